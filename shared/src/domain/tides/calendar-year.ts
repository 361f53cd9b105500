import type { Instant } from '#shared/kernel/time.ts';

const DAY_MS = 86_400_000;

/** The instant at which the calendar year begins in UTC. Gregorian, any whole year number. */
export function startOfYearUtc(year: number): Instant {
  const before = year - 1;
  const leapDays = Math.floor(before / 4) - Math.floor(before / 100) + Math.floor(before / 400);
  // 719162 days lie between 0001-01-01 and 1970-01-01.
  return (before * 365 + leapDays - 719_162) * DAY_MS;
}

/** The calendar year in UTC in which the instant lies. */
export function yearUtcAt(at: Instant): number {
  const guess = 1970 + Math.floor(at / (365.2425 * DAY_MS));
  if (at < startOfYearUtc(guess)) return guess - 1;
  return at < startOfYearUtc(guess + 1) ? guess : guess + 1;
}
