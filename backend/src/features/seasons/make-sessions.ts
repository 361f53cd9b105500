import type { AppContext } from '#backend/app-context.ts';
import { Problem } from '#backend/http/problem.ts';
import type { Actor } from '#backend/http/route.ts';
import type { SessionRow, SlotRow } from '#backend/database/entities/session.entity.ts';
import { plannedSessions } from '#shared/domain/seasons/season-plan.ts';
import type { TakenDate } from '#shared/domain/seasons/season-plan.ts';
import type { SeasonPlanId, SessionId, SlotId } from '#shared/kernel/ids.ts';
import { previewPlan } from './plan-preview.ts';
import { readPlan } from './seasons.reader.ts';
import type { Plan } from './seasons.reader.ts';
import { insertSessions, lockPlan } from './seasons.repository.ts';

/**
 * Makes a draft session of every taken date that has none and whose crew has not met yet, all in
 * one transaction (R8). Pressed twice, the second makes none.
 */
export async function makeSessions(
  ctx: AppContext,
  actor: Actor,
  planId: SeasonPlanId,
): Promise<void> {
  await ctx.inTransaction(async (tx) => {
    await lockPlan(tx, planId);
    const plan = await readPlan(tx, planId);
    if (plan === null) throw new Problem('not-found', 'There is no such plan');
    const preview = await previewPlan(ctx, tx, plan);
    const now = ctx.clock.now();
    const made = new Set(plan.sessions.map(({ plannedOn }) => plannedOn));
    const dates = plannedSessions(preview.dates).filter(
      ({ originalOn, window }) => !made.has(originalOn) && window.crewMeetsAt > now,
    );
    if (dates.length === 0 && plan.sessions.length === 0) {
      throw new Problem('plan-refused', 'No date of this plan can be made a session of.');
    }
    const sessions = dates.map((date) => ({
      row: sessionOf(ctx, plan, date, preview.shore.zone),
      date,
    }));
    await insertSessions(
      tx,
      sessions.map(({ row }) => row),
      sessions.flatMap(({ row }) => slotsOf(ctx, plan, row.id)),
    );
    if (sessions.length === 0) return;
    await ctx.recordTrail(
      tx,
      ...sessions.map(({ row, date }) => ({
        actorId: actor.personId,
        action: 'session.made',
        recordKind: 'session',
        recordId: row.id,
        details: { planId, plannedOn: date.originalOn, isByHand: date.byHand },
      })),
    );
  });
}

function sessionOf(ctx: AppContext, plan: Plan, date: TakenDate, zone: string): SessionRow {
  const { window } = date;
  return {
    id: ctx.newId<SessionId>(),
    kind: 'shore',
    title: plan.name,
    state: 'draft',
    shoreId: plan.shoreId,
    zone,
    meetsAt: new Date(window.crewMeetsAt),
    partyMeetsAt: new Date(window.partyMeetsAt),
    startsAt: new Date(window.startsAt),
    endsAt: new Date(window.endsAt),
    lowWaterAt: new Date(window.lowWaterAt),
    lowWaterHeightM: window.lowWaterHeightM,
    lowerShoreClearBy: new Date(window.lowerShoreClearBy),
    offTheShoreBy: new Date(window.offTheShoreBy),
    madeAt: new Date(ctx.clock.now()),
    seasonPlanId: plan.id,
    plannedOn: date.originalOn,
  };
}

function slotsOf(ctx: AppContext, plan: Plan, sessionId: SessionId): SlotRow[] {
  return plan.slots
    .flatMap(({ slotKindId, count }) => Array.from({ length: count }, () => slotKindId))
    .map((slotKindId, position) => ({
      id: ctx.newId<SlotId>(),
      sessionId,
      slotKindId,
      position,
    }));
}
