import type { AwardId, CompetencyId, PersonId, SessionId, ShoreId } from '../../kernel/ids.ts';
import type { Verdict } from '../../kernel/result.ts';
import { granted, refused } from '../../kernel/result.ts';
import type { CalendarDay, Instant } from '../../kernel/time.ts';
import { daysBetween, yearOf } from '../../kernel/time.ts';
import type { Award } from '../competencies/currency.ts';
import { coveringAward, lastCountedDay } from '../competencies/currency.ts';

/**
 * Minutes that a person needs between sessions on different shores, from the end of one to
 * the crew's meeting of the other. Default chosen by this project (product rule R3).
 */
export const defaultTravelMinutes = 45;

const minutesToMs = 60_000;
const adultYears = 18;

/** A session as far as taking a slot of it goes. */
export interface SessionToCrew {
  readonly id: SessionId;
  readonly shoreId: ShoreId;
  readonly state: 'draft' | 'published' | 'stood-down' | 'closed';
  /** When the crew meets; from then on the session has started. */
  readonly meetsAt: Instant;
  readonly endsAt: Instant;
  /** The first and the last local day that the session touches, both included. */
  readonly firstDayOn: CalendarDay;
  readonly lastDayOn: CalendarDay;
}

/** A slot as far as taking it goes. */
export interface SlotToTake {
  readonly isFor18AndOver: boolean;
  readonly requirements: readonly CompetencyId[];
  /** The live claim on it, sound or in doubt; null for a gap. */
  readonly holder: { readonly personId: PersonId; readonly claimedAt: Instant } | null;
}

/** Another live claim of the same person. */
export interface OtherClaim {
  readonly sessionId: SessionId;
  readonly shoreId: ShoreId;
  readonly meetsAt: Instant;
  readonly endsAt: Instant;
}

/** A person as far as taking a slot goes. */
export interface PersonToCrew {
  readonly isActive: boolean;
  readonly bornOn: CalendarDay | null;
  /** Awards in any competency; those that the slot does not require are not read. */
  readonly awards: readonly (Award & { readonly competencyId: CompetencyId })[];
  readonly otherClaims: readonly OtherClaim[];
}

/** One reason why a person may not take a slot, with its own facts. */
export type EligibilityReason =
  | { readonly why: 'person-not-active' }
  | { readonly why: 'session-not-published' }
  | { readonly why: 'session-stood-down' }
  | { readonly why: 'session-started'; readonly meetsAt: Instant }
  | { readonly why: 'slot-taken'; readonly holderId: PersonId; readonly claimedAt: Instant }
  | { readonly why: 'competency-not-held'; readonly competencyId: CompetencyId }
  | {
      readonly why: 'competency-lapses';
      readonly competencyId: CompetencyId;
      readonly lastValidOn: CalendarDay;
      readonly neededOn: CalendarDay;
      readonly daysShort: number;
      readonly hasLapsed: boolean;
    }
  | {
      readonly why: 'competency-starts-later';
      readonly competencyId: CompetencyId;
      readonly validFrom: CalendarDay;
      readonly neededOn: CalendarDay;
    }
  | { readonly why: 'under-18'; readonly turns18On: CalendarDay | null }
  | { readonly why: 'overlap'; readonly other: OtherClaim }
  | {
      readonly why: 'travel-time';
      readonly other: OtherClaim;
      readonly travelMinutes: number;
      readonly gapMinutes: number;
    };

/** What a granted claim rests on: for each requirement the award that meets it. */
export interface Eligibility {
  readonly evidence: readonly { readonly competencyId: CompetencyId; readonly awardId: AwardId }[];
}

/**
 * Whether a person may take a slot now: every hard rule at once, and every reason against, in
 * the order session, slot, competencies, age, other claims. Nobody overrides these rules.
 *
 * A requirement is met by one award whose days, both ends included, hold the first and the
 * last local day of the session. A renewal that is expected counts for nothing.
 * Source: product rules R1, R3 and R4.
 */
export function mayTakeSlot(facts: {
  readonly now: Instant;
  readonly todayOn: CalendarDay;
  readonly person: PersonToCrew;
  readonly session: SessionToCrew;
  readonly slot: SlotToTake;
  readonly travelMinutes: number;
}): Verdict<Eligibility, EligibilityReason> {
  const { now, todayOn, person, session, slot, travelMinutes } = facts;
  const reasons: EligibilityReason[] = [];
  const evidence: Eligibility['evidence'][number][] = [];

  if (!person.isActive) reasons.push({ why: 'person-not-active' });
  if (session.state === 'stood-down') reasons.push({ why: 'session-stood-down' });
  else if (session.state !== 'published') reasons.push({ why: 'session-not-published' });
  if (now >= session.meetsAt) reasons.push({ why: 'session-started', meetsAt: session.meetsAt });
  if (slot.holder !== null) {
    const { personId: holderId, claimedAt } = slot.holder;
    reasons.push({ why: 'slot-taken', holderId, claimedAt });
  }

  for (const competencyId of slot.requirements) {
    const awards = person.awards.filter((award) => award.competencyId === competencyId);
    const covering = coveringAward([session.firstDayOn, session.lastDayOn], awards);
    if (covering !== null) evidence.push({ competencyId, awardId: covering.id });
    else reasons.push(shortfall(competencyId, awards, session, todayOn));
  }

  if (slot.isFor18AndOver) {
    const turns18On = person.bornOn === null ? null : birthday(person.bornOn, adultYears);
    if (turns18On === null || turns18On > session.firstDayOn) {
      reasons.push({ why: 'under-18', turns18On });
    }
  }

  for (const other of person.otherClaims) {
    const clash = clashWith(other, session, travelMinutes);
    if (clash !== null) reasons.push(clash);
  }

  const [first, ...rest] = reasons;
  return first === undefined ? granted({ evidence }) : refused(first, ...rest);
}

/** Why no award covers the session: none counts, the latest ends too soon, or starts too late. */
function shortfall(
  competencyId: CompetencyId,
  awards: readonly Award[],
  session: SessionToCrew,
  todayOn: CalendarDay,
): EligibilityReason {
  const spans = awards
    .filter((award) => award.isConfirmed)
    .map((award) => ({ validFrom: award.validFrom, lastValidOn: lastCountedDay(award) }))
    .filter(({ validFrom, lastValidOn }) => lastValidOn === null || lastValidOn >= validFrom);
  const ended = spans
    .map(({ lastValidOn }) => lastValidOn)
    .filter((day): day is CalendarDay => day !== null && day < session.lastDayOn)
    .sort()
    .at(-1);
  const startsLater = spans
    .map(({ validFrom }) => validFrom)
    .filter((day) => day > session.firstDayOn)
    .sort()[0];
  if (ended !== undefined) {
    return {
      why: 'competency-lapses',
      competencyId,
      lastValidOn: ended,
      neededOn: session.lastDayOn,
      daysShort: daysBetween(ended, session.lastDayOn),
      hasLapsed: ended < todayOn,
    };
  }
  if (startsLater !== undefined) {
    return {
      why: 'competency-starts-later',
      competencyId,
      validFrom: startsLater,
      neededOn: session.firstDayOn,
    };
  }
  return { why: 'competency-not-held', competencyId };
}

/** Overlapping times, or too little time to get from one shore to the other. */
function clashWith(
  other: OtherClaim,
  session: SessionToCrew,
  travelMinutes: number,
): EligibilityReason | null {
  if (other.meetsAt < session.endsAt && session.meetsAt < other.endsAt) {
    return { why: 'overlap', other };
  }
  if (other.shoreId === session.shoreId) return null;
  const gapMs = Math.max(other.meetsAt - session.endsAt, session.meetsAt - other.endsAt);
  if (gapMs >= travelMinutes * minutesToMs) return null;
  return { why: 'travel-time', other, travelMinutes, gapMinutes: Math.floor(gapMs / minutesToMs) };
}

/**
 * The day on which somebody turns an age. Born on 29 February: 1 March in a short year
 * (the day of English law), so that nobody counts as of age a day early.
 */
export function birthday(bornOn: CalendarDay, years: number): CalendarDay {
  const year = String(yearOf(bornOn) + years).padStart(4, '0');
  const monthDay = bornOn.slice(5);
  const isLeap = daysBetween(`${Number(year)}-01-01`, `${Number(year)}-12-31`) === 365;
  return monthDay === '02-29' && !isLeap
    ? (`${year}-03-01` as CalendarDay)
    : (`${year}-${monthDay}` as CalendarDay);
}
