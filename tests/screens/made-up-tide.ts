import type { CalendarDay, Instant } from '#shared/kernel/time.ts';
import { addDays, fromIso, startOfDay } from '#shared/kernel/time.ts';

const HOUR_MS = 3_600_000;
const MINUTE_MS = 60_000;
const SPRING_LOW_AT = fromIso('2027-05-08T08:28:00Z');
const MEAN_M = 3.05;
/** Amplitude in metres and speed in degrees an hour: a moon's tide and a sun's, and no real place. */
const MOON = { amplitudeM: 1.72, degreesAnHour: 28.9841 };
const SUN = { amplitudeM: 0.62, degreesAnHour: 30 };

export interface MadeUpLow {
  readonly at: Instant;
  readonly heightM: number;
}

/** The height of an invented tide, lowest on 8 May 2027 at 09:28 in London. */
export function madeUpHeightM(at: Instant): number {
  const hours = (at - SPRING_LOW_AT) / HOUR_MS;
  return [MOON, SUN].reduce(
    (sum, { amplitudeM, degreesAnHour }) =>
      sum - amplitudeM * Math.cos((degreesAnHour * hours * Math.PI) / 180),
    MEAN_M,
  );
}

/** Points of the invented tide, both ends included. */
export function madeUpCurve(fromAt: Instant, untilAt: Instant, everyMinutes: number) {
  const count = Math.round((untilAt - fromAt) / (everyMinutes * MINUTE_MS));
  return Array.from({ length: count + 1 }, (_, index) => {
    const at = fromAt + index * everyMinutes * MINUTE_MS;
    return { at, heightM: Math.round(madeUpHeightM(at) * 1000) / 1000 };
  });
}

/** The low waters of a day, to the minute. */
export function madeUpLows(day: CalendarDay, zone: string): MadeUpLow[] {
  const fromAt = startOfDay(day, zone);
  const untilAt = startOfDay(addDays(day, 1), zone);
  const lows: MadeUpLow[] = [];
  for (let at = fromAt; at < untilAt; at += MINUTE_MS) {
    const heightM = madeUpHeightM(at);
    if (heightM <= madeUpHeightM(at - MINUTE_MS) && heightM < madeUpHeightM(at + MINUTE_MS)) {
      lows.push({ at, heightM: Math.round(heightM * 100) / 100 });
    }
  }
  return lows;
}

/** The low water of a day nearest to noon. */
export function madeUpNoonLow(day: CalendarDay, zone: string): MadeUpLow {
  const noonAt = startOfDay(day, zone) + 12 * HOUR_MS;
  const [nearest] = madeUpLows(day, zone).sort(
    (a, b) => Math.abs(a.at - noonAt) - Math.abs(b.at - noonAt),
  );
  if (nearest === undefined) throw new RangeError(`No low water on ${day}`);
  return nearest;
}
