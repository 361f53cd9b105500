import type { QueryClient } from '@tanstack/react-query';
import { queryOptions } from '@tanstack/react-query';
import { call } from '#frontend/api/call.ts';
import type { SessionView } from '#shared/contracts/sessions.ts';
import type { SlotView } from '#shared/contracts/slots.ts';
import type { CalendarDay } from '#shared/kernel/time.ts';

/** The replies that this feature keeps, under one root. */
export const sessionsQueries = {
  root: ['sessions'] as const,
  calendar: (from: CalendarDay, to: CalendarDay) =>
    queryOptions({
      queryKey: [...sessionsQueries.root, 'calendar', from, to],
      queryFn: ({ signal }) => call('seeCalendar', { query: { from, to } }, signal),
    }),
  session: (sessionId: string) =>
    queryOptions({
      queryKey: [...sessionsQueries.root, 'session', sessionId],
      queryFn: ({ signal }) => call('seeSession', { params: { sessionId } }, signal),
    }),
};

/** Writes a slot as the server just answered it into the kept session. */
export function putSlot(queryClient: QueryClient, sessionId: string, slot: SlotView): void {
  queryClient.setQueryData<SessionView>(
    sessionsQueries.session(sessionId).queryKey,
    (session) =>
      session && {
        ...session,
        slots: session.slots.map((kept) => (kept.id === slot.id ? slot : kept)),
      },
  );
}

/** Has everything that shows sessions asked again: a claim changes more than its own slot. */
export function refreshSessions(queryClient: QueryClient): Promise<void> {
  return queryClient.invalidateQueries({ queryKey: sessionsQueries.root });
}
