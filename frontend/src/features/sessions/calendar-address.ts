import type { CalendarSession } from '#shared/contracts/sessions.ts';
import type { CalendarDay } from '#shared/kernel/time.ts';
import {
  addDays,
  endOfMonth,
  isCalendarDay,
  startOfMonth,
  weekdayOf,
} from '#shared/kernel/time.ts';

/** What the address of the calendar says: the month, the filters, and a day that is opened. */
export interface CalendarAddress {
  /** The first day of the month. */
  readonly monthOn: CalendarDay;
  readonly shoreId: string | null;
  readonly onlyMine: boolean;
  readonly onlyGaps: boolean;
  readonly openedOn: CalendarDay | null;
}

const STRAND_DAYS = 42;

/** Reads the address; where it names no month that exists, the month of today. */
export function readAddress(search: URLSearchParams, today: CalendarDay): CalendarAddress {
  const named = `${search.get('month') ?? ''}-01`;
  const opened = search.get('day') ?? '';
  return {
    monthOn: isCalendarDay(named) ? named : startOfMonth(today),
    shoreId: search.get('shore'),
    onlyMine: search.has('mine'),
    onlyGaps: search.has('gaps'),
    openedOn: isCalendarDay(opened) ? opened : null,
  };
}

/** The address with one thing changed; null leaves it out. */
export function changedAddress(
  search: URLSearchParams,
  name: 'month' | 'shore' | 'mine' | 'gaps' | 'day',
  value: string | null,
): string {
  const changed = new URLSearchParams(search);
  changed.delete('day');
  if (value === null) changed.delete(name);
  else changed.set(name, value);
  return `?${changed.toString()}`;
}

/** A month as the address writes it: '2027-05'. */
export function monthInAddress(day: CalendarDay): string {
  return day.slice(0, 7);
}

/** The whole weeks, Monday to Sunday, that a month touches; both ends included. */
export function weeksOf(monthOn: CalendarDay): { from: CalendarDay; to: CalendarDay } {
  const last = endOfMonth(monthOn);
  return {
    from: addDays(monthOn, 1 - weekdayOf(monthOn)),
    to: addDays(last, 7 - weekdayOf(last)),
  };
}

/** The six weeks of the strand list: from today, or from the first of another month. */
export function strandSpan(
  monthOn: CalendarDay,
  today: CalendarDay,
): { from: CalendarDay; to: CalendarDay } {
  const from = monthOn === startOfMonth(today) ? today : monthOn;
  return { from, to: addDays(from, STRAND_DAYS - 1) };
}

/** The sessions that the filters leave. */
export function filtered(
  sessions: readonly CalendarSession[],
  { shoreId, onlyMine, onlyGaps }: CalendarAddress,
): CalendarSession[] {
  return sessions.filter(
    ({ shoreId: at, slots, hasStarted, state }) =>
      (shoreId === null || at === shoreId) &&
      (!onlyMine || slots.some(({ isYours }) => isYours)) &&
      (!onlyGaps ||
        (!hasStarted && state !== 'stood-down' && slots.some((slot) => slot.state !== 'claimed'))),
  );
}
