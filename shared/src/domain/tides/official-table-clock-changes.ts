import {
  addDays,
  clockAt,
  dayAt,
  instantOf,
  startOfDay,
  zoneName,
  zoneOffsetMinutes,
} from '#shared/kernel/time.ts';
import type { CalendarDay, ClockTime, Instant } from '#shared/kernel/time.ts';
import type { TableEvent, TableZone } from './official-table-reading.ts';

/** An event as a clock shows it. */
export interface Reading {
  readonly on: CalendarDay;
  readonly clock: ClockTime;
  /** Such as BST; for a fixed zone its offset, such as UTC+1. */
  readonly zoneName: string;
}

/** An event as it stands on the printed page, and as it will be shown at the shore. */
export interface HeldEvent {
  readonly event: TableEvent;
  readonly printed: Reading;
  readonly atShore: Reading;
}

/** The days about one clock change at the shore. */
export interface ClockChange {
  readonly on: CalendarDay;
  /** 60 when clocks go forward by an hour. */
  readonly forwardMinutes: number;
  /** The day before, the day itself and the day after, by the calendar of the printed page. */
  readonly days: readonly { readonly on: CalendarDay; readonly events: readonly HeldEvent[] }[];
}

const MINUTE_MS = 60_000;

/**
 * The dates round each clock change of a year at the shore, with the table's events as they were
 * read, so that a person can hold them against the printed page: a table read in the wrong zone is
 * an hour off on one side of the change. Empty where clocks do not change.
 */
export function datesRoundClockChanges(
  events: readonly TableEvent[],
  zones: { readonly table: TableZone; readonly shore: string },
  year: number,
): ClockChange[] {
  const changes: ClockChange[] = [];
  const end = firstDayOf(year + 1);
  for (let on = firstDayOf(year); on < end; on = addDays(on, 1)) {
    const offset = (day: CalendarDay): number =>
      zoneOffsetMinutes(startOfDay(day, zones.shore), zones.shore);
    const forwardMinutes = offset(addDays(on, 1)) - offset(on);
    if (forwardMinutes === 0) continue;
    const days = [addDays(on, -1), on, addDays(on, 1)].map((day) => ({
      on: day,
      events: eventsOn(events, day, zones),
    }));
    changes.push({ on, forwardMinutes, days });
  }
  return changes;
}

function firstDayOf(year: number): CalendarDay {
  return `${year}-01-01` as CalendarDay;
}

function eventsOn(
  events: readonly TableEvent[],
  on: CalendarDay,
  zones: { readonly table: TableZone; readonly shore: string },
): HeldEvent[] {
  const middayAt = instantOf(on, '12:00', zones.shore);
  return events
    .filter(({ at }) => Math.abs(at - middayAt) <= 48 * 60 * MINUTE_MS)
    .map((event) => ({
      event,
      printed: readingIn(event.at, zones.table),
      atShore: readingIn(event.at, zones.shore),
    }))
    .filter(({ printed }) => printed.on === on);
}

function readingIn(at: Instant, zone: TableZone): Reading {
  if (typeof zone === 'string') {
    return { on: dayAt(at, zone), clock: clockAt(at, zone), zoneName: zoneName(at, zone) };
  }
  const wallAt = at + zone * MINUTE_MS;
  return { on: dayAt(wallAt, 'UTC'), clock: clockAt(wallAt, 'UTC'), zoneName: offsetName(zone) };
}

function offsetName(minutes: number): string {
  if (minutes === 0) return 'UTC';
  const size = Math.abs(minutes);
  const rest = size % 60;
  const sign = minutes < 0 ? '-' : '+';
  return `UTC${sign}${Math.floor(size / 60)}${rest === 0 ? '' : `:${String(rest).padStart(2, '0')}`}`;
}
