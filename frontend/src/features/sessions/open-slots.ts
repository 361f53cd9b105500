import type { CalendarSession } from '#shared/contracts/sessions.ts';
import { fromIso } from '#shared/kernel/time.ts';

/** A slot that the reader may take now, in a session. */
export interface OpenSlot {
  readonly session: CalendarSession;
  readonly slotId: string;
  readonly slotKindName: string;
}

/** What the reader may take, soonest first; one slot for each kind of a session. */
export function openSlots(sessions: readonly CalendarSession[]): OpenSlot[] {
  return inOrder(sessions).flatMap((session) => {
    const kinds = new Map<string, OpenSlot>();
    for (const { id, slotKindName, mayClaim } of session.slots) {
      if (mayClaim && !kinds.has(slotKindName)) {
        kinds.set(slotKindName, { session, slotId: id, slotKindName });
      }
    }
    return [...kinds.values()];
  });
}

/** The reader's next session that has not ended and is not stood down, or null. */
export function nextOfYours(sessions: readonly CalendarSession[]): CalendarSession | null {
  return (
    inOrder(sessions).find(
      ({ hasEnded, state, slots }) =>
        !hasEnded && state === 'published' && slots.some(({ isYours }) => isYours),
    ) ?? null
  );
}

/** The reader's sessions to come in which their own slot is in doubt. */
export function inDoubtOfYours(sessions: readonly CalendarSession[]): CalendarSession[] {
  return inOrder(sessions).filter(
    ({ hasStarted, slots }) =>
      !hasStarted && slots.some(({ isYours, state }) => isYours && state === 'in-doubt'),
  );
}

function inOrder(sessions: readonly CalendarSession[]): CalendarSession[] {
  return [...sessions].sort((a, b) => fromIso(a.startsAt) - fromIso(b.startsAt));
}
