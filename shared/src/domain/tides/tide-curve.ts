import type { Instant } from '#shared/kernel/time.ts';

/** A high or a low water; the height is above chart datum. */
export interface TideExtreme {
  readonly at: Instant;
  readonly kind: 'high' | 'low';
  readonly heightM: number;
}

/** A height above chart datum at an instant. */
export interface TideHeight {
  readonly at: Instant;
  readonly heightM: number;
}

/** The predicted tide at a place, at any time. All heights are in metres above chart datum. */
export interface TideCurve {
  readonly heightAtM: (at: Instant) => number;
  /** Heights at fromAt and every stepMinutes after it, toAt included when a step falls on it. */
  readonly series: (fromAt: Instant, toAt: Instant, stepMinutes: number) => TideHeight[];
  /** Every high and low water with fromAt <= at < toAt, in order, alternating. */
  readonly extremes: (fromAt: Instant, toAt: Instant) => TideExtreme[];
}

const MINUTE_MS = 60_000;

/**
 * The heights of a curve at fromAt and every stepMinutes after it, as TideCurve.series gives them.
 * Throws a RangeError on a step that would not get anywhere.
 */
export function heightsAtSteps(
  heightAtM: TideCurve['heightAtM'],
  fromAt: Instant,
  toAt: Instant,
  stepMinutes: number,
): TideHeight[] {
  if (!(stepMinutes > 0)) throw new RangeError(`Not a step in minutes: ${stepMinutes}`);
  const heights: TideHeight[] = [];
  for (let step = 0; ; step += 1) {
    const at = fromAt + step * stepMinutes * MINUTE_MS;
    if (!(at <= toAt)) return heights;
    heights.push({ at, heightM: heightAtM(at) });
  }
}
