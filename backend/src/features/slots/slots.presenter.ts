import type { ReasonAgainst } from '#shared/contracts/reasons.ts';
import type { SlotView, Standing } from '#shared/contracts/slots.ts';
import { coveringAward, standingOn } from '#shared/domain/competencies/currency.ts';
import type { EligibilityReason } from '#shared/domain/slots/eligibility.ts';
import type { ReleaseReason } from '#shared/domain/slots/release.ts';
import { mayRelease } from '#shared/domain/slots/release.ts';
import type { CompetencyId } from '#shared/kernel/ids.ts';
import type { CalendarDay, Instant } from '#shared/kernel/time.ts';
import { addDays, addMonths, dayAt, daysBetween, toIso } from '#shared/kernel/time.ts';
import { judgeClaim } from './judge-claim.ts';
import type { CrewFacts, HeldClaim, RequiredCompetency, SlotFacts } from './slots.reader.ts';

/** One slot as this person sees it now, with what the server would answer to a claim or a release. */
export function presentSlot(slot: SlotFacts, crew: CrewFacts, now: Instant): SlotView {
  const { claim, session } = slot;
  const isYours = claim?.personId === crew.personId;
  return {
    id: slot.id,
    slotKindId: slot.slotKindId,
    slotKindName: slot.slotKindName,
    needs: slot.requirements.map(({ name }) => name),
    isFor18AndOver: slot.isFor18AndOver,
    state: claim === null ? 'gap' : claim.isInDoubt ? 'in-doubt' : 'claimed',
    isYours,
    holder:
      claim === null
        ? null
        : {
            personId: claim.personId,
            name: claim.personName,
            claimedAt: toIso(claim.claimedAt),
          },
    claim: claim === null ? presentClaimVerdict(slot, crew, now) : null,
    release: isYours ? presentReleaseVerdict(slot, crew, now) : null,
    standings: slot.requirements.map((competency) =>
      presentStanding(competency, crew, session, dayAt(now, session.zone)),
    ),
  };
}

function presentClaimVerdict(slot: SlotFacts, crew: CrewFacts, now: Instant): SlotView['claim'] {
  const verdict = judgeClaim(slot, crew, now);
  return verdict.isGranted
    ? { isGranted: true }
    : { isGranted: false, reasons: presentReasons(verdict.reasons, slot, crew) };
}

function presentReleaseVerdict(
  slot: SlotFacts,
  crew: CrewFacts,
  now: Instant,
): NonNullable<SlotView['release']> {
  const verdict = mayRelease({
    now,
    personId: crew.personId,
    holderId: slot.claim?.personId ?? null,
    meetsAt: slot.session.meetsAt,
  });
  return verdict.isGranted
    ? { isGranted: true, sentence: null }
    : { isGranted: false, sentence: sayWhyNotReleased(verdict.reasons[0]) };
}

const releaseSentences: Record<ReleaseReason['why'], string> = {
  'not-the-holder': 'Only the person who holds a slot may release it.',
  'session-started': 'The session has started. Speak to the shore leader.',
};

/** One sentence on why a slot cannot be released. */
export function sayWhyNotReleased(reason: ReleaseReason): string {
  return releaseSentences[reason.why];
}

/** The reasons of a refusal with the names that their sentences need. */
export function presentReasons(
  reasons: readonly EligibilityReason[],
  slot: SlotFacts,
  crew: CrewFacts,
): ReasonAgainst[] {
  return reasons.map((reason) => presentReason(reason, slot, crew));
}

function presentReason(reason: EligibilityReason, slot: SlotFacts, crew: CrewFacts): ReasonAgainst {
  const zone = slot.session.zone;
  switch (reason.why) {
    case 'person-not-active':
    case 'session-not-published':
    case 'session-stood-down':
      return { why: reason.why };
    case 'session-started':
      return { why: reason.why, meetsAt: toIso(reason.meetsAt), zone };
    case 'slot-taken':
      return {
        why: reason.why,
        holderName: slot.claim?.personName ?? null,
        claimedAt: toIso(reason.claimedAt),
      };
    case 'competency-not-held':
      return { why: reason.why, ...presentCompetency(slot, reason.competencyId) };
    case 'competency-lapses':
      return {
        why: reason.why,
        ...presentCompetency(slot, reason.competencyId),
        lastValidOn: reason.lastValidOn,
        neededOn: reason.neededOn,
        daysShort: reason.daysShort,
        hasLapsed: reason.hasLapsed,
      };
    case 'competency-starts-later':
      return {
        why: reason.why,
        ...presentCompetency(slot, reason.competencyId),
        validFrom: reason.validFrom,
        neededOn: reason.neededOn,
      };
    case 'under-18':
      return { why: reason.why, turns18On: reason.turns18On };
    case 'overlap':
      return { why: reason.why, ...presentOther(crew, reason.other.sessionId) };
    case 'travel-time':
      return {
        why: reason.why,
        ...presentOther(crew, reason.other.sessionId),
        travelMinutes: reason.travelMinutes,
        gapMinutes: reason.gapMinutes,
      };
  }
}

function presentCompetency(slot: SlotFacts, competencyId: CompetencyId) {
  const competency = found(slot.requirements.find(({ id }) => id === competencyId));
  return {
    competencyId,
    competencyName: competency.name,
    howToGet: competency.howToGet,
  };
}

function presentOther(crew: CrewFacts, sessionId: HeldClaim['sessionId']) {
  const other = found(crew.claims.find((claim) => claim.sessionId === sessionId));
  return {
    sessionId,
    shoreName: other.shoreName,
    dayOn: other.dayOn,
    meetsAt: toIso(other.meetsAt),
    endsAt: toIso(other.endsAt),
    zone: other.zone,
  };
}

function presentStanding(
  competency: RequiredCompetency,
  crew: CrewFacts,
  session: SlotFacts['session'],
  todayOn: CalendarDay,
): Standing {
  const awards = crew.awards.filter(({ competencyId }) => competencyId === competency.id);
  const today = standingOn(todayOn, awards, competency.noticeDays);
  const base = {
    competencyId: competency.id,
    competencyName: competency.name,
    isCurrent: coveringAward([session.firstDayOn, session.lastDayOn], awards) !== null,
  };
  switch (today.state) {
    case 'current':
    case 'renew-by': {
      const shares =
        today.lastValidOn === null || competency.validityMonths === null
          ? { shareLeft: null, noticeShare: null }
          : sharesOf(todayOn, today.lastValidOn, competency.validityMonths, competency.noticeDays);
      return { ...base, state: today.state, lastValidOn: today.lastValidOn, ...shares };
    }
    case 'lapsed':
      return {
        ...base,
        state: 'lapsed',
        lastValidOn: addDays(today.lapsedOn, -1),
        shareLeft: null,
        noticeShare: null,
      };
    case 'awaiting-check':
    case 'not-held':
      return { ...base, state: 'not-held', lastValidOn: null, shareLeft: null, noticeShare: null };
  }
}

/** What is left of a validity and how much of it the notice takes, each from 0 to 1. */
function sharesOf(
  todayOn: CalendarDay,
  lastValidOn: CalendarDay,
  validityMonths: number,
  noticeDays: number,
): Pick<Standing, 'shareLeft' | 'noticeShare'> {
  const dayAfter = addDays(lastValidOn, 1);
  const validityDays = daysBetween(addMonths(dayAfter, -validityMonths), dayAfter);
  return {
    shareLeft: Math.min(1, daysBetween(todayOn, dayAfter) / validityDays),
    noticeShare: Math.min(1, noticeDays / validityDays),
  };
}

function found<Value>(value: Value | undefined): Value {
  if (value === undefined) throw new Error('A reason names a record that its facts do not hold');
  return value;
}
