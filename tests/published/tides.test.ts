import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { tideStations } from '#backend/platform/tides/tide-stations.ts';
import {
  constituentNamed,
  equilibriumArgumentDeg,
  nodeFactorAt,
  speedDegPerHour,
} from '#shared/domain/tides/constituents.ts';
import { tideCurve } from '#shared/domain/tides/prediction.ts';
import type { TideStation } from '#shared/domain/tides/prediction.ts';
import type { TideCurve, TideExtreme } from '#shared/domain/tides/tide-curve.ts';
import { fromIso, instantOf } from '#shared/kernel/time.ts';
import type { CalendarDay, ClockTime, Instant } from '#shared/kernel/time.ts';

interface PredictedStation {
  readonly name: string;
  readonly z0_m_above_mllw: number;
  readonly constituents: readonly {
    readonly name: string;
    readonly amplitude_m: number;
    readonly phase_deg_gmt: number;
  }[];
  readonly extremes: readonly {
    readonly time_utc: string;
    readonly height_m: number;
    readonly type: 'high' | 'low';
  }[];
}

interface PublishedLows {
  readonly low_waters: readonly { readonly time_utc: string; readonly height_ft: number }[];
}

interface Miss {
  readonly minutes: number;
  readonly heightCm: number;
}

const FOOT_M = 0.3048;
const DAY_MS = 86_400_000;
const stations = tideStations();

// NOAA constituents, highs and lows by XTide 2.15.2; provenance in the file.
const predicted = (
  JSON.parse(dataFile('tide-extremes-2027.json')) as { stations: PredictedStation[] }
).stations;

describe('the independent predictor of 2027', () => {
  it('gives forty extremes at each of two stations', () => {
    expect(predicted.map(({ extremes }) => extremes.length)).toEqual([40, 40]);
  });

  it.each(predicted)('agrees on every extreme at $name', (station) => {
    const curve = curveOf({
      id: station.name,
      meanLevelM: station.z0_m_above_mllw,
      constituents: station.constituents.map((line) => ({
        name: line.name,
        amplitudeM: line.amplitude_m,
        phaseDeg: line.phase_deg_gmt,
      })),
    });
    const misses = station.extremes.map(({ time_utc, height_m, type }) =>
      missOf(curve, fromIso(time_utc), type, height_m),
    );
    report(station.name, misses);
    expect(worstMinutes(misses)).toBeLessThan(1.5);
    expect(worstCm(misses)).toBeLessThan(1);
  });
});

describe('the low waters that NOAA published for Santa Barbara', () => {
  // NOAA CO-OPS predictions for 9411340, MLLW, times to the minute; request in the file.
  const { low_waters: lows } = JSON.parse(dataFile('noaa-published-lows.json')) as PublishedLows;

  it('come out to the minute and half a centimetre', async () => {
    const curve = await servedCurve('noaa/9411340');
    const misses = lows.map(({ time_utc, height_ft }) =>
      missOf(curve, fromIso(time_utc), 'low', height_ft * FOOT_M),
    );
    report('Santa Barbara', misses);
    expect(misses).toHaveLength(36);
    expect(worstMinutes(misses)).toBeLessThan(1);
    expect(worstCm(misses)).toBeLessThan(0.5);
  });
});

describe('the annual table of NOAA for Seattle, 2017', () => {
  // NOAA's published table, made with older constituents than those served today.
  const table = seattleTable();
  const missesOf = async (lines: readonly TableEvent[]): Promise<Miss[]> => {
    const curve = await servedCurve('noaa/9447130');
    return lines.map(({ at, kind, heightM }) => missOf(curve, at, kind, heightM));
  };

  it('holds 1,411 events', () => {
    expect(table).toHaveLength(1411);
  });

  it('agrees on New Year’s Day within 4 minutes and 4 cm', async () => {
    const day = table.filter(({ on }) => on === '2017-01-01');
    const misses = await missesOf(day);
    expect(misses).toHaveLength(4);
    expect(worstMinutes(misses)).toBeLessThan(4);
    expect(worstCm(misses)).toBeLessThan(4);
  });

  it('agrees over the year with a median under 2 minutes, 10 at the worst', async () => {
    const misses = await missesOf(table);
    report('Seattle, the year', misses);
    expect(median(misses.map(({ minutes }) => minutes))).toBeLessThan(2);
    expect(worstMinutes(misses)).toBeLessThan(10);
    expect(median(misses.map(({ heightCm }) => heightCm))).toBeLessThan(3);
    expect(worstCm(misses)).toBeLessThan(8);
  });

  it('has as many highs and lows as the year that is predicted', async () => {
    const curve = await servedCurve('noaa/9447130');
    const fromAt = instantOf('2017-01-01', '00:00', 'America/Los_Angeles');
    const toAt = instantOf('2018-01-01', '00:00', 'America/Los_Angeles');
    expect(curve.extremes(fromAt, toAt)).toHaveLength(table.length);
  });
});

describe('the tide at Hove', () => {
  it.each([
    // UK Hydrographic Office, Hove, 17 June 2022, times in UTC; predicted for the nearest station.
    ['high', '2022-06-17T00:45Z', 6.305],
    ['low', '2022-06-17T07:05Z', 0.541],
    ['high', '2022-06-17T13:20Z', 6.279],
  ] as const)('agrees on the %s water of %s', async (kind, time, heightM) => {
    const curve = await servedCurve('ticon/brighton-btn-gbr-cco');
    const miss = missOf(curve, fromIso(time), kind, heightM);
    report(`Hove ${time}`, [miss]);
    expect(miss.minutes).toBeLessThan(8);
    expect(miss.heightCm).toBeLessThan(7);
  });
});

describe('the equilibrium arguments at Greenwich', () => {
  it.each([
    // V0 + u at the beginning of 2017 and of 2027, as computed for the predictor XTide (congen).
    ['J1', 264.33, 114.06, 0.05],
    ['K1', 5.26, 16.25, 0.05],
    ['K2', 191.35, 213.08, 0.05],
    ['L2', 1.96, 101.09, 0.05],
    // There with the mean of a ratio that depends on the inclination of the moon's orbit.
    ['M1', 102.4, 323.67, 0.5],
    ['M2', 286.18, 167.68, 0.05],
    ['M3', 69.27, 71.52, 0.05],
    ['M4', 212.36, 335.37, 0.05],
  ])('are the published ones for %s', (name, in2017, in2027, within) => {
    const constituent = constituentNamed(name);
    if (constituent === undefined) throw new Error(`No constituent ${name}`);
    for (const [year, expected] of [
      [2017, in2017],
      [2027, in2027],
    ] as const) {
      const startAt = fromIso(`${year}-01-01T00:00Z`);
      const { u } = nodeFactorAt(constituent, fromIso(`${year}-07-02T12:00Z`));
      const argument = equilibriumArgumentDeg(constituent, startAt) + u - expected;
      expect(Math.abs(((argument + 900) % 360) - 180), `${year}`).toBeLessThan(within);
    }
  });
});

describe('the speeds of the constituents', () => {
  const speedOf = (name: string): number => {
    const constituent = constituentNamed(name);
    if (constituent === undefined) throw new Error(`No constituent ${name}`);
    return speedDegPerHour(constituent, fromIso('2027-07-02T12:00Z'));
  };

  it.each([
    // IHO, list of standard tidal constituents (2017), degrees an hour.
    ['SA', 0.0410686],
    ['SSA', 0.0821373],
    ['MM', 0.5443747],
    ['MSF', 1.0158958],
    ['MF', 1.098033],
    ['MTM', 1.6424078],
    ['MSQM', 2.1139287],
    ['2Q1', 12.8542862],
    ['SGM', 12.9271398],
    ['Q1', 13.3986609],
    ['RHO', 13.4715145],
    ['O1', 13.9430356],
    ['M1', 14.4966939],
    ['P1', 14.9589314],
    ['S1', 15],
    ['K1', 15.0410686],
    ['J1', 15.5854433],
    ['OO1', 16.1391017],
    ['EP2', 27.4238338],
    ['2N2', 27.8953548],
    ['MU2', 27.9682085],
    ['N2', 28.4397295],
    ['NU2', 28.5125832],
    ['MA2', 28.943036],
    ['M2', 28.9841042],
    ['MB2', 29.025173],
    ['MKS2', 29.0662415],
    ['LAM2', 29.4556253],
    ['L2', 29.5284789],
    ['T2', 29.9589333],
    ['S2', 30],
    ['R2', 30.0410667],
    ['K2', 30.0821373],
    ['2SM2', 31.0158958],
    ['2MK3', 42.9271398],
    ['M3', 43.4761564],
    ['MK3', 44.0251729],
    ['S3', 45],
    ['N4', 56.8794591],
    ['MN4', 57.4238338],
    ['M4', 57.9682085],
    ['MS4', 58.9841042],
    ['S4', 60],
    ['2MO5', 71.911244],
    ['2MK5', 73.009277],
    ['M6', 86.9523127],
    ['2MS6', 87.9682085],
    ['S6', 90],
    ['M8', 115.936417],
    // TICON-4, by their Doodson numbers 245555, 265555, 381555, 383555.
    ['3N2', 28.4350877],
    ['3L2', 29.5331208],
    ['T3', 44.9589333],
    ['R3', 45.0410686],
  ])('%s moves %f degrees an hour', (name, speed) => {
    expect(speedOf(name)).toBeCloseTo(speed, 5);
  });

  it('make a lunar day of 24 h 50.47 min', () => {
    // Half of it, 12 h 25.2 min, from one high water to the next: NOAA.
    expect((2 * 360 * 60) / speedOf('M2')).toBeCloseTo(24 * 60 + 50.47, 2);
  });

  it('bring springs back after 14.765 days', () => {
    expect(360 / speedOf('MSF') / 24).toBeCloseTo(14.765, 3);
  });
});

function dataFile(name: string): string {
  return readFileSync(new URL(`data/${name}`, import.meta.url), 'utf8');
}

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

function missOf(curve: TideCurve, at: Instant, kind: 'high' | 'low', heightM: number): Miss {
  const near = curve.extremes(at - DAY_MS, at + DAY_MS).filter((extreme) => extreme.kind === kind);
  const away = (extreme: TideExtreme) => Math.abs(extreme.at - at);
  const nearest = near.reduce((best, other) => (away(other) < away(best) ? other : best));
  return { minutes: away(nearest) / 60_000, heightCm: Math.abs(nearest.heightM - heightM) * 100 };
}

interface TableEvent {
  readonly on: CalendarDay;
  readonly at: Instant;
  readonly kind: 'high' | 'low';
  readonly heightM: number;
}

function seattleTable(): TableEvent[] {
  const line =
    /^(?<year>\d{4})\/(?<month>\d\d)\/(?<day>\d\d)\s+\w{3}\s+(?<hour>\d\d):(?<minute>\d\d) (?<half>[AP]M)\s+\S+\s+(?<cm>-?\d+)\s+(?<kind>[HL])\s*$/;
  return dataFile('noaa-annual-table-seattle-2017.txt')
    .split('\n')
    .flatMap((text) => {
      const groups = line.exec(text)?.groups;
      if (groups === undefined) return [];
      const { year, month, day, hour, minute, half, cm, kind } = groups;
      const on = `${year}-${month}-${day}` as CalendarDay;
      const hours = (Number(hour) % 12) + (half === 'PM' ? 12 : 0);
      const clock = `${String(hours).padStart(2, '0')}:${minute}` as ClockTime;
      const at = instantOf(on, clock, 'America/Los_Angeles');
      return [{ on, at, kind: kind === 'H' ? 'high' : 'low', heightM: Number(cm) / 100 } as const];
    });
}

function median(figures: readonly number[]): number {
  const sorted = [...figures].sort((a, b) => a - b);
  const middle = sorted[Math.floor(sorted.length / 2)];
  if (middle === undefined) throw new Error('Nothing to take the middle of');
  return middle;
}

function worstMinutes(misses: readonly Miss[]): number {
  return Math.max(...misses.map(({ minutes }) => minutes));
}

function worstCm(misses: readonly Miss[]): number {
  return Math.max(...misses.map(({ heightCm }) => heightCm));
}

function report(what: string, misses: readonly Miss[]): void {
  const minutes = misses.map((miss) => miss.minutes);
  const cm = misses.map((miss) => miss.heightCm);
  console.info(
    `${what}: ${misses.length} compared; time off by ${median(minutes).toFixed(2)} min (median), ` +
      `${Math.max(...minutes).toFixed(2)} min (worst); height by ${median(cm).toFixed(2)} cm ` +
      `(median), ${Math.max(...cm).toFixed(2)} cm (worst)`,
  );
}
