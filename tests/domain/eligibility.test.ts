import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Award } from '#shared/domain/competencies/currency.ts';
import { isCurrentOn } from '#shared/domain/competencies/currency.ts';
import { birthday, mayTakeSlot } from '#shared/domain/slots/eligibility.ts';
import type {
  EligibilityReason,
  OtherClaim,
  PersonToCrew,
  SessionToCrew,
  SlotToTake,
} from '#shared/domain/slots/eligibility.ts';
import type { AwardId, CompetencyId, PersonId, SessionId, ShoreId } from '#shared/kernel/ids.ts';
import type { CalendarDay, Instant } from '#shared/kernel/time.ts';
import { addDays, instantOf } from '#shared/kernel/time.ts';

const zone = 'Europe/London';
const minuteMs = 60_000;
const tideSafety = 'tide safety' as CompetencyId;
const firstAid = 'first aid' as CompetencyId;
const gullLedges = 'gull ledges' as ShoreId;
const kettleReef = 'kettle reef' as ShoreId;
const todayOn: CalendarDay = '2027-04-29';
const dayOn: CalendarDay = '2027-05-09';
const at = (clock: `${number}:${number}`, day = dayOn): Instant => instantOf(day, clock, zone);

const session: SessionToCrew = {
  id: 'the session' as SessionId,
  shoreId: gullLedges,
  state: 'published',
  meetsAt: at('07:37'),
  endsAt: at('10:52'),
  firstDayOn: dayOn,
  lastDayOn: dayOn,
};
const slot: SlotToTake = { isFor18AndOver: false, requirements: [tideSafety], holder: null };

let awardCount = 0;
function award(
  validFrom: CalendarDay,
  expiresOn: CalendarDay | null,
  more: Partial<Award> & { readonly competencyId?: CompetencyId } = {},
): PersonToCrew['awards'][number] {
  awardCount += 1;
  return {
    id: `award ${awardCount}` as AwardId,
    competencyId: tideSafety,
    validFrom,
    expiresOn,
    withdrawnOn: null,
    isConfirmed: true,
    ...more,
  };
}

const current = award('2026-01-01', '2027-12-31');
const person: PersonToCrew = {
  isActive: true,
  bornOn: '1990-01-01',
  awards: [current],
  otherClaims: [],
};

function judge(
  changes: {
    readonly person?: Partial<PersonToCrew>;
    readonly session?: Partial<SessionToCrew>;
    readonly slot?: Partial<SlotToTake>;
    readonly now?: Instant;
  } = {},
) {
  return mayTakeSlot({
    now: changes.now ?? at('12:00', todayOn),
    todayOn,
    person: { ...person, ...changes.person },
    session: { ...session, ...changes.session },
    slot: { ...slot, ...changes.slot },
    travelMinutes: 45,
  });
}

function reasons(changes: Parameters<typeof judge>[0]): readonly EligibilityReason[] {
  const verdict = judge(changes);
  return verdict.isGranted ? [] : verdict.reasons;
}

describe('taking a slot', () => {
  it('is granted with the award that meets each requirement', () => {
    const aid = award('2026-05-10', '2027-05-09', { competencyId: firstAid });
    const verdict = judge({
      person: { awards: [current, aid] },
      slot: { requirements: [tideSafety, firstAid] },
    });
    expect(verdict).toEqual({
      isGranted: true,
      value: {
        evidence: [
          { competencyId: tideSafety, awardId: current.id },
          { competencyId: firstAid, awardId: aid.id },
        ],
      },
    });
  });

  it.each<[string, CalendarDay, CalendarDay | null, CalendarDay | null, string | null]>([
    ['ends on the day', '2026-01-01', '2027-05-09', null, null],
    ['ended the day before', '2026-01-01', '2027-05-08', null, 'competency-lapses'],
    ['begins on the day', '2027-05-09', '2028-05-08', null, null],
    ['begins the day after', '2027-05-10', '2028-05-09', null, 'competency-starts-later'],
    ['has no end', '2020-01-01', null, null, null],
    ['is withdrawn from the day on', '2026-01-01', '2028-01-01', '2027-05-09', 'competency-lapses'],
    ['is withdrawn from the day after on', '2026-01-01', '2028-01-01', '2027-05-10', null],
    [
      'was withdrawn on its first day',
      '2026-01-01',
      '2028-01-01',
      '2026-01-01',
      'competency-not-held',
    ],
  ])('with an award that %s', (_words, validFrom, expiresOn, withdrawnOn, why) => {
    const found = reasons({ person: { awards: [award(validFrom, expiresOn, { withdrawnOn })] } });
    expect(found.map((reason) => reason.why)).toEqual(why === null ? [] : [why]);
  });

  it('counts nothing for a certificate that waits for its check', () => {
    const waiting = award('2026-01-01', '2028-01-01', { isConfirmed: false });
    expect(reasons({ person: { awards: [waiting] } })).toEqual([
      { why: 'competency-not-held', competencyId: tideSafety },
    ]);
  });

  it('judges a session past midnight on both of its days', () => {
    const lastValid = award('2026-01-01', dayOn);
    const pastMidnight = { endsAt: at('00:30', addDays(dayOn, 1)), lastDayOn: addDays(dayOn, 1) };
    expect(reasons({ person: { awards: [lastValid] }, session: pastMidnight })).toEqual([
      {
        why: 'competency-lapses',
        competencyId: tideSafety,
        lastValidOn: dayOn,
        neededOn: addDays(dayOn, 1),
        daysShort: 1,
        hasLapsed: false,
      },
    ]);
  });

  it('says whether what falls short has lapsed already', () => {
    const lapsed = reasons({ person: { awards: [award('2024-01-01', '2027-04-28')] } });
    expect(lapsed).toMatchObject([{ why: 'competency-lapses', hasLapsed: true, daysShort: 11 }]);
    const lastDayToday = reasons({ person: { awards: [award('2024-01-01', todayOn)] } });
    expect(lastDayToday).toMatchObject([{ hasLapsed: false, daysShort: 10 }]);
  });

  it.each([
    ['paused', { person: { isActive: false } }, 'person-not-active'],
    ['a draft', { session: { state: 'draft' } }, 'session-not-published'],
    ['closed', { session: { state: 'closed' } }, 'session-not-published'],
    ['stood down', { session: { state: 'stood-down' } }, 'session-stood-down'],
    ['at its meeting time', { now: session.meetsAt }, 'session-started'],
  ] as const)('is refused when %s', (_words, changes, why) => {
    expect(reasons(changes).map((reason) => reason.why)).toEqual([why]);
  });

  it('is granted until the very moment before the crew meets', () => {
    expect(reasons({ now: session.meetsAt - 1 })).toEqual([]);
  });

  it('is refused where somebody holds the slot, and says who and since when', () => {
    const holder = { personId: 'amara' as PersonId, claimedAt: at('09:00', todayOn) };
    expect(reasons({ slot: { holder } })).toEqual([
      { why: 'slot-taken', holderId: 'amara', claimedAt: holder.claimedAt },
    ]);
  });

  it.each<[CalendarDay | null, CalendarDay | null, boolean]>([
    ['2009-05-09', null, true],
    ['2009-05-10', '2027-05-10', false],
    [null, null, false],
  ])('of a kind for 18 and over, born on %s', (bornOn, turns18On, isGranted) => {
    const found = reasons({ person: { bornOn }, slot: { isFor18AndOver: true } });
    expect(found).toEqual(isGranted ? [] : [{ why: 'under-18', turns18On }]);
  });

  it('gives every reason at once, in the order session, slot, competencies, age, other claims', () => {
    const other: OtherClaim = {
      sessionId: 'other' as SessionId,
      shoreId: gullLedges,
      meetsAt: at('09:00'),
      endsAt: at('12:00'),
    };
    const found = reasons({
      now: at('08:00'),
      person: { isActive: false, bornOn: '2015-01-01', awards: [], otherClaims: [other] },
      session: { state: 'stood-down' },
      slot: {
        isFor18AndOver: true,
        requirements: [tideSafety, firstAid],
        holder: { personId: 'amara' as PersonId, claimedAt: 0 },
      },
    });
    expect(found.map((reason) => reason.why)).toEqual([
      'person-not-active',
      'session-stood-down',
      'session-started',
      'slot-taken',
      'competency-not-held',
      'competency-not-held',
      'under-18',
      'overlap',
    ]);
  });
});

describe('other claims', () => {
  it.each<[string, ShoreId, number, number, string | null]>([
    ['ends as this crew meets, same shore', gullLedges, -120, 0, null],
    ['ends a minute after this crew meets', gullLedges, -120, 1, 'overlap'],
    ['ends 45 minutes before, another shore', kettleReef, -120, -45, null],
    ['ends 44 minutes before, another shore', kettleReef, -120, -44, 'travel-time'],
    ['meets as this one ends, same shore', gullLedges, 195, 300, null],
    ['meets 45 minutes after this one ends, another shore', kettleReef, 240, 300, null],
    ['meets 44 minutes after this one ends, another shore', kettleReef, 239, 300, 'travel-time'],
    ['holds the whole of this one', kettleReef, -60, 600, 'overlap'],
    ['lies within this one', kettleReef, 30, 60, 'overlap'],
  ])('one that %s', (_words, shoreId, fromMinutes, toMinutes, why) => {
    const other: OtherClaim = {
      sessionId: 'other' as SessionId,
      shoreId,
      meetsAt: session.meetsAt + fromMinutes * minuteMs,
      endsAt: session.meetsAt + toMinutes * minuteMs,
    };
    const found = reasons({ person: { otherClaims: [other] } });
    expect(found.map((reason) => reason.why)).toEqual(why === null ? [] : [why]);
  });
});

describe('whatever the awards', () => {
  const day = fc.integer({ min: -40, max: 40 }).map((days) => addDays(dayOn, days));
  const someAward = fc
    .record({
      validFrom: day,
      validDays: fc.option(fc.integer({ min: 0, max: 40 }), { nil: null }),
      withdrawnOn: fc.option(day, { nil: null }),
      isConfirmed: fc.boolean(),
    })
    .map(({ validFrom, validDays, ...more }) =>
      award(validFrom, validDays === null ? null : addDays(validFrom, validDays), more),
    );

  it('a one-day session is granted exactly when the person is current on that day', () => {
    fc.assert(
      fc.property(fc.array(someAward, { maxLength: 5 }), (awards) => {
        expect(judge({ person: { awards } }).isGranted).toBe(isCurrentOn(dayOn, awards));
      }),
    );
  });

  it('one more award never takes away what was granted', () => {
    fc.assert(
      fc.property(fc.array(someAward, { maxLength: 4 }), someAward, (awards, more) => {
        const before = judge({ person: { awards } }).isGranted;
        const after = judge({ person: { awards: [...awards, more] } }).isGranted;
        expect(after || !before).toBe(true);
      }),
    );
  });
});

describe('a birthday', () => {
  // Family Law Reform Act 1969, section 9: an age is reached at the beginning of its day. That
  // of somebody born on 29 February falls on 1 March in a short year: common practice.
  it.each<[CalendarDay, number, CalendarDay]>([
    ['2009-05-10', 18, '2027-05-10'],
    ['2008-02-29', 18, '2026-03-01'],
    ['2008-02-29', 20, '2028-02-29'],
    ['2008-12-31', 18, '2026-12-31'],
  ])('of somebody born on %s, %d years', (bornOn, years, expected) => {
    expect(birthday(bornOn, years)).toBe(expected);
  });
});
