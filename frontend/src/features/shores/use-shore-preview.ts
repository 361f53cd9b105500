import { useQuery } from '@tanstack/react-query';
import { useMemo, useState } from 'react';
import { ProblemError } from '#frontend/api/problem-error.ts';
import { useSettled } from '#frontend/components/use-settled.ts';
import type { CalendarDay } from '#shared/kernel/time.ts';
import { addDays } from '#shared/kernel/time.ts';
import type { DraftErrors, ShoreDraft } from './shore-draft.ts';
import { isDraftPath, readPosition, readWater } from './shore-draft.ts';
import { shoresQueries } from './shores.queries.ts';

const QUIET_MS = 300;
const SENT_AS = 'settings.';

/** What the draft of a shore would mean, asked again when nothing was typed for a moment. */
export function useShorePreview(draft: ShoreDraft) {
  const [on, setOn] = useState<CalendarDay | null>(null);
  const typed = useMemo(() => ({ water: readWater(draft), at: readPosition(draft) }), [draft]);
  const [whole, setWhole] = useState(typed.water);
  if (typed.water !== null && typed.water !== whole) setWhole(typed.water);
  const water = useSettled(whole, QUIET_MS);
  const at = useSettled(typed.at, QUIET_MS);
  const preview = useQuery(shoresQueries.preview(water, on));
  const stations = useQuery(shoresQueries.stations(at));
  const shown = preview.data;
  return {
    preview,
    stations,
    /** The settings that the water was asked with, the last that were whole; null for none. */
    water,
    isComplete: typed.water !== null,
    isOnNextUsable: on === null,
    showNextUsable: () => setOn(null),
    step: (days: 1 | -1) => {
      const from = on ?? shown?.day.on;
      if (from !== undefined) setOn(addDays(from, days));
    },
    errors: errorsOf(preview.error),
  };
}

export type ShorePreview = ReturnType<typeof useShorePreview>;

function errorsOf(error: Error | null): DraftErrors {
  const fields = error instanceof ProblemError ? (error.problem.fields ?? []) : [];
  return Object.fromEntries(
    fields.flatMap(({ where, field, message }) => {
      const path = field.startsWith(SENT_AS) ? field.slice(SENT_AS.length) : field;
      return where === 'body' && isDraftPath(path) ? [[path, message]] : [];
    }),
  );
}
