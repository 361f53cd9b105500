import { counted } from '#frontend/words/number-words.ts';
import type { ReasonAgainst } from '#shared/contracts/reasons.ts';
import type { CalendarDay } from '#shared/kernel/time.ts';
import { clockAt, dayAt, daysBetween, formatDay, fromIso } from '#shared/kernel/time.ts';

/** One reason against a claim in words, and what would mend it. */
export interface WhyNot {
  /** What the sentence is about, to be set in bold at its head; null where it stands as a whole. */
  readonly subject: string | null;
  /** The sentence, or the rest of it after its subject. */
  readonly rest: string;
  readonly mend: string;
}

type Said = {
  [Why in ReasonAgainst['why']]: (reason: Extract<ReasonAgainst, { why: Why }>) => WhyNot;
};

/**
 * A sentence for every reason of contracts/reasons.ts. It is a mapped type, so a reason without
 * its sentence stops the build.
 */
const said: Said = {
  'person-not-active': () => ({
    subject: null,
    rest: 'Your place in the group is paused.',
    mend: 'An administrator can open it again.',
  }),
  'session-not-published': () => ({
    subject: null,
    rest: 'This session is not published yet.',
    mend: 'It opens for claims when a coordinator publishes it.',
  }),
  'session-stood-down': () => ({
    subject: null,
    rest: 'This session is stood down.',
    mend: 'Should it be on again, its slots open again too.',
  }),
  'session-started': (reason) => ({
    subject: null,
    rest: `The crew met at ${clockAt(fromIso(reason.meetsAt), reason.zone)}, and a slot is claimed before then.`,
    mend: 'Look for a session that is still to come.',
  }),
  'slot-taken': (reason) => ({
    subject: reason.holderName,
    rest: reason.holderName === null ? 'Somebody else has claimed it.' : 'has claimed it.',
    mend: 'It opens again if it is released.',
  }),
  'competency-not-held': (reason) => ({
    subject: reason.competencyName,
    rest: 'not held.',
    mend: `How to get it: ${reason.howToGet}`,
  }),
  'competency-lapses': (reason) => ({
    subject: reason.competencyName,
    rest: `${reason.hasLapsed ? 'lapsed' : 'lapses'} on ${dayBeside(reason.lastValidOn, reason.neededOn)}, ${counted(reason.daysShort, 'day')} before this session.`,
    mend: `How to renew it: ${reason.howToGet}`,
  }),
  'competency-starts-later': (reason) => ({
    subject: reason.competencyName,
    rest: `counts from ${dayBeside(reason.validFrom, reason.neededOn)}, ${counted(daysBetween(reason.neededOn, reason.validFrom), 'day')} after this session.`,
    mend: 'From that day on you may claim.',
  }),
  'under-18': (reason) => ({
    subject: null,
    rest: 'This slot is for people of 18 and over.',
    mend:
      reason.turns18On === null
        ? 'No date of birth is recorded for you; an administrator can add it.'
        : `You are 18 on ${formatDay(reason.turns18On, 'dayMonthYear')}.`,
  }),
  overlap: (reason) => ({
    subject: null,
    rest: `You are on the crew at ${otherSession(reason)}, at the same time.`,
    mend: 'Release that slot first, or leave this one to somebody else.',
  }),
  'travel-time': (reason) => ({
    subject: null,
    rest: `You are on the crew at ${otherSession(reason)}. That leaves ${counted(reason.gapMinutes, 'minute')}, and the way between the shores takes ${counted(reason.travelMinutes, 'minute')}.`,
    mend: 'Release that slot first, or leave this one to somebody else.',
  }),
};

/** What one reason against a claim says, and what would mend it. */
export function sayWhyNot(reason: ReasonAgainst): WhyNot {
  return (said[reason.why] as (reason: ReasonAgainst) => WhyNot)(reason);
}

/** The whole sentence of a reason, for where nothing can be set in bold. */
export function whyNotSentence(reason: ReasonAgainst): string {
  const { subject, rest } = sayWhyNot(reason);
  return subject === null ? rest : `${subject} ${rest}`;
}

/** A day without its year where the day beside it lies in the same one. */
function dayBeside(day: CalendarDay, other: CalendarDay): string {
  return formatDay(day, day.slice(0, 4) === other.slice(0, 4) ? 'dayMonth' : 'dayMonthYear');
}

function otherSession(other: Extract<ReasonAgainst, { why: 'overlap' | 'travel-time' }>): string {
  const meets = fromIso(other.meetsAt);
  const ends = fromIso(other.endsAt);
  return `${other.shoreName} from ${clockAt(meets, other.zone)} to ${clockAt(ends, other.zone)} on ${formatDay(dayAt(meets, other.zone), 'dayMonth')}`;
}
