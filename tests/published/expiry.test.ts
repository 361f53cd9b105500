import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { expiryOf, isUsableRule, keepingWindow } from '#shared/domain/competencies/expiry.ts';
import type { Expiry, ValidityRule } from '#shared/domain/competencies/expiry.ts';
import { addDays, addMonths, endOfMonth } from '#shared/kernel/time.ts';
import type { CalendarDay } from '#shared/kernel/time.ts';

const fromNewDate = (validityMonths: number): ValidityRule => ({
  validityMonths,
  renewal: { kind: 'from-new-date' },
  graceDays: 0,
});
const keepsDate = (validityMonths: number, windowMonths: number, graceDays = 0): ValidityRule => ({
  validityMonths,
  renewal: { kind: 'keeps-date', windowMonths },
  graceDays,
});
const monthEnd = (validityMonths: number, windowMonths: number | null): ValidityRule => ({
  validityMonths,
  renewal: { kind: 'month-end', windowMonths },
  graceDays: 0,
});

describe('an award that runs from its own day', () => {
  // Health and Safety Executive, L74, First aid at work (3rd edition), paragraph 74: three years.
  // The days are computed: the day before the anniversary, 29 February clamped first.
  it.each<[CalendarDay, number, CalendarDay]>([
    ['2023-05-14', 36, '2026-05-13'],
    ['2023-03-01', 36, '2026-02-28'],
    ['2023-01-01', 36, '2025-12-31'],
    ['2024-02-29', 36, '2027-02-27'],
    ['2024-02-29', 48, '2028-02-28'],
    ['2025-03-01', 36, '2028-02-29'],
    // British Red Cross Training, "How long does a First Aid at Work certificate last": since
    // October 2013 a new certificate runs from its own date.
    ['2026-12-01', 12, '2027-11-30'],
  ])('given on %s for %i months is valid through %s', (awardedOn, months, lastValidOn) => {
    const expected = { why: 'from-award-day', lastValidOn, isMonthEnd: false };
    expect(expiryOf(fromNewDate(months), awardedOn, null)).toEqual(expected);
  });

  it('keeps nothing of the date before it, one day early or one day late', () => {
    const previousLastValidOn = '2026-05-13';
    for (const awardedOn of ['2026-05-12', '2026-05-13', '2026-05-14'] as const) {
      const renewed = expiryOf(fromNewDate(36), awardedOn, previousLastValidOn);
      expect(renewed).toEqual(expiryOf(fromNewDate(36), awardedOn, null));
    }
  });

  it('has no last day in a competency that does not expire', () => {
    const rule = {
      validityMonths: null,
      renewal: { kind: 'from-new-date' },
      graceDays: 0,
    } as const;
    const never = { why: 'does-not-expire', lastValidOn: null };
    expect(expiryOf(rule, '2026-05-14', null)).toEqual(never);
    expect(expiryOf(rule, '2026-05-14', '2026-05-20')).toEqual(never);
  });
});

describe('a renewal that keeps the date within a month before', () => {
  // Guidance on the UK vehicle (MOT) test: expiry 15 May, earliest day that keeps it 16 April.
  it.each<[CalendarDay, CalendarDay, Expiry['why'], CalendarDay]>([
    ['2026-05-15', '2026-04-16', 'keeps-date', '2027-05-15'],
    ['2026-05-15', '2026-05-15', 'keeps-date', '2027-05-15'],
    ['2026-05-15', '2026-04-15', 'too-early-to-keep', '2027-04-14'],
    // The same guidance: a pass on 10 April is too early, and the new expiry is 9 April.
    ['2026-05-15', '2026-04-10', 'too-early-to-keep', '2027-04-09'],
    // Product rule R2: what has lapsed is not kept.
    ['2026-05-15', '2026-05-16', 'too-late-to-keep', '2027-05-15'],
    ['2026-05-15', '2026-06-01', 'too-late-to-keep', '2027-05-31'],
  ])('old last day %s, taken %s: %s, valid through %s', (previous, awardedOn, why, lastValidOn) => {
    expect(expiryOf(keepsDate(12, 1), awardedOn, previous)).toMatchObject({ why, lastValidOn });
  });

  it.each<[CalendarDay, number, CalendarDay]>([
    // Guidance on the UK vehicle (MOT) test.
    ['2026-05-15', 1, '2026-04-16'],
    // Earlier guidance on the same test: expiry 1 April, earliest 2 March.
    ['2003-04-01', 1, '2003-03-02'],
    // Computed by the same rule: (last valid day + 1 day) - k months, clamped.
    ['2026-03-31', 1, '2026-03-01'],
    ['2026-03-30', 1, '2026-02-28'],
    ['2026-05-15', 3, '2026-02-16'],
  ])('opens for %s with %i months on %s', (previousLastValidOn, windowMonths, earliestOn) => {
    const rule = keepsDate(12, windowMonths);
    expect(keepingWindow(rule, previousLastValidOn)).toEqual({
      earliestOn,
      latestOn: previousLastValidOn,
    });
    expect(expiryOf(rule, earliestOn, previousLastValidOn).why).toBe('keeps-date');
    const dayBefore = expiryOf(rule, addDays(earliestOn, -1), previousLastValidOn);
    expect(dayBefore).toMatchObject({ why: 'too-early-to-keep', earliestOn });
  });

  // The superseded practice of the Health and Safety Executive's review note of May 2006: three
  // months early keeps the date, 28 days after still counts from it.
  it('keeps the date through the days of grace that a competency has, and no longer', () => {
    const rule = keepsDate(36, 3, 28);
    expect(expiryOf(rule, '2026-06-10', '2026-05-13')).toEqual({
      why: 'keeps-date',
      lastValidOn: '2029-05-13',
      isMonthEnd: false,
      previousLastValidOn: '2026-05-13',
    });
    expect(expiryOf(rule, '2026-06-11', '2026-05-13')).toEqual({
      why: 'too-late-to-keep',
      lastValidOn: '2029-06-10',
      isMonthEnd: false,
      latestOn: '2026-06-10',
    });
  });

  it('has no date to keep on a first award', () => {
    expect(expiryOf(keepsDate(12, 1), '2026-04-16', null).why).toBe('from-award-day');
  });
});

describe('an award that runs to the end of a month', () => {
  // American Heart Association: two years through the end of the month of issue.
  // Training in air transport of dangerous goods (24 months, window 3): passes of 7 February 2013 and
  // 10 September 2014 and the window from 1 December 2014 are published examples; the days beside
  // them are computed by the same rule.
  it.each<[string, number | null, CalendarDay | null, CalendarDay, Expiry['why'], CalendarDay]>([
    ['heart association', null, null, '2024-02-10', 'from-award-day', '2026-02-28'],
    ['heart association', null, '2026-02-28', '2026-02-10', 'from-award-day', '2028-02-29'],
    ['dangerous goods', 3, null, '2013-02-07', 'from-award-day', '2015-02-28'],
    ['dangerous goods', 3, '2015-02-28', '2014-12-01', 'keeps-date', '2017-02-28'],
    ['dangerous goods', 3, '2015-02-28', '2014-11-30', 'too-early-to-keep', '2016-11-30'],
    ['dangerous goods', 3, '2015-02-28', '2014-09-10', 'too-early-to-keep', '2016-09-30'],
    ['dangerous goods', 3, '2015-02-28', '2015-02-28', 'keeps-date', '2017-02-28'],
    ['dangerous goods', 3, '2015-02-28', '2015-03-01', 'too-late-to-keep', '2017-03-31'],
    ['into a leap year', 3, '2026-02-28', '2026-01-15', 'keeps-date', '2028-02-29'],
  ])(
    '%s, window %j, old last day %s, taken %s: %s, %s',
    (_, window, previous, taken, why, last) => {
      const expected = { why, lastValidOn: last, isMonthEnd: true };
      expect(expiryOf(monthEnd(24, window), taken, previous)).toMatchObject(expected);
    },
  );
});

describe('settings that do not fit', () => {
  it.each<[string, ValidityRule]>([
    ['no months', fromNewDate(0)],
    ['part of a month', fromNewDate(1.5)],
    ['a window as long as the validity', keepsDate(12, 12)],
    ['a window of nothing', keepsDate(12, 0)],
    ['grace below nothing', keepsDate(12, 1, -1)],
    ['a month-end window longer than the validity', monthEnd(2, 3)],
  ])('are refused: %s', (_, rule) => {
    expect(isUsableRule(rule)).toBe(false);
    expect(() => expiryOf(rule, '2026-05-14', null)).toThrow(RangeError);
  });
});

describe('every rule', () => {
  const anyDay = fc.integer({ min: 0, max: 20_000 }).map((days) => addDays('2000-01-01', days));
  const anyMonths = fc.integer({ min: 2, max: 60 });
  const anyRule = fc
    .record({
      validityMonths: anyMonths,
      share: fc.double({ min: 0, max: 0.99, noNaN: true }),
      kind: fc.constantFrom('from-new-date', 'keeps-date', 'month-end', 'month-end-window'),
    })
    .map(({ validityMonths, share, kind }): ValidityRule => {
      const windowMonths = 1 + Math.floor(share * (validityMonths - 1));
      if (kind === 'from-new-date') return fromNewDate(validityMonths);
      if (kind === 'keeps-date') return keepsDate(validityMonths, windowMonths);
      return monthEnd(validityMonths, kind === 'month-end' ? null : windowMonths);
    });
  const aroundRenewal = fc.integer({ min: -900, max: 200 });
  const lastOf = (rule: ValidityRule, awardedOn: CalendarDay, previous: CalendarDay | null) => {
    const { lastValidOn } = expiryOf(rule, awardedOn, previous);
    if (lastValidOn === null) throw new Error('Every rule generated here expires');
    return lastValidOn;
  };

  it('never gives less for renewing early or late than the award gives by itself', () => {
    fc.assert(
      fc.property(anyRule, anyDay, aroundRenewal, (rule, previous, days) => {
        const awardedOn = addDays(previous, days);
        const renewed = lastOf(rule, awardedOn, previous);
        expect(renewed >= lastOf(rule, awardedOn, null)).toBe(true);
      }),
    );
  });

  it('does not add up however often the course is taken', () => {
    fc.assert(
      fc.property(anyRule, anyDay, fc.integer({ min: 1, max: 40 }), (rule, firstOn, times) => {
        let previous: CalendarDay | null = null;
        let takenOn = firstOn;
        for (let taken = 0; taken < times; taken += 1) {
          takenOn = addDays(firstOn, taken);
          previous = lastOf(rule, takenOn, previous);
        }
        const { renewal, validityMonths } = rule;
        const windowMonths = renewal.kind === 'from-new-date' ? 0 : (renewal.windowMonths ?? 0);
        const bound = endOfMonth(addMonths(takenOn, (validityMonths ?? 0) + windowMonths));
        expect(previous !== null && previous <= bound).toBe(true);
      }),
    );
  });

  it('never gives more for a course taken earlier, within the same side of the window', () => {
    fc.assert(
      fc.property(anyRule, anyDay, aroundRenewal, (rule, previous, days) => {
        const earlier = expiryOf(rule, addDays(previous, days), previous);
        const later = expiryOf(rule, addDays(previous, days + 1), previous);
        const isSameSide = earlier.why === later.why;
        if (!isSameSide || earlier.lastValidOn === null || later.lastValidOn === null) return;
        expect(earlier.lastValidOn <= later.lastValidOn).toBe(true);
      }),
    );
  });
});
