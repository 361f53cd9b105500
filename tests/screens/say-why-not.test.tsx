import { describe, expect, it } from 'vitest';
import { sayWhyNot, whyNotSentence } from '#frontend/features/slots/say-why-not.ts';
import type { ReasonAgainst } from '#shared/contracts/reasons.ts';
import { reasonAgainst } from '#shared/contracts/reasons.ts';
import { idOf } from './made-up-replies.ts';

const tideSafety = {
  competencyId: idOf(21),
  competencyName: 'Tide safety',
  howToGet: 'the refresher on the first Saturday of the month.',
};
const elsewhere = {
  sessionId: idOf(108),
  shoreName: 'Kettle Reef',
  dayOn: '2027-05-09',
  meetsAt: '2027-05-09T05:35:00.000Z',
  endsAt: '2027-05-09T09:45:00.000Z',
  zone: 'Europe/London',
} as const;

const cases: readonly [ReasonAgainst, string, string][] = [
  [
    { why: 'person-not-active' },
    'Your place in the group is paused.',
    'An administrator can open it again.',
  ],
  [
    { why: 'session-not-published' },
    'This session is not published yet.',
    'It opens for claims when a coordinator publishes it.',
  ],
  [
    { why: 'session-stood-down' },
    'This session is stood down.',
    'Should it be on again, its slots open again too.',
  ],
  [
    { why: 'session-started', meetsAt: '2027-05-09T06:37:00.000Z', zone: 'Europe/London' },
    'The crew met at 07:37, and a slot is claimed before then.',
    'Look for a session that is still to come.',
  ],
  [
    { why: 'slot-taken', holderName: 'Dorothy Ashdown', claimedAt: '2027-04-29T12:04:00.000Z' },
    'Dorothy Ashdown has claimed it.',
    'It opens again if it is released.',
  ],
  [
    { why: 'slot-taken', holderName: null, claimedAt: null },
    'Somebody else has claimed it.',
    'It opens again if it is released.',
  ],
  [
    { why: 'competency-not-held', ...tideSafety },
    'Tide safety not held.',
    'How to get it: the refresher on the first Saturday of the month.',
  ],
  [
    {
      why: 'competency-lapses',
      ...tideSafety,
      lastValidOn: '2027-05-03',
      neededOn: '2027-05-09',
      daysShort: 6,
      hasLapsed: false,
    },
    'Tide safety lapses on 3 May, six days before this session.',
    'How to renew it: the refresher on the first Saturday of the month.',
  ],
  [
    {
      why: 'competency-lapses',
      ...tideSafety,
      lastValidOn: '2026-12-31',
      neededOn: '2027-01-14',
      daysShort: 14,
      hasLapsed: true,
    },
    'Tide safety lapsed on 31 December 2026, 14 days before this session.',
    'How to renew it: the refresher on the first Saturday of the month.',
  ],
  [
    {
      why: 'competency-starts-later',
      ...tideSafety,
      validFrom: '2027-05-10',
      neededOn: '2027-05-09',
    },
    'Tide safety counts from 10 May, one day after this session.',
    'From that day on you may claim.',
  ],
  [
    { why: 'under-18', turns18On: '2027-06-03' },
    'This slot is for people of 18 and over.',
    'You are 18 on 3 June 2027.',
  ],
  [
    { why: 'under-18', turns18On: null },
    'This slot is for people of 18 and over.',
    'No date of birth is recorded for you; an administrator can add it.',
  ],
  [
    { why: 'overlap', ...elsewhere },
    'You are on the crew at Kettle Reef from 06:35 to 10:45 on 9 May, at the same time.',
    'Release that slot first, or leave this one to somebody else.',
  ],
  [
    { why: 'travel-time', ...elsewhere, travelMinutes: 45, gapMinutes: 13 },
    'You are on the crew at Kettle Reef from 06:35 to 10:45 on 9 May. That leaves thirteen minutes, and the way between the shores takes 45 minutes.',
    'Release that slot first, or leave this one to somebody else.',
  ],
];

describe('why a slot may not be claimed', () => {
  it.each(cases)('%j is said in a sentence with what would mend it', (reason, sentence, mend) => {
    expect(reasonAgainst.parse(reason)).toEqual(reason);
    expect(whyNotSentence(reason)).toBe(sentence);
    expect(sayWhyNot(reason).mend).toBe(mend);
  });

  it('has a sentence here for every reason that the contract knows', () => {
    const known = reasonAgainst.options.map((option) => option.shape.why.value).sort();
    expect([...new Set(cases.map(([{ why }]) => why))].sort()).toEqual(known);
  });
});
