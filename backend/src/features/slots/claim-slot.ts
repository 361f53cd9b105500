import type { AppContext } from '#backend/app-context.ts';
import { databaseError } from '#backend/database/transaction.ts';
import { Problem } from '#backend/http/problem.ts';
import type { Actor } from '#backend/http/route.ts';
import type { Instant } from '#shared/kernel/time.ts';
import type { ClaimId, SlotId } from '#shared/kernel/ids.ts';
import { claimConfirmedMail } from './claim-confirmed.mail.ts';
import { judgeClaim } from './judge-claim.ts';
import { presentReasons } from './slots.presenter.ts';
import type { CrewFacts, SlotFacts } from './slots.reader.ts';
import { readCrewFacts, readLetterFacts, readSlot } from './slots.reader.ts';
import { insertClaim, lockForClaim } from './slots.repository.ts';

/** The guards of the database that speak when facts changed between reading and committing. */
const guards = new Set([
  'claim_one_live_per_slot',
  'claim_no_overlap',
  'claim_has_evidence',
  'claim_evidence_by_award',
  'claim_evidence_covers_session',
  'claim_follows_session',
]);

/** A slot after the change, with who looks at it and when. */
export interface SlotSeen {
  readonly slot: SlotFacts;
  readonly crew: CrewFacts;
  readonly now: Instant;
}

/**
 * Takes a slot for the person who asks: claim, evidence, letter and trail line in one
 * transaction, or a refusal with every reason (R3, R4). Where a guard of the database refuses
 * what the rule granted, the facts have changed meanwhile: it is judged once more.
 */
export async function claimSlot(ctx: AppContext, actor: Actor, slotId: SlotId): Promise<SlotSeen> {
  try {
    return await tryToClaim(ctx, actor, slotId);
  } catch (error) {
    if (!guards.has(databaseError(error)?.constraint ?? '')) throw error;
    return tryToClaim(ctx, actor, slotId);
  }
}

function tryToClaim(ctx: AppContext, actor: Actor, slotId: SlotId): Promise<SlotSeen> {
  return ctx.inTransaction(async (tx) => {
    await lockForClaim(tx, actor.personId, slotId);
    const slot = await readSlot(tx, slotId);
    const crew = await readCrewFacts(tx, actor.personId);
    if (slot === null || crew === null || slot.session.state === 'draft') {
      throw new Problem('not-found', 'There is no such slot');
    }
    const now = ctx.clock.now();
    const verdict = judgeClaim(slot, crew, now);
    if (!verdict.isGranted) {
      throw new Problem('claim-refused', 'This slot cannot be claimed', {
        reasons: presentReasons(verdict.reasons, slot, crew),
      });
    }
    const claimId = ctx.newId<ClaimId>();
    const claim = { id: claimId, slotId, personId: actor.personId, claimedAt: new Date(now) };
    await insertClaim(tx, claim, verdict.value.evidence);
    const facts = await readLetterFacts(tx, claimId);
    await ctx.postLetter(tx, claimConfirmedMail(claimId, facts, ctx.group));
    await ctx.recordTrail(tx, {
      actorId: actor.personId,
      action: 'slot.claimed',
      recordKind: 'claim',
      recordId: claimId,
      details: {
        sessionId: slot.session.id,
        slotId,
        slotKindId: slot.slotKindId,
        personId: actor.personId,
      },
    });
    const { personId, name: personName } = actor;
    const held = { id: claimId, personId, personName, claimedAt: now, isInDoubt: false };
    return { slot: { ...slot, claim: held }, crew, now };
  });
}
