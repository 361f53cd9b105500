import { ClaimEntity } from '#backend/database/entities/claim.entity.ts';
import type { Tx } from '#backend/database/transaction.ts';
import type { Eligibility } from '#shared/domain/slots/eligibility.ts';
import type { ClaimId, PersonId, SlotId } from '#shared/kernel/ids.ts';

/**
 * Locks everything that taking a slot depends on, always in the order person, session, slot,
 * award, each step fed by the one before so that the order holds within one statement. Two
 * claims of one person, and two at one slot, so come one after the other.
 */
export async function lockForClaim(tx: Tx, personId: PersonId, slotId: SlotId): Promise<void> {
  await tx.query(
    `WITH the_person AS MATERIALIZED (
       SELECT id FROM person WHERE id = $1 FOR NO KEY UPDATE
     ), the_session AS MATERIALIZED (
       SELECT session.id FROM the_person, session
        WHERE session.id = (SELECT session_id FROM slot WHERE id = $2)
          FOR SHARE OF session
     ), the_slot AS MATERIALIZED (
       SELECT slot.id FROM the_session, slot WHERE slot.id = $2 FOR NO KEY UPDATE OF slot
     )
     SELECT award.id FROM the_slot, award WHERE award.person_id = $1
      ORDER BY award.id FOR SHARE OF award`,
    [personId, slotId],
  );
}

/** Inserts a claim, copying what follows the session, with one evidence row a requirement. */
export async function insertClaim(
  tx: Tx,
  claim: {
    readonly id: ClaimId;
    readonly slotId: SlotId;
    readonly personId: PersonId;
    readonly claimedAt: Date;
  },
  evidence: Eligibility['evidence'],
): Promise<void> {
  await tx.query(
    `WITH taken AS (
       INSERT INTO claim (id, slot_id, session_id, slot_kind_id, person_id,
                          during, first_day, last_day, claimed_at)
       SELECT $1, slot.id, slot.session_id, slot.slot_kind_id, $2,
              session.during, session.first_day, session.last_day, $4
         FROM slot JOIN session ON session.id = slot.session_id
        WHERE slot.id = $3
       RETURNING id, person_id, first_day, last_day
     )
     INSERT INTO claim_evidence (claim_id, person_id, competency_id, award_id, valid, first_day, last_day)
     SELECT taken.id, taken.person_id, award.competency_id, award.id, award.valid,
            taken.first_day, taken.last_day
       FROM taken JOIN award ON award.id = ANY ($5)`,
    [
      claim.id,
      claim.personId,
      claim.slotId,
      claim.claimedAt,
      evidence.map(({ awardId }) => awardId),
    ],
  );
}

/** Gives a claim back. Its evidence stays: it shows on what the claim rested. */
export async function markReleased(tx: Tx, claimId: ClaimId, releasedAt: Date): Promise<void> {
  await tx.update(ClaimEntity, { id: claimId }, { releasedAt });
}
