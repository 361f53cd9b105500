import { addDays, addMonths, endOfMonth } from '../../kernel/time.ts';
import type { CalendarDay } from '../../kernel/time.ts';

/**
 * From where a renewal runs. 'from-new-date': from the day of the new award. 'keeps-date': within
 * the window before the old last valid day the old date of the year is kept. 'month-end': always to
 * the end of a month, with a window in which the old month is kept, or null for none.
 */
export type RenewalRule =
  | { readonly kind: 'from-new-date' }
  | { readonly kind: 'keeps-date'; readonly windowMonths: number }
  | { readonly kind: 'month-end'; readonly windowMonths: number | null };

/** How long an award of a competency is valid: settings of the competency, not of the award. */
export interface ValidityRule {
  /** Whole months, at least one; null for a competency that does not expire. */
  readonly validityMonths: number | null;
  readonly renewal: RenewalRule;
  /**
   * Days after the old last valid day on which a late renewal still keeps the old date, as if it had
   * been in time; 0 for none. It only decides from where the new award runs: nobody is current in
   * those days, and with no window to keep a date in, it changes nothing.
   */
  readonly graceDays: number;
}

/**
 * The last valid day of a new award (that day included; null: it does not expire) and the rule that
 * gave it, so that a screen can say it:
 * - 'does-not-expire': the competency has no length of validity.
 * - 'from-award-day': it runs from the day of the award; there was no date to keep.
 * - 'keeps-date': it runs on from the old last valid day.
 * - 'too-early-to-keep': taken before the window opened on earliestOn, it runs from its own day.
 * - 'too-late-to-keep': taken after latestOn, the last day on which the date was kept, likewise.
 * Where isMonthEnd, it was then lengthened to the end of that month.
 */
export type Expiry =
  | { readonly why: 'does-not-expire'; readonly lastValidOn: null }
  | {
      readonly why: 'from-award-day';
      readonly lastValidOn: CalendarDay;
      readonly isMonthEnd: boolean;
    }
  | {
      readonly why: 'keeps-date';
      readonly lastValidOn: CalendarDay;
      readonly isMonthEnd: boolean;
      readonly previousLastValidOn: CalendarDay;
    }
  | {
      readonly why: 'too-early-to-keep';
      readonly lastValidOn: CalendarDay;
      readonly isMonthEnd: boolean;
      readonly earliestOn: CalendarDay;
    }
  | {
      readonly why: 'too-late-to-keep';
      readonly lastValidOn: CalendarDay;
      readonly isMonthEnd: boolean;
      readonly latestOn: CalendarDay;
    };

/**
 * Whether the settings make sense together: whole numbers, a validity of at least a month, a window
 * of at least a month that is shorter than the validity (else the same course taken twice would add
 * up), no negative days of grace. A competency that fails this cannot be saved.
 */
export function isUsableRule(rule: ValidityRule): boolean {
  const { validityMonths, graceDays } = rule;
  const window = windowMonthsOf(rule);
  return (
    isWholeFrom(0, graceDays) &&
    (validityMonths === null || isWholeFrom(1, validityMonths)) &&
    (window === null || (isWholeFrom(1, window) && window < (validityMonths ?? Infinity)))
  );
}

/**
 * The first and the last day on which a renewal keeps the old date, both included; null where the
 * rule keeps no dates. The first is the day after the old last valid day, less the window (15 May
 * with one month: 16 April), clamped to the end of a short month.
 * Source: product rule R2; the rule of the UK vehicle (MOT) test for keeping its date.
 */
export function keepingWindow(
  rule: ValidityRule,
  previousLastValidOn: CalendarDay,
): { readonly earliestOn: CalendarDay; readonly latestOn: CalendarDay } | null {
  const window = windowMonthsOf(rule);
  if (rule.validityMonths === null || window === null) return null;
  return {
    earliestOn: addMonths(addDays(previousLastValidOn, 1), -window),
    latestOn: addDays(previousLastValidOn, rule.graceDays),
  };
}

/**
 * The last valid day of an award given on awardedOn, after one that was valid through
 * previousLastValidOn (null: a first award, or the one before did not expire).
 *
 * To the day: the day before the anniversary; 29 February becomes 28 February first, then one day
 * less. To the month end: the last day of the month in which the anniversary falls. A date kept
 * counts from the day after the old last valid day. A renewal after lapse runs from its own day
 * unless the competency has days of grace. Another date printed on the certificate is for the
 * trainer to enter, and wins over what this says. Throws a RangeError on settings that are not usable.
 * Source: product rule R2.
 */
export function expiryOf(
  rule: ValidityRule,
  awardedOn: CalendarDay,
  previousLastValidOn: CalendarDay | null,
): Expiry {
  if (!isUsableRule(rule)) throw new RangeError('The settings of this competency do not fit');
  const { validityMonths } = rule;
  if (validityMonths === null) return { why: 'does-not-expire', lastValidOn: null };

  const isMonthEnd = rule.renewal.kind === 'month-end';
  const fromOwnDay = {
    lastValidOn: isMonthEnd
      ? endOfMonth(addMonths(awardedOn, validityMonths))
      : addDays(addMonths(awardedOn, validityMonths), -1),
    isMonthEnd,
  };
  if (previousLastValidOn === null) return { why: 'from-award-day', ...fromOwnDay };
  const window = keepingWindow(rule, previousLastValidOn);
  if (window === null) return { why: 'from-award-day', ...fromOwnDay };

  const { earliestOn, latestOn } = window;
  if (awardedOn < earliestOn) return { why: 'too-early-to-keep', ...fromOwnDay, earliestOn };
  if (awardedOn > latestOn) return { why: 'too-late-to-keep', ...fromOwnDay, latestOn };
  return {
    why: 'keeps-date',
    lastValidOn: isMonthEnd
      ? endOfMonth(addMonths(previousLastValidOn, validityMonths))
      : addDays(addMonths(addDays(previousLastValidOn, 1), validityMonths), -1),
    isMonthEnd,
    previousLastValidOn,
  };
}

function windowMonthsOf(rule: ValidityRule): number | null {
  return rule.renewal.kind === 'from-new-date' ? null : rule.renewal.windowMonths;
}

function isWholeFrom(least: number, count: number): boolean {
  return Number.isSafeInteger(count) && count >= least;
}
