import type { AppContext } from '#backend/app-context.ts';
import { Problem } from '#backend/http/problem.ts';
import type { Actor } from '#backend/http/route.ts';
import { mayRelease } from '#shared/domain/slots/release.ts';
import type { SlotId } from '#shared/kernel/ids.ts';
import type { SlotSeen } from './claim-slot.ts';
import { sayWhyNotReleased } from './slots.presenter.ts';
import { readCrewFacts, readLetterFacts, readSlot } from './slots.reader.ts';
import { lockForClaim, markReleased } from './slots.repository.ts';
import { slotReleasedMail } from './slot-released.mail.ts';

/** Gives the asker's own slot back: it is a gap again from the commit on. */
export function releaseSlot(ctx: AppContext, actor: Actor, slotId: SlotId): Promise<SlotSeen> {
  return ctx.inTransaction(async (tx) => {
    await lockForClaim(tx, actor.personId, slotId);
    const slot = await readSlot(tx, slotId);
    if (slot === null) throw new Problem('not-found', 'There is no such slot');
    const now = ctx.clock.now();
    const verdict = mayRelease({
      now,
      personId: actor.personId,
      holderId: slot.claim?.personId ?? null,
      meetsAt: slot.session.meetsAt,
    });
    if (!verdict.isGranted || slot.claim === null) {
      const sentence = verdict.isGranted
        ? sayWhyNotReleased({ why: 'not-the-holder' })
        : sayWhyNotReleased(verdict.reasons[0]);
      throw new Problem('release-refused', sentence);
    }
    const claimId = slot.claim.id;
    const facts = await readLetterFacts(tx, claimId);
    await markReleased(tx, claimId, new Date(now));
    await ctx.postLetter(tx, slotReleasedMail(claimId, facts, ctx.group));
    await ctx.recordTrail(tx, {
      actorId: actor.personId,
      action: 'slot.released',
      recordKind: 'claim',
      recordId: claimId,
      details: {
        sessionId: slot.session.id,
        slotId,
        slotKindId: slot.slotKindId,
        personId: actor.personId,
      },
    });
    const crew = await readCrewFacts(tx, actor.personId);
    if (crew === null) throw new Problem('not-found', 'There is no such person');
    return { slot: { ...slot, claim: null }, crew, now };
  });
}
