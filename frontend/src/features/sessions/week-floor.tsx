import {
  cutCurve,
  heightAt,
  linePath,
  sandPath,
  waterPath,
  xOf,
  yOf,
} from '#frontend/components/water-curve.ts';
import { fromIso } from '#shared/kernel/time.ts';
import type { DayFacts, DayScale } from './month-days.ts';
import { positionOf } from './month-days.ts';

const WEEK_DAYS = 7;
const DAY_UNITS = 100;
const FLOOR_UNITS = 42;
const TOP_UNITS = 3;
const BASE_UNITS = 40;
const FALLEN_DAYS = 0.12;

/** How high over the foot of a week the water stands, as a share of the floor's height. */
export function floorShare(shareOfAxis: number): number {
  return (FLOOR_UNITS - BASE_UNITS + shareOfAxis * (BASE_UNITS - TOP_UNITS)) / FLOOR_UNITS;
}

/**
 * The floor of one week: the water as one unbroken line over seven cells, the working windows in
 * sand, and the posts of sessions that are stood down. No words in it, so it may be stretched.
 */
export function WeekFloor(props: {
  readonly scale: DayScale;
  /** Days from the start of the scale to this week's Monday. */
  readonly mondayAt: number;
  readonly days: readonly DayFacts[];
}) {
  const { scale, mondayAt, days } = props;
  if (scale.axis === null || cutCurve(scale.curve, mondayAt, mondayAt + WEEK_DAYS).length < 2) {
    return null;
  }
  const plot = {
    fromAt: mondayAt,
    untilAt: mondayAt + WEEK_DAYS,
    widthPx: WEEK_DAYS * DAY_UNITS,
    topPx: TOP_UNITS,
    basePx: BASE_UNITS,
    axis: scale.axis,
  };
  const sessions = days.flatMap((day) => day.sessions);
  const windows = sessions.filter(({ state }) => state !== 'stood-down');
  const fallen = sessions.filter(({ state }) => state === 'stood-down');
  return (
    <svg
      className="pointer-events-none absolute bottom-0 left-0 h-floor w-[calc(700%+6px)] max-w-none"
      viewBox={`0 0 ${WEEK_DAYS * DAY_UNITS} ${FLOOR_UNITS}`}
      preserveAspectRatio="none"
      data-week-floor
    >
      <path className="fill-shallow" d={waterPath(plot, scale.curve, FLOOR_UNITS)} />
      {windows.map(({ id, startsAt, offTheShoreBy, endsAt }) => {
        const openAt = positionOf(scale, fromIso(startsAt));
        const shutAt = positionOf(scale, fromIso(offTheShoreBy ?? endsAt));
        const edgeM = heightAt(scale.curve, openAt);
        return (
          <g key={id}>
            <path className="fill-sand" d={sandPath(plot, scale.curve, openAt, shutAt, 0)} />
            {edgeM !== null && (
              <path
                className="stroke-sand-edge"
                strokeWidth="1"
                vectorEffect="non-scaling-stroke"
                d={`M${xOf(plot, openAt)} 0V${yOf(plot, edgeM)}`}
              />
            )}
          </g>
        );
      })}
      <path
        className="fill-none stroke-deep"
        strokeWidth="1.75"
        strokeLinejoin="round"
        vectorEffect="non-scaling-stroke"
        d={linePath(plot, scale.curve)}
      />
      {fallen.map(({ id, lowWaterAt, startsAt }) => {
        const at = positionOf(scale, fromIso(lowWaterAt ?? startsAt));
        const heightM = heightAt(scale.curve, at);
        if (heightM === null) return null;
        return (
          <path
            key={id}
            className="stroke-barnacle"
            strokeWidth="2"
            vectorEffect="non-scaling-stroke"
            d={`M${xOf(plot, at - FALLEN_DAYS)} ${yOf(plot, heightM) - 0.5}L${xOf(plot, at + FALLEN_DAYS)} ${yOf(plot, heightM) - 3}`}
          />
        );
      })}
    </svg>
  );
}
