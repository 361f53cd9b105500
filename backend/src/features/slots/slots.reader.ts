import type { Read } from '#backend/database/transaction.ts';
import type { Award } from '#shared/domain/competencies/currency.ts';
import type { OtherClaim, SessionToCrew } from '#shared/domain/slots/eligibility.ts';
import type {
  ClaimId,
  CompetencyId,
  PersonId,
  SessionId,
  SlotId,
  SlotKindId,
} from '#shared/kernel/ids.ts';
import type { CalendarDay, Instant } from '#shared/kernel/time.ts';

/** A competency that a slot requires, with what its sentences need. */
export interface RequiredCompetency {
  readonly id: CompetencyId;
  readonly name: string;
  readonly howToGet: string;
  readonly validityMonths: number | null;
  readonly noticeDays: number;
}

/** A slot with its session, its requirements and its live claim. */
export interface SlotFacts {
  readonly id: SlotId;
  readonly slotKindId: SlotKindId;
  readonly slotKindName: string;
  readonly isFor18AndOver: boolean;
  readonly requirements: readonly RequiredCompetency[];
  readonly session: SessionToCrew & { readonly zone: string; readonly shoreName: string };
  readonly claim: {
    readonly id: ClaimId;
    readonly personId: PersonId;
    readonly personName: string;
    readonly claimedAt: Instant;
    readonly isInDoubt: boolean;
  } | null;
}

/** A claim of the person elsewhere, with what its sentence needs. */
export interface HeldClaim extends OtherClaim {
  readonly shoreName: string;
  readonly dayOn: CalendarDay;
  readonly zone: string;
}

/** What the rules need to know of a person who would take a slot. */
export interface CrewFacts {
  readonly personId: PersonId;
  readonly isActive: boolean;
  readonly bornOn: CalendarDay | null;
  readonly awards: readonly (Award & { readonly competencyId: CompetencyId })[];
  readonly claims: readonly HeldClaim[];
}

const slotFactsSql = `
  SELECT json_build_object(
      'id', slot.id,
      'slotKindId', kind.id,
      'slotKindName', kind.name,
      'isFor18AndOver', kind.is_for_18_and_over,
      'requirements', coalesce((
        SELECT json_agg(json_build_object(
            'id', c.id, 'name', c.name, 'howToGet', c.how_to_get,
            'validityMonths', c.validity_months, 'noticeDays', c.notice_days) ORDER BY c.position)
          FROM slot_kind_requirement r
          JOIN competency c ON c.id = r.competency_id
         WHERE r.slot_kind_id = kind.id AND r.added_at < session.meets_at), '[]'),
      'session', json_build_object(
        'id', session.id, 'shoreId', session.shore_id, 'state', session.state,
        'meetsAt', epoch_ms(session.meets_at), 'endsAt', epoch_ms(session.ends_at),
        'firstDayOn', session.first_day, 'lastDayOn', session.last_day,
        'zone', session.zone, 'shoreName', shore.name),
      'claim', (
        SELECT json_build_object(
            'id', claim.id, 'personId', holder.id, 'personName', holder.name,
            'claimedAt', epoch_ms(claim.claimed_at),
            'isInDoubt', claim.in_doubt_since IS NOT NULL)
          FROM claim JOIN person holder ON holder.id = claim.person_id
         WHERE claim.slot_id = slot.id AND claim.released_at IS NULL)
    ) AS slot
    FROM slot
    JOIN slot_kind kind ON kind.id = slot.slot_kind_id
    JOIN session ON session.id = slot.session_id
    JOIN shore ON shore.id = session.shore_id`;

/** One slot; null when there is none of this id. */
export async function readSlot(read: Read, slotId: SlotId): Promise<SlotFacts | null> {
  const rows: { slot: SlotFacts }[] = await read.query(`${slotFactsSql} WHERE slot.id = $1`, [
    slotId,
  ]);
  return rows[0]?.slot ?? null;
}

/** The slots of some sessions, in the order of their positions. */
export async function readSlotsOfSessions(
  read: Read,
  sessionIds: readonly SessionId[],
): Promise<readonly SlotFacts[]> {
  const rows: { slot: SlotFacts }[] = await read.query(
    `${slotFactsSql} WHERE session.id = ANY ($1) ORDER BY session.id, slot.position`,
    [sessionIds],
  );
  return rows.map((row) => row.slot);
}

/** A person with every confirmed award and every live claim; null when there is none of this id. */
export async function readCrewFacts(read: Read, personId: PersonId): Promise<CrewFacts | null> {
  const rows: { facts: CrewFacts }[] = await read.query(
    `SELECT json_build_object(
         'personId', p.id,
         'isActive', p.state = 'active',
         'bornOn', p.born_on,
         'awards', coalesce((
           SELECT json_agg(json_build_object(
               'id', a.id, 'competencyId', a.competency_id, 'validFrom', a.valid_from,
               'expiresOn', a.expires_on, 'withdrawnOn', a.withdrawn_on, 'isConfirmed', true))
             FROM award a WHERE a.person_id = p.id), '[]'),
         'claims', coalesce((
           SELECT json_agg(json_build_object(
               'sessionId', s.id, 'shoreId', s.shore_id, 'shoreName', shore.name,
               'dayOn', s.first_day, 'zone', s.zone,
               'meetsAt', epoch_ms(s.meets_at), 'endsAt', epoch_ms(s.ends_at)) ORDER BY s.meets_at)
             FROM claim c
             JOIN session s ON s.id = c.session_id
             JOIN shore ON shore.id = s.shore_id
            WHERE c.person_id = p.id AND c.released_at IS NULL), '[]')
       ) AS facts
       FROM person p WHERE p.id = $1`,
    [personId],
  );
  return rows[0]?.facts ?? null;
}

/** What a letter about a claim needs to say. */
export interface LetterFacts {
  readonly personId: PersonId;
  readonly personName: string;
  readonly personEmail: string;
  readonly slotKindName: string;
  readonly sessionId: SessionId;
  readonly title: string;
  readonly shoreName: string;
  readonly meetingPlace: string;
  readonly zone: string;
  readonly dayOn: CalendarDay;
  readonly meetsAt: Instant;
  readonly startsAt: Instant;
  readonly lowWaterAt: Instant | null;
  readonly lowWaterHeightM: number | null;
  readonly lowerShoreClearBy: Instant | null;
  readonly offTheShoreBy: Instant | null;
  readonly endsAt: Instant;
}

/** The facts of a letter about a claim that exists, live or released. */
export async function readLetterFacts(read: Read, claimId: ClaimId): Promise<LetterFacts> {
  const rows: { facts: LetterFacts }[] = await read.query(
    `SELECT json_build_object(
         'personId', p.id, 'personName', p.name, 'personEmail', p.email,
         'slotKindName', k.name, 'sessionId', s.id, 'title', s.title, 'shoreName', shore.name,
         'meetingPlace', shore.meeting_place, 'zone', s.zone, 'dayOn', s.first_day,
         'meetsAt', epoch_ms(s.meets_at), 'startsAt', epoch_ms(s.starts_at),
         'lowWaterAt', epoch_ms(s.low_water_at), 'lowWaterHeightM', s.low_water_height_m,
         'lowerShoreClearBy', epoch_ms(s.lower_shore_clear_by),
         'offTheShoreBy', epoch_ms(s.off_the_shore_by), 'endsAt', epoch_ms(s.ends_at)) AS facts
       FROM claim c
       JOIN person p ON p.id = c.person_id
       JOIN slot_kind k ON k.id = c.slot_kind_id
       JOIN session s ON s.id = c.session_id
       JOIN shore ON shore.id = s.shore_id
      WHERE c.id = $1`,
    [claimId],
  );
  const facts = rows[0]?.facts;
  if (facts === undefined) throw new Error('There is no claim to write a letter about');
  return facts;
}
