import type { MonthPlace, Pattern } from '#shared/domain/seasons/recurrence.ts';
import { patternOf, patternText } from '#shared/domain/seasons/recurrence.ts';
import type { Weekday } from '#shared/kernel/recurrence-rule.ts';

/**
 * A pattern as it is being put together. What belongs to the other kinds is kept, so that nothing
 * is lost by looking at them.
 */
export interface PatternDraft {
  readonly kind: Pattern['kind'];
  /** A whole number as it is typed. */
  readonly everyWeeks: string;
  readonly weekdays: readonly Weekday[];
  readonly places: readonly MonthPlace[];
  /** Days of the month as they are typed: '1, 15, last'. */
  readonly monthDays: string;
  readonly rule: string;
}

/** The rule of a draft as text, or a sentence on what is missing. */
export type PatternReading =
  { readonly text: string; readonly error: null } | { readonly text: null; readonly error: string };

const LAST = -1;

/** The draft of a plan that is kept already: built where the builder knows its rule. */
export function patternDraft(text: string): PatternDraft {
  const read = patternOf(text);
  const pattern: Pattern = read.isGranted ? read.value : { kind: 'rule', text };
  const draft: PatternDraft = {
    kind: pattern.kind,
    everyWeeks: '1',
    weekdays: [6],
    places: [1],
    monthDays: '1',
    rule: text,
  };
  switch (pattern.kind) {
    case 'weekly':
      return { ...draft, everyWeeks: String(pattern.everyWeeks), weekdays: pattern.weekdays };
    case 'monthly-by-weekday':
      return { ...draft, places: pattern.places, weekdays: pattern.weekdays };
    case 'monthly-by-day':
      return { ...draft, monthDays: pattern.days.map(dayWord).join(', ') };
    case 'rule':
      return draft;
  }
}

/** What a draft says. A rule that is written freely goes as it is: the server reads it. */
export function readPatternDraft(draft: PatternDraft): PatternReading {
  if (draft.kind === 'rule') {
    return draft.rule.trim() === ''
      ? wrong('Write a rule, for example FREQ=WEEKLY;BYDAY=SA.')
      : { text: draft.rule.trim(), error: null };
  }
  const pattern = builtPattern(draft);
  if (typeof pattern === 'string') return wrong(pattern);
  const text = patternText(pattern);
  if (text.isGranted) return { text: text.value, error: null };
  return wrong(
    text.reasons[0].why === 'interval-too-large'
      ? `At most every ${text.reasons[0].mostInterval} weeks.`
      : 'These dates never come.',
  );
}

function builtPattern(draft: PatternDraft): Pattern | string {
  const { weekdays, places } = draft;
  if (draft.kind === 'monthly-by-day') {
    const days = readMonthDays(draft.monthDays);
    return days === null
      ? 'Write days from 1 to 31, with commas between, or last.'
      : { kind: 'monthly-by-day', days };
  }
  if (weekdays.length === 0) return 'Choose at least one weekday.';
  if (draft.kind === 'monthly-by-weekday') {
    return places.length === 0
      ? 'Choose which one of the month.'
      : { kind: 'monthly-by-weekday', places, weekdays };
  }
  return /^\s*[1-9]\d{0,3}\s*$/.test(draft.everyWeeks)
    ? { kind: 'weekly', everyWeeks: Number(draft.everyWeeks), weekdays }
    : 'Write a whole number of weeks, from 1.';
}

function readMonthDays(text: string): number[] | null {
  const words = text
    .toLowerCase()
    .split(/[\s,]+/)
    .filter((word) => word !== '');
  const days = words.map((word) => (word === 'last' ? LAST : Number(word)));
  const isDay = (day: number): boolean => day === LAST || (Number.isInteger(day) && day >= 1);
  return days.length > 0 && days.every((day) => isDay(day) && day <= 31) ? days : null;
}

function dayWord(day: number): string {
  return day === LAST ? 'last' : String(day);
}

function wrong(error: string): PatternReading {
  return { text: null, error };
}
