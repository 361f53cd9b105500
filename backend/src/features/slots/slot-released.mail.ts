import type { Letter } from '#backend/app-context.ts';
import type { ClaimId } from '#shared/kernel/ids.ts';
import { letterToHolder, slotInWords } from './letter-to-holder.ts';
import type { WritingGroup } from './letter-to-holder.ts';
import type { LetterFacts } from './slots.reader.ts';

/** Tells a person that the slot they gave back is no longer theirs. Pure. */
export function slotReleasedMail(
  claimId: ClaimId,
  facts: LetterFacts,
  group: WritingGroup,
): Letter {
  return letterToHolder(claimId, facts, group, {
    kind: 'slot-released',
    subject: `Released: ${slotInWords(facts, ', ')}`,
    heading: `Released: ${slotInWords(facts, ' at ')}`,
    opening: [`${facts.personName}, you released this slot. It is a gap again.`],
    facts: [],
    closing: [`You get this letter because you held a slot with ${group.name}.`],
  });
}
