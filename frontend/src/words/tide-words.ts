import type { Instant } from '#shared/kernel/time.ts';
import { clockAt } from '#shared/kernel/time.ts';

const MINUTE_MS = 60_000;

/** A height in metres to one decimal, with a true minus sign: '0.6', '−0.2'. */
export function metres(heightM: number): string {
  const tenths = Math.round(heightM * 10);
  return `${tenths < 0 ? '−' : ''}${(Math.abs(tenths) / 10).toFixed(1)}`;
}

/**
 * The clock at a predicted low water, to the nearest minute as tide tables print it. Deadlines
 * are never rounded in this way: theirs is clockAt, which cuts seconds off.
 */
export function clockOfWater(at: Instant, zone: string): string {
  return clockAt(Math.round(at / MINUTE_MS) * MINUTE_MS, zone);
}

/** Where heights come from: 'predicted from Outer Skerrow', 'from the official table Skerrow 2027'. */
export function sourceInWords(source: {
  readonly stationName: string;
  readonly table: string | null;
}): string {
  return source.table === null
    ? `predicted from ${source.stationName}`
    : `from the official table ${source.table}`;
}

/** What stands wherever heights and times of the water are shown. */
export const tideCaution =
  'Predictions are predictions: pressure, wind and swell move the water. The official tide table and the shore leader on the spot decide.';
