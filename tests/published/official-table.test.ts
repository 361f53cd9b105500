import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { tideStations } from '#backend/platform/tides/tide-stations.ts';
import { datesRoundClockChanges } from '#shared/domain/tides/official-table-clock-changes.ts';
import { compareWithPrediction } from '#shared/domain/tides/official-table-comparison.ts';
import { curveByTable } from '#shared/domain/tides/official-table-curve.ts';
import type { OfficialTable } from '#shared/domain/tides/official-table-reading.ts';
import { readOfficialTable } from '#shared/domain/tides/official-table.ts';
import { tideCurve } from '#shared/domain/tides/prediction.ts';
import { windowOn } from '#shared/domain/tides/shore-water.ts';
import type { ShoreRules } from '#shared/domain/tides/shore-water.ts';
import type { TideCurve } from '#shared/domain/tides/tide-curve.ts';
import { addDays, fromIso, instantOf, toIso } from '#shared/kernel/time.ts';
import type { CalendarDay } from '#shared/kernel/time.ts';

const MINUTE_MS = 60_000;
const PACIFIC = 'America/Los_Angeles';

// NOAA, annual tide prediction for Seattle (9447130), 2017, as published; see data/SOURCES.md.
const file = readFileSync(
  new URL('data/noaa-annual-table-seattle-2017.txt', import.meta.url),
  'utf8',
);

describe('the annual table of NOAA for Seattle, 2017, uploaded as it is', () => {
  const table = tableIn(PACIFIC);

  it('gives all 1,411 events, and no line is in doubt', () => {
    expect(table.events).toHaveLength(1411);
    expect(table.problems).toEqual([]);
  });

  it('is recognised: 12 hour clock, centimetres beside feet, its own words for the zone', () => {
    expect([table.clock, table.units]).toEqual([12, 'cm']);
    expect(table.layout).toMatchObject({
      unitsFrom: 'two-columns',
      dateOrder: 'year-first',
      zoneSaid: 'LST/LDT',
    });
    expect(table.layout.words).toContain('date, time, height in ft and cm');
  });

  it('begins with the four events of New Year’s Day', () => {
    const day = table.events.slice(0, 4).map(({ at, kind, heightM }) => [toIso(at), kind, heightM]);
    expect(day).toEqual([
      ['2017-01-01T08:16:00.000Z', 'low', -0.37],
      ['2017-01-01T15:31:00.000Z', 'high', 3.78],
      ['2017-01-01T21:17:00.000Z', 'low', 2.04],
      ['2017-01-02T02:05:00.000Z', 'high', 2.99],
    ]);
  });

  it('counts its hours from UTC by standard time before 12 March and by summer time after', () => {
    expect(at('2017-03-12T06:17Z')).toBe('low'); // 11 March, 10:17 PM PST
    expect(at('2017-03-12T13:04Z')).toBe('high'); // 12 March, 06:04 AM PDT
    expect(at('2017-11-05T06:53Z')).toBe('low'); // 4 November, 11:53 PM PDT
    expect(at('2017-11-05T13:43Z')).toBe('high'); // 5 November, 05:43 AM PST
    function at(iso: string): string | undefined {
      return table.events.find((event) => event.at === fromIso(iso))?.kind;
    }
  });

  it('shows the days round both changes as they stand on the page', () => {
    const changes = datesRoundClockChanges(table.events, { table: PACIFIC, shore: PACIFIC }, 2017);
    expect(changes.map(({ on, forwardMinutes }) => [on, forwardMinutes])).toEqual([
      ['2017-03-12', 60],
      ['2017-11-05', -60],
    ]);
    const printed = changes[0]?.days.map(({ on, events }) => [
      on,
      ...events.map((held) => held.printed.clock),
    ]);
    expect(printed).toEqual([
      ['2017-03-11', '04:36', '10:28', '15:55', '22:17'],
      ['2017-03-12', '06:04', '12:04', '17:43', '23:57'],
      ['2017-03-13', '06:30', '12:39', '18:29'],
    ]);
  });

  it('agrees with the prediction: times by 3 minutes at the median, 12 at the worst', async () => {
    const compared = compareWithPrediction(table.events, await seattle());
    console.info(
      `Seattle table against prediction: ${compared.medianMinutes?.toFixed(2) ?? '-'} min (median), ` +
        `${compared.worstMinutes?.toFixed(2) ?? '-'} min (worst); ` +
        `${((compared.medianM ?? NaN) * 100).toFixed(2)} cm, ${((compared.worstM ?? NaN) * 100).toFixed(2)} cm`,
    );
    expect(compared.verdict).toBe('agrees');
    expect(compared.pairs).toHaveLength(1411);
    expect([compared.missing, compared.extra]).toEqual([[], []]);
    expect(compared.medianMinutes).toBeLessThan(3);
    expect(compared.worstMinutes).toBeLessThan(12);
  });

  it.each([
    // Its local clock taken for one zone all year: an hour off while it is summer time.
    ['Pacific standard time', -480, 60],
    // Eight hours off in winter, seven in the longer summer.
    ['Greenwich time', 0, -420],
  ])('is known for a mistake of the zone when read in %s', async (_, zone, minutes) => {
    const compared = compareWithPrediction(tableIn(zone).events, await seattle());
    expect([compared.verdict, compared.constantMinutes]).toEqual(['zone-mistake', minutes]);
    const { fromAt = 0, toAt = 0 } = compared.constantWithin ?? {};
    expect(toIso(fromAt)).toMatch(/^2017-03-12/);
    expect(toIso(toAt)).toMatch(/^2017-11-0[45]/);
  });

  it('bends the curve so that its highs and lows are exactly the table’s', async () => {
    const bent = curveByTable(await seattle(), table.events);
    const fromAt = table.events[0]?.at ?? 0;
    const toAt = (table.events.at(-1)?.at ?? 0) + 1;
    expect(bent.extremes(fromAt, toAt)).toEqual(
      table.events.map(({ at: eventAt, kind, heightM }) => ({ at: eventAt, kind, heightM })),
    );
    const offM = table.events.map((event) => Math.abs(bent.heightAtM(event.at) - event.heightM));
    expect(Math.max(...offM)).toBeLessThan(1e-9);
  });
});

describe('windows by a table', () => {
  it('of the prediction’s own highs and lows, rounded as tables are, are its own within 3 minutes over a year', async () => {
    const curve = await seattle();
    const fromAt = instantOf('2027-01-01', '00:00', PACIFIC);
    const toAt = instantOf('2028-01-01', '00:00', PACIFIC);
    const events = curve.extremes(fromAt, toAt).map(({ at, kind, heightM }) => ({
      at: Math.round(at / MINUTE_MS) * MINUTE_MS,
      kind,
      heightM: Math.round(heightM * 100) / 100,
    }));
    const { days, minutes, onlyOne } = windowsApart(curve, curveByTable(curve, events), 2027);
    console.info(
      `by a rounded table: ${days} days, ${said(minutes)}; by one only: ${onlyOne.length}`,
    );
    expect(days).toBeGreaterThan(60);
    expect(minutes.at(-1)).toBeLessThanOrEqual(3);
    expect(onlyOne).toEqual([]);
  });

  it('of NOAA for Seattle, 2017, are those of the prediction within 3 minutes at the median, 12 at the worst', async () => {
    const curve = await seattle();
    const bent = curveByTable(curve, tableIn(PACIFIC).events);
    const { days, minutes, onlyOne } = windowsApart(curve, bent, 2017);
    console.info(
      `by the table of Seattle: ${days} days, ${said(minutes)}; by one only: ${onlyOne.length}`,
    );
    expect(days).toBeGreaterThan(60);
    expect(minutes[Math.floor(minutes.length / 2)]).toBeLessThanOrEqual(3);
    expect(minutes.at(-1)).toBeLessThanOrEqual(12);
    // A table some centimetres off may grant a day at the very edge of the rules, or not.
    expect(onlyOne.length).toBeLessThan(days / 20);
  });
});

/** How far apart the windows of a year are by two curves: every edge and low water, in order. */
function windowsApart(one: TideCurve, other: TideCurve, year: number) {
  const minutes: number[] = [];
  const onlyOne: string[] = [];
  let days = 0;
  // A day from either end of the year, where a table hands over to the prediction.
  const lastOn: CalendarDay = `${year}-12-30`;
  for (let on: CalendarDay = `${year}-01-02`; on <= lastOn; on = addDays(on, 1)) {
    const [a, b] = [windowOn(shore, one, on), windowOn(shore, other, on)];
    if (!a.isGranted || !b.isGranted) {
      if (a.isGranted !== b.isGranted) onlyOne.push(on);
      continue;
    }
    days += 1;
    for (const time of ['startsAt', 'endsAt', 'lowWaterAt', 'offTheShoreBy'] as const) {
      minutes.push(Math.abs(a.value[time] - b.value[time]) / MINUTE_MS);
    }
  }
  return { days, minutes: minutes.sort((x, y) => x - y), onlyOne };
}

function said(minutes: readonly number[]): string {
  const median = minutes[Math.floor(minutes.length / 2)] ?? NaN;
  return `${median} min (median), ${minutes.at(-1) ?? NaN} min (worst)`;
}

const shore: ShoreRules = {
  zone: PACIFIC,
  latitude: 47.6,
  longitude: -122.34,
  workingLevelM: 0.8,
  cutOffLevelM: 2.2,
  minutesBeforeLow: 120,
  minutesAfterLow: 30,
  daylightMarginMinutes: 30,
  minimumMinutes: 90,
  earliestClock: '06:00',
  latestClock: '21:00',
  crewMeetsMinutes: 45,
  partyMeetsMinutes: 20,
};

function tableIn(zone: string | number): OfficialTable {
  const read = readOfficialTable(file, { zone });
  if (!read.isGranted) throw new Error(JSON.stringify(read.reasons));
  return read.value;
}

async function seattle(): Promise<TideCurve> {
  const station = await tideStations().find('noaa/9447130');
  if (!station.isGranted) throw new Error(JSON.stringify(station.reasons));
  const curve = tideCurve(station.value);
  if (!curve.isGranted) throw new Error(JSON.stringify(curve.reasons));
  return curve.value;
}
