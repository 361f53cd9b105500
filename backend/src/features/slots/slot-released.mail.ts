import type { Letter } from '#backend/app-context.ts';
import { letterHtml, letterText } from '#backend/platform/mail/letter-layout.ts';
import type { ClaimId } from '#shared/kernel/ids.ts';
import { formatDay } from '#shared/kernel/time.ts';
import type { LetterFacts } from './slots.reader.ts';

/** Tells a person that the slot they gave back is no longer theirs. Pure. */
export function slotReleasedMail(
  claimId: ClaimId,
  facts: LetterFacts,
  group: { readonly name: string; readonly baseUrl: string },
): Letter {
  const day = formatDay(facts.dayOn, 'longYear');
  const content = {
    groupName: group.name,
    heading: `Released: ${facts.slotKindName.toLowerCase()} at ${facts.shoreName}, ${day}`,
    opening: [`${facts.personName}, you released this slot. It is a gap again.`],
    facts: [],
    link: {
      label: 'See the session',
      url: `${group.baseUrl}/sessions/${facts.sessionId}`,
    },
    closing: [`You get this letter because you held a slot with ${group.name}.`],
  };
  return {
    kind: 'slot-released',
    about: claimId,
    to: { personId: facts.personId, name: facts.personName, address: facts.personEmail },
    subject: `Released: ${facts.slotKindName.toLowerCase()}, ${facts.shoreName}, ${day}`,
    text: letterText(content),
    html: letterHtml(content),
  };
}
