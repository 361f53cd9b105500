import { stations as everyStation } from '@neaps/tide-database';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { tideStations } from '#backend/platform/tides/tide-stations.ts';
import { startOfYearUtc, yearUtcAt } from '#shared/domain/tides/calendar-year.ts';
import { constituentNamed } from '#shared/domain/tides/constituents.ts';
import { harmonicSum } from '#shared/domain/tides/harmonic-sum.ts';
import { tideCurve } from '#shared/domain/tides/prediction.ts';
import type { TideStation } from '#shared/domain/tides/prediction.ts';
import type { TideCurve, TideExtreme } from '#shared/domain/tides/tide-curve.ts';
import { fromIso } from '#shared/kernel/time.ts';

const MINUTE_MS = 60_000;
const DAY_MS = 86_400_000;
const stations = tideStations();

/** High at noon and midnight UTC, low at six, between 0.5 m and 4.5 m, every day alike. */
const SOLAR: TideStation = {
  id: 'solar',
  meanLevelM: 2.5,
  constituents: [{ name: 'S2', amplitudeM: 2, phaseDeg: 0 }],
};

describe('a tide curve', () => {
  it('puts the solar tide alone at the same hours each day', () => {
    const fromAt = fromIso('2027-06-01T00:00Z');
    expect(curveOf(SOLAR).extremes(fromAt, fromAt + DAY_MS)).toEqual([
      { at: fromIso('2027-06-01T00:00Z'), kind: 'high', heightM: 4.5 },
      { at: fromIso('2027-06-01T06:00Z'), kind: 'low', heightM: 0.5 },
      { at: fromIso('2027-06-01T12:00Z'), kind: 'high', heightM: 4.5 },
      { at: fromIso('2027-06-01T18:00Z'), kind: 'low', heightM: 0.5 },
    ]);
  });

  it('counts an extreme at the beginning of the span and none at its end', () => {
    const highAt = fromIso('2027-06-01T12:00Z');
    const curve = curveOf(SOLAR);
    expect(curve.extremes(highAt, highAt + 1).map(({ kind }) => kind)).toEqual(['high']);
    expect(curve.extremes(highAt - 1, highAt)).toEqual([]);
    expect(curve.extremes(highAt, highAt)).toEqual([]);
  });

  it('gives heights from the beginning to the end, both included', () => {
    const fromAt = fromIso('2027-06-01T00:00Z');
    const heights = curveOf(SOLAR).series(fromAt, fromAt + 180 * MINUTE_MS, 90);
    expect(heights.map(({ at }) => (at - fromAt) / MINUTE_MS)).toEqual([0, 90, 180]);
    expect(heights[2]?.heightM).toBeCloseTo(2.5, 9);
  });

  it('stands still, with no extremes, where there is no tide', () => {
    const still = curveOf({ id: 'still', meanLevelM: 1.2, constituents: [] });
    expect(still.heightAtM(0)).toBe(1.2);
    expect(still.extremes(0, 365 * DAY_MS)).toEqual([]);
  });

  it('refuses a step that leads nowhere', () => {
    expect(() => curveOf(SOLAR).series(0, DAY_MS, 0)).toThrow(RangeError);
  });

  it('refuses every constituent that it does not know, by name', () => {
    const lines = ['M2', '2MN6', 'S2', 'ETA2'].map((name) => ({
      name,
      amplitudeM: 0,
      phaseDeg: 0,
    }));
    expect(tideCurve({ ...SOLAR, constituents: lines })).toEqual({
      isGranted: false,
      reasons: [
        { why: 'unknown-constituent', name: '2MN6' },
        { why: 'unknown-constituent', name: 'ETA2' },
      ],
    });
  });

  it('refuses figures that are none', () => {
    const lines = [{ name: 'M2', amplitudeM: NaN, phaseDeg: 0 }];
    expect(tideCurve({ id: 'x', meanLevelM: Infinity, constituents: lines })).toEqual({
      isGranted: false,
      reasons: [
        { why: 'unusable-figure', name: 'M2' },
        { why: 'unusable-figure', name: 'mean level' },
      ],
    });
  });

  it('finds the same extremes from whatever span it is asked', async () => {
    const curve = await servedCurve('noaa/9449880');
    const fromAt = fromIso('2027-03-01T00:00Z');
    const whole = curve.extremes(fromAt, fromAt + 30 * DAY_MS);
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 30 * DAY_MS - 1 }), (splitMs) => {
        const halves = [
          ...curve.extremes(fromAt, fromAt + splitMs),
          ...curve.extremes(fromAt + splitMs, fromAt + 30 * DAY_MS),
        ];
        expect(halves).toEqual(whole);
      }),
      { numRuns: 40 },
    );
  });
});

describe('highs and lows', () => {
  const kinds = chosenByKind();

  it.each(Object.entries(kinds))('alternate over the years at %s stations', async (_, ids) => {
    for (const id of ids) {
      const curve = await servedCurve(id);
      // Over two turns of the year.
      const found = curve.extremes(fromIso('2026-12-01T00:00Z'), fromIso('2028-02-01T00:00Z'));
      expect(found.length, id).toBeGreaterThan(427);
      expectAlternation(found, id);
    }
  });

  it('come from thirty stations or more, of every kind', () => {
    expect(Object.keys(kinds)).toEqual([
      'semidiurnal',
      'mixed, mainly semidiurnal',
      'mixed, mainly diurnal',
      'diurnal',
      'tiny',
      'subordinate',
    ]);
    expect(Object.values(kinds).flat().length).toBeGreaterThanOrEqual(30);
  });

  it.each([
    // Friday Harbor (mixed, with weak inequalities), Pensacola (diurnal), Bar Harbor
    // (semidiurnal), Brighton (shallow water), and a tiny tide.
    'noaa/9449880',
    'noaa/8729840',
    'noaa/8413320',
    'ticon/brighton-btn-gbr-cco',
    kinds['tiny']?.[0] ?? '',
  ])('miss none that minute by minute sampling shows, at %s', async (id) => {
    const curve = await servedCurve(id);
    const fromAt = fromIso('2026-11-15T00:00Z');
    const toAt = fromIso('2027-03-01T00:00Z');
    const found = curve.extremes(fromAt, toAt);
    const sampled = sampledExtremes(curve, fromAt + MINUTE_MS, toAt - MINUTE_MS);
    expect(sampled.length).toBeGreaterThan(100);
    for (const one of sampled) {
      const isFound = found.some(
        ({ at, kind }) => kind === one.kind && Math.abs(at - one.at) <= MINUTE_MS,
      );
      expect(isFound, `${one.kind} at ${one.at}`).toBe(true);
    }
    // What lies between two samples can only come in pairs.
    expect((found.length - sampled.length) % 2).toBe(0);
  });
});

describe('the turn of the year', () => {
  it('is smooth, though the node factors of the two years differ', async () => {
    const curve = await servedCurve('noaa/8413320');
    const turnAt = fromIso('2027-01-01T00:00Z');
    const steps = curve.series(turnAt - 8 * 60 * MINUTE_MS, turnAt + 8 * 60 * MINUTE_MS, 1 / 60);
    const changes = steps
      .slice(1)
      .map(({ heightM }, place) => heightM - (steps[place]?.heightM ?? 0));
    // Half the range at the speed of M2 makes less than 0.3 mm a second.
    expect(Math.max(...changes.map(Math.abs))).toBeLessThan(0.0003);
    const bends = changes.slice(1).map((change, place) => change - (changes[place] ?? 0));
    expect(Math.max(...bends.map(Math.abs))).toBeLessThan(0.000001);
  });

  it('has a slope and a curvature that follow from the height', () => {
    const m2 = constituentNamed('M2');
    if (m2 === undefined) throw new Error('No M2');
    const sum = harmonicSum([{ constituent: m2, amplitudeM: 4, phaseDeg: 40 }]);
    const turnAt = fromIso('2028-01-01T00:00Z');
    fc.assert(
      fc.property(fc.integer({ min: -9 * 60, max: 9 * 60 }), (minutes) => {
        const at = turnAt + minutes * MINUTE_MS;
        const [before, here, after] = [at - MINUTE_MS, at, at + MINUTE_MS].map(sum.motionAt);
        if (before === undefined || here === undefined || after === undefined) throw new Error();
        const slope = (after.heightM - before.heightM) * 30;
        expect(here.slopeMPerHour).toBeCloseTo(slope, 3);
        const curvature = (after.slopeMPerHour - before.slopeMPerHour) * 30;
        expect(here.curvatureMPerHour2).toBeCloseTo(curvature, 3);
        const jerk = Math.abs(after.curvatureMPerHour2 - before.curvatureMPerHour2) * 30;
        expect(jerk).toBeLessThanOrEqual(sum.jerkBoundAt(at));
      }),
    );
  });
});

describe('differences from another place', () => {
  const shifted = curveOf({
    ...SOLAR,
    differences: {
      high: { laterMinutes: 60, heightFactor: 0.5, higherM: 0 },
      low: { laterMinutes: -30, heightFactor: 1, higherM: 0.2 },
    },
  });

  it('move highs and lows apart, in time and in height', () => {
    const fromAt = fromIso('2027-06-01T00:00Z');
    expect(shifted.extremes(fromAt, fromAt + DAY_MS / 2)).toEqual([
      { at: fromIso('2027-06-01T01:00Z'), kind: 'high', heightM: 2.25 },
      { at: fromIso('2027-06-01T05:30Z'), kind: 'low', heightM: 0.7 },
    ]);
  });

  it('pass through the moved extremes, and keep the shape between them', () => {
    expect(shifted.heightAtM(fromIso('2027-06-01T05:30Z'))).toBeCloseTo(0.7, 6);
    // Midway between the extremes of a pure wave stands the mean of their heights.
    expect(shifted.heightAtM(fromIso('2027-06-01T03:15Z'))).toBeCloseTo((2.25 + 0.7) / 2, 6);
  });

  it('leave no step in the height where one block of the table meets the next', () => {
    const blockAt = 700 * 32 * DAY_MS;
    const before = shifted.heightAtM(blockAt - 1);
    expect(shifted.heightAtM(blockAt)).toBeCloseTo(before, 5);
  });

  it('leave out a small high and low that they would turn round', async () => {
    const pensacola = await stations.find('noaa/8729840');
    if (!pensacola.isGranted) throw new Error('Not served');
    const curve = curveOf({
      ...pensacola.value,
      differences: {
        high: { laterMinutes: 240, heightFactor: 1, higherM: 0 },
        low: { laterMinutes: -60, heightFactor: 1, higherM: 0.1 },
      },
    });
    const fromAt = fromIso('2027-01-01T00:00Z');
    const found = curve.extremes(fromAt, fromAt + 365 * DAY_MS);
    expect(found.length).toBeLessThan(
      curveOf(pensacola.value).extremes(fromAt, fromAt + 365 * DAY_MS).length,
    );
    expectAlternation(found, 'Pensacola, moved');
  });
});

describe('the calendar year', () => {
  it('begins where the clock says, for two centuries', () => {
    for (let year = 1900; year < 2100; year += 1) {
      expect(startOfYearUtc(year)).toBe(Date.UTC(year, 0, 1));
      expect(yearUtcAt(startOfYearUtc(year))).toBe(year);
      expect(yearUtcAt(startOfYearUtc(year) - 1)).toBe(year - 1);
    }
  });
});

describe('speed of work', () => {
  it('draws six weeks, and finds their extremes, in a few milliseconds', async () => {
    const curve = await servedCurve('noaa/8413320');
    const fromAt = fromIso('2027-05-01T00:00Z');
    const took = [1, 2, 3, 4, 5].map(() => {
      const startedAt = performance.now();
      curve.series(fromAt, fromAt + 42 * DAY_MS, 30);
      curve.extremes(fromAt, fromAt + 42 * DAY_MS);
      return performance.now() - startedAt;
    });
    console.info(`six weeks: ${Math.min(...took).toFixed(1)} ms`);
    // Far above what it takes, so that a busy machine does not fail it.
    expect(Math.min(...took)).toBeLessThan(60);
  });
});

function curveOf(station: TideStation): TideCurve {
  const curve = tideCurve(station);
  if (!curve.isGranted) throw new Error(JSON.stringify(curve.reasons));
  return curve.value;
}

async function servedCurve(id: string): Promise<TideCurve> {
  const station = await stations.find(id);
  if (!station.isGranted) throw new Error(JSON.stringify(station.reasons));
  return curveOf(station.value);
}

function expectAlternation(found: readonly TideExtreme[], what: string): void {
  found.slice(1).forEach((extreme, place) => {
    const last = found[place];
    if (last === undefined) throw new Error(what);
    expect(extreme.at, what).toBeGreaterThan(last.at);
    expect(extreme.kind, what).not.toBe(last.kind);
    const rise = extreme.heightM - last.heightM;
    expect(extreme.kind === 'high' ? rise : -rise, what).toBeGreaterThanOrEqual(0);
  });
}

function sampledExtremes(curve: TideCurve, fromAt: number, toAt: number): TideExtreme[] {
  const heights = curve.series(fromAt, toAt, 1);
  return heights.flatMap((here, place): TideExtreme[] => {
    const before = heights[place - 1];
    const after = heights[place + 1];
    if (before === undefined || after === undefined) return [];
    if (here.heightM > before.heightM && here.heightM >= after.heightM) {
      return [{ ...here, kind: 'high' }];
    }
    const isLow = here.heightM < before.heightM && here.heightM <= after.heightM;
    return isLow ? [{ ...here, kind: 'low' }] : [];
  });
}

/** Five stations or more of each kind, by the usual ratio (K1 + O1) / (M2 + S2), evenly chosen. */
function chosenByKind(): Record<string, string[]> {
  const figures = everyStation
    .filter(({ kind, license, source }) => {
      return kind === 'tide' && license.commercial_use && /NOAA|Oceanic|TICON/.test(source.name);
    })
    .map((station) => {
      const amplitude = (name: string) =>
        station.harmonic_constituents.find((line) => line.name === name)?.amplitude ?? 0;
      const diurnal = amplitude('K1') + amplitude('O1');
      const semidiurnal = amplitude('M2') + amplitude('S2');
      const isSubordinate = station.type === 'subordinate';
      return { id: station.id, ratio: diurnal / semidiurnal, diurnal, semidiurnal, isSubordinate };
    });
  const evenly = (isOfKind: (figure: (typeof figures)[number]) => boolean): string[] => {
    const all = figures.filter(isOfKind);
    return [0.1, 0.3, 0.5, 0.7, 0.9].map((share) => all[Math.floor(share * all.length)]?.id ?? '');
  };
  const isRef = ({ isSubordinate }: (typeof figures)[number]) => !isSubordinate;
  return {
    semidiurnal: evenly((one) => isRef(one) && one.ratio < 0.25),
    'mixed, mainly semidiurnal': evenly(
      (one) => isRef(one) && one.ratio >= 0.25 && one.ratio < 1.5,
    ),
    'mixed, mainly diurnal': evenly((one) => isRef(one) && one.ratio >= 1.5 && one.ratio < 3),
    diurnal: evenly((one) => isRef(one) && one.ratio >= 3),
    tiny: evenly((one) => isRef(one) && one.diurnal + one.semidiurnal < 0.08),
    subordinate: evenly((one) => one.isSubordinate),
  };
}
