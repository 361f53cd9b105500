import type { CalendarSession } from '#shared/contracts/sessions.ts';
import { clockAt, fromIso } from '#shared/kernel/time.ts';

/** From when to when a session is on the shore, by its shore's clocks: '08:22 to 10:52'. */
export function timesOf(
  session: Pick<CalendarSession, 'startsAt' | 'offTheShoreBy' | 'endsAt' | 'zone'>,
): string {
  const clock = (iso: string): string => clockAt(fromIso(iso), session.zone);
  return `${clock(session.startsAt)} to ${clock(session.offTheShoreBy ?? session.endsAt)}`;
}
