import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { draftOf, readDraft } from '#frontend/features/seasons/plan-draft.ts';
import { decided, decisionFor } from '#frontend/features/seasons/plan-exceptions.ts';
import {
  planHeadline,
  skippedInWords,
  takenInWords,
} from '#frontend/features/seasons/plan-words.ts';
import { planSettings } from '#shared/contracts/season-plans.ts';
import { sayNoWindow } from '#frontend/words/no-window-words.ts';
import type { NoWindowView } from '#shared/contracts/shores.ts';
import { plans, preview, settings, skippedOn, slotKindIds, takenOn } from './made-up-plans.ts';
import { zone } from './made-up-replies.ts';

const on = '2027-05-08';
const at = (utcClock: string): string => `${on}T${utcClock}:00.000Z`;

/** One of each kind; London in May is an hour ahead of UTC. */
const reasons: { readonly [Why in NoWindowView['why']]: Extract<NoWindowView, { why: Why }> } = {
  'no-low-water': { why: 'no-low-water', on },
  'too-high': {
    why: 'too-high',
    lowWaterAt: at('13:03'),
    lowWaterHeightM: 2,
    workingLevelM: 1.3,
  },
  dark: {
    why: 'dark',
    lowWaterAt: at('02:00'),
    lightFromAt: at('04:40'),
    lightToAt: at('19:20'),
  },
  'out-of-hours': {
    why: 'out-of-hours',
    lowWaterAt: at('05:39'),
    earliestAt: at('06:00'),
    latestAt: at('17:00'),
  },
  'cut-off-at-low-water': {
    why: 'cut-off-at-low-water',
    lowWaterAt: at('10:00'),
    lowWaterHeightM: 1.2,
    surgeM: 0.3,
    cutOffLevelM: 1.4,
  },
  'off-the-shore-before-low-water': {
    why: 'off-the-shore-before-low-water',
    lowWaterAt: at('10:00'),
    offTheShoreBy: at('09:20'),
  },
  'too-short': {
    why: 'too-short',
    lowWaterAt: at('06:46'),
    lengthMinutes: 76,
    minimumMinutes: 90,
    cuts: [{ edge: 'start', by: 'hours', at: at('06:00') }],
  },
};

describe('a skipped date', () => {
  it.each(Object.values(reasons).map((reason) => [reason.why, reason] as const))(
    'gives its reason in words when it is %s',
    (_why, reason) => {
      const words = skippedInWords(skippedOn(on, [reason]), zone);
      expect(words).toBe(sayNoWindow(reason, zone));
      expect(words).not.toBe('');
    },
  );

  it('tells of the low water with less against it, without the dark that goes without saying', () => {
    const both = skippedOn(on, [
      reasons.dark,
      { ...reasons['out-of-hours'], lowWaterAt: at('02:00') },
      reasons['too-high'],
    ]);
    expect(skippedInWords(both, zone)).toBe('low water 14:03, 2.0 m, above 1.3 m');
  });

  it('tells all that stands against the same low water, naming it once', () => {
    const high = { ...reasons['too-high'], lowWaterAt: at('05:39') };
    expect(skippedInWords(skippedOn(on, [high, reasons['out-of-hours']]), zone)).toBe(
      'low water 06:39, 2.0 m, above 1.3 m, before 07:00',
    );
  });

  it.each([
    ['skipped by hand', { skippedBy: 'hand' }],
    ['skipped by hand: School fair', { skippedBy: 'hand', handReason: 'School fair' }],
    ['the shore is closed', { skippedBy: 'closure' }],
    ['another date of the plan is on this day', { skippedBy: 'other-date' }],
  ] as const)('says "%s"', (words, changes) => {
    expect(skippedInWords(skippedOn(on, [], changes), zone)).toBe(words);
  });
});

describe('a taken date', () => {
  type Cuts = NonNullable<ReturnType<typeof takenOn>['day']['window']>['cuts'];
  const cutBy = (cuts: Cuts, leftMinutes: number) => {
    const date = takenOn(on);
    const { window } = date.day;
    if (window === null) throw new Error('A taken date has a window');
    return { ...date, leftMinutes, day: { ...date.day, window: { ...window, cuts } } };
  };

  it.each<readonly [string | null, Cuts, number]>([
    [null, [{ edge: 'start', by: 'low-water-time', at: at('06:28') }], 150],
    [null, [{ edge: 'end', by: 'hours', at: at('09:00') }], 150],
    ['cut at 07:00, 2:15 left', [{ edge: 'start', by: 'hours', at: at('06:00') }], 135],
    ['cut at sunrise, 1:31 left', [{ edge: 'start', by: 'daylight', at: at('04:10') }], 91],
    ['cut at sunset, 1:31 left', [{ edge: 'off-the-shore', by: 'daylight', at: at('19:50') }], 91],
    ['cut by the dark, 1:31 left', [{ edge: 'start', by: 'daylight', at: at('04:40') }], 91],
    ['cut by the water, 1:31 left', [{ edge: 'start', by: 'working-level', at: at('07:00') }], 91],
    [
      'cut by the way off, 1:31 left',
      [{ edge: 'off-the-shore', by: 'cut-off-level', at: at('09:00') }],
      91,
    ],
    [
      'cut at 07:00 and by the dark, 1:31 left',
      [
        { edge: 'start', by: 'hours', at: at('06:00') },
        { edge: 'off-the-shore', by: 'daylight', at: at('19:20') },
      ],
      91,
    ],
  ])('says "%s" of what cut it', (words, cuts, leftMinutes) => {
    expect(takenInWords(cutBy(cuts, leftMinutes), zone)).toBe(words);
  });

  it('says that it was taken by hand and why', () => {
    const byHand = takenOn(on, {
      isByHand: true,
      leftMinutes: 76,
      handReason: 'Asked by a school',
    });
    expect(takenInWords(byHand, zone)).toBe('by hand, 1:16 left: Asked by a school');
  });

  it('says that no session comes of it once its crew would have met', () => {
    expect(takenInWords(takenOn(on, { isPast: true }), zone)).toBe('past, no session');
  });
});

describe('the headline of a plan', () => {
  const skipped = skippedOn(on, [reasons['too-high']]);

  it('counts the weekdays of a plan on one weekday', () => {
    expect(planHeadline(preview())).toBe('4 Saturdays: 3 sessions, 1 skipped');
    expect(planHeadline(preview([takenOn(on)]))).toBe('1 Saturday: 1 session');
  });

  it('begins with the sentence of any other pattern', () => {
    const shown = {
      ...preview([takenOn('2027-05-09'), skipped]),
      sentence: 'Every second Saturday and Sunday',
    };
    expect(planHeadline(shown)).toBe('Every second Saturday and Sunday: 1 session, 1 skipped');
  });

  it('counts added and past dates apart', () => {
    const added = takenOn('2027-05-12', { source: 'added' });
    const past = takenOn('2027-04-24', { isPast: true });
    expect(planHeadline(preview([past, takenOn(on), added]))).toBe(
      '2 Saturdays and 1 added: 2 sessions, 1 past',
    );
  });
});

describe('a decision by hand', () => {
  const skip = { on, kind: 'skip', reason: null } as const;

  it('replaces the one before for the same date and leaves the others', () => {
    const other = { on: '2027-05-01', kind: 'add', reason: 'Open day' } as const;
    expect(decided([skip, other], on, 'take', '  wanted ')).toEqual([
      other,
      { on, kind: 'take', reason: 'wanted' },
    ]);
  });

  it('is taken back where a hand made it, rather than countered', () => {
    expect(decisionFor(takenOn(on, { isByHand: true }))).toEqual({ word: 'Skip', kind: null });
    expect(decisionFor(skippedOn(on, [], { skippedBy: 'hand', mayTake: false }))).toEqual({
      word: 'Take',
      kind: null,
    });
    expect(decided([skip], on, null, '')).toEqual([]);
  });
});

describe('a draft', () => {
  const clock = fc.integer({ min: 1, max: 23 * 60 + 58 }).map((minutes) => {
    const text = `${String(Math.floor(minutes / 60)).padStart(2, '0')}:${String(minutes % 60).padStart(2, '0')}`;
    return text as `${number}:${number}`;
  });
  const changes = fc.record({
    minutesBeforeLow: fc.integer({ min: 0, max: 360 }),
    minutesAfterLow: fc.integer({ min: 0, max: 360 }),
    daylightMarginMinutes: fc.integer({ min: 0, max: 240 }),
    minimumMinutes: fc.integer({ min: 1, max: 720 }),
    lowestLevelM: fc.option(fc.integer({ min: -500, max: 2000 }).map((cm) => cm / 100)),
    earliestClock: clock.filter((text) => text < '12:00'),
    latestClock: clock.filter((text) => text > '12:00'),
    pattern: fc.constantFrom(
      'FREQ=WEEKLY;BYDAY=SA',
      'FREQ=WEEKLY;INTERVAL=2;BYDAY=SA,SU',
      'FREQ=MONTHLY;BYDAY=1SA,-1SA',
      'FREQ=MONTHLY;BYMONTHDAY=1,15,-1',
      'FREQ=MONTHLY;BYDAY=FR;BYMONTHDAY=13',
    ),
    count: fc.integer({ min: 1, max: 20 }),
  });

  it('says the same settings again that it was made of', () => {
    fc.assert(
      fc.property(changes, ({ count, ...changed }) => {
        const kept = planSettings.parse({
          ...settings,
          ...changed,
          slots: settings.slots.map((slot) => ({ ...slot, count })),
        });
        expect(readDraft(draftOf(kept, plans().slotKinds))).toEqual({ settings: kept, errors: {} });
      }),
    );
  });

  const draft = draftOf(settings, plans().slotKinds);

  it.each([
    ['name', { name: ' ' }, 'Give the plan a name.'],
    ['fromOn', { fromOn: '' }, 'Choose a day.'],
    ['minutesBeforeLow', { beforeLow: '7:00' }, 'At most 6:00.'],
    ['minimumMinutes', { shortest: '0:00' }, 'At least 0:01.'],
    ['minutesAfterLow', { afterLow: '0:75' }, 'Write hours and minutes, like 1:30.'],
    ['daylightMarginMinutes', { daylightMargin: '' }, 'Write a whole number, at most 240.'],
    ['earliestClock', { earliestClock: '' }, 'Write a time like 07:30.'],
    ['lowestLevelM', { lowestLevel: 'low' }, 'Write metres, like 1.3.'],
    ['lowestLevelM', { lowestLevel: '21' }, 'Between −5.0 and 20.0 m.'],
    [
      'slots',
      { slots: [{ slotKindId: slotKindIds.leader, count: '21' }] },
      'Write a whole number, at most 20.',
    ],
    ['pattern', { pattern: { ...draft.pattern, weekdays: [] } }, 'Choose at least one weekday.'],
    [
      'pattern',
      { pattern: { ...draft.pattern, everyWeeks: '0' } },
      'Write a whole number of weeks, from 1.',
    ],
    ['pattern', { pattern: { ...draft.pattern, everyWeeks: '900' } }, 'At most every 520 weeks.'],
    [
      'pattern',
      { pattern: { ...draft.pattern, kind: 'monthly-by-weekday', places: [] } },
      'Choose which one of the month.',
    ],
    [
      'pattern',
      { pattern: { ...draft.pattern, kind: 'monthly-by-day', monthDays: '32' } },
      'Write days from 1 to 31, with commas between, or last.',
    ],
    [
      'pattern',
      { pattern: { ...draft.pattern, kind: 'rule', rule: ' ' } },
      'Write a rule, for example FREQ=WEEKLY;BYDAY=SA.',
    ],
  ] as const)('says beside %s what cannot be read: %j', (field, change, sentence) => {
    expect(readDraft({ ...draft, ...change })).toEqual({
      settings: null,
      errors: { [field]: sentence },
    });
  });

  it('reads bare hours, a comma for a point, and no level as that of the shore', () => {
    const read = readDraft({ ...draft, beforeLow: '2', lowestLevel: '−0,2' });
    expect(read.settings).toMatchObject({ minutesBeforeLow: 120, lowestLevelM: -0.2 });
    expect(readDraft({ ...draft, lowestLevel: '' }).settings?.lowestLevelM).toBeNull();
  });
});
