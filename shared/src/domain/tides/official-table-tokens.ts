import type { HeightUnit } from './official-table-reading.ts';

/** A date as written; which of two numbers is the day may have to be decided by the whole table. */
export type WrittenDate =
  | {
      readonly order: 'year-first' | 'month-named';
      readonly year: number | null;
      readonly month: number;
      readonly day: number;
    }
  | {
      readonly order: 'numbers';
      readonly year: number | null;
      readonly first: number;
      readonly second: number;
    };

/** A piece of a line, by its shape alone. */
export type Token =
  | { readonly shape: 'date'; readonly text: string; readonly date: WrittenDate }
  | {
      readonly shape: 'time';
      readonly text: string;
      readonly hour: number;
      readonly minute: number;
      readonly half: 'am' | 'pm' | null;
    }
  | {
      readonly shape: 'figure';
      readonly text: string;
      readonly value: number;
      readonly decimals: number;
      readonly unit: HeightUnit | null;
      /** Read as 0031 or 00.31, where it can be. */
      readonly clock: { readonly hour: number; readonly minute: number } | null;
      /** No height is written with a leading zero such as 0031 or 06.40. */
      readonly isSurelyClock: boolean;
    }
  | { readonly shape: 'mark'; readonly text: string; readonly kind: 'high' | 'low' }
  | { readonly shape: 'word'; readonly text: string };

const MONTHS = ['jan', 'feb', 'mar', 'apr', 'may', 'jun', 'jul', 'aug', 'sep', 'oct', 'nov', 'dec'];

const MONTH =
  '(?<name>jan|feb|mar|apr|may|jun|jul|aug|sep|oct|nov|dec)(?:uary|ruary|ch|il|e|y|ust|t|tember|ober|ember)?\\.?';
const DAY_OF_MONTH = '(?<day>\\d{1,2})(?:st|nd|rd|th)?';
const YEAR = '(?<year>(?:19|20|21)\\d\\d)';
const END = '(?=\\s|$)';

const pattern = (source: string): RegExp => new RegExp(source, 'iy');

const SPACE = /\s+/y;
const DAY_NAME = pattern(
  `(?:mon|tue|tues|wed|weds|thu|thur|thurs|fri|sat|sun|monday|tuesday|wednesday|thursday|friday|saturday|sunday)[.,]?${END}`,
);
const YEAR_FIRST = pattern(
  `(?<year>\\d{4})(?<mark>[-/.])(?<month>\\d{1,2})\\k<mark>(?<day>\\d{1,2})(?:T(?=\\d)|${END})`,
);
const COMPACT = pattern(`${YEAR}(?<month>\\d\\d)(?<day>\\d\\d)${END}`);
const NUMBERS = pattern(
  `(?<first>\\d{1,2})(?<mark>[-/.])(?<second>\\d{1,2})\\k<mark>(?<year>\\d{4}|\\d\\d)${END}`,
);
const NUMBERS_ALONE = pattern(`(?<first>\\d{1,2})/(?<second>\\d{1,2})${END}`);
const DAY_MONTH = pattern(`${DAY_OF_MONTH}[ -]?${MONTH}(?:,?[ -]?${YEAR})?${END}`);
const MONTH_DAY = pattern(`${MONTH}[ -]?${DAY_OF_MONTH}(?:,?[ -]${YEAR})?${END}`);
const TIME = pattern(
  `(?<hour>\\d{1,2})[:h](?<minute>\\d\\d)(?::\\d\\d)?(?:\\s*(?<half>[ap])\\.?m\\.?)?${END}`,
);
const TIME_WITH_HALF = pattern(
  `(?<hour>\\d{1,2})\\.?(?<minute>\\d\\d)\\s*(?<half>[ap])\\.?m\\.?${END}`,
);
const FIGURE = pattern(
  `(?<figure>[-+−–]?(?:\\d+(?:[.,]\\d+)?|[.,]\\d+))(?:\\s*(?<unit>cm|metres?|meters?|m|feet|ft|')\\.?)?${END}`,
);
// Of two letters the second counts: HLW is the higher low water of a day.
const MARK = pattern(
  `\\(?(?:(?:higher|lower)\\s|h|l)?(?<kind>high|low|h|l)(?:\\s?w(?:ater)?)?\\)?${END}`,
);
const REST = /\S+/y;

/**
 * The pieces of a stretch of text between two separators, or of a whole line whose columns are
 * aligned by spaces. Names of weekdays are passed over.
 */
export function tokensOf(text: string): Token[] {
  const tokens: Token[] = [];
  let place = 0;
  const match = (shape: RegExp): RegExpExecArray | null => {
    shape.lastIndex = place;
    const found = shape.exec(text);
    if (found !== null) place = shape.lastIndex;
    return found;
  };
  while (place < text.length) {
    if (match(SPACE) !== null || match(DAY_NAME) !== null) continue;
    const token = date(match) ?? time(match) ?? figure(match) ?? mark(match) ?? word(match);
    if (token !== null) tokens.push(token);
  }
  return tokens;
}

type Match = (shape: RegExp) => RegExpExecArray | null;

function date(match: Match): Token | null {
  const yearFirst = match(YEAR_FIRST) ?? match(COMPACT);
  if (yearFirst !== null) {
    const { year, month, day } = yearFirst.groups ?? {};
    const parts = { year: Number(year), month: Number(month), day: Number(day) };
    return { shape: 'date', text: yearFirst[0], date: { order: 'year-first', ...parts } };
  }
  const numbers = match(NUMBERS) ?? match(NUMBERS_ALONE);
  if (numbers !== null) {
    const { first, second, year } = numbers.groups ?? {};
    const parts = { first: Number(first), second: Number(second), year: fullYear(year) };
    return { shape: 'date', text: numbers[0], date: { order: 'numbers', ...parts } };
  }
  const named = match(DAY_MONTH) ?? match(MONTH_DAY);
  if (named === null) return null;
  const { name = '', day, year } = named.groups ?? {};
  const month = MONTHS.indexOf(name.toLowerCase()) + 1;
  const parts = { month, day: Number(day), year: fullYear(year) };
  return { shape: 'date', text: named[0], date: { order: 'month-named', ...parts } };
}

function fullYear(text: string | undefined): number | null {
  if (text === undefined) return null;
  return text.length === 2 ? 2000 + Number(text) : Number(text);
}

function time(match: Match): Token | null {
  const found = match(TIME) ?? match(TIME_WITH_HALF);
  if (found === null) return null;
  const { hour, minute, half } = found.groups ?? {};
  return {
    shape: 'time',
    text: found[0],
    hour: Number(hour),
    minute: Number(minute),
    half: half === undefined ? null : half.toLowerCase() === 'a' ? 'am' : 'pm',
  };
}

function figure(match: Match): Token | null {
  const found = match(FIGURE);
  if (found === null) return null;
  const { figure: written = '', unit } = found.groups ?? {};
  const plain = written.replace(',', '.').replace(/[−–]/, '-');
  const clock = unit === undefined ? /^(?<hour>\d{1,2})\.?(?<minute>[0-5]\d)$/.exec(plain) : null;
  const hour = Number(clock?.groups?.hour);
  return {
    shape: 'figure',
    text: found[0],
    value: Number(plain),
    decimals: plain.split('.')[1]?.length ?? 0,
    unit: unit === undefined ? null : unitNamed(unit),
    clock: hour < 24 && plain.length > 2 ? { hour, minute: Number(clock?.groups?.minute) } : null,
    isSurelyClock: unit === undefined && /^0\d\.?[0-5]\d$/.test(plain),
  };
}

function unitNamed(unit: string): HeightUnit {
  const first = unit.toLowerCase().charAt(0);
  return first === 'c' ? 'cm' : first === 'm' ? 'm' : 'ft';
}

function mark(match: Match): Token | null {
  const found = match(MARK);
  if (found === null) return null;
  const isHigh = found.groups?.kind?.toLowerCase().startsWith('h') === true;
  return { shape: 'mark', text: found[0], kind: isHigh ? 'high' : 'low' };
}

function word(match: Match): Token | null {
  const found = match(REST);
  return found === null ? null : { shape: 'word', text: found[0] };
}
