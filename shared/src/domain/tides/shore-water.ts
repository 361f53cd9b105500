import type { Verdict } from '#shared/kernel/result.ts';
import { sunOn } from '#shared/kernel/sun.ts';
import { addDays, addMonths, instantOf, startOfDay } from '#shared/kernel/time.ts';
import type { CalendarDay, ClockTime } from '#shared/kernel/time.ts';
import type { TideCurve, TideExtreme } from './tide-curve.ts';
import { DEFAULT_WINDOW_SETTINGS, workingWindow } from './working-window.ts';
import type { NoWindowReason, WorkingWindow } from './working-window.ts';

/** The settings of a shore by which its days are judged; levels are metres above chart datum. */
export interface ShoreRules {
  readonly zone: string;
  readonly latitude: number;
  readonly longitude: number;
  readonly workingLevelM: number;
  readonly cutOffLevelM: number;
  readonly minutesBeforeLow: number;
  readonly minutesAfterLow: number;
  readonly daylightMarginMinutes: number;
  readonly minimumMinutes: number;
  readonly earliestClock: ClockTime;
  readonly latestClock: ClockTime;
  readonly crewMeetsMinutes: number;
  readonly partyMeetsMinutes: number;
}

/** The working window of a shore on a local day, by the shore's own settings (R7). */
export function windowOn(
  shore: ShoreRules,
  curve: TideCurve,
  on: CalendarDay,
): Verdict<WorkingWindow, NoWindowReason> {
  return workingWindow({
    curve,
    on,
    zone: shore.zone,
    sun: sunOn(on, shore.latitude, shore.longitude, shore.zone),
    workingLevelM: shore.workingLevelM,
    cutOffLevelM: shore.cutOffLevelM,
    planLevelM: null,
    earliest: shore.earliestClock,
    latest: shore.latestClock,
    settings: {
      ...DEFAULT_WINDOW_SETTINGS,
      beforeLowWaterMinutes: shore.minutesBeforeLow,
      afterLowWaterMinutes: shore.minutesAfterLow,
      daylightMarginMinutes: shore.daylightMarginMinutes,
      minimumMinutes: shore.minimumMinutes,
      crewMeetsBeforeMinutes: shore.crewMeetsMinutes,
      partyMeetsBeforeMinutes: shore.partyMeetsMinutes,
    },
  });
}

/** The days with a working window, by the shore's own rules, in the year that begins on a day. */
export function usableDaysInYear(
  shore: ShoreRules,
  curve: TideCurve,
  fromOn: CalendarDay,
): CalendarDay[] {
  const endsBeforeOn = addMonths(fromOn, 12);
  const usable: CalendarDay[] = [];
  for (let on = fromOn; on < endsBeforeOn; on = addDays(on, 1)) {
    if (windowOn(shore, curve, on).isGranted) usable.push(on);
  }
  return usable;
}

/** The high and low waters of a local day. */
export function extremesOn(curve: TideCurve, on: CalendarDay, zone: string): TideExtreme[] {
  return curve.extremes(startOfDay(on, zone), startOfDay(addDays(on, 1), zone));
}

/** The low water of a local day nearest to its noon, by daylight or not; null when it has none. */
export function lowNearestNoon(
  curve: TideCurve,
  on: CalendarDay,
  zone: string,
): TideExtreme | null {
  const noonAt = instantOf(on, '12:00', zone);
  return nearest(extremesOn(curve, on, zone), noonAt);
}

/** The low water between sunrise and sunset nearest to noon; null when all fall in the dark. */
export function daylightLow(
  shore: Pick<ShoreRules, 'zone' | 'latitude' | 'longitude'>,
  curve: TideCurve,
  on: CalendarDay,
): TideExtreme | null {
  const sun = sunOn(on, shore.latitude, shore.longitude, shore.zone);
  const isByDay = ({ at }: TideExtreme): boolean =>
    sun.isUpAllDay ||
    (sun.sunriseAt !== null && sun.sunsetAt !== null && sun.sunriseAt <= at && at <= sun.sunsetAt);
  const noonAt = instantOf(on, '12:00', shore.zone);
  return nearest(extremesOn(curve, on, shore.zone).filter(isByDay), noonAt);
}

function nearest(extremes: readonly TideExtreme[], at: number): TideExtreme | null {
  const byDistance = extremes
    .filter(({ kind }) => kind === 'low')
    .toSorted((a, b) => Math.abs(a.at - at) - Math.abs(b.at - at));
  return byDistance[0] ?? null;
}

/** A day on which the tides are at their largest or smallest for a while. */
export interface TideMark {
  readonly on: CalendarDay;
  readonly kind: 'springs' | 'neaps';
  /** From the lowest low to the highest high of the day. */
  readonly rangeM: number;
}

/** Springs follow springs after 14.8 days, so a crest stands out over 5 days on either side. */
const daysAside = 5;

/**
 * The springs and neaps from one local day to another, both included: days whose range is the
 * largest, or the smallest, within five days on either side; of equals the first.
 */
export function tideMarks(
  curve: TideCurve,
  fromOn: CalendarDay,
  toOn: CalendarDay,
  zone: string,
): TideMark[] {
  const days: { on: CalendarDay; rangeM: number }[] = [];
  for (let on = addDays(fromOn, -daysAside); on <= addDays(toOn, daysAside); on = addDays(on, 1)) {
    const heights = extremesOn(curve, on, zone).map(({ heightM }) => heightM);
    days.push({ on, rangeM: heights.length < 2 ? 0 : Math.max(...heights) - Math.min(...heights) });
  }
  const marks: TideMark[] = [];
  days.forEach(({ on, rangeM }, index) => {
    if (on < fromOn || on > toOn) return;
    const before = days.slice(index - daysAside, index);
    const after = days.slice(index + 1, index + 1 + daysAside);
    const isOver = (mark: number, sign: 1 | -1): boolean =>
      before.every((day) => sign * day.rangeM < sign * mark) &&
      after.every((day) => sign * day.rangeM <= sign * mark);
    if (isOver(rangeM, 1)) marks.push({ on, kind: 'springs', rangeM });
    else if (isOver(rangeM, -1)) marks.push({ on, kind: 'neaps', rangeM });
  });
  return marks;
}
