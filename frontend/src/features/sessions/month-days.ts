import type { WaterPoint } from '#frontend/components/water-curve.ts';
import { heightAt, readCurve } from '#frontend/components/water-curve.ts';
import { counted } from '#frontend/words/number-words.ts';
import { clockOfWater, metres } from '#frontend/words/tide-words.ts';
import type { CalendarSession, CalendarView } from '#shared/contracts/sessions.ts';
import type { CalendarDay, Instant } from '#shared/kernel/time.ts';
import { addDays, daysBetween, formatDay, fromIso, startOfDay } from '#shared/kernel/time.ts';

type HomeShore = NonNullable<CalendarView['homeShore']>;
type HomeDay = HomeShore['days'][number];
export type TideMark = HomeShore['tideMarks'][number];

/**
 * The water of a calendar on a scale of local days: 2.5 is the middle of the third day, whether
 * that day has 23, 24 or 25 hours. So a curve runs on over a change of the clocks.
 */
export interface DayScale {
  readonly from: CalendarDay;
  readonly to: CalendarDay;
  readonly zone: string;
  /** The water, its moments in days from the first midnight. */
  readonly curve: readonly WaterPoint[];
  readonly axis: HomeShore['axis'] | null;
}

/** A moment in days from the first midnight of a scale. */
export function positionOf(scale: Pick<DayScale, 'from' | 'to' | 'zone'>, at: Instant): number {
  const count = daysBetween(scale.from, scale.to) + 1;
  for (let index = 0; index < count; index += 1) {
    const startsAt = startOfDay(addDays(scale.from, index), scale.zone);
    const endsAt = startOfDay(addDays(scale.from, index + 1), scale.zone);
    if (at < endsAt || index === count - 1) return index + (at - startsAt) / (endsAt - startsAt);
  }
  throw new RangeError('A scale of days has at least one day');
}

/** The home shore's water on a scale of days, from and to included. */
export function dayScale(view: CalendarView, from: CalendarDay, to: CalendarDay): DayScale {
  const { zone, homeShore } = view;
  const midnights = Array.from({ length: daysBetween(from, to) + 2 }, (_, index) =>
    startOfDay(addDays(from, index), zone),
  );
  const curve: WaterPoint[] = [];
  let index = 0;
  for (const { at, heightM } of readCurve(homeShore?.curve ?? [])) {
    while (index < midnights.length - 2 && at >= (midnights[index + 1] ?? Infinity)) index += 1;
    const startsAt = midnights[index] ?? at;
    const endsAt = midnights[index + 1] ?? at + 1;
    curve.push({ at: index + (at - startsAt) / (endsAt - startsAt), heightM });
  }
  return { from, to, zone, curve, axis: homeShore?.axis ?? null };
}

/** The share of its axis, 0 at the bottom to 1, at which the water stands at a place of a scale. */
export function waterShare(scale: DayScale, position: number): number {
  const heightM = heightAt(scale.curve, position);
  if (heightM === null || scale.axis === null) return 0;
  const { bottomM, topM } = scale.axis;
  return Math.min(1, Math.max(0, (heightM - bottomM) / (topM - bottomM)));
}

/** What the month and the strand list show of one day. */
export interface DayFacts {
  readonly on: CalendarDay;
  readonly home: HomeDay | null;
  readonly mark: TideMark | null;
  readonly sessions: readonly CalendarSession[];
}

/** Every day from one to another with its low water, its springs or neaps, and its sessions. */
export function daysOf(
  view: CalendarView,
  sessions: readonly CalendarSession[],
  from: CalendarDay,
  to: CalendarDay,
): DayFacts[] {
  return Array.from({ length: daysBetween(from, to) + 1 }, (_, index) => {
    const on = addDays(from, index);
    return {
      on,
      home: view.homeShore?.days.find((day) => day.on === on) ?? null,
      mark: view.homeShore?.tideMarks.find((mark) => mark.on === on) ?? null,
      sessions: sessions
        .filter(({ dayOn }) => dayOn === on)
        .sort((a, b) => fromIso(a.startsAt) - fromIso(b.startsAt)),
    };
  });
}

/** A day aloud: 'Sunday 9 May, low water 10:22, 0.6 metres, one session'. */
export function dayInWords(day: DayFacts, zone: string): string {
  return [
    formatDay(day.on, 'long'),
    ...(day.home === null ? [] : [lowWaterInWords(day.home, zone)]),
    ...(day.mark === null ? [] : [`${day.mark.kind}, range ${metres(day.mark.rangeM)} metres`]),
    counted(day.sessions.length, 'session'),
  ].join(', ');
}

function lowWaterInWords({ daylightLow }: HomeDay, zone: string): string {
  if (daylightLow === null) return 'no low water in daylight';
  return `low water ${clockOfWater(fromIso(daylightLow.at), zone)}, ${metres(daylightLow.heightM)} metres`;
}
