import { readFileSync } from 'node:fs';
import { beforeAll, describe, expect, it } from 'vitest';
import { tideStations } from '#backend/platform/tides/tide-stations.ts';
import { planDates } from '#shared/domain/seasons/season-plan.ts';
import type { PlanDate } from '#shared/domain/seasons/season-plan.ts';
import { tideCurve } from '#shared/domain/tides/prediction.ts';
import type { ShoreRules } from '#shared/domain/tides/shore-water.ts';
import type { TideCurve } from '#shared/domain/tides/tide-curve.ts';
import { instantOf } from '#shared/kernel/time.ts';
import type { CalendarDay, ClockTime } from '#shared/kernel/time.ts';

const ZONE = 'America/Los_Angeles';
const MINUTE_MS = 60_000;

// NOAA, Seattle 9447130, annual table of 2017: local clock time, centimetres above MLLW.
const table = readFileSync(
  new URL('data/noaa-annual-table-seattle-2017.txt', import.meta.url),
  'utf8',
).replaceAll(/\t+/g, ' ');

const SHORE: ShoreRules = {
  zone: ZONE,
  latitude: 47.6026,
  longitude: -122.3393,
  workingLevelM: 1,
  cutOffLevelM: 2.5,
  minutesBeforeLow: 120,
  minutesAfterLow: 30,
  daylightMarginMinutes: 30,
  minimumMinutes: 90,
  earliestClock: '07:00',
  latestClock: '20:00',
  crewMeetsMinutes: 45,
  partyMeetsMinutes: 20,
};

// The table was made with older constituents than those served: on these days 1 to 2 minutes apart.
const TABLE_MINUTES = 3;
// Heights between table times are reckoned here by half a cosine, as in NOAA's own rule for the
// height at any time (Tide Tables, table 3); the mixed tide of Seattle departs from it.
const COSINE_MINUTES = 15;

describe('a window reckoned by hand from the table of NOAA for Seattle', () => {
  let curve: TideCurve;

  beforeAll(async () => {
    const station = await tideStations().find('noaa/9447130');
    if (!station.isGranted) throw new Error(JSON.stringify(station.reasons));
    const verdict = tideCurve(station.value);
    if (!verdict.isGranted) throw new Error(JSON.stringify(verdict.reasons));
    curve = verdict.value;
  });

  it('is whole on 23 June: two hours before the low water to half an hour after', () => {
    expectInTable('2017/06/23 Fri 10:52 AM -3.2 -98 L');
    const date = taken('2017-06-23', {});
    // 10:52 - 2:00 = 08:52; 10:52 + 0:30 = 11:22; 11:22 - 08:52 = 2:30.
    expectAbout(date.window.startsAt, '2017-06-23', '08:52', TABLE_MINUTES);
    expectAbout(date.window.lowerShoreClearBy, '2017-06-23', '10:52', TABLE_MINUTES);
    expectAbout(date.window.offTheShoreBy, '2017-06-23', '11:22', TABLE_MINUTES);
    // 08:52 - 0:45 = 08:07.
    expectAbout(date.window.crewMeetsAt, '2017-06-23', '08:07', TABLE_MINUTES);
    expect(date.window.lowWaterHeightM).toBeCloseTo(-0.98, 1);
    expect(date).toMatchObject({ leftMinutes: 150, cuts: [], byHand: false });
  });

  it('is cut at the earliest hour on 21 June', () => {
    expectInTable('2017/06/21 Wed 09:20 AM -1.2 -37 L');
    const date = taken('2017-06-21', { earliestClock: '08:00' });
    // 09:20 - 2:00 = 07:20, before 08:00; 09:20 + 0:30 = 09:50; 09:50 - 08:00 = 1:50.
    expectAbout(date.window.startsAt, '2017-06-21', '08:00', 0);
    expectAbout(date.window.offTheShoreBy, '2017-06-21', '09:50', TABLE_MINUTES);
    expect(Math.abs(date.leftMinutes - 110)).toBeLessThanOrEqual(TABLE_MINUTES);
    expect(date.cuts.map(({ edge, by }) => [edge, by])).toEqual([['start', 'hours']]);
  });

  it('is cut at the working level on 5 August', () => {
    expectInTable('2017/08/05 Sat 03:21 AM 9.7 296 H\n2017/08/05 Sat 10:16 AM -0.5 -15 L');
    const date = taken('2017-08-05', { workingLevelM: 0.3 });
    // From 2.96 m at 03:21 to -0.15 m at 10:16 the water falls 3.11 m in 415 min. 0.30 m is 0.45 m
    // above the low: (3.11 / 2) (1 - cos a) = 0.45, a = 44.7 degrees, 415 x 44.7 / 180 = 103 min.
    // 10:16 - 1:43 = 08:33.
    expectAbout(date.window.startsAt, '2017-08-05', '08:33', COSINE_MINUTES);
    // 0.30 m is passed again well after 10:46.
    expectAbout(date.window.offTheShoreBy, '2017-08-05', '10:46', TABLE_MINUTES);
    expect(date.cuts.map(({ edge, by }) => [edge, by])).toEqual([['start', 'working-level']]);
  });

  it('is cut before the way off goes under on 7 August', () => {
    expectInTable('2017/08/07 Mon 11:28 AM -1.0 -30 L\n2017/08/07 Mon 06:41 PM 11.2 341 H');
    const date = taken('2017-08-07', {
      workingLevelM: 1.2,
      cutOffLevelM: 0.9,
      minutesAfterLow: 180,
    });
    // With 0.3 m for surge, 0.9 m is reached at 0.6 m, which is 0.90 m above the low. From -0.30 m at
    // 11:28 to 3.41 m at 18:41 it rises 3.71 m in 433 min: (3.71 / 2) (1 - cos a) = 0.90, a = 59.0
    // degrees, 433 x 59.0 / 180 = 142 min: 13:50. Less 20 min: 13:30.
    expectAbout(date.window.offTheShoreBy, '2017-08-07', '13:30', COSINE_MINUTES);
    expect(date.window.offTheShoreBy).toBeLessThan(date.window.endsAt);
    expect(date.cuts.at(-1)).toMatchObject({ edge: 'off-the-shore', by: 'cut-off-level' });
  });

  it('is none on New Year’s Day: one low water by night, the other too high', () => {
    expectInTable('2017/01/01 Sun 12:16 AM -1.2 -37 L');
    expectInTable('2017/01/01 Sun 01:17 PM 6.7 204 L');
    const date = dateOn('2017-01-01', {});
    expect(date.state === 'skipped' ? date.reasons.map(({ why }) => why) : date).toEqual([
      'dark',
      'out-of-hours',
      'too-high',
    ]);
  });

  function dateOn(on: CalendarDay, change: Partial<ShoreRules>): PlanDate {
    const dates = planDates(
      {
        pattern: { kind: 'weekly', everyWeeks: 1, weekdays: [1, 2, 3, 4, 5, 6, 7] },
        fromOn: on,
        toOn: on,
        windowRules: {
          planLevelM: null,
          earliestClock: null,
          latestClock: null,
          minutesBeforeLow: null,
          minutesAfterLow: null,
          daylightMarginMinutes: null,
          minimumMinutes: null,
        },
        exceptions: [],
        closures: [],
      },
      { ...SHORE, ...change },
      curve,
    );
    if (!dates.isGranted) throw new Error(JSON.stringify(dates.reasons));
    const [date, ...more] = dates.value;
    if (date === undefined || more.length > 0) throw new Error('Not one date');
    return date;
  }

  function taken(on: CalendarDay, change: Partial<ShoreRules>) {
    const date = dateOn(on, change);
    if (date.state !== 'taken') throw new Error(JSON.stringify(date.reasons));
    return date;
  }
});

function expectInTable(lines: string): void {
  expect(table).toContain(lines);
}

function expectAbout(at: number, on: CalendarDay, clock: ClockTime, withinMinutes: number): void {
  const minutes = Math.abs(at - instantOf(on, clock, ZONE)) / MINUTE_MS;
  expect(minutes, `${on} ${clock}`).toBeLessThanOrEqual(withinMinutes);
}
