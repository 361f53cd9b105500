import { useQuery } from '@tanstack/react-query';
import { ProblemError } from '#frontend/api/problem-error.ts';
import { ChoiceField, NumberField, TextField } from '#frontend/components/field.tsx';
import { ToggleRow } from '#frontend/components/toggle-row.tsx';
import { useSettled } from '#frontend/components/use-settled.ts';
import { listed } from '#frontend/words/number-words.ts';
import type { MonthPlace } from '#shared/domain/seasons/recurrence.ts';
import type { Weekday } from '#shared/kernel/recurrence-rule.ts';
import type { CalendarDay } from '#shared/kernel/time.ts';
import { formatDay, isCalendarDay } from '#shared/kernel/time.ts';
import type { PatternDraft } from './pattern-draft.ts';
import { readPatternDraft } from './pattern-draft.ts';
import { seasonsQueries } from './seasons.queries.ts';

const QUIET_MS = 300;

const kinds: readonly { value: PatternDraft['kind']; words: string }[] = [
  { value: 'weekly', words: 'By the week' },
  { value: 'monthly-by-weekday', words: 'By weekday of the month' },
  { value: 'monthly-by-day', words: 'By day of the month' },
  { value: 'rule', words: 'By a rule' },
];

const weekdays: readonly { value: Weekday; short: string; words: string }[] = [
  { value: 1, short: 'Mon', words: 'Monday' },
  { value: 2, short: 'Tue', words: 'Tuesday' },
  { value: 3, short: 'Wed', words: 'Wednesday' },
  { value: 4, short: 'Thu', words: 'Thursday' },
  { value: 5, short: 'Fri', words: 'Friday' },
  { value: 6, short: 'Sat', words: 'Saturday' },
  { value: 7, short: 'Sun', words: 'Sunday' },
];

const places: readonly { value: MonthPlace; short: string; words: string }[] = [
  { value: 1, short: '1st', words: 'First of the month' },
  { value: 2, short: '2nd', words: 'Second of the month' },
  { value: 3, short: '3rd', words: 'Third of the month' },
  { value: 4, short: '4th', words: 'Fourth of the month' },
  { value: 5, short: '5th', words: 'Fifth of the month' },
  { value: -1, short: 'last', words: 'Last of the month' },
];

/** Which kind of pattern a plan follows. */
export function PatternKind({ draft, onChange }: PatternProps) {
  return (
    <ChoiceField
      label="Repeats"
      value={draft.kind}
      choices={kinds}
      onChange={(value) => {
        const kind = kinds.find((one) => one.value === value)?.value;
        if (kind !== undefined) onChange({ ...draft, kind });
      }}
    />
  );
}

interface PatternProps {
  readonly draft: PatternDraft;
  readonly onChange: (draft: PatternDraft) => void;
}

/** How the dates of a plan repeat, by its kind, with what is wrong beside it. */
export function PatternFields(props: PatternProps & { readonly error: string | null }) {
  const { draft, onChange, error } = props;
  const isWeekdayError = draft.weekdays.length === 0;
  const weekdayRow = (
    <ToggleRow
      label="On"
      choices={weekdays}
      chosen={draft.weekdays}
      error={isWeekdayError ? error : null}
      onChange={(chosen) => onChange({ ...draft, weekdays: chosen })}
    />
  );
  switch (draft.kind) {
    case 'weekly':
      return (
        <>
          <NumberField
            label="Every so many weeks"
            unit={draft.everyWeeks.trim() === '1' ? 'week' : 'weeks'}
            keys="numeric"
            value={draft.everyWeeks}
            error={isWeekdayError ? null : error}
            onChange={(everyWeeks) => onChange({ ...draft, everyWeeks })}
          />
          {weekdayRow}
        </>
      );
    case 'monthly-by-weekday':
      return (
        <>
          <ToggleRow
            label="Which of the month"
            choices={places}
            chosen={draft.places}
            error={isWeekdayError ? null : error}
            onChange={(chosen) => onChange({ ...draft, places: chosen })}
          />
          {weekdayRow}
        </>
      );
    case 'monthly-by-day':
      return (
        <TextField
          label="Days of the month"
          hint="Commas between; last for the last day."
          value={draft.monthDays}
          error={error}
          onChange={(monthDays) => onChange({ ...draft, monthDays })}
        />
      );
    case 'rule':
      return (
        <TextField
          label="Rule"
          hint="As calendars write it, RFC 5545: FREQ=MONTHLY;BYDAY=2SA"
          value={draft.rule}
          error={error}
          onChange={(rule) => onChange({ ...draft, rule })}
        />
      );
  }
}

/** What the server reads in a pattern from a day on; nothing while either cannot be sent. */
export function usePatternReading(draft: PatternDraft, fromOn: string) {
  const settled = useSettled(draft, QUIET_MS);
  const { text } = readPatternDraft(settled);
  const isSent = text !== null && isCalendarDay(fromOn);
  const query = useQuery({
    ...seasonsQueries.pattern(text ?? '', fromOn as CalendarDay),
    enabled: isSent,
  });
  const fields = query.error instanceof ProblemError ? (query.error.problem.fields ?? []) : [];
  return {
    readBack: isSent && settled === draft ? query.data : undefined,
    error: isSent ? (fields.find(({ field }) => field === 'pattern')?.message ?? null) : null,
  };
}

/** The pattern as it was understood: in words, and its next five dates. */
export function PatternReadBack(props: {
  readonly readBack:
    { readonly sentence: string; readonly nextDates: readonly CalendarDay[] } | undefined;
}) {
  const { readBack } = props;
  return (
    <div className="min-h-10 text-sm text-barnacle" aria-live="polite">
      {readBack !== undefined && (
        <>
          <p className="text-ink">{readBack.sentence}.</p>
          <p>{listed(readBack.nextDates.map((on) => formatDay(on, 'short')))}.</p>
        </>
      )}
    </div>
  );
}
