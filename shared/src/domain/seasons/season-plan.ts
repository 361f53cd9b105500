import { windowOn } from '#shared/domain/tides/shore-water.ts';
import type { ShoreRules } from '#shared/domain/tides/shore-water.ts';
import type { TideCurve } from '#shared/domain/tides/tide-curve.ts';
import type {
  NoWindowReason,
  WindowCut,
  WorkingWindow,
} from '#shared/domain/tides/working-window.ts';
import { recurrenceDays } from '#shared/kernel/recurrence-dates.ts';
import type { SpanRefusal } from '#shared/kernel/recurrence-dates.ts';
import { granted, refused } from '#shared/kernel/result.ts';
import type { Verdict } from '#shared/kernel/result.ts';
import { daysBetween } from '#shared/kernel/time.ts';
import type { CalendarDay } from '#shared/kernel/time.ts';
import { narrowedRules, windowTakenByHand } from './plan-window.ts';
import type { OverruledRule, PlanWindowRules, TakenWindow } from './plan-window.ts';
import { patternRule } from './recurrence.ts';
import type { Pattern, PatternRefusal } from './recurrence.ts';

/**
 * What was decided for one date by hand, one decision a date. `on` is always the date as it stood
 * before: so a decision outlives a change of the pattern, and a moved date keeps its name.
 *
 * A date that the pattern no longer gives: added and moved dates stand all the same; skipping and
 * taking rest, and hold again when the date comes back.
 */
export type PlanException =
  | { readonly kind: 'skip'; readonly on: CalendarDay; readonly reason: string }
  /** The date is taken although the rules refuse it, as far as windowTakenByHand allows. */
  | { readonly kind: 'take'; readonly on: CalendarDay; readonly reason: string }
  | {
      readonly kind: 'add';
      readonly on: CalendarDay;
      readonly reason: string;
      /** Taken by hand too, should the rules refuse it. */
      readonly isByHand: boolean;
    }
  | {
      readonly kind: 'move';
      readonly on: CalendarDay;
      readonly toOn: CalendarDay;
      readonly reason: string;
      readonly isByHand: boolean;
    };

/** Days on which the shore is closed, both included. No hand overrules it: shorten the closure. */
export interface Closure {
  readonly fromOn: CalendarDay;
  readonly toOn: CalendarDay;
  readonly reason: string;
}

/** A season plan (product rule R8). */
export interface SeasonPlan {
  readonly pattern: Pattern;
  /** Both included. The pattern counts its weeks from here. Added and moved dates may lie outside. */
  readonly fromOn: CalendarDay;
  readonly toOn: CalendarDay;
  readonly windowRules: PlanWindowRules;
  readonly exceptions: readonly PlanException[];
  readonly closures: readonly Closure[];
}

/** Why a date of a plan has no session. */
export type SkipReason =
  | { readonly why: 'skipped-by-hand'; readonly reason: string }
  | ({ readonly why: 'closed' } & Closure)
  /** One session a day: the plan already holds one that day, that of another of its dates. */
  | { readonly why: 'day-held-by-another-date'; readonly originalOn: CalendarDay }
  | NoWindowReason;

interface PlanDay {
  readonly on: CalendarDay;
  /** Where the date stood before it was moved; else the same day. No two dates share it. */
  readonly originalOn: CalendarDay;
  /** Whether the pattern gives the original date. */
  readonly source: 'pattern' | 'added';
}

/** A date with a session. */
export interface TakenDate extends PlanDay {
  readonly state: 'taken';
  readonly window: WorkingWindow;
  /** Whether the rules alone would have refused it; then which ones were overruled. */
  readonly byHand: boolean;
  readonly overruled: readonly OverruledRule[];
  /** What cut the start, and the time off the shore, short of the usual time round low water. */
  readonly cuts: readonly WindowCut[];
  /** From the start to off the shore. */
  readonly leftMinutes: number;
}

/** A date without one. */
export interface SkippedDate extends PlanDay {
  readonly state: 'skipped';
  readonly reasons: readonly [SkipReason, ...SkipReason[]];
  /** Whether somebody skipped it, rather than the rules. */
  readonly byHand: boolean;
  /** Whether the rules refuse it, yet it may be taken by hand. */
  readonly mayTakeByHand: boolean;
}

export type PlanDate = TakenDate | SkippedDate;

/** Why a plan gives no dates. */
export type PlanRefusal =
  | PatternRefusal
  | SpanRefusal
  | { readonly why: 'two-exceptions-for-a-date'; readonly on: CalendarDay }
  | ({ readonly why: 'closure-ends-before-it-begins' } & Closure);

/** Two years: the working window of every date is worked out, so a plan is a season, not a decade. */
export const MOST_PLAN_DAYS = 732;

const MINUTE_MS = 60_000;

/** A date of the plan before the water is asked. */
interface Candidate extends PlanDay {
  readonly exception: PlanException | undefined;
}

/**
 * The dates of a season plan in order, each taken with its working window or skipped with every
 * reason (product rules R7 and R8). Nothing is written by asking: this is the preview too.
 *
 * Of two dates on the same day a moved one is held, before the one that the day has itself.
 */
export function planDates(
  plan: SeasonPlan,
  shore: ShoreRules,
  curve: TideCurve,
): Verdict<PlanDate[], PlanRefusal> {
  const candidates = candidatesOf(plan, shore.zone);
  if (!candidates.isGranted) return candidates;
  const rules = narrowedRules(shore, plan.windowRules);
  const heldBy = new Map<CalendarDay, CalendarDay>();
  const dates = candidates.value.map((candidate) => {
    const { on, originalOn, source } = candidate;
    const date = judged(candidate, plan.closures, heldBy.get(on), rules, curve);
    if (date.state === 'taken') heldBy.set(on, originalOn);
    return { on, originalOn, source, ...date };
  });
  return granted(dates.sort((a, b) => compare(a.on, b.on) || compare(a.originalOn, b.originalOn)));
}

/** The sessions of a plan: its taken dates and no others. */
export function plannedSessions(dates: readonly PlanDate[]): TakenDate[] {
  return dates.filter((date) => date.state === 'taken');
}

/** Every date of the plan, moved ones first, since they hold their new day. */
function candidatesOf(plan: SeasonPlan, zone: string): Verdict<Candidate[], PlanRefusal> {
  const { fromOn, toOn, exceptions } = plan;
  const rule = patternRule(plan.pattern);
  const reasons: PlanRefusal[] = rule.isGranted ? [] : [...rule.reasons];
  const days = daysBetween(fromOn, toOn) + 1;
  if (days > MOST_PLAN_DAYS) {
    reasons.push({ why: 'span-too-long', days, mostDays: MOST_PLAN_DAYS });
  }
  const exceptionOn = new Map<CalendarDay, PlanException>();
  for (const exception of exceptions) {
    const { on } = exception;
    if (exceptionOn.has(on)) reasons.push({ why: 'two-exceptions-for-a-date', on });
    exceptionOn.set(on, exception);
  }
  for (const closure of plan.closures) {
    if (closure.toOn < closure.fromOn) {
      reasons.push({ why: 'closure-ends-before-it-begins', ...closure });
    }
  }
  const [first, ...rest] = reasons;
  if (first !== undefined) return refused(first, ...rest);
  if (!rule.isGranted) return rule;
  const recurrence = { rule: rule.value, startsOn: fromOn, alsoOn: [], exceptOn: [] };
  const ofPattern = recurrenceDays(recurrence, fromOn, toOn, zone);
  if (!ofPattern.isGranted) return ofPattern;

  const isOfPattern = new Set(ofPattern.value);
  const standing = exceptions.filter(({ kind }) => kind === 'add' || kind === 'move');
  const originals = new Set([...ofPattern.value, ...standing.map(({ on }) => on)]);
  const candidates = [...originals].sort(compare).map((originalOn): Candidate => {
    const exception = exceptionOn.get(originalOn);
    const on = exception?.kind === 'move' ? exception.toOn : originalOn;
    const source = isOfPattern.has(originalOn) ? 'pattern' : 'added';
    return { on, originalOn, source, exception };
  });
  const isMoved = ({ exception }: Candidate): number => (exception?.kind === 'move' ? 0 : 1);
  return granted(candidates.sort((a, b) => isMoved(a) - isMoved(b)));
}

type Judged = Omit<TakenDate, keyof PlanDay> | Omit<SkippedDate, keyof PlanDay>;

function judged(
  { on, exception }: Candidate,
  closures: readonly Closure[],
  heldByOn: CalendarDay | undefined,
  rules: ShoreRules,
  curve: TideCurve,
): Judged {
  const isSkipped = exception?.kind === 'skip';
  const barred: SkipReason[] = [];
  if (isSkipped) barred.push({ why: 'skipped-by-hand', reason: exception.reason });
  for (const closure of closures) {
    if (closure.fromOn <= on && on <= closure.toOn) barred.push({ why: 'closed', ...closure });
  }
  if (heldByOn !== undefined) {
    barred.push({ why: 'day-held-by-another-date', originalOn: heldByOn });
  }
  const [bar, ...furtherBars] = barred;
  if (bar !== undefined) return skipped([bar, ...furtherBars], isSkipped, false);

  const byRules = windowOn(rules, curve, on);
  if (byRules.isGranted) return taken({ window: byRules.value, overruled: [] });
  const byHand = windowTakenByHand(rules, curve, on);
  if (byHand.isGranted && isTakenByHand(exception)) return taken(byHand.value);
  return skipped(byRules.reasons, false, byHand.isGranted);
}

function isTakenByHand(exception: PlanException | undefined): boolean {
  if (exception === undefined || exception.kind === 'skip') return false;
  return exception.kind === 'take' || exception.isByHand;
}

function skipped(reasons: SkippedDate['reasons'], byHand: boolean, mayTakeByHand: boolean): Judged {
  return { state: 'skipped', reasons, byHand, mayTakeByHand };
}

function taken({ window, overruled }: TakenWindow): Judged {
  return {
    state: 'taken',
    window,
    byHand: overruled.length > 0,
    overruled,
    // The end only matters where it is also the time off the shore.
    cuts: window.cuts.filter(({ edge, by }) => edge !== 'end' && by !== 'low-water-time'),
    leftMinutes: (window.offTheShoreBy - window.startsAt) / MINUTE_MS,
  };
}

function compare(a: CalendarDay, b: CalendarDay): number {
  return a < b ? -1 : a > b ? 1 : 0;
}
