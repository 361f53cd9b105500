import type { AppContext } from '#backend/app-context.ts';
import { Problem } from '#backend/http/problem.ts';
import type { Actor } from '#backend/http/route.ts';
import type { SeasonPlanId, SessionId } from '#shared/kernel/ids.ts';
import { lockPlan, publishDrafts } from './seasons.repository.ts';

/**
 * Publishes those drafts of a plan among the given whose crew has not met: from the commit on
 * people can claim their slots. Published ones among them stay as they are.
 */
export async function publishSessions(
  ctx: AppContext,
  actor: Actor,
  planId: SeasonPlanId,
  sessionIds: readonly SessionId[],
): Promise<void> {
  await ctx.inTransaction(async (tx) => {
    await lockPlan(tx, planId);
    const published = await publishDrafts(tx, planId, sessionIds, new Date(ctx.clock.now()));
    if (published.length === 0) {
      throw new Problem('plan-refused', 'None of these sessions is a draft that lies ahead.');
    }
    await ctx.recordTrail(
      tx,
      ...published.map((sessionId) => ({
        actorId: actor.personId,
        action: 'session.published',
        recordKind: 'session',
        recordId: sessionId,
        details: { planId },
      })),
    );
  });
}
