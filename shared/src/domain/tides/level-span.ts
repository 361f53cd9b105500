import type { Instant } from '#shared/kernel/time.ts';
import type { TideCurve, TideExtreme } from './tide-curve.ts';

/** A span of time, both ends inclusive. */
export interface Span {
  readonly fromAt: Instant;
  readonly toAt: Instant;
}

/** A crossing is found to this, and always on the lower side of the level. */
const CROSSING_MS = 100;

/**
 * The span round a low water in which the curve stays at or below the level, looked for no further
 * than from fromAt to toAt, which must hold the low water; there the span ends if not before.
 *
 * Beyond a high water that is itself at or below the level the span goes on. If the low water is
 * above the level, the span is the low water's instant alone.
 */
export function spanAtOrBelow(
  curve: TideCurve,
  low: TideExtreme,
  levelM: number,
  fromAt: Instant,
  toAt: Instant,
): Span {
  if (low.heightM > levelM) return { fromAt: low.at, toAt: low.at };
  const turns = curve.extremes(fromAt, toAt + 1);
  const later = turns.filter(({ at }) => at > low.at).map(({ at }) => at);
  const earlier = turns.filter(({ at }) => at < low.at).map(({ at }) => at);
  return {
    fromAt: crossing(curve, levelM, low.at, [...earlier.reverse(), fromAt]),
    toAt: crossing(curve, levelM, low.at, [...later, toAt]),
  };
}

/** How far the curve stays at or below the level, between turns of which it only rises or falls. */
function crossing(
  curve: TideCurve,
  levelM: number,
  lowAt: Instant,
  turnsAt: readonly Instant[],
): Instant {
  let belowAt = lowAt;
  for (const turnAt of turnsAt) {
    if (curve.heightAtM(turnAt) > levelM) {
      let aboveAt = turnAt;
      while (Math.abs(aboveAt - belowAt) > CROSSING_MS) {
        const middleAt = (aboveAt + belowAt) / 2;
        if (curve.heightAtM(middleAt) > levelM) aboveAt = middleAt;
        else belowAt = middleAt;
      }
      return belowAt;
    }
    belowAt = turnAt;
  }
  return belowAt;
}
