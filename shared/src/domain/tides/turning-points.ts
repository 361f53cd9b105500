import type { Instant } from '#shared/kernel/time.ts';
import type { HarmonicSum } from './harmonic-sum.ts';

/** Where the water stops rising or falling; the height is about mean level. */
export interface TurningPoint {
  readonly at: Instant;
  readonly kind: 'high' | 'low';
  readonly heightM: number;
}

interface Slope {
  readonly at: Instant;
  readonly mPerHour: number;
}

const HOUR_MS = 3_600_000;

/** The spans that are searched one by one; HarmonicSum.jerkBoundAt reaches an hour to each side. */
const SPAN_MS = 2 * HOUR_MS;

/** Two turns closer together than this are one resting of the water, and no high and low. */
const CLOSEST_TURNS_MS = 1_000;

/**
 * Every high and low of the sum with fromAt <= at < toAt, in order and to the millisecond.
 *
 * None is lost, and highs and lows alternate: a span is only passed over where Taylor's bound on
 * the slope shows it free of zeros, taken as holding one where the bound on the curvature shows
 * the slope to be monotone, and halved otherwise, down to a second. The spans begin at fixed hours
 * of UTC, so that the same turn is found from whatever time is asked for.
 */
export function turningPoints(sum: HarmonicSum, fromAt: Instant, toAt: Instant): TurningPoint[] {
  const found: TurningPoint[] = [];
  if (!(fromAt < toAt)) return found;
  const keep = (at: Instant, kind: 'high' | 'low') => {
    if (at >= fromAt && at < toAt) found.push({ at, kind, heightM: sum.heightAtM(at) });
  };
  // From the span before too where one begins, since a turn just under it is rounded onto it.
  const firstAt = Math.floor((fromAt - 1) / SPAN_MS) * SPAN_MS;
  let left = slopeAt(sum, firstAt);
  for (let at = firstAt + SPAN_MS; left.at < toAt; at += SPAN_MS) {
    const right = slopeAt(sum, at);
    search(sum, left, right, keep);
    left = right;
  }
  return found;
}

function search(
  sum: HarmonicSum,
  left: Slope,
  right: Slope,
  keep: (at: Instant, kind: 'high' | 'low') => void,
): void {
  const middleAt = (left.at + right.at) / 2;
  const middle = sum.motionAt(middleAt);
  const jerk = sum.jerkBoundAt(middleAt);
  // Water without a tide is still, and never turns.
  if (jerk === 0) return;
  const halfHours = (right.at - left.at) / 2 / HOUR_MS;
  const curvature = Math.abs(middle.curvatureMPerHour2);
  const reach = curvature * halfHours + (jerk * halfHours ** 2) / 2;
  if (Math.abs(middle.slopeMPerHour) > reach) return;
  const isMonotone = curvature > jerk * halfHours;
  if (isMonotone || right.at - left.at <= CLOSEST_TURNS_MS) {
    if (isRising(left) !== isRising(right)) {
      keep(Math.round(zero(sum, left, right)), isRising(left) ? 'high' : 'low');
    }
    return;
  }
  const split = { at: middleAt, mPerHour: middle.slopeMPerHour };
  search(sum, left, split, keep);
  search(sum, split, right, keep);
}

/** The one zero of the slope between two points of opposite sign: Newton, held in by bisection. */
function zero(sum: HarmonicSum, left: Slope, right: Slope): Instant {
  let lowAt = left.at;
  let highAt = right.at;
  let at = (lowAt + highAt) / 2;
  while (highAt - lowAt > 0.01) {
    const { slopeMPerHour, curvatureMPerHour2 } = sum.motionAt(at);
    if (slopeMPerHour >= 0 === isRising(left)) lowAt = at;
    else highAt = at;
    const stepMs = (slopeMPerHour / curvatureMPerHour2) * HOUR_MS;
    const next = at - stepMs;
    if (Math.abs(stepMs) < 0.01) return next;
    at = next > lowAt && next < highAt ? next : (lowAt + highAt) / 2;
  }
  return at;
}

function slopeAt(sum: HarmonicSum, at: Instant): Slope {
  return { at, mPerHour: sum.motionAt(at).slopeMPerHour };
}

// A slope of exactly nothing counts as rising, on both sides alike, so that no turn counts twice.
function isRising(slope: Slope): boolean {
  return slope.mPerHour >= 0;
}
