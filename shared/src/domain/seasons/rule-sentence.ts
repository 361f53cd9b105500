import { ruleText } from '#shared/kernel/recurrence-rule.ts';
import type { RecurrenceRule, RuleEnd, Weekday } from '#shared/kernel/recurrence-rule.ts';
import { clockAt, dayAt, formatDay, zoneName } from '#shared/kernel/time.ts';

const WEEKDAY_NAMES = [
  'Monday',
  'Tuesday',
  'Wednesday',
  'Thursday',
  'Friday',
  'Saturday',
  'Sunday',
];
const MONTH_NAMES = [
  'January',
  'February',
  'March',
  'April',
  'May',
  'June',
  'July',
  'August',
  'September',
  'October',
  'November',
  'December',
];
const ORDINALS = [
  'first',
  'second',
  'third',
  'fourth',
  'fifth',
  'sixth',
  'seventh',
  'eighth',
  'ninth',
  'tenth',
  'eleventh',
  'twelfth',
];
const SHORTEST_MONTH_DAYS = [31, 28, 31, 30, 31, 30, 31, 31, 30, 31, 30, 31];

/**
 * A rule in an English sentence, without a full stop. Only what the words truly say is put in words;
 * for any other rule the rule itself is given. An end that is an instant is told in the zone.
 */
export function ruleSentence(rule: RecurrenceRule, zone: string): string {
  const words = dateWords(asMonthly(rule));
  if (words === null) return `By the rule ${ruleText(rule)}`;
  const count = rule.count === null ? '' : `, ${times(rule.count)}`;
  return `${words}${count}${rule.until === null ? '' : `, until ${endWords(rule.until, zone)}`}`;
}

/**
 * The same rule by the month, where it is the same: every day or week or year, with days that lie in
 * their month, is every month. One way of saying them is then enough.
 */
function asMonthly(rule: RecurrenceRule): RecurrenceRule {
  const { frequency, months, weekdays, monthDays } = rule;
  const isOther =
    rule.interval > 1 ||
    rule.positions.length + rule.weekNumbers.length + rule.yearDays.length > 0 ||
    weekdays.length + monthDays.length === 0 ||
    (frequency === 'YEARLY' && months.length === 0 && weekdays.some(({ place }) => place !== null));
  return isOther ? rule : { ...rule, frequency: 'MONTHLY' };
}

/** What the sentence says of the dates; null where no plain words say it. */
function dateWords(rule: RecurrenceRule): string | null {
  const { frequency, interval, months, weekdays, monthDays } = rule;
  if (rule.positions.length + rule.weekNumbers.length + rule.yearDays.length > 0) return null;
  const isBare = weekdays.length + monthDays.length === 0;
  // 'Every second Saturday in June' would be read as the second one of June.
  if (interval > 1 && months.length > 0) return null;
  if (frequency === 'DAILY') return isBare ? everyWords(interval, 'day') + inMonths(months) : null;
  if (frequency === 'WEEKLY') {
    // Weeks that do not begin on Monday can pair other days than the words would say.
    if (rule.weekStart !== 1 && interval > 1 && weekdays.length !== 1) return null;
    if (!isBare) return everyWords(interval, weekdayWords(rule)) + inMonths(months);
    return months.length > 0 ? null : `${everyWords(interval, 'week')}, on the day it starts`;
  }
  if (frequency === 'MONTHLY' && !isBare) return monthWords(rule);
  if (months.length > 0 || !isBare) return null;
  const unit = frequency === 'MONTHLY' ? 'month' : 'year';
  return `${everyWords(interval, unit)}, on the date it starts`;
}

/** Dates of the month: by place, by weekday, by day, or weekdays on certain days. */
function monthWords(rule: RecurrenceRule): string | null {
  const { interval, months, weekdays, monthDays } = rule;
  const places = [...new Set(weekdays.map(({ place }) => place))].sort(lastAtTheEnd);
  const isAllPlaces = places.length === 1 && places[0] === null;
  const isEveryMonth = interval === 1;
  const ofMonths =
    months.length > 0
      ? `of ${monthNames(months)}`
      : isEveryMonth
        ? 'of each month'
        : `of every ${ordinal(interval)} month`;

  if (weekdays.length === 0) {
    const days = monthDayWords(monthDays);
    if (days === null) return null;
    const latest = Math.max(...monthDays);
    const isLacking = SHORTEST_MONTH_DAYS.some(
      (length, index) => length < latest && (months.length === 0 || months.includes(index + 1)),
    );
    return `The ${days} ${ofMonths}${isLacking ? ', where the month has that day' : ''}`;
  }
  if (isAllPlaces) {
    const every = everyWords(1, weekdayWords(rule));
    if (monthDays.length === 0) {
      return isEveryMonth ? every + inMonths(months) : `${every} ${ofMonths}`;
    }
    const days = monthDayWords(monthDays, 'or');
    if (days === null || weekdays.length > 1) return null;
    return `${every} that is the ${days} ${ofMonths}`;
  }
  if (monthDays.length > 0) return null;
  const placeNames = places.map(placeName);
  const days = [...new Set(weekdays.map(({ weekday }) => weekday))];
  const isProduct = weekdays.length === places.length * days.length;
  if (!isProduct || placeNames.includes(null)) return null;
  // Of several days the first of each is meant, never the first of them all.
  const which = joined(placeNames.filter((name) => name !== null));
  const each = days.toSorted((a, b) => a - b).map((day) => `${which} ${weekdayName(day)}`);
  return `The ${each.join(' and the ')} ${ofMonths}`;
}

/** 'every Saturday', 'every second week', 'every 20th day', with a capital. */
function everyWords(interval: number, what: string): string {
  return interval === 1 ? `Every ${what}` : `Every ${ordinal(interval)} ${what}`;
}

/** 'Saturday and Sunday'; all seven are simply 'day' where each week counts. */
function weekdayWords({ weekdays, interval, frequency }: RecurrenceRule): string {
  const days = [...new Set(weekdays.map(({ weekday }) => weekday))].sort((a, b) => a - b);
  const isEveryDay = days.length === 7 && (interval === 1 || frequency === 'MONTHLY');
  return isEveryDay ? 'day' : joined(days.map(weekdayName));
}

function monthDayWords(monthDays: readonly number[], word: 'and' | 'or' = 'and'): string | null {
  const fromStart = monthDays.filter((day) => day > 0).sort((a, b) => a - b);
  if (monthDays.some((day) => day < -1)) return null;
  const names = fromStart.map((day) => `${day}${suffix(day)}`);
  return joined(monthDays.includes(-1) ? [...names, 'last day'] : names, word);
}

function placeName(place: number | null): string | null {
  if (place === -1) return 'last';
  return place === null || place < 1 || place > 5 ? null : ordinal(place);
}

/** Rising, then what counts from the end. */
function lastAtTheEnd(a: number | null, b: number | null): number {
  const rank = (place: number | null): number =>
    place === null ? 0 : place > 0 ? place : 1000 + place;
  return rank(a) - rank(b);
}

function inMonths(months: readonly number[]): string {
  return months.length === 0 ? '' : ` in ${monthNames(months)}`;
}

function monthNames(months: readonly number[]): string {
  return joined(
    months.toSorted((a, b) => a - b).map((month) => MONTH_NAMES[month - 1] ?? String(month)),
  );
}

function weekdayName(weekday: Weekday): string {
  return WEEKDAY_NAMES[weekday - 1] ?? String(weekday);
}

function ordinal(count: number): string {
  return ORDINALS[count - 1] ?? `${count}${suffix(count)}`;
}

function suffix(count: number): string {
  const isTeen = count % 100 >= 11 && count % 100 <= 13;
  return isTeen ? 'th' : (['th', 'st', 'nd', 'rd'][count % 10] ?? 'th');
}

function times(count: number): string {
  return count === 1 ? 'once' : `${count} times in all`;
}

function endWords(until: RuleEnd, zone: string): string {
  if (until.kind === 'day') return formatDay(until.on, 'dayMonthYear');
  if (until.kind === 'wall') return `${formatDay(until.on, 'dayMonthYear')} at ${until.clock}`;
  const { at } = until;
  const day = formatDay(dayAt(at, zone), 'dayMonthYear');
  return `${day} at ${clockAt(at, zone)} ${zoneName(at, zone)}`;
}

function joined(names: readonly string[], word: 'and' | 'or' = 'and'): string {
  const last = names.at(-1) ?? '';
  return names.length < 2 ? last : `${names.slice(0, -1).join(', ')} ${word} ${last}`;
}
