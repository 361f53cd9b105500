import { hoursAndMinutes } from '#frontend/words/duration-words.ts';
import { metres } from '#frontend/words/tide-words.ts';
import type { PlanSettings } from '#shared/contracts/season-plans.ts';
import type { CalendarDay, ClockTime } from '#shared/kernel/time.ts';
import { addDays, isCalendarDay, isClockTime, weekdayOf } from '#shared/kernel/time.ts';
import type { PatternDraft } from './pattern-draft.ts';
import { patternDraft, readPatternDraft } from './pattern-draft.ts';
import type { PlansView } from './seasons.queries.ts';

export type PlanException = PlanSettings['exceptions'][number];
export type PlanShore = PlansView['shores'][number];

/** A plan as it is being written: every field as it is typed, so that nothing typed is lost. */
export interface PlanDraft {
  readonly name: string;
  readonly shoreId: string;
  readonly pattern: PatternDraft;
  readonly fromOn: string;
  readonly toOn: string;
  readonly beforeLow: string;
  readonly afterLow: string;
  readonly daylightMargin: string;
  readonly shortest: string;
  readonly earliestClock: string;
  readonly latestClock: string;
  /** Empty: the working level of the shore. */
  readonly lowestLevel: string;
  /** One for each slot kind, in the order of the group. */
  readonly slots: readonly { readonly slotKindId: string; readonly count: string }[];
  readonly exceptions: readonly PlanException[];
}

/** The fields that something can be wrong with; the names of the contract. */
export type PlanField = keyof PlanSettings;
export type FieldErrors = Partial<Record<PlanField, string>>;

/** A draft read: its settings, or what is wrong beside each field that cannot be read. */
export interface PlanReading {
  readonly settings: PlanSettings | null;
  readonly errors: FieldErrors;
}

const SATURDAY = 6;
const DAYS_A_WEEK = 7;
const SEASON_WEEKS = 26;
const MOST_REACH_MINUTES = 360;
const MOST_LENGTH_MINUTES = 720;
const MOST_MARGIN_MINUTES = 240;
const LEVELS_M = { least: -5, most: 20 };
const MOST_SLOTS = 20;

/** A plan to begin with: half a year of Saturdays from the next, by the rules of the first shore. */
export function newDraft(view: PlansView): PlanDraft | null {
  const shore = view.shores[0];
  if (shore === undefined) return null;
  const fromOn = addDays(
    view.today,
    (SATURDAY - weekdayOf(view.today) + DAYS_A_WEEK) % DAYS_A_WEEK,
  );
  return {
    name: '',
    shoreId: shore.id,
    pattern: patternDraft('FREQ=WEEKLY;BYDAY=SA'),
    fromOn,
    toOn: addDays(fromOn, SEASON_WEEKS * DAYS_A_WEEK),
    ...rulesOf(shore),
    slots: view.slotKinds.map(({ id }, index) => ({
      slotKindId: id,
      count: String([1, 1, 2][index] ?? 0),
    })),
    exceptions: [],
  };
}

/** The draft that a kept plan is changed in. */
export function draftOf(settings: PlanSettings, slotKinds: PlansView['slotKinds']): PlanDraft {
  const countOf = (id: string): number =>
    settings.slots.find(({ slotKindId }) => slotKindId === id)?.count ?? 0;
  return {
    name: settings.name,
    shoreId: settings.shoreId,
    pattern: patternDraft(settings.pattern),
    fromOn: settings.fromOn,
    toOn: settings.toOn,
    ...rulesOf({ ...settings, workingLevelM: settings.lowestLevelM }),
    slots: slotKinds.map(({ id }) => ({ slotKindId: id, count: String(countOf(id)) })),
    exceptions: settings.exceptions,
  };
}

/** The draft at another shore: rules that were the shore's follow it, those written by hand stay. */
export function atShore(draft: PlanDraft, from: PlanShore | undefined, to: PlanShore): PlanDraft {
  const before = from === undefined ? null : rulesOf(from);
  const after = rulesOf(to);
  const followed = Object.entries(after).filter(
    ([name]) => before !== null && draft[name as keyof Rules] === before[name as keyof Rules],
  );
  return { ...draft, shoreId: to.id, ...Object.fromEntries(followed) };
}

type Rules = ReturnType<typeof rulesOf>;

function rulesOf(
  rules: Omit<PlanShore, 'id' | 'name' | 'zone' | 'workingLevelM'> & {
    readonly workingLevelM: number | null;
  },
) {
  return {
    beforeLow: hoursAndMinutes(rules.minutesBeforeLow),
    afterLow: hoursAndMinutes(rules.minutesAfterLow),
    daylightMargin: String(rules.daylightMarginMinutes),
    shortest: hoursAndMinutes(rules.minimumMinutes),
    earliestClock: rules.earliestClock,
    latestClock: rules.latestClock,
    lowestLevel: rules.workingLevelM === null ? '' : levelText(rules.workingLevelM),
  };
}

/** What a draft says, or what is wrong beside each field of it. */
export function readDraft(draft: PlanDraft): PlanReading {
  const errors: FieldErrors = {};
  const take = <Value>(field: PlanField, read: Value | Wrong): Value | null => {
    if (!(read instanceof Wrong)) return read;
    errors[field] ??= read.sentence;
    return null;
  };
  const pattern = readPatternDraft(draft.pattern);
  const parts = {
    name: take('name', draft.name.trim() || new Wrong('Give the plan a name.')),
    pattern: take('pattern', pattern.text ?? new Wrong(pattern.error)),
    fromOn: take('fromOn', readDay(draft.fromOn)),
    toOn: take('toOn', readDay(draft.toOn)),
    minutesBeforeLow: take('minutesBeforeLow', readLength(draft.beforeLow, MOST_REACH_MINUTES)),
    minutesAfterLow: take('minutesAfterLow', readLength(draft.afterLow, MOST_REACH_MINUTES)),
    daylightMarginMinutes: take(
      'daylightMarginMinutes',
      readWhole(draft.daylightMargin, MOST_MARGIN_MINUTES),
    ),
    minimumMinutes: take('minimumMinutes', readLength(draft.shortest, MOST_LENGTH_MINUTES, 1)),
    earliestClock: take('earliestClock', readClock(draft.earliestClock)),
    latestClock: take('latestClock', readClock(draft.latestClock)),
    slots: draft.slots.map(({ slotKindId, count }) => ({
      slotKindId,
      count: take('slots', readWhole(count, MOST_SLOTS)),
    })),
  };
  const lowestLevelM = take('lowestLevelM', readLevel(draft.lowestLevel));
  if (!isWhole(parts)) return { settings: null, errors };
  if (Object.keys(errors).length > 0) return { settings: null, errors };
  const { shoreId, exceptions } = draft;
  return {
    settings: { ...parts, shoreId, lowestLevelM, exceptions: [...exceptions] },
    errors,
  };
}

/** A sentence on why what is typed cannot be read. */
class Wrong {
  constructor(readonly sentence: string) {}
}

type WholeParts = Omit<PlanSettings, 'shoreId' | 'lowestLevelM' | 'exceptions'>;

function isWhole(parts: { [Name in keyof WholeParts]: unknown }): parts is WholeParts {
  const { slots, ...others } = parts;
  return (
    Object.values(others).every((value) => value !== null) &&
    Array.isArray(slots) &&
    slots.every((slot: { count: unknown }) => slot.count !== null)
  );
}

function readDay(text: string): CalendarDay | Wrong {
  return isCalendarDay(text) ? text : new Wrong('Choose a day.');
}

function readClock(text: string): ClockTime | Wrong {
  return isClockTime(text) ? text : new Wrong('Write a time like 07:30.');
}

/** Hours and minutes, '1:30'; a bare number is hours. */
function readLength(text: string, mostMinutes: number, leastMinutes = 0): number | Wrong {
  const { hours, minutes } =
    /^\s*(?<hours>\d{1,2})(?::(?<minutes>[0-5]\d))?\s*$/.exec(text)?.groups ?? {};
  if (hours === undefined) return new Wrong('Write hours and minutes, like 1:30.');
  const length = Number(hours) * 60 + Number(minutes ?? 0);
  if (length > mostMinutes) return new Wrong(`At most ${hoursAndMinutes(mostMinutes)}.`);
  if (length < leastMinutes) return new Wrong(`At least ${hoursAndMinutes(leastMinutes)}.`);
  return length;
}

function readWhole(text: string, most: number): number | Wrong {
  const isRead = /^\s*\d{1,4}\s*$/.test(text) && Number(text) <= most;
  return isRead ? Number(text) : new Wrong(`Write a whole number, at most ${most}.`);
}

/** A height in metres; empty leaves it to the shore. A comma may stand for the point. */
function readLevel(text: string): number | null | Wrong {
  if (text.trim() === '') return null;
  const levelM = Number(text.trim().replace(',', '.').replace('−', '-'));
  if (!Number.isFinite(levelM)) return new Wrong('Write metres, like 1.3.');
  return levelM < LEVELS_M.least || levelM > LEVELS_M.most
    ? new Wrong(`Between ${metres(LEVELS_M.least)} and ${metres(LEVELS_M.most)} m.`)
    : levelM;
}

function levelText(levelM: number): string {
  return Number.isInteger(levelM) ? levelM.toFixed(1) : String(levelM).replace('-', '−');
}
