import type { CalendarDay, ClockTime, Instant } from '#shared/kernel/time.ts';
import { clockAt, dayAt } from '#shared/kernel/time.ts';

const OFFSET = /^(?<sign>[+-])(?<hours>\d{2}):(?<minutes>\d{2})$/;
const MINUTE_MS = 60_000;

/** A moment as a page printed in that zone shows it: an IANA zone, or an offset like '+01:00'. */
export function printedAt(
  at: Instant,
  zone: string,
): { readonly on: CalendarDay; readonly clock: ClockTime } {
  const offset = OFFSET.exec(zone)?.groups;
  if (offset === undefined) return { on: dayAt(at, zone), clock: clockAt(at, zone) };
  const minutes = Number(offset['hours']) * 60 + Number(offset['minutes']);
  const wallAt = at + (offset['sign'] === '-' ? -minutes : minutes) * MINUTE_MS;
  return { on: dayAt(wallAt, 'UTC'), clock: clockAt(wallAt, 'UTC') };
}

/** A table's zone for its reader. */
export function zoneInWords(zone: string): string {
  if (zone === 'UTC') return 'UTC all year';
  return OFFSET.test(zone) ? `UTC${zone.replace('-', '−')} all year` : `local clock time, ${zone}`;
}
