import { getTimes } from 'suncalc';
import { instantOf } from './time.ts';
import type { CalendarDay, Instant } from './time.ts';

/** The daylight of one local day. Both instants are given, or neither is. */
export interface SunDay {
  /** The upper edge of the sun comes over a level horizon; null when it does not on that day. */
  readonly sunriseAt: Instant | null;
  /**
   * The upper edge goes under, on the same stretch of daylight: always later than sunriseAt. Just
   * before the midnight sun begins, and after it ends, that can be past the local midnight.
   */
  readonly sunsetAt: Instant | null;
  /** Never under the horizon. False with both instants null: it never comes up. */
  readonly isUpAllDay: boolean;
}

/**
 * Sunrise and sunset of the stretch of daylight whose middle, the sun's highest point, is the one
 * nearest to clock noon of that day in the zone. The two belong together, however far the zone's
 * clocks stand from the sun: a sunset left over from the evening before is never given.
 *
 * Latitude in degrees north (-90 to 90), longitude in degrees east (-180 to 180); a RangeError for
 * anything else. For a sea-level horizon with the usual refraction (the sun's centre 0.833 degrees
 * below): hills and cliffs make daylight shorter. Within a minute of the tables of the US Naval
 * Observatory, which print whole minutes, except on days on which the sun only grazes the horizon.
 */
export function sunOn(day: CalendarDay, latitude: number, longitude: number, zone: string): SunDay {
  if (!(Math.abs(latitude) <= 90)) throw new RangeError(`Not a latitude: ${latitude}`);
  if (!(Math.abs(longitude) <= 180)) throw new RangeError(`Not a longitude: ${longitude}`);
  // Of all days, getTimes gives the one whose highest sun is nearest to the instant handed to it.
  const times = getTimes(new Date(instantOf(day, '12:00', zone)), latitude, longitude);
  const isUpAllDay = times.alwaysUp === true;
  return times.sunrise === null || times.sunset === null
    ? { sunriseAt: null, sunsetAt: null, isUpAllDay }
    : { sunriseAt: times.sunrise.getTime(), sunsetAt: times.sunset.getTime(), isUpAllDay };
}
