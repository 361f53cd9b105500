import { useId } from 'react';
import type { ClockTime, Instant } from '#shared/kernel/time.ts';
import { clockAt, dayAt, instantOf } from '#shared/kernel/time.ts';
import { metres } from '#frontend/words/tide-words.ts';
import type { HeroFacts, HeroLayout } from './hero-layout.ts';
import { xOf, yOf } from './water-curve.ts';

const STEP_M = 2;
const HOUR_MS = 3_600_000;
/** Under this width the words of two hours would touch. */
const LEAST_APART_PX = 60;

/** What the axes are drawn from: of a session's day, or of one without a session. */
export type AxisFacts = Pick<HeroFacts, 'axis' | 'zone' | 'dayFromAt' | 'sunriseAt' | 'sunsetAt'>;
export type AxisLayout = Pick<HeroLayout, 'plot' | 'heightPx' | 'isNarrow'>;

/** Behind the water: the night, the heights and the hours. */
export function HeroAxes({ facts, layout }: { facts: AxisFacts; layout: AxisLayout }) {
  const { plot, isNarrow } = layout;
  const nightId = useId();
  const topPx = plot.topPx - 4;
  const floorPx = plot.basePx + 4;
  return (
    <>
      <defs>
        <pattern
          id={nightId}
          width="6"
          height="6"
          patternUnits="userSpaceOnUse"
          patternTransform="rotate(45)"
        >
          <rect className="fill-hair" width="1.2" height="6" />
        </pattern>
      </defs>
      {!isNarrow &&
        heights(facts).map((heightM, index, all) => (
          <g key={heightM}>
            <path className="stroke-hair" d={`M0 ${yOf(plot, heightM)}H${plot.widthPx}`} />
            <text
              className="fill-barnacle text-xs tabular-nums"
              x="-8"
              y={yOf(plot, heightM) + 4.5}
              textAnchor="end"
            >
              {index === all.length - 1 ? `${heightM} m` : metres(heightM).replace('.0', '')}
            </text>
          </g>
        ))}
      {nights(facts, layout).map(([fromPx, untilPx]) => (
        <rect
          key={fromPx}
          fill={`url(#${nightId})`}
          x={fromPx}
          y={topPx}
          width={untilPx - fromPx}
          height={floorPx - topPx}
        />
      ))}
      {hours(facts, layout).map((at) => (
        <g key={at}>
          <path className="stroke-edge" strokeWidth="1.25" d={`M${xOf(plot, at)} ${floorPx}v5`} />
          <text
            className="fill-barnacle text-xs tabular-nums"
            x={xOf(plot, at)}
            y={layout.heightPx - 4}
            textAnchor="middle"
          >
            {clockAt(at, facts.zone)}
          </text>
        </g>
      ))}
    </>
  );
}

function heights(facts: AxisFacts): number[] {
  const first = Math.ceil(facts.axis.bottomM / STEP_M) * STEP_M;
  const count = Math.max(0, Math.floor((facts.axis.topM - first) / STEP_M) + 1);
  return Array.from({ length: count }, (_, step) => first + step * STEP_M);
}

/** The spans of the drawing without daylight, in pixels. */
function nights(facts: AxisFacts, { plot }: AxisLayout): (readonly [number, number])[] {
  const { sunriseAt, sunsetAt } = facts;
  const spans: (readonly [Instant, Instant])[] = [];
  if (sunriseAt !== null) spans.push([plot.fromAt, Math.min(sunriseAt, plot.untilAt)]);
  if (sunsetAt !== null) spans.push([Math.max(sunsetAt, plot.fromAt), plot.untilAt]);
  return spans
    .filter(([fromAt, untilAt]) => untilAt > fromAt)
    .map(([fromAt, untilAt]) => [xOf(plot, fromAt), xOf(plot, untilAt)]);
}

/** The full hours to be named: every third where there is room, else every second or sixth. */
function hours(facts: AxisFacts, { plot, isNarrow }: AxisLayout): Instant[] {
  const day = dayAt(facts.dayFromAt, facts.zone);
  const hourPx = (plot.widthPx * HOUR_MS) / (plot.untilAt - plot.fromAt);
  const everyOnNarrow = hourPx * 2 < LEAST_APART_PX ? 6 : 2;
  const every = isNarrow ? everyOnNarrow : 3;
  const clocks = Array.from({ length: 24 / every }, (_, step) => step * every);
  return clocks
    .map((hour) => instantOf(day, `${String(hour).padStart(2, '0')}:00` as ClockTime, facts.zone))
    .filter((at) => xOf(plot, at) >= 18 && xOf(plot, at) <= plot.widthPx - 18);
}
