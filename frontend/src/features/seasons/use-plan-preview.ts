import { useQuery } from '@tanstack/react-query';
import { useMemo, useState } from 'react';
import { ProblemError } from '#frontend/api/problem-error.ts';
import { useSettled } from '#frontend/components/use-settled.ts';
import type { PlanPreview, PlanSettings, PlanView } from '#shared/contracts/season-plans.ts';
import type { FieldErrors, PlanDraft, PlanField } from './plan-draft.ts';
import { readDraft } from './plan-draft.ts';
import { seasonsQueries } from './seasons.queries.ts';

const QUIET_MS = 300;
/** A name changes no date, so that none is needed to see them, and none asks again. */
const ANY_NAME = 'Season plan';

/** The dates that a draft gives, and what the server says against its fields. */
export interface SeenPlan {
  /** The newest that could be had; it stays while the next is asked for or cannot be. */
  readonly preview: PlanPreview | null;
  readonly fieldErrors: FieldErrors;
  /** What else stands in the way: no answer, or nothing to do with a field. */
  readonly error: Error | null;
  readonly onRetry: () => void;
}

/** Asks what a draft gives once typing rests; a kept plan that is unchanged is not asked again. */
export function usePlanPreview(
  draft: PlanDraft,
  saved: PlanView | null,
  isChanged: boolean,
): SeenPlan {
  const isOpen = saved === null || isChanged;
  const settings = useMemo(
    () => (isOpen ? readDraft({ ...draft, name: ANY_NAME }).settings : null),
    [draft, isOpen],
  );
  const settled = useSettled(settings, QUIET_MS);
  const isAsked = settled !== null && isOpen;
  const query = useQuery({
    ...seasonsQueries.preview(settled ?? ({} as PlanSettings)),
    enabled: isAsked,
  });
  const seen = saved !== null && !isChanged ? saved.preview : query.data;
  const [newest, setNewest] = useState(seen);
  if (seen !== undefined && seen !== newest) setNewest(seen);
  const fieldErrors = query.error === null || !isAsked ? {} : fieldErrorsOf(query.error);
  return {
    preview: seen ?? newest ?? null,
    fieldErrors,
    error: isAsked && Object.keys(fieldErrors).length === 0 ? query.error : null,
    onRetry: () => void query.refetch(),
  };
}

/** What a refusal says beside the fields of the body, the first for each. */
export function fieldErrorsOf(error: Error): FieldErrors {
  const fields = error instanceof ProblemError ? (error.problem.fields ?? []) : [];
  const errors: FieldErrors = {};
  for (const { where, field, message } of fields) {
    if (where === 'body') errors[field.split('.')[0] as PlanField] ??= message;
  }
  return errors;
}
