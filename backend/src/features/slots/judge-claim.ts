import type { Eligibility, EligibilityReason } from '#shared/domain/slots/eligibility.ts';
import { defaultTravelMinutes, mayTakeSlot } from '#shared/domain/slots/eligibility.ts';
import type { Verdict } from '#shared/kernel/result.ts';
import type { Instant } from '#shared/kernel/time.ts';
import { dayAt } from '#shared/kernel/time.ts';
import type { CrewFacts, SlotFacts } from './slots.reader.ts';

/** Whether the person may take the slot now, and by which awards; else every reason against. */
export function judgeClaim(
  slot: SlotFacts,
  crew: CrewFacts,
  now: Instant,
): Verdict<Eligibility, EligibilityReason> {
  return mayTakeSlot({
    now,
    todayOn: dayAt(now, slot.session.zone),
    person: {
      isActive: crew.isActive,
      bornOn: crew.bornOn,
      awards: crew.awards,
      otherClaims: crew.claims,
    },
    session: slot.session,
    slot: {
      isFor18AndOver: slot.isFor18AndOver,
      requirements: slot.requirements.map(({ id }) => id),
      holder: slot.claim,
    },
    travelMinutes: defaultTravelMinutes,
  });
}
