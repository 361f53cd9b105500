import type { AppContext } from '#backend/app-context.ts';
import { readShores } from '#backend/features/shores/shores.reader.ts';
import { Problem } from '#backend/http/problem.ts';
import type { Route } from '#backend/http/route.ts';
import { route } from '#backend/http/route.ts';
import {
  changePlan as changePlanContract,
  keepPlan as keepPlanContract,
  makeSessions as makeSessionsContract,
  previewPlan as previewPlanContract,
  publishSessions as publishSessionsContract,
  readPattern as readPatternContract,
  seePlan as seePlanContract,
  seePlans as seePlansContract,
} from '#shared/contracts/season-plans.ts';
import type { PlanView } from '#shared/contracts/season-plans.ts';
import { patternOf, patternSentence } from '#shared/domain/seasons/recurrence.ts';
import type { SeasonPlanId, SessionId } from '#shared/kernel/ids.ts';
import { dayAt } from '#shared/kernel/time.ts';
import { makeSessions } from './make-sessions.ts';
import { previewPlan, readPattern } from './plan-preview.ts';
import { publishSessions } from './publish-sessions.ts';
import { changePlan, keepPlan } from './save-plan.ts';
import { planValues, presentPlan, presentPlans, presentPreview } from './seasons.presenter.ts';
import { readPlan, readPlans, readSlotKinds } from './seasons.reader.ts';

export function seasonsRoutes(ctx: AppContext): Route[] {
  const see = (id: SeasonPlanId): Promise<PlanView> =>
    ctx.reading(async (read) => {
      const plan = await readPlan(read, id);
      if (plan === null) throw new Problem('not-found', 'There is no such plan');
      return presentPlan(plan, await previewPlan(ctx, read, plan), ctx.clock.now());
    });
  return [
    route(seePlansContract, 'season-plan.see', () =>
      ctx.reading(async (read) => {
        const plans = (await readPlans(read)).map((plan) => ({
          plan,
          sentence: sentenceOf(plan.pattern, ctx.group.zone),
        }));
        const todayOn = dayAt(ctx.clock.now(), ctx.group.zone);
        return presentPlans(plans, await readShores(read), await readSlotKinds(read), todayOn);
      }),
    ),
    route(previewPlanContract, 'season-plan.change', ({ body }) =>
      ctx.reading(async (read) => {
        const values = planValues(body);
        const preview = await previewPlan(ctx, read, values);
        return presentPreview(preview, values.exceptions, [], ctx.clock.now());
      }),
    ),
    route(readPatternContract, 'season-plan.change', ({ body }) => {
      const { sentence, nextDates } = readPattern(
        body.pattern,
        body.fromOn,
        ctx.group.zone,
        'pattern',
      );
      return Promise.resolve({ sentence, nextDates: [...nextDates] });
    }),
    route(keepPlanContract, 'season-plan.change', async ({ actor, body }) =>
      see(await keepPlan(ctx, actor, planValues(body))),
    ),
    route(seePlanContract, 'season-plan.see', ({ params }) => see(params.planId as SeasonPlanId)),
    route(changePlanContract, 'season-plan.change', async ({ actor, params, body }) => {
      await changePlan(ctx, actor, params.planId as SeasonPlanId, planValues(body));
      return see(params.planId as SeasonPlanId);
    }),
    route(makeSessionsContract, 'season-plan.change', async ({ actor, params }) => {
      await makeSessions(ctx, actor, params.planId as SeasonPlanId);
      return see(params.planId as SeasonPlanId);
    }),
    route(publishSessionsContract, 'season-plan.change', async ({ actor, params, body }) => {
      const planId = params.planId as SeasonPlanId;
      await publishSessions(ctx, actor, planId, body.sessionIds as SessionId[]);
      return see(planId);
    }),
  ];
}

/** The pattern in words; the rule itself where it has none. */
function sentenceOf(text: string, zone: string): string {
  const pattern = patternOf(text);
  const sentence = pattern.isGranted ? patternSentence(pattern.value, zone) : pattern;
  return sentence.isGranted ? sentence.value : text;
}
