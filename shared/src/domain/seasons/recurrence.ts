import { recurrenceDays, MOST_RECURRENCE_DAYS } from '#shared/kernel/recurrence-dates.ts';
import type { SpanRefusal } from '#shared/kernel/recurrence-dates.ts';
import { plainRule, readRule, ruleText } from '#shared/kernel/recurrence-rule.ts';
import type {
  RecurrenceRule,
  RuleRefusal,
  RuleWeekday,
  Weekday,
} from '#shared/kernel/recurrence-rule.ts';
import { granted, refused } from '#shared/kernel/result.ts';
import type { Verdict } from '#shared/kernel/result.ts';
import { addDays } from '#shared/kernel/time.ts';
import type { CalendarDay } from '#shared/kernel/time.ts';
import { ruleSentence } from './rule-sentence.ts';

/** Which one of a weekday's days in a month: 1 the first to 5 the fifth, -1 the last. */
export type MonthPlace = 1 | 2 | 3 | 4 | 5 | -1;

/** How the dates of a season plan repeat, as a coordinator builds it (product rule R8). */
export type Pattern =
  | {
      readonly kind: 'weekly';
      /** 1 every week, 2 every second, counted from the week (from Monday) of the first date. */
      readonly everyWeeks: number;
      readonly weekdays: readonly Weekday[];
    }
  | {
      readonly kind: 'monthly-by-weekday';
      readonly places: readonly MonthPlace[];
      readonly weekdays: readonly Weekday[];
    }
  | {
      readonly kind: 'monthly-by-day';
      /** 1 to 31, and -1 for the last; a month that lacks the day has no date by it. */
      readonly days: readonly number[];
    }
  /** Any rule of RFC 5545 that gives days: 'FREQ=MONTHLY;BYDAY=FR;BYMONTHDAY=13'. */
  | { readonly kind: 'rule'; readonly text: string };

/** Why a pattern gives no rule. */
export type PatternRefusal =
  RuleRefusal | { readonly why: 'nothing-chosen'; readonly choice: 'weekdays' | 'places' | 'days' };

/** Why the next dates of a pattern cannot be given. */
export type NextDatesRefusal =
  PatternRefusal | SpanRefusal | { readonly why: 'no-date-comes'; readonly days: number };

const MONTH_PLACES: readonly MonthPlace[] = [1, 2, 3, 4, 5, -1];

/** The rule that a pattern stands for; choices are put in order and counted once. */
export function patternRule(pattern: Pattern): Verdict<RecurrenceRule, PatternRefusal> {
  if (pattern.kind === 'rule') return readRule(pattern.text);
  const reasons: PatternRefusal[] = [];
  const choose = (choice: 'weekdays' | 'places' | 'days', chosen: readonly number[]): void => {
    if (chosen.length === 0) reasons.push({ why: 'nothing-chosen', choice });
  };
  if (pattern.kind === 'monthly-by-day') choose('days', pattern.days);
  else choose('weekdays', pattern.weekdays);
  if (pattern.kind === 'monthly-by-weekday') choose('places', pattern.places);
  const [first, ...rest] = reasons;
  // Written out and read back, so that a number that no rule may hold is refused in the same words.
  return first === undefined ? readRule(ruleText(builtRule(pattern))) : refused(first, ...rest);
}

/** The pattern as the text of its rule, for keeping and for calendars. */
export function patternText(pattern: Pattern): Verdict<string, PatternRefusal> {
  const rule = patternRule(pattern);
  return rule.isGranted ? granted(ruleText(rule.value)) : rule;
}

/**
 * The pattern that a rule's text stands for: one that the builder knows where it says the same
 * whatever day it starts on, else the rule itself. A pattern written by patternText comes back.
 */
export function patternOf(text: string): Verdict<Pattern, RuleRefusal> {
  const read = readRule(text);
  if (!read.isGranted) return read;
  const canonical = ruleText(read.value);
  const { frequency, interval, weekdays, monthDays } = read.value;
  const guesses: Pattern[] = [];
  if (frequency === 'WEEKLY') {
    const chosen = weekdays.map(({ weekday }) => weekday);
    guesses.push({ kind: 'weekly', everyWeeks: interval, weekdays: inOrder(chosen) });
  } else if (frequency === 'MONTHLY' && monthDays.some((day) => day >= -1)) {
    const days = monthDays.filter((day) => day >= -1);
    guesses.push({ kind: 'monthly-by-day', days: lastAtTheEnd(days) });
  } else if (frequency === 'MONTHLY') {
    guesses.push({
      kind: 'monthly-by-weekday',
      places: MONTH_PLACES.filter((place) => weekdays.some((day) => day.place === place)),
      weekdays: inOrder(weekdays.map(({ weekday }) => weekday)),
    });
  }
  // A guess that leaves a part of the rule out does not write the same rule again.
  const same = guesses.find((guess) => {
    const again = patternRule(guess);
    return again.isGranted && sorted(again.value) === sorted(read.value);
  });
  return granted(same ?? { kind: 'rule', text: canonical });
}

/**
 * The pattern in an English sentence, without a full stop: 'Every second Saturday and Sunday', 'The
 * first and last Saturday of each month'. A rule that has no plain words is given itself: 'By the
 * rule FREQ=...'. The zone is that in which an end that is an instant is told.
 */
export function patternSentence(pattern: Pattern, zone: string): Verdict<string, PatternRefusal> {
  const rule = patternRule(pattern);
  return rule.isGranted ? granted(ruleSentence(rule.value, zone)) : rule;
}

/**
 * The next dates of a pattern that starts on fromOn, at most so many, fromOn itself included if it
 * fits. Fewer when the rule ends before or ten years have passed; with none at all it is refused.
 * Throws a RangeError on a count that is no whole number from 1.
 */
export function nextDates(
  pattern: Pattern,
  fromOn: CalendarDay,
  count: number,
  zone: string,
): Verdict<CalendarDay[], NextDatesRefusal> {
  if (!Number.isSafeInteger(count) || count < 1) throw new RangeError(`Not a count: ${count}`);
  const rule = patternRule(pattern);
  if (!rule.isGranted) return rule;
  const recurrence = { rule: rule.value, startsOn: fromOn, alsoOn: [], exceptOn: [] };
  const toOn = addDays(fromOn, MOST_RECURRENCE_DAYS - 1);
  const dates = recurrenceDays(recurrence, fromOn, toOn, zone);
  if (!dates.isGranted) return dates;
  return dates.value.length === 0
    ? refused({ why: 'no-date-comes', days: MOST_RECURRENCE_DAYS })
    : granted(dates.value.slice(0, count));
}

function builtRule(pattern: Exclude<Pattern, { kind: 'rule' }>): RecurrenceRule {
  if (pattern.kind === 'monthly-by-day') {
    return { ...plainRule('MONTHLY', 1), monthDays: lastAtTheEnd(pattern.days) };
  }
  if (pattern.kind === 'weekly') {
    const weekdays = inOrder(pattern.weekdays).map((weekday) => ({ weekday, place: null }));
    return { ...plainRule('WEEKLY', pattern.everyWeeks), weekdays };
  }
  const places = lastAtTheEnd(pattern.places);
  const weekdays: RuleWeekday[] = places.flatMap((place) =>
    inOrder(pattern.weekdays).map((weekday) => ({ weekday, place })),
  );
  return { ...plainRule('MONTHLY', 1), weekdays };
}

function inOrder<Value extends number>(values: readonly Value[]): Value[] {
  return [...new Set(values)].sort((a, b) => a - b);
}

/** Rising, then what counts from the end: 1, 2, 15, -2, -1. */
function lastAtTheEnd<Value extends number>(values: readonly Value[]): Value[] {
  const ordered = inOrder(values);
  return [...ordered.filter((value) => value > 0), ...ordered.filter((value) => value <= 0)];
}

/** The rule's text with its lists in one order: two rules that say the same are the same text. */
function sorted(rule: RecurrenceRule): string {
  const weekdays = rule.weekdays.toSorted(
    (a, b) => a.weekday - b.weekday || (a.place ?? 0) - (b.place ?? 0),
  );
  return ruleText({ ...rule, weekdays, monthDays: inOrder(rule.monthDays) });
}
