import type { AppContext, Tx } from '#backend/app-context.ts';
import { databaseError } from '#backend/database/transaction.ts';
import { Problem } from '#backend/http/problem.ts';
import type { Actor } from '#backend/http/route.ts';
import type { SeasonPlanId } from '#shared/kernel/ids.ts';
import { previewPlan } from './plan-preview.ts';
import { readPlan } from './seasons.reader.ts';
import type { PlanValues } from './seasons.reader.ts';
import { insertPlan, lockPlan, updatePlan } from './seasons.repository.ts';

/** Saves the draft of a plan; nothing is on the calendar yet. */
export async function keepPlan(
  ctx: AppContext,
  actor: Actor,
  values: PlanValues,
): Promise<SeasonPlanId> {
  return refusingUnknownKind(() =>
    ctx.inTransaction(async (tx) => {
      await previewPlan(ctx, tx, values);
      const id = ctx.newId<SeasonPlanId>();
      await insertPlan(tx, id, values, new Date(ctx.clock.now()));
      await record(ctx, tx, actor, id, 'season-plan.kept', values);
      return id;
    }),
  );
}

/** Changes a plan of which no session is made. */
export async function changePlan(
  ctx: AppContext,
  actor: Actor,
  id: SeasonPlanId,
  values: PlanValues,
): Promise<void> {
  await refusingUnknownKind(() =>
    ctx.inTransaction(async (tx) => {
      await lockPlan(tx, id);
      const plan = await readPlan(tx, id);
      if (plan === null) throw new Problem('not-found', 'There is no such plan');
      if (plan.sessions.length > 0) {
        throw new Problem(
          'plan-refused',
          'Sessions are made of this plan already, and people may hold their slots. It stays as it is.',
        );
      }
      await previewPlan(ctx, tx, values);
      await updatePlan(tx, id, values);
      await record(ctx, tx, actor, id, 'season-plan.changed', values);
    }),
  );
}

function record(
  ctx: AppContext,
  tx: Tx,
  actor: Actor,
  id: SeasonPlanId,
  action: string,
  values: PlanValues,
): Promise<void> {
  const { slots, exceptions, ...figures } = values;
  return ctx.recordTrail(tx, {
    actorId: actor.personId,
    action,
    recordKind: 'season-plan',
    recordId: id,
    details: {
      shoreId: figures.shoreId,
      pattern: figures.pattern,
      fromOn: figures.fromOn,
      toOn: figures.toOn,
      minutesBeforeLow: figures.minutesBeforeLow,
      minutesAfterLow: figures.minutesAfterLow,
      daylightMarginMinutes: figures.daylightMarginMinutes,
      minimumMinutes: figures.minimumMinutes,
      earliestClock: figures.earliestClock,
      latestClock: figures.latestClock,
      lowestLevelM: figures.lowestLevelM,
      slots: slots.map(({ slotKindId, count }) => `${count} ${slotKindId}`).join(', '),
      exceptions: exceptions.map(({ on, kind }) => `${kind} ${on}`).join(', '),
    },
  });
}

async function refusingUnknownKind<Result>(work: () => Promise<Result>): Promise<Result> {
  try {
    return await work();
  } catch (error) {
    if (databaseError(error)?.constraint !== 'season_plan_slot_slot_kind_id_fkey') throw error;
    throw new Problem('not-understood', 'The plan cannot be used as it is', {
      fields: [{ where: 'body', field: 'slots', message: 'One of the slot kinds does not exist.' }],
    });
  }
}
