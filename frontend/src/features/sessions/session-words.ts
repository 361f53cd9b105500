import type { LimpetLook } from '#frontend/components/limpet.tsx';
import { counted, numberWord } from '#frontend/words/number-words.ts';
import type { SessionView } from '#shared/contracts/sessions.ts';

type State = SessionView['state'];
interface Slot {
  readonly state: 'gap' | 'claimed' | 'in-doubt';
  readonly isYours: boolean;
}

/** How the slots of a session stand, to be drawn and to be said. */
export interface Cover {
  readonly looks: readonly LimpetLook[];
  readonly gaps: number;
  readonly inDoubt: number;
  readonly isYours: boolean;
}

/** How the slots of a session stand. A slot in doubt is drawn as such even if it is the reader's. */
export function coverOf(slots: readonly Slot[]): Cover {
  return {
    looks: slots.map(({ state, isYours }) => (state === 'claimed' && isYours ? 'yours' : state)),
    gaps: slots.filter(({ state }) => state === 'gap').length,
    inDoubt: slots.filter(({ state }) => state === 'in-doubt').length,
    isYours: slots.some(({ isYours }) => isYours),
  };
}

/** What is said of a session beside its shore: 'two gaps, one in doubt', 'covered', 'stood down'. */
export function coverInWords(state: State, hasEnded: boolean, cover: Cover): string {
  if (state === 'stood-down') return 'stood down';
  if (hasEnded || state === 'closed') return 'done';
  const open = [
    ...(cover.gaps > 0 ? [counted(cover.gaps, 'gap')] : []),
    ...(cover.inDoubt > 0 ? [`${numberWord(cover.inDoubt)} in doubt`] : []),
  ];
  const words = open.length === 0 ? 'covered' : open.join(', ');
  return state === 'draft' ? `draft, ${words}` : words;
}

/** The name of a link to a session: 'Gull Ledges, two gaps, one in doubt'. */
export function sessionInWords(session: {
  readonly shoreName: string;
  readonly state: State;
  readonly hasEnded: boolean;
  readonly slots: readonly Slot[];
}): string {
  const cover = coverOf(session.slots);
  const words = coverInWords(session.state, session.hasEnded, cover);
  return `${session.shoreName}, ${words}${cover.isYours ? ', you are on the crew' : ''}`;
}
