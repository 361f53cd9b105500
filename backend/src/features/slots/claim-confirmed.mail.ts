import type { Letter } from '#backend/app-context.ts';
import { letterHtml, letterText } from '#backend/platform/mail/letter-layout.ts';
import type { ClaimId } from '#shared/kernel/ids.ts';
import { formatDay } from '#shared/kernel/time.ts';
import { letterWhenAndWhere } from './letter-when-and-where.ts';
import type { LetterFacts } from './slots.reader.ts';

/** Tells a person that a slot is theirs, with the times to keep. Pure. */
export function claimConfirmedMail(
  claimId: ClaimId,
  facts: LetterFacts,
  group: { readonly name: string; readonly baseUrl: string },
): Letter {
  const day = formatDay(facts.dayOn, 'longYear');
  const content = {
    groupName: group.name,
    heading: `You are ${facts.slotKindName.toLowerCase()} at ${facts.shoreName}, ${day}`,
    opening: [`${facts.personName}, the slot is yours.`],
    facts: letterWhenAndWhere(facts),
    link: {
      label: 'See the session',
      url: `${group.baseUrl}/sessions/${facts.sessionId}`,
    },
    closing: [
      'If you cannot come, release the slot on that page, as early as you can.',
      'Predictions are predictions: pressure, wind and swell move the water. The official tide table and the shore leader on the spot decide.',
      `You get this letter because you claimed a slot with ${group.name}.`,
    ],
  };
  return {
    kind: 'claim-confirmed',
    about: claimId,
    to: { personId: facts.personId, name: facts.personName, address: facts.personEmail },
    subject: `Yours: ${facts.slotKindName.toLowerCase()}, ${facts.shoreName}, ${day}`,
    text: letterText(content),
    html: letterHtml(content),
  };
}
