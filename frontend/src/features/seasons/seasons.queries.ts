import type { QueryClient } from '@tanstack/react-query';
import { queryOptions } from '@tanstack/react-query';
import type { Reply } from '#frontend/api/call.ts';
import { call } from '#frontend/api/call.ts';
import type { PlanSettings, PlanView } from '#shared/contracts/season-plans.ts';
import type { CalendarDay } from '#shared/kernel/time.ts';

/** Every plan, and what is needed to write one. */
export type PlansView = Reply<'seePlans'>;

/** The replies that this feature keeps, under one root. */
export const seasonsQueries = {
  root: ['seasons'] as const,
  plans: () =>
    queryOptions({
      queryKey: [...seasonsQueries.root, 'plans'],
      queryFn: ({ signal }) => call('seePlans', {}, signal),
    }),
  plan: (planId: string) =>
    queryOptions({
      queryKey: [...seasonsQueries.root, 'plan', planId],
      queryFn: ({ signal }) => call('seePlan', { params: { planId } }, signal),
    }),
  preview: (settings: PlanSettings) =>
    queryOptions({
      queryKey: [...seasonsQueries.root, 'preview', settings],
      queryFn: ({ signal }) => call('previewPlan', { body: settings }, signal),
    }),
  pattern: (pattern: string, fromOn: CalendarDay) =>
    queryOptions({
      queryKey: [...seasonsQueries.root, 'pattern', pattern, fromOn],
      queryFn: ({ signal }) => call('readPattern', { body: { pattern, fromOn } }, signal),
    }),
};

/** Keeps a plan as the server just answered it, and has the list of plans asked again. */
export function putPlan(queryClient: QueryClient, plan: PlanView): void {
  queryClient.setQueryData(seasonsQueries.plan(plan.id).queryKey, plan);
  void queryClient.invalidateQueries({ queryKey: seasonsQueries.plans().queryKey });
}
