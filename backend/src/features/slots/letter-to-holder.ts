import type { Letter } from '#backend/app-context.ts';
import { letterHtml, letterText } from '#backend/platform/mail/letter-layout.ts';
import type { LetterContent } from '#backend/platform/mail/letter-layout.ts';
import type { ClaimId } from '#shared/kernel/ids.ts';
import { formatDay } from '#shared/kernel/time.ts';
import type { LetterFacts } from './slots.reader.ts';

/** Which group writes, and where its pages are. */
export interface WritingGroup {
  readonly name: string;
  readonly baseUrl: string;
}

/** What a letter about a claim says beyond what all of them say. */
export interface ClaimWords extends Pick<
  LetterContent,
  'heading' | 'opening' | 'facts' | 'closing'
> {
  readonly kind: string;
  readonly subject: string;
}

/** The slot in words: 'shore leader at Gull Ledges, Sunday 9 May 2027'. */
export function slotInWords(facts: LetterFacts, between: ' at ' | ', '): string {
  const day = formatDay(facts.dayOn, 'longYear');
  return `${facts.slotKindName.toLowerCase()}${between}${facts.shoreName}, ${day}`;
}

/** A letter to the holder of a claim, with the link to its session. */
export function letterToHolder(
  claimId: ClaimId,
  facts: LetterFacts,
  group: WritingGroup,
  words: ClaimWords,
): Letter {
  const { kind, subject, ...said } = words;
  const content: LetterContent = {
    ...said,
    groupName: group.name,
    link: { label: 'See the session', url: `${group.baseUrl}/sessions/${facts.sessionId}` },
  };
  return {
    kind,
    about: claimId,
    to: { personId: facts.personId, name: facts.personName, address: facts.personEmail },
    subject,
    text: letterText(content),
    html: letterHtml(content),
  };
}
