import type { TableEvent } from '#shared/domain/tides/official-table-reading.ts';
import { tideCurve } from '#shared/domain/tides/prediction.ts';
import type { TideCurve } from '#shared/domain/tides/tide-curve.ts';
import { clockAt, dayAt } from '#shared/kernel/time.ts';
import type { Instant } from '#shared/kernel/time.ts';

const MINUTE_MS = 60_000;

/** An invented shore with two tides a day, unequal, and springs and neaps. */
export function exampleCurve(): TideCurve {
  const curve = tideCurve({
    id: 'example',
    meanLevelM: 3.4,
    constituents: [
      { name: 'M2', amplitudeM: 1.9, phaseDeg: 150 },
      { name: 'S2', amplitudeM: 0.6, phaseDeg: 190 },
      { name: 'N2', amplitudeM: 0.4, phaseDeg: 130 },
      { name: 'K1', amplitudeM: 0.25, phaseDeg: 110 },
      { name: 'O1', amplitudeM: 0.2, phaseDeg: 340 },
      { name: 'M4', amplitudeM: 0.12, phaseDeg: 60 },
    ],
  });
  if (!curve.isGranted) throw new Error(JSON.stringify(curve.reasons));
  return curve.value;
}

/** The highs and lows of the curve as a printed table would give them: whole minutes and cm. */
export function tableOf(curve: TideCurve, fromAt: Instant, toAt: Instant): TableEvent[] {
  return curve.extremes(fromAt, toAt).map(({ at, kind, heightM }, place) => ({
    at: Math.round(at / MINUTE_MS) * MINUTE_MS,
    kind,
    heightM: Math.round(heightM * 100) / 100,
    row: place + 1,
  }));
}

/** One event a line: 2027-06-01,00:31,1.23,L in the zone. */
export function plainLines(events: readonly TableEvent[], zone: string): string[] {
  return events.map(({ at, kind, heightM }) => {
    const mark = kind === 'high' ? 'H' : 'L';
    return `${dayAt(at, zone)},${clockAt(at, zone)},${heightM.toFixed(2)},${mark}`;
  });
}
