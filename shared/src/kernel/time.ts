import dayjs from 'dayjs';
import utc from 'dayjs/plugin/utc.js';

dayjs.extend(utc);

/** What happened, or will happen: milliseconds since 1970-01-01T00:00Z, the same moment everywhere. */
export type Instant = number;

/**
 * A date of the civil calendar, 'YYYY-MM-DD', tied to no zone. Years 1000 to 9999, so that plain
 * string comparison (<, ===, sort) is the order of the calendar: compare days in that way.
 */
export type CalendarDay = `${number}-${number}-${number}`;

/** A time as a clock on the wall shows it, 'HH:MM', 00:00 to 23:59. String comparison orders it. */
export type ClockTime = `${number}:${number}`;

/**
 * How a day is written for people: long 'Sunday 9 May', longYear 'Sunday 9 May 2027',
 * short 'Sun 9 May', dayMonth '9 May', dayMonthYear '9 May 2027', monthYear 'May 2027'.
 */
export type DayStyle = 'long' | 'longYear' | 'short' | 'dayMonth' | 'dayMonthYear' | 'monthYear';

const MINUTE_MS = 60_000;
const HOUR_MS = 60 * MINUTE_MS;
const DAY_MS = 24 * HOUR_MS;

// No zone has ever been further than this from UTC, so every change of offset that can matter to
// a wall time lies within this reach of that same wall time read as UTC.
const WIDEST_OFFSET_MS = 16 * HOUR_MS;

const DAY_TEXT = /^[1-9]\d{3}-\d{2}-\d{2}$/;
const CLOCK_TEXT = /^(?:[01]\d|2[0-3]):[0-5]\d$/;
const ISO_TEXT =
  /^(?<day>\d{4}-\d{2}-\d{2})T(?<clock>\d{2}:\d{2})(?::[0-5]\d(?:\.\d{1,9})?)?(?:Z|[+-](?<offset>\d{2}:\d{2}))$/;

const DAY_STYLES: Readonly<Record<DayStyle, string>> = {
  long: 'dddd D MMMM',
  longYear: 'dddd D MMMM YYYY',
  short: 'ddd D MMM',
  dayMonth: 'D MMMM',
  dayMonthYear: 'D MMMM YYYY',
  monthYear: 'MMMM YYYY',
};

/** Whether the text is a real date of the calendar, strictly 'YYYY-MM-DD', year 1000 to 9999. */
export function isCalendarDay(text: string): text is CalendarDay {
  return realMidnightUtc(text) !== null;
}

/** The beginning of the day in UTC; null where there is no such day. */
function realMidnightUtc(text: string): dayjs.Dayjs | null {
  if (!DAY_TEXT.test(text)) return null;
  const midnight = dayjs.utc(text);
  return midnight.format('YYYY-MM-DD') === text ? midnight : null;
}

/** Whether the text is strictly 'HH:MM' from 00:00 to 23:59; 24:00 is not. */
export function isClockTime(text: string): text is ClockTime {
  return CLOCK_TEXT.test(text);
}

/**
 * Whether this is a time zone that can be used here: 'UTC' or a name of the IANA database in the
 * form 'Area/Place'. Bare offsets ('+01:00') and abbreviations ('BST', 'EST') are refused: they
 * know no summer time, and other programs read them in other ways.
 */
export function isZone(name: string): boolean {
  if (name !== 'UTC' && !/^[A-Za-z_]+\//.test(name)) return false;
  try {
    offsetFormat(name);
    return true;
  } catch (error) {
    // Intl has no question for this: a RangeError is its way of saying that it knows no such zone.
    if (error instanceof RangeError) return false;
    throw error;
  }
}

/** The instant as text with milliseconds, in UTC: '2026-12-01T10:22:00.000Z'. */
export function toIso(at: Instant): string {
  return dayjs.utc(at).toISOString();
}

/**
 * The instant that an ISO 8601 date and time with its offset names ('Z' or '+01:00'; seconds and
 * their fraction may be left out; digits beyond milliseconds are dropped). Throws a RangeError on
 * text without an offset, since it names no instant, and on days and times that do not exist.
 */
export function fromIso(iso: string): Instant {
  const { day, clock, offset } = ISO_TEXT.exec(iso)?.groups ?? {};
  const isReal =
    day !== undefined &&
    isCalendarDay(day) &&
    clock !== undefined &&
    isClockTime(clock) &&
    (offset === undefined || isClockTime(offset));
  if (!isReal) throw new RangeError(`Not a date and time with its offset from UTC: '${iso}'`);
  return dayjs.utc(iso).valueOf();
}

/**
 * Minutes that clocks in the zone are ahead of UTC at that instant: 60 in London in summer, -570
 * in the Marquesas. A fraction for zones that kept local mean time with seconds, long ago.
 * Throws a RangeError on a zone that is not known.
 */
export function zoneOffsetMinutes(at: Instant, zone: string): number {
  return offsetMs(at, zone) / MINUTE_MS;
}

/**
 * The short name of the zone's time at that instant, to stand beside every time that is shown:
 * 'GMT' and 'BST' in London, 'GMT-5' where British English has no name of its own.
 */
export function zoneName(at: Instant, zone: string): string {
  const name = nameFormat(zone)
    .formatToParts(at)
    .find((part) => part.type === 'timeZoneName');
  if (name === undefined) throw new RangeError(`No name for the time zone '${zone}'`);
  return name.value;
}

/** The calendar day in the zone at that instant. */
export function dayAt(at: Instant, zone: string): CalendarDay {
  return dayOf(dayjs.utc(at + offsetMs(at, zone)));
}

/**
 * What a clock in the zone shows at that instant. Seconds are cut off, as a clock does: the minute
 * shown has begun and never lies ahead. A moment by which people must be somewhere may therefore be
 * shown up to a minute early, never late; a predicted time that reads better rounded (a low water)
 * is rounded by its caller before it comes here.
 */
export function clockAt(at: Instant, zone: string): ClockTime {
  return dayjs.utc(at + offsetMs(at, zone)).format('HH:mm') as ClockTime;
}

/**
 * The instant at which clocks in the zone show this day and time. By RFC 5545 3.3.5 a time that
 * the clocks skip is read with the offset before the gap (02:30 in a gap from 02:00 to 03:00 is the
 * instant shown as 03:30), and a time that they show twice means the first.
 */
export function instantOf(day: CalendarDay, clock: ClockTime, zone: string): Instant {
  const wallMs = wallMsOf(day, clock);
  const offsetBeforeMs = offsetMs(wallMs - WIDEST_OFFSET_MS, zone);
  const offsetAfterMs = offsetMs(wallMs + WIDEST_OFFSET_MS, zone);
  const showings = [wallMs - offsetBeforeMs, wallMs - offsetAfterMs].filter(
    (at) => at + offsetMs(at, zone) === wallMs,
  );
  return showings.length === 0 ? wallMs - offsetBeforeMs : Math.min(...showings);
}

/** A day and time as if its clock were that of UTC. */
function wallMsOf(day: CalendarDay, clock: ClockTime): number {
  if (!isClockTime(clock)) throw new RangeError(`Not a clock time: '${String(clock)}'`);
  const [hours, minutes] = clock.split(':').map(Number) as [number, number];
  return midnightUtc(day).valueOf() + hours * HOUR_MS + minutes * MINUTE_MS;
}

/** Whether clocks in the zone ever show this time on this day; false inside a gap. */
export function existsOnClock(day: CalendarDay, clock: ClockTime, zone: string): boolean {
  const at = instantOf(day, clock, zone);
  return at + offsetMs(at, zone) === wallMsOf(day, clock);
}

/**
 * The first instant of the day in the zone. Where the clocks skip midnight that is the moment of
 * the change (01:00 on the clock, say); for a day that the zone left out altogether it is the
 * moment at which the next day began.
 */
export function startOfDay(day: CalendarDay, zone: string): Instant {
  const at = instantOf(day, '00:00', zone);
  return existsOnClock(day, '00:00', zone) ? at : offsetChangeBefore(at, zone);
}

/**
 * Every local day that the half-open span [fromAt, toAt) touches, in order: a session that ends at
 * the stroke of midnight does not touch the next day. With fromAt equal to toAt, the one day of that
 * instant; never empty. A day that the zone left out is not in it. Throws a RangeError when the span
 * ends before it begins.
 */
export function daysTouched(fromAt: Instant, toAt: Instant, zone: string): CalendarDay[] {
  if (toAt < fromAt) throw new RangeError('A span of time cannot end before it begins');
  const ends = [dayAt(fromAt, zone), dayAt(Math.max(fromAt, toAt - 1), zone)] as const;
  // Clocks put back across midnight can show the earlier day at the later instant.
  const [first, last] = ends[0] <= ends[1] ? ends : [ends[1], ends[0]];
  const days: CalendarDay[] = [];
  for (let day = first; day <= last; day = addDays(day, 1)) {
    const isEnd = day === first || day === last;
    if (isEnd || dayAt(startOfDay(day, zone), zone) === day) days.push(day);
  }
  return days;
}

/** The day n days later, earlier if n is negative. */
export function addDays(day: CalendarDay, days: number): CalendarDay {
  return dayOf(midnightUtc(day).add(whole(days), 'day'));
}

/**
 * The same date n months later, earlier if n is negative; the last day of the month where the month
 * is too short: 31 January and one month is 28 or 29 February. Not reversible for that reason.
 */
export function addMonths(day: CalendarDay, months: number): CalendarDay {
  return dayOf(midnightUtc(day).add(whole(months), 'month'));
}

/** Days to go from the first day to the second: 1 for tomorrow, 0 for the same day, negative back. */
export function daysBetween(from: CalendarDay, to: CalendarDay): number {
  return midnightUtc(to).diff(midnightUtc(from), 'day');
}

/** The day of the week by ISO 8601: 1 Monday to 7 Sunday. */
export function weekdayOf(day: CalendarDay): number {
  return midnightUtc(day).day() || 7;
}

/** The year of the day, as a number. */
export function yearOf(day: CalendarDay): number {
  return midnightUtc(day).year();
}

/** The first day of the month in which the day lies. */
export function startOfMonth(day: CalendarDay): CalendarDay {
  return dayOf(midnightUtc(day).startOf('month'));
}

/** The last day of the month in which the day lies. */
export function endOfMonth(day: CalendarDay): CalendarDay {
  return dayOf(midnightUtc(day).endOf('month'));
}

/** The day in English words, in one of the closed list of styles. */
export function formatDay(day: CalendarDay, style: DayStyle): string {
  return midnightUtc(day).format(DAY_STYLES[style]);
}

function midnightUtc(day: CalendarDay): dayjs.Dayjs {
  const midnight = realMidnightUtc(day);
  if (midnight === null) throw new RangeError(`Not a calendar day: '${day}'`);
  return midnight;
}

function dayOf(moment: dayjs.Dayjs): CalendarDay {
  const text = moment.format('YYYY-MM-DD');
  if (!DAY_TEXT.test(text)) throw new RangeError(`Outside the years 1000 to 9999: '${text}'`);
  return text as CalendarDay;
}

function whole(count: number): number {
  if (!Number.isSafeInteger(count)) throw new RangeError(`Not a whole number: ${count}`);
  return count;
}

/** Where a gap ends that the instant lies in or after, by at most the longest gap (a whole day). */
function offsetChangeBefore(at: Instant, zone: string): Instant {
  const offsetAfterMs = offsetMs(at, zone);
  let beforeAt = at - DAY_MS - 1;
  let afterAt = at;
  while (afterAt - beforeAt > 1) {
    const middleAt = Math.floor((beforeAt + afterAt) / 2);
    if (offsetMs(middleAt, zone) === offsetAfterMs) afterAt = middleAt;
    else beforeAt = middleAt;
  }
  return afterAt;
}

// No zone has ever changed its clocks there and back within a day: an offset that holds at both
// ends of a day (in UTC) holds all through it, and asking Intl takes thirty times as long.
function offsetMs(at: Instant, zone: string): number {
  const day = Math.floor(at / DAY_MS);
  const fromMs = offsetAtStartMs(day, zone);
  return fromMs === offsetAtStartMs(day + 1, zone) ? fromMs : offsetByIntlMs(at, zone);
}

const offsetsOfDays = new Map<string, Map<number, number>>();
const MOST_DAYS_KEPT = 20_000;

/** The offset at the beginning of a day, counted in days from 1970 and in UTC. */
function offsetAtStartMs(day: number, zone: string): number {
  const known = offsetsOfDays.get(zone) ?? new Map<number, number>();
  const kept = known.get(day);
  if (kept !== undefined) return kept;
  const found = offsetByIntlMs(day * DAY_MS, zone);
  if (known.size >= MOST_DAYS_KEPT) known.clear();
  offsetsOfDays.set(zone, known.set(day, found));
  return found;
}

function offsetByIntlMs(at: Instant, zone: string): number {
  const wall = { year: 0, month: 0, day: 0, hour: 0, minute: 0, second: 0 };
  for (const { type, value } of offsetFormat(zone).formatToParts(at)) {
    if (type in wall) wall[type as keyof typeof wall] = Number(value);
  }
  const wallMs = Date.UTC(wall.year, wall.month - 1, wall.day, wall.hour, wall.minute, wall.second);
  return wallMs - Math.floor(at / 1000) * 1000;
}

// A formatter takes some hundred times as long to build as to use, so each zone keeps its own.
const offsetFormats = new Map<string, Intl.DateTimeFormat>();
const nameFormats = new Map<string, Intl.DateTimeFormat>();

function offsetFormat(zone: string): Intl.DateTimeFormat {
  const known = offsetFormats.get(zone);
  if (known !== undefined) return known;
  const format = new Intl.DateTimeFormat('en-US', {
    timeZone: zone,
    calendar: 'gregory',
    numberingSystem: 'latn',
    hourCycle: 'h23',
    year: 'numeric',
    month: 'numeric',
    day: 'numeric',
    hour: 'numeric',
    minute: 'numeric',
    second: 'numeric',
  });
  offsetFormats.set(zone, format);
  return format;
}

function nameFormat(zone: string): Intl.DateTimeFormat {
  const known = nameFormats.get(zone);
  if (known !== undefined) return known;
  const format = new Intl.DateTimeFormat('en-GB', { timeZone: zone, timeZoneName: 'short' });
  nameFormats.set(zone, format);
  return format;
}
