import { windowOn } from '#shared/domain/tides/shore-water.ts';
import type { ShoreRules } from '#shared/domain/tides/shore-water.ts';
import type { TideCurve } from '#shared/domain/tides/tide-curve.ts';
import type { NoWindowReason, WorkingWindow } from '#shared/domain/tides/working-window.ts';
import { granted } from '#shared/kernel/result.ts';
import type { Verdict } from '#shared/kernel/result.ts';
import type { CalendarDay, ClockTime } from '#shared/kernel/time.ts';

/**
 * What a plan asks beyond its shore; null asks nothing more. A plan may only narrow: a higher level,
 * an earlier hour or a shorter length than the shore's changes nothing.
 */
export interface PlanWindowRules {
  /** Metres above chart datum. */
  readonly planLevelM: number | null;
  readonly earliestClock: ClockTime | null;
  readonly latestClock: ClockTime | null;
  readonly minutesBeforeLow: number | null;
  readonly minutesAfterLow: number | null;
  readonly daylightMarginMinutes: number | null;
  readonly minimumMinutes: number | null;
}

/** What a date taken by hand may overrule, the least grave first. Daylight and cut-off never. */
export type OverruledRule = 'minimum-length' | 'working-level' | 'hours';

/** A working window, and the rules that had to give way for it. */
export interface TakenWindow {
  readonly window: WorkingWindow;
  readonly overruled: readonly OverruledRule[];
}

/** Every way to overrule, the fewest rules first. */
const WAYS: readonly (readonly OverruledRule[])[] = [
  ['minimum-length'],
  ['working-level'],
  ['hours'],
  ['minimum-length', 'working-level'],
  ['minimum-length', 'hours'],
  ['working-level', 'hours'],
  ['minimum-length', 'working-level', 'hours'],
];

/** The rules of a shore narrowed by those of a plan on it. */
export function narrowedRules(shore: ShoreRules, plan: PlanWindowRules): ShoreRules {
  const { earliestClock, latestClock } = plan;
  const isLater = earliestClock !== null && earliestClock > shore.earliestClock;
  const isEarlier = latestClock !== null && latestClock < shore.latestClock;
  const least = (ofShore: number, ofPlan: number | null): number =>
    Math.min(ofShore, ofPlan ?? Infinity);
  const most = (ofShore: number, ofPlan: number | null): number =>
    Math.max(ofShore, ofPlan ?? -Infinity);
  return {
    ...shore,
    workingLevelM: least(shore.workingLevelM, plan.planLevelM),
    earliestClock: isLater ? earliestClock : shore.earliestClock,
    latestClock: isEarlier ? latestClock : shore.latestClock,
    minutesBeforeLow: least(shore.minutesBeforeLow, plan.minutesBeforeLow),
    minutesAfterLow: least(shore.minutesAfterLow, plan.minutesAfterLow),
    daylightMarginMinutes: most(shore.daylightMarginMinutes, plan.daylightMarginMinutes),
    minimumMinutes: most(shore.minimumMinutes, plan.minimumMinutes),
  };
}

/**
 * The working window of a day that somebody takes by hand: the rules' own where they grant it, else
 * with as few of them overruled as it takes; of equally few the length gives way before the height,
 * and the height before the hours.
 *
 * Chosen on the safe side: the low water must come in daylight with its margin, with the surge added
 * it must stand under the cut-off level, and everyone must be off the shore, by the earlier of the
 * window's end and the margin before the cut-off level, no sooner than the low water and at least a
 * minute after the start. No hand overrules these. The reasons of a refusal are those that stand
 * when all that may give way has done so.
 */
export function windowTakenByHand(
  rules: ShoreRules,
  curve: TideCurve,
  on: CalendarDay,
): Verdict<TakenWindow, NoWindowReason> {
  let verdict = windowOn(rules, curve, on);
  if (verdict.isGranted) return granted({ window: verdict.value, overruled: [] });
  for (const overruled of WAYS) {
    verdict = windowOn(withoutRules(rules, overruled), curve, on);
    if (verdict.isGranted) return granted({ window: verdict.value, overruled });
  }
  return verdict;
}

function withoutRules(rules: ShoreRules, overruled: readonly OverruledRule[]): ShoreRules {
  return {
    ...rules,
    ...(overruled.includes('minimum-length') && { minimumMinutes: 1 }),
    ...(overruled.includes('working-level') && { workingLevelM: Infinity }),
    ...(overruled.includes('hours') && { earliestClock: '00:00', latestClock: '23:59' }),
  };
}
