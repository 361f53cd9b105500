import type { AwardId } from '../../kernel/ids.ts';
import { addDays, daysBetween } from '../../kernel/time.ts';
import type { CalendarDay } from '../../kernel/time.ts';

/**
 * One award of one competency to one person. Valid from validFrom through expiresOn, both days
 * included; null does not expire. Withdrawn: valid before withdrawnOn only, so that what was done on
 * the strength of it stays proven; withdrawn on or before validFrom it was never valid.
 */
export interface Award {
  readonly id: AwardId;
  readonly validFrom: CalendarDay;
  readonly expiresOn: CalendarDay | null;
  readonly withdrawnOn: CalendarDay | null;
  /** False while a certificate waits for a trainer's check: it then counts for nothing. */
  readonly isConfirmed: boolean;
}

interface Lapse {
  readonly awardId: AwardId;
  readonly lapsedOn: CalendarDay;
  readonly lapsedBy: 'expiry' | 'withdrawal';
}

/**
 * How a person stands in one competency on one day. Only 'current' and 'renew-by' are current.
 * - awardId: the award that the state rests on.
 * - lastValidOn: the last day of validity without a break, a renewal that follows on included;
 *   null: it does not end. lapsedOn: the first day on which it was valid no more.
 * - daysLeft: days after this one that are still valid, 0 on the last.
 * - heldFrom: the day on which the next confirmed award begins, if one is known.
 */
export type Standing =
  | {
      readonly state: 'current';
      readonly awardId: AwardId;
      readonly lastValidOn: CalendarDay | null;
      readonly daysLeft: number | null;
    }
  | {
      readonly state: 'renew-by';
      readonly awardId: AwardId;
      readonly lastValidOn: CalendarDay;
      readonly daysLeft: number;
    }
  | (Lapse & { readonly state: 'lapsed'; readonly heldFrom: CalendarDay | null })
  | {
      readonly state: 'awaiting-check';
      readonly awardId: AwardId;
      readonly lapsedOn: CalendarDay | null;
      readonly heldFrom: CalendarDay | null;
    }
  | { readonly state: 'not-held'; readonly heldFrom: CalendarDay | null };

/**
 * How a person with these awards of one competency stands on a calendar day at the shore.
 *
 * 'renew-by' begins noticeDays before the last valid day (that day included: with 30, on the day
 * the 30-day notice goes out) unless a confirmed renewal follows without a day between.
 * 'awaiting-check' stands where the person is not current, and a certificate that waits for its
 * check would make them so. The order of the awards means nothing.
 * Source: product rule R1.
 */
export function standingOn(
  day: CalendarDay,
  awards: readonly Award[],
  noticeDays: number,
): Standing {
  const holding = coveringAward([day], awards);
  if (holding !== null) {
    const lastValidOn = unbrokenThrough(holding, awards);
    if (lastValidOn === null) {
      return { state: 'current', awardId: holding.id, lastValidOn, daysLeft: null };
    }
    const daysLeft = daysBetween(day, lastValidOn);
    const state = daysLeft <= noticeDays ? 'renew-by' : 'current';
    return { state, awardId: holding.id, lastValidOn, daysLeft };
  }

  const heldFrom = nextBeginning(day, awards);
  const lapse = latestLapse(day, awards);
  const awaiting = furthestOf(awards.filter((award) => !award.isConfirmed && spans(award, day)));
  if (awaiting !== null) {
    const lapsedOn = lapse === null ? null : lapse.lapsedOn;
    return { state: 'awaiting-check', awardId: awaiting.id, lapsedOn, heldFrom };
  }
  return lapse === null ? { state: 'not-held', heldFrom } : { state: 'lapsed', ...lapse, heldFrom };
}

/** Whether any one of the awards makes the person current on that day. Source: product rule R1. */
export function isCurrentOn(day: CalendarDay, awards: readonly Award[]): boolean {
  return awards.some((award) => award.isConfirmed && spans(award, day));
}

/**
 * Whether the person is current on every one of the days, on some days perhaps by one award and on
 * others by the next. Throws a RangeError when asked about no days at all, which nobody may pass.
 * Source: product rule R1.
 */
export function currentThroughout(days: readonly CalendarDay[], awards: readonly Award[]): boolean {
  refuseNoDays(days);
  return days.every((day) => isCurrentOn(day, awards));
}

/**
 * The one award that covers all of the days, or null; of several, the one that is valid longest,
 * then the one that began first. This is what a claim rests on, because the database ties one award
 * to the whole of a session: it can be null where currentThroughout is true, when one award ends and
 * the next begins during a session that runs past midnight. Throws a RangeError on no days.
 */
export function coveringAward(
  days: readonly CalendarDay[],
  awards: readonly Award[],
): Award | null {
  refuseNoDays(days);
  return furthestOf(
    awards.filter((award) => award.isConfirmed && days.every((day) => spans(award, day))),
  );
}

function refuseNoDays(days: readonly CalendarDay[]): void {
  if (days.length === 0) throw new RangeError('Currency is judged on at least one day');
}

function spans(award: Award, day: CalendarDay): boolean {
  const lastValidOn = lastCountedDay(award);
  return award.validFrom <= day && (lastValidOn === null || day <= lastValidOn);
}

/**
 * The last day on which an award, once confirmed, counts: its last valid day, or the day before it
 * was withdrawn if that came first; before validFrom if it never counted; null without an end.
 */
export function lastCountedDay(award: Award): CalendarDay | null {
  const { expiresOn, withdrawnOn } = award;
  return withdrawnOn !== null && isCutShort(award) ? addDays(withdrawnOn, -1) : expiresOn;
}

function isCutShort({ expiresOn, withdrawnOn }: Award): boolean {
  return withdrawnOn !== null && (expiresOn === null || withdrawnOn <= expiresOn);
}

/** Confirmed, and not withdrawn before it began. */
function isEverValid(award: Award): boolean {
  return award.isConfirmed && spans(award, award.validFrom);
}

/** Of several, the one that is valid longest; the rest of the order only makes it always the same. */
function furthestOf(awards: readonly Award[]): Award | null {
  return awards.toSorted(byReach)[0] ?? null;
}

function byReach(a: Award, b: Award): number {
  const reachOfA = lastCountedDay(a);
  const reachOfB = lastCountedDay(b);
  if (reachOfA === reachOfB) return compare(a.validFrom, b.validFrom) || compare(a.id, b.id);
  if (reachOfA === null) return -1;
  return reachOfB === null ? 1 : compare(reachOfB, reachOfA);
}

function unbrokenThrough(holding: Award, awards: readonly Award[]): CalendarDay | null {
  let lastValidOn = lastCountedDay(holding);
  while (lastValidOn !== null) {
    const following = coveringAward([addDays(lastValidOn, 1)], awards);
    if (following === null) return lastValidOn;
    lastValidOn = lastCountedDay(following);
  }
  return null;
}

function nextBeginning(day: CalendarDay, awards: readonly Award[]): CalendarDay | null {
  const beginnings = awards
    .filter((award) => isEverValid(award) && award.validFrom > day)
    .map((award) => award.validFrom);
  return beginnings.toSorted()[0] ?? null;
}

// Asked only of a day on which the person is not current: whatever began by then is over.
function latestLapse(day: CalendarDay, awards: readonly Award[]): Lapse | null {
  const past = furthestOf(awards.filter((award) => isEverValid(award) && award.validFrom <= day));
  const lastValidOn = past === null ? null : lastCountedDay(past);
  if (past === null || lastValidOn === null) return null;
  return {
    awardId: past.id,
    lapsedOn: addDays(lastValidOn, 1),
    lapsedBy: isCutShort(past) ? 'withdrawal' : 'expiry',
  };
}

function compare(a: string, b: string): number {
  if (a === b) return 0;
  return a < b ? -1 : 1;
}
