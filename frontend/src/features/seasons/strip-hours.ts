import type { CalendarDay, ClockTime, Instant } from '#shared/kernel/time.ts';
import { instantOf } from '#shared/kernel/time.ts';

/** The hours that every strip of a plan shows, and the limits that are dashed down them. */
export interface StripHours {
  readonly fromClock: ClockTime;
  readonly untilClock: ClockTime;
  readonly earliestClock: ClockTime;
  readonly latestClock: ClockTime;
}

const USUAL: Pick<StripHours, 'fromClock' | 'untilClock'> = {
  fromClock: '04:30',
  untilClock: '21:30',
};
const HOUR_STEP = 3;

/** From 04:30 to 21:30, or wider where a plan has longer hours. */
export function stripHours(earliestClock: ClockTime, latestClock: ClockTime): StripHours {
  return {
    fromClock: earliestClock < USUAL.fromClock ? earliestClock : USUAL.fromClock,
    untilClock: latestClock > USUAL.untilClock ? latestClock : USUAL.untilClock,
    earliestClock,
    latestClock,
  };
}

/** Where a time stands across a strip: 0 at its left edge, 1 at its right. */
export function shareOf(hours: StripHours, clock: ClockTime): number {
  const from = minutesOf(hours.fromClock);
  return (minutesOf(clock) - from) / (minutesOf(hours.untilClock) - from);
}

/** Every third hour that stands clear of the strip's ends. */
export function hoursToName(hours: StripHours): ClockTime[] {
  return Array.from({ length: 24 / HOUR_STEP }, (_, index): ClockTime => {
    const hour = String(index * HOUR_STEP).padStart(2, '0') as `${number}`;
    return `${hour}:00`;
  }).filter((clock) => shareOf(hours, clock) > 0.05 && shareOf(hours, clock) < 0.95);
}

/** The moments of a strip on one day at the shore. */
export function stripMoments(
  hours: StripHours,
  on: CalendarDay,
  zone: string,
): { readonly fromAt: Instant; readonly untilAt: Instant; readonly limits: readonly Instant[] } {
  return {
    fromAt: instantOf(on, hours.fromClock, zone),
    untilAt: instantOf(on, hours.untilClock, zone),
    limits: [instantOf(on, hours.earliestClock, zone), instantOf(on, hours.latestClock, zone)],
  };
}

function minutesOf(clock: ClockTime): number {
  const [hours = 0, minutes = 0] = clock.split(':').map(Number);
  return hours * 60 + minutes;
}
