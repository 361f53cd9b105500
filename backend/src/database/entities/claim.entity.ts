import { EntitySchema } from 'typeorm';
import type {
  AwardId,
  ClaimId,
  CompetencyId,
  PersonId,
  SessionId,
  SlotId,
  SlotKindId,
} from '#shared/kernel/ids.ts';
import type { CalendarDay } from '#shared/kernel/time.ts';

/** A person holds a slot. `during` and the two days are copies that follow the session. */
export interface ClaimRow {
  id: ClaimId;
  slotId: SlotId;
  sessionId: SessionId;
  slotKindId: SlotKindId;
  personId: PersonId;
  /** From the crew's meeting to the end, as PostgreSQL writes a tstzrange. */
  during: string;
  firstDay: CalendarDay;
  lastDay: CalendarDay;
  claimedAt: Date;
  releasedAt: Date | null;
  inDoubtSince: Date | null;
}

/** The award by which a claim meets one requirement. */
export interface ClaimEvidenceRow {
  claimId: ClaimId;
  personId: PersonId;
  competencyId: CompetencyId;
  awardId: AwardId;
  /** The days on which the award counts, as PostgreSQL writes a daterange. */
  valid: string;
  firstDay: CalendarDay;
  lastDay: CalendarDay;
}

export const ClaimEntity = new EntitySchema<ClaimRow>({
  name: 'claim',
  columns: {
    id: { type: 'uuid', primary: true },
    slotId: { name: 'slot_id', type: 'uuid' },
    sessionId: { name: 'session_id', type: 'uuid' },
    slotKindId: { name: 'slot_kind_id', type: 'uuid' },
    personId: { name: 'person_id', type: 'uuid' },
    during: { type: 'tstzrange' },
    firstDay: { name: 'first_day', type: 'date' },
    lastDay: { name: 'last_day', type: 'date' },
    claimedAt: { name: 'claimed_at', type: 'timestamptz' },
    releasedAt: { name: 'released_at', type: 'timestamptz', nullable: true },
    inDoubtSince: { name: 'in_doubt_since', type: 'timestamptz', nullable: true },
  },
});

export const ClaimEvidenceEntity = new EntitySchema<ClaimEvidenceRow>({
  name: 'claim_evidence',
  columns: {
    claimId: { name: 'claim_id', type: 'uuid', primary: true },
    competencyId: { name: 'competency_id', type: 'uuid', primary: true },
    personId: { name: 'person_id', type: 'uuid' },
    awardId: { name: 'award_id', type: 'uuid' },
    valid: { type: 'daterange' },
    firstDay: { name: 'first_day', type: 'date' },
    lastDay: { name: 'last_day', type: 'date' },
  },
});
