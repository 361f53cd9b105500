import * as ns from 'rrule';
import type { Options } from 'rrule';
import type { RecurrenceRule, RuleEnd } from './recurrence-rule.ts';
import { granted, refused } from './result.ts';
import type { Verdict } from './result.ts';
import {
  addDays,
  dayAt,
  daysBetween,
  existsOnClock,
  instantOf,
  weekdayOf,
  yearOf,
} from './time.ts';
import type { CalendarDay, ClockTime, Instant } from './time.ts';

/** A recurrence set of RFC 5545 3.8.5: what the rule gives, and what was added and taken out. */
export interface Recurrence {
  readonly rule: RecurrenceRule;
  /** No date of the rule is earlier; intervals and counts run from here. A date only if it fits. */
  readonly startsOn: CalendarDay;
  /** Dates besides the rule's (RDATE), before startsOn too. */
  readonly alsoOn: readonly CalendarDay[];
  /** Dates taken out of both (EXDATE); the rule's count goes by as if they had stood. */
  readonly exceptOn: readonly CalendarDay[];
}

/** One date of a recurrence at its clock time. */
export interface RecurrenceTime {
  readonly on: CalendarDay;
  readonly at: Instant;
}

/** Why a span of dates is not looked through. */
export type SpanRefusal =
  | {
      readonly why: 'ends-before-it-begins';
      readonly fromOn: CalendarDay;
      readonly toOn: CalendarDay;
    }
  | { readonly why: 'span-too-long'; readonly days: number; readonly mostDays: number };

/** Ten years: no recurrence is looked through further than this from its start. */
export const MOST_RECURRENCE_DAYS = 3660;

// Under Node the package is one CommonJS value under `default`; a bundler gives its names as they are.
const lib = (Reflect.get(ns, 'default') ?? ns) as typeof ns;
const { RRule } = lib;

const FREQUENCIES = {
  DAILY: RRule.DAILY,
  WEEKLY: RRule.WEEKLY,
  MONTHLY: RRule.MONTHLY,
  YEARLY: RRule.YEARLY,
} as const;
const WEEKDAYS = [RRule.MO, RRule.TU, RRule.WE, RRule.TH, RRule.FR, RRule.SA, RRule.SU] as const;

const DAY_MS = 86_400_000;

// The package gives up on a rule only past the year 9999. The calendar repeats itself, weekdays and
// all, every 400 years: moved by whole such cycles towards that end, a rule that never comes again
// is looked for over some 400 years, not over 8,000.
const CYCLE_YEARS = 400;
const CYCLE_DAYS = 146_097;
const LAST_YEAR_TO_START = 9980;

/**
 * The dates of a recurrence from one day to another, both included, in order and each once. An end
 * that is an instant is read in the zone: the last date is its day there.
 *
 * Refuses to look further than MOST_RECURRENCE_DAYS from the earlier of startsOn and fromOn.
 */
export function recurrenceDays(
  recurrence: Recurrence,
  fromOn: CalendarDay,
  toOn: CalendarDay,
  zone: string,
): Verdict<CalendarDay[], SpanRefusal> {
  const { until } = recurrence.rule;
  const lastOn = until === null ? null : lastDay(until, zone);
  return datesOf(recurrence, fromOn, toOn, (on) =>
    lastOn !== null && on > lastOn ? 'ended' : 'stands',
  );
}

/**
 * The dates of a recurrence at a clock time of the zone, both days included, in order. A time of the
 * rule that the clocks skip is dropped and not counted (RFC 5545 3.3.10); an added one in a gap is
 * read with the offset before it, and a time shown twice means the first (3.3.5).
 */
export function recurrenceTimes(
  recurrence: Recurrence,
  clock: ClockTime,
  zone: string,
  fromOn: CalendarDay,
  toOn: CalendarDay,
): Verdict<RecurrenceTime[], SpanRefusal> {
  const { until } = recurrence.rule;
  const lastAt = until === null ? null : lastInstant(until, clock, zone);
  const days = datesOf(recurrence, fromOn, toOn, (on) => {
    if (lastAt !== null && instantOf(on, clock, zone) > lastAt) return 'ended';
    return existsOnClock(on, clock, zone) ? 'stands' : 'dropped';
  });
  return days.isGranted
    ? granted(days.value.map((on) => ({ on, at: instantOf(on, clock, zone) })))
    : days;
}

function datesOf(
  { rule, startsOn, alsoOn, exceptOn }: Recurrence,
  fromOn: CalendarDay,
  toOn: CalendarDay,
  judge: (on: CalendarDay) => 'stands' | 'dropped' | 'ended',
): Verdict<CalendarDay[], SpanRefusal> {
  if (toOn < fromOn) return refused({ why: 'ends-before-it-begins', fromOn, toOn });
  const days = daysBetween(startsOn < fromOn ? startsOn : fromOn, toOn) + 1;
  if (days > MOST_RECURRENCE_DAYS) {
    return refused({ why: 'span-too-long', days, mostDays: MOST_RECURRENCE_DAYS });
  }
  const ofRule: CalendarDay[] = [];
  for (const on of generatedDays(rule, startsOn, toOn)) {
    const verdict = judge(on);
    if (verdict === 'ended' || ofRule.length === rule.count) break;
    if (verdict === 'stands') ofRule.push(on);
  }
  const except = new Set(exceptOn);
  const all = [...new Set([...ofRule, ...alsoOn])];
  return granted(
    all
      .filter((on) => on >= fromOn && on <= toOn && !except.has(on))
      .sort((a, b) => (a < b ? -1 : 1)),
  );
}

/**
 * What the rule alone gives, its count and end left aside, as floating days: midnight on the wall
 * stands in the fields of UTC, so that no zone, not even that of the process, has a say.
 */
function generatedDays(
  rule: RecurrenceRule,
  startsOn: CalendarDay,
  toOn: CalendarDay,
): CalendarDay[] {
  if (toOn < startsOn) return [];
  const cycles = Math.floor((LAST_YEAR_TO_START - yearOf(startsOn)) / CYCLE_YEARS);
  const movedDays = cycles * CYCLE_DAYS;
  // The package takes a week in which the rule starts for a short one, and counts positions in that.
  const isWeekly = rule.frequency === 'WEEKLY';
  const fromWeekStart = (weekdayOf(startsOn) - rule.weekStart + 7) % 7;
  const beginsOn = isWeekly ? addDays(startsOn, -fromWeekStart) : startsOn;
  const dtstart = floating(addDays(beginsOn, movedDays));
  const options: Partial<Options> = {
    freq: FREQUENCIES[rule.frequency],
    interval: rule.interval,
    wkst: packageWeekday(rule.weekStart),
    dtstart,
    until: floating(addDays(toOn, movedDays)),
    ...given('bymonth', rule.months),
    ...given('byweekno', rule.weekNumbers),
    ...given('byyearday', rule.yearDays),
    ...given('bymonthday', rule.monthDays),
    ...given('byweekday', packageWeekdays(rule, startsOn)),
    ...given('bysetpos', rule.positions),
  };
  return new RRule(options, true)
    .all()
    .map((date) => addDays(beginsOn, (date.getTime() - dtstart.getTime()) / DAY_MS))
    .filter((on) => on >= startsOn);
}

/** Where the rule leaves the weekday open, RFC 5545 takes it from the start. */
function packageWeekdays(rule: RecurrenceRule, startsOn: CalendarDay): ns.Weekday[] {
  const { frequency, weekdays, weekNumbers, yearDays, monthDays } = rule;
  const isByWeek = frequency === 'WEEKLY' || weekNumbers.length > 0;
  if (isByWeek && weekdays.length + yearDays.length + monthDays.length === 0) {
    return [packageWeekday(weekdayOf(startsOn))];
  }
  return weekdays.map(({ weekday, place }) =>
    place === null ? packageWeekday(weekday) : packageWeekday(weekday).nth(place),
  );
}

function packageWeekday(weekday: number): ns.Weekday {
  const found = WEEKDAYS[weekday - 1];
  if (found === undefined) throw new RangeError(`Not a day of the week: ${weekday}`);
  return found;
}

function given<Key extends keyof Options>(
  key: Key,
  values: readonly (number | ns.Weekday)[],
): Partial<Options> {
  return values.length === 0 ? {} : { [key]: [...values] };
}

function floating(on: CalendarDay): Date {
  return new Date(instantOf(on, '00:00', 'UTC'));
}

function lastDay(until: RuleEnd, zone: string): CalendarDay {
  return until.kind === 'instant' ? dayAt(until.at, zone) : until.on;
}

/** An end that is a whole day lets in the clock time of that day. */
function lastInstant(until: RuleEnd, clock: ClockTime, zone: string): Instant {
  if (until.kind === 'instant') return until.at;
  return instantOf(until.on, until.kind === 'wall' ? until.clock : clock, zone);
}
