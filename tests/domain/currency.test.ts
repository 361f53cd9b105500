import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  coveringAward,
  currentThroughout,
  isCurrentOn,
  standingOn,
  lastCountedDay,
} from '#shared/domain/competencies/currency.ts';
import type { Award } from '#shared/domain/competencies/currency.ts';
import type { AwardId } from '#shared/kernel/ids.ts';
import { addDays, daysBetween } from '#shared/kernel/time.ts';

const first = 'a0000000-0000-4000-8000-000000000001' as AwardId;
const second = 'a0000000-0000-4000-8000-000000000002' as AwardId;

function award(facts: Partial<Award> = {}): Award {
  return {
    id: first,
    validFrom: '2023-05-14',
    expiresOn: '2026-05-13',
    withdrawnOn: null,
    isConfirmed: true,
    ...facts,
  };
}

describe('who is current', () => {
  it('counts an award from its first day through the whole of its last', () => {
    expect(isCurrentOn('2023-05-13', [award()])).toBe(false);
    expect(isCurrentOn('2023-05-14', [award()])).toBe(true);
    expect(isCurrentOn('2026-05-13', [award()])).toBe(true);
    expect(isCurrentOn('2026-05-14', [award()])).toBe(false);
  });

  it('counts an award without an end on every day after it began', () => {
    expect(isCurrentOn('2099-01-01', [award({ expiresOn: null })])).toBe(true);
    expect(isCurrentOn('2023-05-13', [award({ expiresOn: null })])).toBe(false);
  });

  it('counts nothing that a trainer has not confirmed', () => {
    expect(isCurrentOn('2024-01-01', [award({ isConfirmed: false })])).toBe(false);
  });

  it('counts a withdrawn award before the day of its withdrawal, and never from then on', () => {
    const withdrawn = award({ withdrawnOn: '2025-02-01' });
    expect(isCurrentOn('2025-01-31', [withdrawn])).toBe(true);
    expect(isCurrentOn('2025-02-01', [withdrawn])).toBe(false);
    expect(isCurrentOn('2026-05-13', [award({ withdrawnOn: '2026-05-13' })])).toBe(false);
    expect(isCurrentOn('2026-05-12', [award({ withdrawnOn: '2026-05-13' })])).toBe(true);
    expect(isCurrentOn('2025-01-31', [award({ withdrawnOn: '2025-02-01', expiresOn: null })])).toBe(
      true,
    );
  });

  it('never counts an award withdrawn on the day it began', () => {
    expect(isCurrentOn('2023-05-14', [award({ withdrawnOn: '2023-05-14' })])).toBe(false);
  });

  it('does not lengthen an award by withdrawing it after its last day', () => {
    const withdrawn = award({ withdrawnOn: '2026-08-01' });
    expect(lastCountedDay(withdrawn)).toBe('2026-05-13');
    expect(isCurrentOn('2026-06-01', [withdrawn])).toBe(false);
  });

  it('is nobody without awards', () => {
    expect(isCurrentOn('2024-01-01', [])).toBe(false);
  });
});

describe('a session that touches more than one day', () => {
  const nightOf = ['2026-05-13', '2026-05-14'] as const;
  const renewal = award({ id: second, validFrom: '2026-05-14', expiresOn: '2029-05-13' });

  it('needs currency on every one of them', () => {
    expect(currentThroughout(nightOf, [award()])).toBe(false);
    expect(currentThroughout(['2026-05-12', '2026-05-13'], [award()])).toBe(true);
  });

  it('may be covered by one award after another, but a claim rests on one that covers it whole', () => {
    expect(currentThroughout(nightOf, [award(), renewal])).toBe(true);
    expect(coveringAward(nightOf, [award(), renewal])).toBeNull();
    const earlyRenewal = { ...renewal, validFrom: '2026-05-01' } as const;
    expect(coveringAward(nightOf, [award(), earlyRenewal])).toEqual(earlyRenewal);
  });

  it('rests on the award that is valid longest, then on the one that began first', () => {
    const endless = award({ id: second, expiresOn: null });
    expect(coveringAward(['2024-01-01'], [award(), endless])?.id).toBe(second);
    expect(coveringAward(['2024-01-01'], [endless, award()])?.id).toBe(second);
    const longer = award({ id: second, expiresOn: '2026-05-14' });
    expect(coveringAward(['2024-01-01'], [award(), longer])?.id).toBe(second);
    const cutShort = award({ id: second, expiresOn: null, withdrawnOn: '2024-02-01' });
    expect(coveringAward(['2024-01-01'], [cutShort, award()])?.id).toBe(first);
    const begunBefore = award({ id: second, validFrom: '2023-05-13' });
    expect(coveringAward(['2024-01-01'], [award(), begunBefore])?.id).toBe(second);
  });

  it('cannot be a session of no days, which everybody would pass', () => {
    expect(() => currentThroughout([], [award()])).toThrow(RangeError);
    expect(() => coveringAward([], [award()])).toThrow(RangeError);
  });
});

describe('how a person stands', () => {
  it('is current until the notice days begin, then renew by, then lapsed', () => {
    const lastValidOn = '2026-05-13';
    expect(standingOn('2026-04-12', [award()], 30)).toEqual({
      state: 'current',
      awardId: first,
      lastValidOn,
      daysLeft: 31,
    });
    expect(standingOn('2026-04-13', [award()], 30)).toEqual({
      state: 'renew-by',
      awardId: first,
      lastValidOn,
      daysLeft: 30,
    });
    expect(standingOn('2026-05-13', [award()], 30)).toEqual({
      state: 'renew-by',
      awardId: first,
      lastValidOn,
      daysLeft: 0,
    });
    expect(standingOn('2026-05-14', [award()], 30)).toEqual({
      state: 'lapsed',
      awardId: first,
      lapsedOn: '2026-05-14',
      lapsedBy: 'expiry',
      heldFrom: null,
    });
  });

  it('is never renew by for an award without an end', () => {
    expect(standingOn('2026-05-13', [award({ expiresOn: null })], 90)).toEqual({
      state: 'current',
      awardId: first,
      lastValidOn: null,
      daysLeft: null,
    });
  });

  it('looks through to the end of a confirmed renewal that follows without a day between', () => {
    const follows = award({ id: second, validFrom: '2026-05-14', expiresOn: '2029-05-13' });
    expect(standingOn('2026-05-01', [follows, award()], 30)).toMatchObject({
      state: 'current',
      awardId: first,
      lastValidOn: '2029-05-13',
    });
    const endless = { ...follows, expiresOn: null };
    expect(standingOn('2026-05-01', [award(), endless], 30)).toMatchObject({ lastValidOn: null });
  });

  it('still asks to renew when the next award begins a day too late, or awaits its check', () => {
    const late = award({ id: second, validFrom: '2026-05-15', expiresOn: '2029-05-14' });
    const unchecked = award({ id: second, validFrom: '2026-05-01', isConfirmed: false });
    for (const next of [late, unchecked]) {
      expect(standingOn('2026-05-01', [award(), next], 30)).toMatchObject({
        state: 'renew-by',
        lastValidOn: '2026-05-13',
      });
    }
    expect(standingOn('2026-05-14', [award(), late], 30)).toMatchObject({
      state: 'lapsed',
      heldFrom: '2026-05-15',
    });
  });

  it('has lapsed by withdrawal from the day of the withdrawal', () => {
    expect(standingOn('2025-03-01', [award({ withdrawnOn: '2025-02-01' })], 30)).toEqual({
      state: 'lapsed',
      awardId: first,
      lapsedOn: '2025-02-01',
      lapsedBy: 'withdrawal',
      heldFrom: null,
    });
  });

  it('has lapsed on the latest of several ends', () => {
    const older = award({ id: second, validFrom: '2020-05-14', expiresOn: '2023-05-13' });
    expect(standingOn('2026-06-01', [award(), older], 30)).toMatchObject({
      state: 'lapsed',
      awardId: first,
      lapsedOn: '2026-05-14',
    });
  });

  it('does not hold what begins later, was never confirmed in time, or was never valid', () => {
    expect(standingOn('2023-05-13', [award()], 30)).toEqual({
      state: 'not-held',
      heldFrom: '2023-05-14',
    });
    const never = award({ withdrawnOn: '2023-05-14' });
    const unchecked = award({ id: second, isConfirmed: false });
    expect(standingOn('2026-06-01', [never, unchecked], 30)).toEqual({
      state: 'not-held',
      heldFrom: null,
    });
    expect(standingOn('2026-06-01', [], 30)).toEqual({ state: 'not-held', heldFrom: null });
  });

  it('awaits check where a certificate not yet checked would make the person current', () => {
    const unchecked = award({
      id: second,
      validFrom: '2026-06-01',
      expiresOn: '2029-05-31',
      isConfirmed: false,
    });
    expect(standingOn('2026-06-01', [award(), unchecked], 30)).toEqual({
      state: 'awaiting-check',
      awardId: second,
      lapsedOn: '2026-05-14',
      heldFrom: null,
    });
    expect(standingOn('2026-06-01', [unchecked], 30)).toMatchObject({ lapsedOn: null });
    expect(standingOn('2026-05-31', [unchecked], 30).state).toBe('not-held');
    const declined = { ...unchecked, withdrawnOn: '2026-06-01' } as const;
    expect(standingOn('2026-06-01', [declined], 30).state).toBe('not-held');
  });
});

describe('whatever the awards', () => {
  const anyDay = fc.integer({ min: 0, max: 60 }).map((days) => addDays('2026-01-01', days));
  const anyAward = fc.record({
    id: fc.uuid({ version: 4 }).map((id) => id as AwardId),
    validFrom: anyDay,
    expiresOn: fc.option(anyDay, { freq: 6 }),
    withdrawnOn: fc.option(anyDay, { freq: 1 }),
    isConfirmed: fc.boolean(),
  });
  const anyAwards = fc.array(anyAward, { maxLength: 5 });
  const anyNotice = fc.integer({ min: 0, max: 20 });

  it('the standing says current exactly when the person is', () => {
    fc.assert(
      fc.property(anyDay, anyAwards, anyNotice, (day, awards, noticeDays) => {
        const { state } = standingOn(day, awards, noticeDays);
        expect(state === 'current' || state === 'renew-by').toBe(isCurrentOn(day, awards));
      }),
      { numRuns: 500 },
    );
  });

  it('a person is current on every day through the last valid day, and not on the next', () => {
    fc.assert(
      fc.property(anyDay, anyAwards, anyNotice, (day, awards, noticeDays) => {
        const standing = standingOn(day, awards, noticeDays);
        if (standing.state !== 'current' && standing.state !== 'renew-by') return;
        if (standing.lastValidOn === null) return;
        expect(standing.daysLeft).toBe(daysBetween(day, standing.lastValidOn));
        for (let on = day; on <= standing.lastValidOn; on = addDays(on, 1)) {
          expect(isCurrentOn(on, awards)).toBe(true);
        }
        expect(isCurrentOn(addDays(standing.lastValidOn, 1), awards)).toBe(false);
      }),
      { numRuns: 500 },
    );
  });

  it('a person whose competency lapsed was current the day before that, and not since', () => {
    fc.assert(
      fc.property(anyDay, anyAwards, anyNotice, (day, awards, noticeDays) => {
        const standing = standingOn(day, awards, noticeDays);
        if (standing.state !== 'lapsed') return;
        expect(isCurrentOn(addDays(standing.lapsedOn, -1), awards)).toBe(true);
        for (let on = standing.lapsedOn; on <= day; on = addDays(on, 1)) {
          expect(isCurrentOn(on, awards)).toBe(false);
        }
      }),
      { numRuns: 500 },
    );
  });

  it('the order in which awards are read changes nothing', () => {
    fc.assert(
      fc.property(anyDay, anyAwards, anyNotice, (day, awards, noticeDays) => {
        const standing = standingOn(day, awards, noticeDays);
        expect(standingOn(day, awards.toReversed(), noticeDays)).toEqual(standing);
      }),
      { numRuns: 500 },
    );
  });

  it('one award that covers all the days means currency throughout', () => {
    fc.assert(
      fc.property(fc.array(anyDay, { minLength: 1, maxLength: 3 }), anyAwards, (days, awards) => {
        const covering = coveringAward(days, awards);
        if (covering === null) return;
        expect(currentThroughout(days, awards)).toBe(true);
        expect(currentThroughout(days, [covering])).toBe(true);
      }),
      { numRuns: 500 },
    );
  });
});
