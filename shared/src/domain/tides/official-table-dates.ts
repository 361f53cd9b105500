import { granted, refused } from '#shared/kernel/result.ts';
import type { Verdict } from '#shared/kernel/result.ts';
import {
  clockAt,
  dayAt,
  daysBetween,
  existsOnClock,
  instantOf,
  isCalendarDay,
  zoneOffsetMinutes,
} from '#shared/kernel/time.ts';
import type { CalendarDay, ClockTime, Instant } from '#shared/kernel/time.ts';
import type { TableLine } from './official-table-lines.ts';
import type { DateOrder, TableLayout, TableRefusal, TableZone } from './official-table-reading.ts';
import type { WrittenDate } from './official-table-tokens.ts';

type Refusal = Extract<TableRefusal, { why: 'date-order-unclear' | 'year-needed' }>;

/** How the dates of a table are to be read. */
export interface DateReading {
  readonly order: TableLayout['dateOrder'];
  /** Null for a date that is not in the calendar. */
  readonly dayOf: (date: WrittenDate) => CalendarDay | null;
}

const MINUTE_MS = 60_000;
const NEAR_CHANGE_MS = 3 * 60 * MINUTE_MS;

/** One slip among so many dates does not put their order in doubt. */
const SLIPS = 10;

/**
 * Decides by the table as a whole which number of a date is the day: by numbers above 12, else by
 * the order in which the dates follow one another a day at a time. Where neither tells, it refuses,
 * unless the person has said it.
 */
export function dateReading(
  rows: readonly TableLine[],
  said: DateOrder | undefined,
  year: number | undefined,
): Verdict<DateReading, Refusal> {
  const dates = rows.flatMap((line) => line.dates.slice(0, 1));
  if (year === undefined && dates.some(({ date }) => date.year === null)) {
    return refused({ why: 'year-needed' });
  }
  const dayBy =
    (order: DateOrder) =>
    (date: WrittenDate): CalendarDay | null =>
      calendarDay(date, order, year);
  const numbers = dates.filter(({ date }) => date.order === 'numbers');
  const [example] = numbers;
  if (example === undefined) {
    const isNamed = dates.some(({ date }) => date.order === 'month-named');
    return granted({ order: isNamed ? 'month-named' : 'year-first', dayOf: dayBy('day-first') });
  }
  const order =
    said ??
    orderOf(
      numbers.map(({ date }) => date),
      dayBy,
    );
  if (order === null) return refused({ why: 'date-order-unclear', example: example.text });
  return granted({ order, dayOf: dayBy(order) });
}

function orderOf(
  dates: readonly WrittenDate[],
  dayBy: (order: DateOrder) => (date: WrittenDate) => CalendarDay | null,
): DateOrder | null {
  let dayFirst = 0;
  let monthFirst = 0;
  for (const date of dates) {
    if (date.order !== 'numbers') continue;
    if (date.first > 12 && date.second <= 12) dayFirst += 1;
    if (date.second > 12 && date.first <= 12) monthFirst += 1;
  }
  if (dayFirst > monthFirst * SLIPS) return 'day-first';
  if (monthFirst > dayFirst * SLIPS) return 'month-first';
  if (dayFirst + monthFirst > 0) return null;
  const byDay = dates.map(dayBy('day-first'));
  const byMonth = dates.map(dayBy('month-first'));
  if (byDay.every((day, place) => day === byMonth[place])) return 'day-first';
  const daySteps = stepsOfADay(byDay);
  const monthSteps = stepsOfADay(byMonth);
  if (daySteps === monthSteps) return null;
  return daySteps > monthSteps ? 'day-first' : 'month-first';
}

function stepsOfADay(days: readonly (CalendarDay | null)[]): number {
  return days.filter((day, place) => {
    const before = days[place - 1] ?? null;
    return day !== null && before !== null && daysBetween(before, day) === 1;
  }).length;
}

function calendarDay(
  date: WrittenDate,
  order: DateOrder,
  year: number | undefined,
): CalendarDay | null {
  const isDayFirst = order === 'day-first';
  const [day, month] =
    date.order !== 'numbers'
      ? [date.day, date.month]
      : isDayFirst
        ? [date.first, date.second]
        : [date.second, date.first];
  const pad = (figure: number): string => String(figure).padStart(2, '0');
  const text = `${date.year ?? year ?? ''}-${pad(month)}-${pad(day)}`;
  return isCalendarDay(text) ? text : null;
}

/**
 * Every instant at which clocks in the zone show this: none in the gap when clocks go forward, two
 * in the hour that they repeat, the earlier first.
 */
export function instantsShown(on: CalendarDay, clock: ClockTime, zone: TableZone): Instant[] {
  if (typeof zone === 'number') return [instantOf(on, clock, 'UTC') - zone * MINUTE_MS];
  const at = instantOf(on, clock, zone);
  const offsetAfter = zoneOffsetMinutes(at + NEAR_CHANGE_MS, zone);
  const backMinutes = zoneOffsetMinutes(at - NEAR_CHANGE_MS, zone) - offsetAfter;
  if (backMinutes === 0) return [at];
  if (!existsOnClock(on, clock, zone)) return [];
  const againAt = at + backMinutes * MINUTE_MS;
  const isTwice =
    backMinutes > 0 && dayAt(againAt, zone) === on && clockAt(againAt, zone) === clock;
  return isTwice ? [at, againAt] : [at];
}
