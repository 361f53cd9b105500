import type { Letter } from '#backend/app-context.ts';
import type { ClaimId } from '#shared/kernel/ids.ts';
import { letterToHolder, slotInWords } from './letter-to-holder.ts';
import type { WritingGroup } from './letter-to-holder.ts';
import { letterWhenAndWhere } from './letter-when-and-where.ts';
import type { LetterFacts } from './slots.reader.ts';

/** Tells a person that a slot is theirs, with the times to keep. Pure. */
export function claimConfirmedMail(
  claimId: ClaimId,
  facts: LetterFacts,
  group: WritingGroup,
): Letter {
  return letterToHolder(claimId, facts, group, {
    kind: 'claim-confirmed',
    subject: `Yours: ${slotInWords(facts, ', ')}`,
    heading: `You are ${slotInWords(facts, ' at ')}`,
    opening: [`${facts.personName}, the slot is yours.`],
    facts: letterWhenAndWhere(facts),
    closing: [
      'If you cannot come, release the slot on that page, as early as you can.',
      'Predictions are predictions: pressure, wind and swell move the water. The official tide table and the shore leader on the spot decide.',
      `You get this letter because you claimed a slot with ${group.name}.`,
    ],
  });
}
