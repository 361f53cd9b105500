import { describe, expect, it } from 'vitest';
import { usableDaysInYear } from '#shared/domain/tides/shore-water.ts';
import type { PlanWindowRules } from '#shared/domain/seasons/plan-window.ts';
import { planDates } from '#shared/domain/seasons/season-plan.ts';
import type {
  PlanDate,
  PlanException,
  PlanRefusal,
  SeasonPlan,
} from '#shared/domain/seasons/season-plan.ts';
import type { Pattern } from '#shared/domain/seasons/recurrence.ts';
import type { ShoreRules } from '#shared/domain/tides/shore-water.ts';
import type { TideCurve } from '#shared/domain/tides/tide-curve.ts';
import { addDays, clockAt } from '#shared/kernel/time.ts';
import { curveOf, datesOf as datesAt, NOTHING_MORE, SHORE } from '../support/given-plan.ts';

const SATURDAYS: Pattern = { kind: 'weekly', everyWeeks: 1, weekdays: [6] };
const JUNE: SeasonPlan = {
  pattern: SATURDAYS,
  fromOn: '2027-06-05',
  toOn: '2027-06-26',
  windowRules: NOTHING_MORE,
  exceptions: [],
  closures: [],
};

// The solar tide alone keeps the same hours each day: lows of 0.5 m at noon and midnight UTC, and t
// hours from low water it stands at 2.5 - 2 cos(30 t) metres.
const NOON_LOWS = lowAtHour(12);

describe('the dates of a plan', () => {
  it('are those of its pattern, first and last day included, each with its window', () => {
    const dates = datesOf(JUNE);
    expect(dates.map(({ on }) => on)).toEqual([
      '2027-06-05',
      '2027-06-12',
      '2027-06-19',
      '2027-06-26',
    ]);
    expect(dates.every(({ state, source }) => state === 'taken' && source === 'pattern')).toBe(
      true,
    );
    // 2.5 - 2 cos(30 t) = 1.6 where t is 126.5 minutes: two hours before noon to half an hour after.
    expect(dates.map(told)[0]).toBe('10:00 12:00 12:30, 150 left');
  });

  it.each<[string, Partial<PlanWindowRules>, string]>([
    ['a lower level', { planLevelM: 1 }, '10:38 12:00 12:30, 112 left, start working-level'],
    ['no higher level', { planLevelM: 2 }, '10:00 12:00 12:30, 150 left'],
    ['a later start', { earliestClock: '10:45' }, '10:45 12:00 12:30, 105 left, start hours'],
    ['no earlier start', { earliestClock: '05:00' }, '10:00 12:00 12:30, 150 left'],
    [
      'an earlier end',
      { latestClock: '12:10' },
      '10:00 12:00 12:10, 130 left, off-the-shore hours',
    ],
    ['less time before', { minutesBeforeLow: 100 }, '10:20 12:00 12:30, 130 left'],
    ['less time after', { minutesAfterLow: 10 }, '10:00 12:00 12:10, 130 left'],
    ['no more time', { minutesBeforeLow: 180, minutesAfterLow: 90 }, '10:00 12:00 12:30, 150 left'],
    ['no shorter length', { minimumMinutes: 10, earliestClock: '11:30' }, 'too-short'],
    ['a greater length', { minimumMinutes: 151 }, 'too-short'],
    // The sun rises at 03:42 and sets at 20:21 (54 N, 0 E): ten hours are more than noon has.
    ['more daylight', { daylightMarginMinutes: 600 }, 'dark out-of-hours dark'],
  ])('let the plan narrow its shore by %s', (_, windowRules, expected) => {
    const plan = { ...JUNE, windowRules: { ...NOTHING_MORE, ...windowRules } };
    expect(told(first(datesOf(plan)))).toContain(expected);
  });

  it('are skipped with every reason of the rules', () => {
    const date = first(datesOf({ ...JUNE, toOn: JUNE.fromOn }, { ...SHORE, workingLevelM: 0.4 }));
    expect(told(date)).toBe('too-high dark out-of-hours too-high');
    expect(date).toMatchObject({ state: 'skipped', byHand: false, mayTakeByHand: true });
  });

  it('are skipped by hand with the reason given', () => {
    const exceptions: PlanException[] = [
      { kind: 'skip', on: '2027-06-12', reason: 'village fair' },
    ];
    const dates = datesOf({ ...JUNE, exceptions });
    expect(states(dates)).toBe('05 taken, 12 skipped, 19 taken, 26 taken');
    expect(dates[1]).toMatchObject({
      byHand: true,
      mayTakeByHand: false,
      reasons: [{ why: 'skipped-by-hand', reason: 'village fair' }],
    });
  });

  it('stand within closures for none, added and taken ones neither', () => {
    const closure = {
      fromOn: '2027-06-12',
      toOn: '2027-06-20',
      reason: 'seals with pups',
    } as const;
    const exceptions: PlanException[] = [
      { kind: 'take', on: '2027-06-12', reason: 'the school asked' },
      { kind: 'add', on: '2027-06-20', reason: 'the school asked', isByHand: true },
      { kind: 'add', on: '2027-06-21', reason: 'the school asked', isByHand: false },
    ];
    const dates = datesOf({ ...JUNE, exceptions, closures: [closure] });
    expect(states(dates)).toBe('05 taken, 12 skipped, 19 skipped, 20 skipped, 21 taken, 26 taken');
    expect(dates[1]).toMatchObject({
      reasons: [{ why: 'closed', ...closure }],
      mayTakeByHand: false,
    });
    expect(dates[4]).toMatchObject({ source: 'added' });
  });

  it('keep what was added outside the season', () => {
    const exceptions: PlanException[] = [
      { kind: 'add', on: '2027-07-01', reason: 'a late school', isByHand: false },
    ];
    expect(datesOf({ ...JUNE, exceptions }).at(-1)).toMatchObject({
      on: '2027-07-01',
      source: 'added',
      state: 'taken',
    });
  });
});

describe('a moved date', () => {
  const moved: PlanException[] = [
    { kind: 'move', on: '2027-06-12', toOn: '2027-06-13', reason: 'the hall', isByHand: false },
  ];

  it('is held on its new day and keeps its name', () => {
    const dates = datesOf({ ...JUNE, exceptions: moved });
    expect(states(dates)).toBe('05 taken, 13 taken, 19 taken, 26 taken');
    expect(dates[1]).toMatchObject({ originalOn: '2027-06-12', source: 'pattern' });
  });

  it('survives a change of the pattern', () => {
    const pattern: Pattern = { kind: 'weekly', everyWeeks: 1, weekdays: [3] };
    const dates = datesOf({ ...JUNE, pattern, exceptions: moved });
    expect(states(dates)).toBe('09 taken, 13 taken, 16 taken, 23 taken');
    expect(dates[1]).toMatchObject({ originalOn: '2027-06-12', source: 'added' });
  });

  it('is held before the date that its new day has already', () => {
    const onto: PlanException[] = [
      { kind: 'move', on: '2027-06-12', toOn: '2027-06-19', reason: 'the hall', isByHand: false },
    ];
    const dates = datesOf({ ...JUNE, exceptions: onto });
    expect(states(dates)).toBe('05 taken, 19 taken, 19 skipped, 26 taken');
    expect(dates[2]).toMatchObject({
      originalOn: '2027-06-19',
      reasons: [{ why: 'day-held-by-another-date', originalOn: '2027-06-12' }],
    });
  });
});

describe('a date taken by hand', () => {
  const take: PlanException[] = [{ kind: 'take', on: '2027-06-05', reason: 'the school asked' }];
  const oneDay = { ...JUNE, toOn: JUNE.fromOn, exceptions: take };

  it.each<[string, TideCurve, Partial<ShoreRules>, string, string[]]>([
    [
      'its length',
      NOON_LOWS,
      { earliestClock: '11:30' },
      '11:30 12:00 12:30, 60 left, start hours',
      ['minimum-length'],
    ],
    [
      'its height',
      NOON_LOWS,
      { workingLevelM: 0.4 },
      '10:00 12:00 12:30, 150 left',
      ['working-level'],
    ],
    ['its hours', NOON_LOWS, { earliestClock: '13:00' }, '10:00 12:00 12:30, 150 left', ['hours']],
    [
      'its height and hours',
      NOON_LOWS,
      { workingLevelM: 0.4, earliestClock: '13:00' },
      '10:00 12:00 12:30, 150 left',
      ['working-level', 'hours'],
    ],
    // With the surge the low stands at 0.8 m; 2.5 - 2 cos(30 t) = 0.6 where t is 36.4 minutes.
    [
      'its length, the cut-off level being near',
      NOON_LOWS,
      { cutOffLevelM: 0.9 },
      '11:24 12:00 12:16, 52 left, start cut-off-level, off-the-shore cut-off-level',
      ['minimum-length'],
    ],
  ])('may overrule %s', (_, curve, change, expected, overruled) => {
    const shore = { ...SHORE, ...change };
    const without = first(datesOf({ ...oneDay, exceptions: [] }, shore, curve));
    expect(without).toMatchObject({ state: 'skipped', byHand: false, mayTakeByHand: true });
    const date = first(datesOf(oneDay, shore, curve));
    expect(told(date)).toBe(expected);
    expect(date).toMatchObject({ state: 'taken', byHand: true, overruled });
  });

  it.each<[string, TideCurve, Partial<ShoreRules>, string]>([
    // At 54 S the light lasts from about nine to three in June; at 80 S there is none.
    ['has its lows by night', lowAtHour(6), { latitude: -54, earliestClock: '05:00' }, 'dark'],
    ['has no daylight', NOON_LOWS, { latitude: -80 }, 'dark'],
    ['has the low water at the cut-off level', NOON_LOWS, { cutOffLevelM: 0.8 }, 'cut-off'],
    [
      'leaves too little time to get off',
      NOON_LOWS,
      { cutOffLevelM: 0.81 },
      'off-the-shore-before-low-water',
    ],
  ])('is refused all the same when it %s', (_, curve, change, reason) => {
    const shore = { ...SHORE, ...change };
    const date = first(datesOf(oneDay, shore, curve));
    expect(date).toMatchObject({ state: 'skipped', byHand: false, mayTakeByHand: false });
    expect(told(date)).toContain(reason);
  });

  it('is not by hand where the rules grant it', () => {
    expect(first(datesOf(oneDay))).toMatchObject({ state: 'taken', byHand: false, overruled: [] });
  });

  it('may be one that was added or moved, if it was so said', () => {
    const shore = { ...SHORE, earliestClock: '11:30' as const };
    for (const isByHand of [true, false]) {
      const exceptions: PlanException[] = [
        { kind: 'add', on: '2027-06-06', reason: 'the school asked', isByHand },
        { kind: 'move', on: '2027-06-05', toOn: '2027-06-07', reason: 'the hall', isByHand },
      ];
      const dates = datesOf({ ...oneDay, exceptions }, shore);
      expect(states(dates)).toBe(isByHand ? '06 taken, 07 taken' : '06 skipped, 07 skipped');
    }
  });
});

describe('a plan that cannot be followed', () => {
  it.each<[string, Partial<SeasonPlan>, PlanRefusal[]]>([
    [
      'its rule cannot be read',
      { pattern: { kind: 'rule', text: 'FREQ=HOURLY' } },
      [{ why: 'more-often-than-daily', part: 'FREQ=HOURLY' }],
    ],
    [
      'it ends before it begins',
      { toOn: '2027-06-04' },
      [{ why: 'ends-before-it-begins', fromOn: '2027-06-05', toOn: '2027-06-04' }],
    ],
    [
      'it runs for years',
      { toOn: addDays('2027-06-05', 732) },
      [{ why: 'span-too-long', days: 733, mostDays: 732 }],
    ],
    [
      'two things were decided for one date, and a closure is no span',
      {
        exceptions: [
          { kind: 'skip', on: '2027-06-12', reason: 'fair' },
          { kind: 'take', on: '2027-06-12', reason: 'fair' },
        ],
        closures: [{ fromOn: '2027-06-12', toOn: '2027-06-11', reason: 'seals' }],
      },
      [
        { why: 'two-exceptions-for-a-date', on: '2027-06-12' },
        {
          why: 'closure-ends-before-it-begins',
          fromOn: '2027-06-12',
          toOn: '2027-06-11',
          reason: 'seals',
        },
      ],
    ],
  ])('is refused when %s', (_, change, reasons) => {
    expect(planDates({ ...JUNE, ...change }, SHORE, NOON_LOWS)).toEqual({
      isGranted: false,
      reasons,
    });
  });
});

describe('the usable days of a year', () => {
  it('are all of them where every noon is low water, and none where none is low enough', () => {
    expect(usableDaysInYear(SHORE, NOON_LOWS, '2026-06-05')).toHaveLength(365);
    expect(usableDaysInYear(SHORE, NOON_LOWS, '2027-06-05')).toHaveLength(366);
    expect(
      usableDaysInYear({ ...SHORE, workingLevelM: 0.4 }, NOON_LOWS, '2027-06-05'),
    ).toHaveLength(0);
  });
});

function datesOf(
  plan: SeasonPlan,
  shore: ShoreRules = SHORE,
  curve: TideCurve = NOON_LOWS,
): PlanDate[] {
  return datesAt(plan, shore, curve);
}

/** A date as a line: its start, low water and time off the shore with the cuts, or its reasons. */
function told(date: PlanDate): string {
  if (date.state === 'skipped') return date.reasons.map(({ why }) => why).join(' ');
  const { startsAt, lowerShoreClearBy, offTheShoreBy } = date.window;
  const clocks = [startsAt, lowerShoreClearBy, offTheShoreBy].map((at) => clockAt(at, 'UTC'));
  const cuts = date.cuts.map(({ edge, by }) => `, ${edge} ${by}`);
  return `${clocks.join(' ')}, ${date.leftMinutes} left${cuts.join('')}`;
}

function states(dates: readonly PlanDate[]): string {
  return dates.map(({ on, state }) => `${on.slice(8)} ${state}`).join(', ');
}

function first(dates: readonly PlanDate[]): PlanDate {
  const [date] = dates;
  if (date === undefined) throw new Error('No date');
  return date;
}

function lowAtHour(hour: number): TideCurve {
  return curveOf([{ name: 'S2', amplitudeM: 2, phaseDeg: 180 + 30 * hour }]);
}
