import type { CalendarDay } from '#shared/kernel/time.ts';
import { daysBetween, formatDay } from '#shared/kernel/time.ts';
import { counted } from './number-words.ts';

/** A day without its weekday, as short as it goes: '9 May', '27 Apr'. */
export function shortDate(day: CalendarDay): string {
  return formatDay(day, 'short').split(' ').slice(1).join(' ');
}

/** How far off a day is: 'today', 'tomorrow', 'in ten days', 'six days ago'. */
export function daysAway(today: CalendarDay, day: CalendarDay): string {
  const days = daysBetween(today, day);
  if (days === 0) return 'today';
  if (days === 1) return 'tomorrow';
  if (days === -1) return 'yesterday';
  return days > 0 ? `in ${counted(days, 'day')}` : `${counted(-days, 'day')} ago`;
}

/** A run of days: 'Sun 9 May', 'Fri 30 Apr to Wed 5 May'. */
export function daySpan(from: CalendarDay, to: CalendarDay): string {
  if (from === to) return formatDay(from, 'short');
  return `${formatDay(from, 'short')} to ${formatDay(to, 'short')}`;
}
