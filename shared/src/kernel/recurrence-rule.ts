import { granted, refused } from './result.ts';
import type { Verdict } from './result.ts';
import { fromIso, isCalendarDay, isClockTime, toIso } from './time.ts';
import type { CalendarDay, ClockTime, Instant } from './time.ts';

/** A day of the week by ISO 8601: 1 Monday to 7 Sunday. */
export type Weekday = 1 | 2 | 3 | 4 | 5 | 6 | 7;

/** How often a rule repeats. Rules by the hour and finer are refused: dates are what they give. */
export type Frequency = 'DAILY' | 'WEEKLY' | 'MONTHLY' | 'YEARLY';

/**
 * The last moment of a rule, itself included (UNTIL): a whole day, a time on the wall, or an instant.
 * Seconds are cut off, since sessions start on whole minutes.
 */
export type RuleEnd =
  | { readonly kind: 'day'; readonly on: CalendarDay }
  | { readonly kind: 'wall'; readonly on: CalendarDay; readonly clock: ClockTime }
  | { readonly kind: 'instant'; readonly at: Instant };

/** A weekday, or one place of it in its month or year: 1 the first, -1 the last; null for all. */
export interface RuleWeekday {
  readonly weekday: Weekday;
  readonly place: number | null;
}

/** A recurrence rule of RFC 5545 3.3.10, taken apart. A part that is left out is an empty list. */
export interface RecurrenceRule {
  readonly frequency: Frequency;
  /** Every how many days, weeks, months or years. */
  readonly interval: number;
  /** How many dates in all; never together with an end. */
  readonly count: number | null;
  readonly until: RuleEnd | null;
  readonly weekStart: Weekday;
  readonly months: readonly number[];
  readonly weekNumbers: readonly number[];
  readonly yearDays: readonly number[];
  readonly monthDays: readonly number[];
  readonly weekdays: readonly RuleWeekday[];
  /** Which of the dates of each day, week, month or year stay: 1 the first, -1 the last. */
  readonly positions: readonly number[];
}

/** Why a text is no rule that can be followed here; each names the part that stands in the way. */
export type RuleRefusal =
  | { readonly why: 'empty-rule' }
  | { readonly why: 'unreadable-part'; readonly part: string }
  | { readonly why: 'part-named-twice'; readonly name: string }
  | { readonly why: 'frequency-missing' }
  | { readonly why: 'more-often-than-daily'; readonly part: string }
  | { readonly why: 'clock-time-in-rule'; readonly part: string }
  | { readonly why: 'interval-too-large'; readonly part: string; readonly mostInterval: number }
  | { readonly why: 'count-and-until' }
  /** RFC 5545 bars this part beside this frequency, or alone. */
  | { readonly why: 'part-out-of-place'; readonly part: string; readonly frequency: Frequency }
  /** Such days do not exist, like 30 February. */
  | { readonly why: 'never-comes'; readonly part: string };

/** A rule that repeats once each so often, with nothing else said. */
export function plainRule(frequency: Frequency, interval: number): RecurrenceRule {
  return {
    frequency,
    interval,
    count: null,
    until: null,
    weekStart: 1,
    months: [],
    weekNumbers: [],
    yearDays: [],
    monthDays: [],
    weekdays: [],
    positions: [],
  };
}

// Over ten years and more there would be no second date to speak of.
const MOST_INTERVAL: Readonly<Record<Frequency, number>> = {
  DAILY: 3660,
  WEEKLY: 520,
  MONTHLY: 120,
  YEARLY: 10,
};
const WEEKDAY_CODES = ['MO', 'TU', 'WE', 'TH', 'FR', 'SA', 'SU'];
const TOO_OFTEN = ['SECONDLY', 'MINUTELY', 'HOURLY'];
const CLOCK_PARTS = ['BYHOUR', 'BYMINUTE', 'BYSECOND'];
const LONGEST_MONTH_DAYS = [31, 29, 31, 30, 31, 30, 31, 31, 30, 31, 30, 31];
const UNTIL_TEXT =
  /^(?<year>\d{4})(?<month>\d\d)(?<day>\d\d)(?:T(?<hour>\d\d)(?<minute>\d\d)(?<second>[0-5]\d|60)(?<zulu>Z?))?$/;

/** How each part is read; undefined for a value that cannot be read. */
const READ: Readonly<Record<string, (value: string) => Partial<RecurrenceRule> | undefined>> = {
  FREQ: (value) => wrap('frequency', isFrequency(value) ? value : undefined),
  INTERVAL: (value) => wrap('interval', wholeFrom1(value)),
  COUNT: (value) => wrap('count', wholeFrom1(value)),
  UNTIL: (value) => wrap('until', ruleEnd(value)),
  WKST: (value) => wrap('weekStart', weekdayOfCode(value)),
  BYMONTH: (value) => wrap('months', numbers(value, 1, 12)),
  BYWEEKNO: (value) => wrap('weekNumbers', numbers(value, -53, 53)),
  BYYEARDAY: (value) => wrap('yearDays', numbers(value, -366, 366)),
  BYMONTHDAY: (value) => wrap('monthDays', numbers(value, -31, 31)),
  BYDAY: (value) => wrap('weekdays', ruleWeekdays(value)),
  BYSETPOS: (value) => wrap('positions', numbers(value, -366, 366)),
};

/**
 * The rule that a text names, as RFC 5545 3.3.10 writes it ('FREQ=WEEKLY;BYDAY=SA', with or without
 * 'RRULE:' before it, in capitals or not). Every part that stands in the way is named: one that
 * cannot be read, stands twice or where the standard bars it, gives clock times (they come from the
 * tide or from a clock time apart), repeats more often than daily, has an interval so large that no
 * second date would come in ten years, or asks for a day that no calendar has.
 */
export function readRule(text: string): Verdict<RecurrenceRule, RuleRefusal> {
  const parts = text
    .trim()
    .toUpperCase()
    .replace(/^RRULE:/, '')
    .replace(/;$/, '')
    .split(';');
  if (parts.length === 1 && parts[0] === '') return refused({ why: 'empty-rule' });
  const reasons: RuleRefusal[] = [];
  const partNamed = new Map<string, string>();
  let read: Partial<RecurrenceRule> = {};
  for (const part of parts) {
    const [name, value] = splitOnce(part);
    if (partNamed.has(name)) reasons.push({ why: 'part-named-twice', name });
    partNamed.set(name, part);
    if (CLOCK_PARTS.includes(name)) reasons.push({ why: 'clock-time-in-rule', part });
    else if (name === 'FREQ' && TOO_OFTEN.includes(value)) {
      reasons.push({ why: 'more-often-than-daily', part });
    } else {
      const found = Object.hasOwn(READ, name) ? READ[name]?.(value) : undefined;
      if (found === undefined) reasons.push({ why: 'unreadable-part', part });
      else read = { ...read, ...found };
    }
  }
  if (!partNamed.has('FREQ')) reasons.push({ why: 'frequency-missing' });
  if (read.frequency !== undefined) {
    const rule = { ...plainRule(read.frequency, 1), ...read };
    reasons.push(...reasonsAgainst(rule, partNamed));
    if (reasons.length === 0) return granted(rule);
  }
  const [first = { why: 'frequency-missing' } as const, ...rest] = reasons;
  return refused(first, ...rest);
}

/** The rule as RFC 5545 writes it, in a fixed order and without the parts that say nothing. */
export function ruleText(rule: RecurrenceRule): string {
  const parts: [string, string][] = [
    ['FREQ', rule.frequency],
    ['INTERVAL', rule.interval === 1 ? '' : String(rule.interval)],
    ['COUNT', rule.count === null ? '' : String(rule.count)],
    ['UNTIL', rule.until === null ? '' : untilText(rule.until)],
    ['WKST', rule.weekStart === 1 ? '' : codeOf(rule.weekStart)],
    ['BYMONTH', rule.months.join()],
    ['BYWEEKNO', rule.weekNumbers.join()],
    ['BYYEARDAY', rule.yearDays.join()],
    ['BYMONTHDAY', rule.monthDays.join()],
    ['BYDAY', rule.weekdays.map((day) => `${day.place ?? ''}${codeOf(day.weekday)}`).join()],
    ['BYSETPOS', rule.positions.join()],
  ];
  return parts
    .filter(([, value]) => value !== '')
    .map(([name, value]) => `${name}=${value}`)
    .join(';');
}

/** What RFC 5545 3.3.10 bars, and what would never give a date or never a second one. */
function reasonsAgainst(
  rule: RecurrenceRule,
  partNamed: ReadonlyMap<string, string>,
): RuleRefusal[] {
  const { frequency, months, monthDays } = rule;
  const reasons: RuleRefusal[] = [];
  const part = (name: string): string => partNamed.get(name) ?? name;
  const bar = (name: string, isBarred: boolean): void => {
    if (!isBarred || !partNamed.has(name)) return;
    reasons.push({ why: 'part-out-of-place', part: part(name), frequency });
  };
  const hasPlaces = rule.weekdays.some(({ place }) => place !== null);
  const isByMonthOrYear = frequency === 'MONTHLY' || frequency === 'YEARLY';
  bar('BYDAY', hasPlaces && (!isByMonthOrYear || rule.weekNumbers.length > 0));
  bar('BYMONTHDAY', frequency === 'WEEKLY');
  bar('BYYEARDAY', frequency !== 'YEARLY');
  bar('BYWEEKNO', frequency !== 'YEARLY');
  bar('BYSETPOS', ![...partNamed.keys()].some((name) => /^BY(?!SETPOS)/.test(name)));
  if (rule.count !== null && rule.until !== null) reasons.push({ why: 'count-and-until' });
  const mostInterval = MOST_INTERVAL[frequency];
  if (rule.interval > mostInterval) {
    reasons.push({ why: 'interval-too-large', part: part('INTERVAL'), mostInterval });
  }
  const isNever =
    monthDays.length > 0 &&
    months.length > 0 &&
    months.every((month) =>
      monthDays.every((day) => Math.abs(day) > (LONGEST_MONTH_DAYS[month - 1] ?? 0)),
    );
  if (isNever) {
    reasons.push({ why: 'never-comes', part: `${part('BYMONTH')};${part('BYMONTHDAY')}` });
  }
  return reasons;
}

function wrap<Key extends keyof RecurrenceRule>(
  key: Key,
  value: RecurrenceRule[Key] | undefined,
): Partial<RecurrenceRule> | undefined {
  return value === undefined ? undefined : { [key]: value };
}

function splitOnce(part: string): [string, string] {
  const at = part.indexOf('=');
  return at < 0 ? [part, ''] : [part.slice(0, at), part.slice(at + 1)];
}

function isFrequency(value: string): value is Frequency {
  return Object.hasOwn(MOST_INTERVAL, value);
}

function wholeFrom1(value: string): number | undefined {
  return /^\d{1,9}$/.test(value) && Number(value) >= 1 ? Number(value) : undefined;
}

/** A list of whole numbers other than 0 within both ends, in the order given, each once. */
function numbers(value: string, least: number, most: number): number[] | undefined {
  const items = value.split(',');
  const isSound = (item: string): boolean =>
    /^[+-]?\d{1,3}$/.test(item) &&
    Number(item) !== 0 &&
    Number(item) >= least &&
    Number(item) <= most;
  return items.every(isSound) ? [...new Set(items.map(Number))] : undefined;
}

function ruleWeekdays(value: string): RuleWeekday[] | undefined {
  const days = new Map<string, RuleWeekday>();
  for (const item of value.split(',')) {
    const { place, code } = /^(?<place>[+-]?\d{1,2})?(?<code>[A-Z]{2})$/.exec(item)?.groups ?? {};
    const weekday = weekdayOfCode(code ?? '');
    if (weekday === undefined) return undefined;
    if (place !== undefined && !(Math.abs(Number(place)) >= 1 && Math.abs(Number(place)) <= 53)) {
      return undefined;
    }
    const day = { weekday, place: place === undefined ? null : Number(place) };
    days.set(`${day.place ?? ''}${weekday}`, day);
  }
  return [...days.values()];
}

function weekdayOfCode(code: string): Weekday | undefined {
  const index = WEEKDAY_CODES.indexOf(code);
  return index < 0 ? undefined : ((index + 1) as Weekday);
}

function codeOf(weekday: Weekday): string {
  const code = WEEKDAY_CODES[weekday - 1];
  if (code === undefined) throw new RangeError(`Not a day of the week: ${weekday}`);
  return code;
}

function ruleEnd(value: string): RuleEnd | undefined {
  const { year, month, day, hour, minute, zulu } = UNTIL_TEXT.exec(value)?.groups ?? {};
  const on = `${year ?? ''}-${month ?? ''}-${day ?? ''}`;
  if (!isCalendarDay(on)) return undefined;
  if (hour === undefined) return { kind: 'day', on };
  const clock = `${hour}:${minute ?? ''}`;
  if (!isClockTime(clock)) return undefined;
  return zulu === 'Z'
    ? { kind: 'instant', at: fromIso(`${on}T${clock}Z`) }
    : { kind: 'wall', on, clock };
}

function untilText(until: RuleEnd): string {
  const bare = (text: string): string => text.replaceAll(/[-:]/g, '');
  if (until.kind === 'day') return bare(until.on);
  if (until.kind === 'wall') return `${bare(until.on)}T${bare(until.clock)}00`;
  return `${bare(toIso(until.at).slice(0, 16))}00Z`;
}
