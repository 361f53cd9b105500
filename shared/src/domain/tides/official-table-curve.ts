import type { Instant } from '#shared/kernel/time.ts';
import { knotsOf } from './official-table-knots.ts';
import type { Knot } from './official-table-knots.ts';
import { heightsAtSteps } from './tide-curve.ts';
import type { TideCurve, TideExtreme } from './tide-curve.ts';

/** A rise or a fall of the bent curve, and the one of the plain curve whose shape it has. */
interface Reach {
  readonly from: TideExtreme;
  readonly to: TideExtreme;
  readonly shapeFrom: TideExtreme;
  readonly shapeTo: TideExtreme;
}

/**
 * The curve bent to an official table (product rule R9). Within the table's span its highs and lows
 * are the table's own, and between two of them the water rises or falls as the plain curve does
 * between the same two, times and heights in straight proportion. A rise or fall that is not
 * predicted has the shape of the nearest predicted one of its direction.
 *
 * Where the table leaves a gap, and for two days before and after its span, the predicted highs and
 * lows are shifted less and less; beyond it is the plain curve. Events that contradict one another,
 * or have no predicted tide near them and would break the turns of high and low, are passed over.
 */
export function curveByTable(curve: TideCurve, events: readonly TideExtreme[]): TideCurve {
  const { knots, plain } = knotsOf(curve, events);
  const first = knots[0];
  const last = knots.at(-1);
  if (first === undefined || last === undefined || first === last) return curve;
  const reaches = reachesOf(knots, plain);
  const heightAtM = (at: Instant): number => {
    if (!(at > first.at && at < last.at)) return curve.heightAtM(at);
    const reach = reaches[reachAt(knots, at)];
    return reach === undefined ? curve.heightAtM(at) : heightWithinM(curve, reach, at);
  };
  return {
    heightAtM,
    series: (fromAt, toAt, stepMinutes) => heightsAtSteps(heightAtM, fromAt, toAt, stepMinutes),
    extremes: (fromAt, toAt) => [
      ...curve.extremes(fromAt, Math.min(toAt, first.at)),
      ...knots
        .filter(({ at }) => at >= fromAt && at < toAt)
        .map(({ at, kind, heightM }) => ({ at, kind, heightM })),
      ...curve.extremes(Math.max(fromAt, last.at + 1), toAt),
    ],
  };
}

function reachesOf(knots: readonly Knot[], plain: readonly TideExtreme[]): Reach[] {
  return knots.slice(1).flatMap((to, place) => {
    const from = knots[place];
    if (from === undefined) return [];
    const shape = ownShape(from, to) ?? nearestShape(from, to, plain);
    return shape === null ? [] : [{ from, to, shapeFrom: shape[0], shapeTo: shape[1] }];
  });

  function ownShape(from: Knot, to: Knot): readonly [TideExtreme, TideExtreme] | null {
    if (from.plain === null || to.plain === null || to.plain !== from.plain + 1) return null;
    const shapeFrom = plain[from.plain];
    const shapeTo = plain[to.plain];
    return shapeFrom === undefined || shapeTo === undefined ? null : [shapeFrom, shapeTo];
  }
}

function nearestShape(
  from: Knot,
  to: Knot,
  plain: readonly TideExtreme[],
): readonly [TideExtreme, TideExtreme] | null {
  let nearest: readonly [TideExtreme, TideExtreme] | null = null;
  let leastMs = Infinity;
  plain.forEach((shapeFrom, place) => {
    const shapeTo = plain[place + 1];
    if (shapeTo === undefined || shapeFrom.kind !== from.kind) return;
    const awayMs = Math.abs(shapeFrom.at + shapeTo.at - from.at - to.at);
    if (awayMs >= leastMs) return;
    leastMs = awayMs;
    nearest = [shapeFrom, shapeTo];
  });
  return nearest;
}

/** The place of the last knot at or before the instant. */
function reachAt(knots: readonly Knot[], at: Instant): number {
  let low = 0;
  let high = knots.length - 1;
  while (high - low > 1) {
    const middle = (low + high) >> 1;
    if ((knots[middle]?.at ?? Infinity) <= at) low = middle;
    else high = middle;
  }
  return low;
}

function heightWithinM(curve: TideCurve, reach: Reach, at: Instant): number {
  const { from, to, shapeFrom, shapeTo } = reach;
  const share = (at - from.at) / (to.at - from.at);
  const shapeAt = shapeFrom.at + share * (shapeTo.at - shapeFrom.at);
  const rise = shapeTo.heightM - shapeFrom.heightM;
  const risen = (curve.heightAtM(shapeAt) - shapeFrom.heightM) / rise;
  // The turn itself is known to the millisecond only, just past which water is falling again.
  const shareOfRise = Math.min(1, Math.max(0, risen));
  return from.heightM + shareOfRise * (to.heightM - from.heightM);
}
