import type { Instant } from '#shared/kernel/time.ts';
import type { TideCurve, TideExtreme } from './tide-curve.ts';

/** A session by its low water as it was planned and told. */
export interface SessionLow<Id extends string> {
  readonly id: Id;
  readonly lowWaterAt: Instant;
}

/** What another curve does to the low water of a session. */
export interface MovedSession<Id extends string> {
  readonly id: Id;
  readonly lowWaterAt: Instant;
  /** To the nearest minute; null when the new curve has no low water near. */
  readonly newLowWaterAt: Instant | null;
  /** Negative when it comes earlier. */
  readonly laterMinutes: number | null;
  readonly higherM: number | null;
}

const MINUTE_MS = 60_000;

/** Half of the time from one low water to the next. */
const SAME_LOW_MS = 6 * 60 * MINUTE_MS;

/** Sessions whose low water moves by no more than this keep their times without a word. */
const MOVED_MINUTES = 5;

/**
 * The sessions whose low water moves by more than 5 minutes when one curve takes the place of
 * another (product rule R9), those that lose it first, then the most moved.
 */
export function sessionsMovedBy<Id extends string>(
  sessions: readonly SessionLow<Id>[],
  oldCurve: TideCurve,
  newCurve: TideCurve,
): MovedSession<Id>[] {
  const moved = sessions.flatMap(({ id, lowWaterAt }): MovedSession<Id>[] => {
    const now = lowNear(newCurve, lowWaterAt);
    if (now === null) {
      return [{ id, lowWaterAt, newLowWaterAt: null, laterMinutes: null, higherM: null }];
    }
    const newLowWaterAt = Math.round(now.at / MINUTE_MS) * MINUTE_MS;
    const laterMinutes = Math.round((newLowWaterAt - lowWaterAt) / MINUTE_MS);
    if (Math.abs(laterMinutes) <= MOVED_MINUTES) return [];
    const was = lowNear(oldCurve, lowWaterAt);
    const higherM = was === null ? null : now.heightM - was.heightM;
    return [{ id, lowWaterAt, newLowWaterAt, laterMinutes, higherM }];
  });
  const size = ({ laterMinutes }: MovedSession<Id>): number =>
    laterMinutes === null ? Number.MAX_VALUE : Math.abs(laterMinutes);
  return moved.sort((a, b) => size(b) - size(a) || a.lowWaterAt - b.lowWaterAt);
}

function lowNear(curve: TideCurve, at: Instant): TideExtreme | null {
  const lows = curve
    .extremes(at - SAME_LOW_MS, at + SAME_LOW_MS + 1)
    .filter(({ kind }) => kind === 'low');
  return lows.reduce<TideExtreme | null>((nearest, low) => {
    const isNearer = nearest === null || Math.abs(low.at - at) < Math.abs(nearest.at - at);
    return isNearer ? low : nearest;
  }, null);
}
