import { describe, expect, it } from 'vitest';
import { sunOn } from '#shared/kernel/sun.ts';
import { instantOf } from '#shared/kernel/time.ts';
import type { CalendarDay, ClockTime, Instant } from '#shared/kernel/time.ts';

// Every value here is from the U.S. Naval Observatory, Astronomical Applications Department
// (aa.usno.navy.mil, rise and set tables; public domain), which prints to the nearest minute.

interface Place {
  readonly latitude: number;
  readonly longitude: number;
  readonly zone: string;
}

function secondsOff(at: Instant | null, day: CalendarDay, clock: ClockTime, zone: string): number {
  if (at === null) throw new Error(`The sun does not cross the horizon on ${day}`);
  return Math.abs(at - instantOf(day, clock, zone)) / 1000;
}

function expectSun(place: Place, day: CalendarDay, rise: ClockTime, set: ClockTime): void {
  const { latitude, longitude, zone } = place;
  const { sunriseAt, sunsetAt, isUpAllDay } = sunOn(day, latitude, longitude, zone);
  expect(secondsOff(sunriseAt, day, rise, zone)).toBeLessThanOrEqual(60);
  expect(secondsOff(sunsetAt, day, set, zone)).toBeLessThanOrEqual(60);
  expect(isUpAllDay).toBe(false);
}

describe('sunset on the Santa Barbara coast, over the change of the clocks', () => {
  it.each<[CalendarDay, ClockTime]>([
    ['2026-10-08', '18:34'],
    ['2026-10-31', '18:07'],
    ['2026-11-01', '17:06'],
  ])('on %s is at %s', (day, clock) => {
    const zone = 'America/Los_Angeles';
    const { sunsetAt } = sunOn(day, 34.4046, -119.844, zone);
    expect(secondsOff(sunsetAt, day, clock, zone)).toBeLessThanOrEqual(60);
  });
});

describe('60 N 0 E, the table for 2019 in Universal Time', () => {
  it.each<[CalendarDay, ClockTime, ClockTime]>([
    ['2019-01-01', '09:02', '15:05'],
    ['2019-02-15', '07:39', '16:50'],
    ['2019-03-20', '06:03', '18:14'],
    ['2019-04-15', '04:45', '19:17'],
    ['2019-05-09', '03:38', '20:17'],
    ['2019-06-21', '02:36', '21:28'],
    ['2019-07-15', '03:03', '21:08'],
    ['2019-08-31', '04:52', '19:08'],
    ['2019-09-23', '05:46', '17:58'],
    ['2019-10-27', '07:08', '16:18'],
    ['2019-11-15', '07:57', '15:31'],
    ['2019-12-31', '09:03', '15:03'],
  ])('on %s from %s to %s', (day, rise, set) => {
    expectSun({ latitude: 60, longitude: 0, zone: 'UTC' }, day, rise, set);
  });
});

describe('60 S 150 W, the table for 2019, ten hours behind Universal Time', () => {
  // The table gives the sunset of the local day under the next day of Universal Time.
  it.each<[CalendarDay, ClockTime, ClockTime]>([
    ['2019-01-01', '02:43', '21:23'],
    ['2019-03-20', '06:00', '18:13'],
    ['2019-06-21', '09:06', '14:58'],
    ['2019-09-22', '05:48', '17:59'],
    ['2019-12-21', '02:32', '21:24'],
  ])('on %s from %s to %s', (day, rise, set) => {
    expectSun({ latitude: -60, longitude: -150, zone: 'Etc/GMT+10' }, day, rise, set);
  });
});

describe('80 N 0 E, the table for 2019 in Universal Time', () => {
  const place = { latitude: 80, longitude: 0, zone: 'UTC' };

  it.each<[CalendarDay, ClockTime, ClockTime]>([
    ['2019-02-21', '11:20', '13:10'],
    ['2019-03-15', '06:41', '17:42'],
    ['2019-04-12', '01:25', '23:02'],
    ['2019-08-31', '01:03', '22:34'],
    ['2019-09-30', '06:33', '17:04'],
    ['2019-10-21', '11:03', '12:23'],
  ])('on %s from %s to %s', (day, rise, set) => {
    expectSun(place, day, rise, set);
  });

  it.each<[CalendarDay]>([['2019-04-14'], ['2019-06-21'], ['2019-08-29']])(
    'on %s it is up all day',
    (day) => {
      const sun = sunOn(day, place.latitude, place.longitude, place.zone);
      expect(sun).toEqual({ sunriseAt: null, sunsetAt: null, isUpAllDay: true });
    },
  );

  it.each<[CalendarDay]>([['2019-01-01'], ['2019-02-20'], ['2019-10-22'], ['2019-12-21']])(
    'on %s it never comes up',
    (day) => {
      const sun = sunOn(day, place.latitude, place.longitude, place.zone);
      expect(sun).toEqual({ sunriseAt: null, sunsetAt: null, isUpAllDay: false });
    },
  );
});
