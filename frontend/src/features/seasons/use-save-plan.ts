import { useMutation, useQueryClient } from '@tanstack/react-query';
import { call } from '#frontend/api/call.ts';
import type { PlanSettings, PlanView } from '#shared/contracts/season-plans.ts';
import { putPlan } from './seasons.queries.ts';

/** What is to be kept: null settings where the plan stands as it was kept before. */
interface PlanToKeep {
  readonly planId: string | null;
  readonly settings: PlanSettings | null;
}

interface OnPlan {
  /** The draft is kept under this id, whatever comes of what is asked next. */
  readonly onKept: (plan: PlanView) => void;
  readonly onDone: (plan: PlanView) => void;
}

/** Saves the draft of a plan. */
export function useKeepPlan({ onKept, onDone }: OnPlan) {
  return useMutation({
    mutationFn: async ({ planId, settings }: { planId: string | null; settings: PlanSettings }) => {
      const plan = await keep(planId, settings);
      onKept(plan);
      return plan;
    },
    onSuccess: onDone,
  });
}

/** Makes the draft sessions of a plan; what has changed is kept first. */
export function useMakeSessions({ onKept, onDone }: OnPlan) {
  return useMutation({
    mutationFn: async ({ planId, settings }: PlanToKeep) => {
      let madeOf = planId;
      if (settings !== null) {
        const kept = await keep(planId, settings);
        onKept(kept);
        madeOf = kept.id;
      }
      if (madeOf === null) throw new Error('A plan that was never kept has settings');
      return call('makeSessions', { params: { planId: madeOf } });
    },
    onSuccess: onDone,
  });
}

/** Publishes draft sessions of a plan. */
export function usePublishSessions(planId: string) {
  const queryClient = useQueryClient();
  return useMutation({
    mutationFn: (sessionIds: string[]) =>
      call('publishSessions', { params: { planId }, body: { sessionIds } }),
    onSuccess: (plan) => putPlan(queryClient, plan),
  });
}

function keep(planId: string | null, settings: PlanSettings): Promise<PlanView> {
  return planId === null
    ? call('keepPlan', { body: settings })
    : call('changePlan', { params: { planId }, body: settings });
}
