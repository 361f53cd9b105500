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
    const turnAboveM = curve.heightAtM(turnAt) - levelM;
    if (turnAboveM > 0) {
      return lastBelow(curve, levelM, belowAt, { at: turnAt, aboveM: turnAboveM });
    }
    belowAt = turnAt;
  }
  return belowAt;
}

/**
 * The last moment at or below the level on the way from one below to one above, the water only
 * rising or falling between. Regula falsi, the weight of the end that stays halved at every step so
 * that both ends close in: a few heights where bisection takes seventeen.
 */
function lastBelow(
  curve: TideCurve,
  levelM: number,
  fromAt: Instant,
  turn: { readonly at: Instant; readonly aboveM: number },
): Instant {
  let belowAt = fromAt;
  let belowM = curve.heightAtM(fromAt) - levelM;
  let aboveAt = turn.at;
  let { aboveM } = turn;
  while (Math.abs(aboveAt - belowAt) > CROSSING_MS) {
    const share = aboveM > belowM ? -belowM / (aboveM - belowM) : 0.5;
    // Never so near an end that the span would not shrink by a part of the precision.
    const leastShare = CROSSING_MS / 4 / Math.abs(aboveAt - belowAt);
    const at =
      belowAt + (aboveAt - belowAt) * Math.min(1 - leastShare, Math.max(leastShare, share));
    const heightM = curve.heightAtM(at) - levelM;
    if (heightM > 0) {
      aboveAt = at;
      aboveM = heightM;
      belowM /= 2;
    } else {
      belowAt = at;
      belowM = heightM;
      aboveM /= 2;
    }
  }
  return belowAt;
}
