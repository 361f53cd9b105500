import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  nextDates,
  patternOf,
  patternRule,
  patternSentence,
  patternText,
} from '#shared/domain/seasons/recurrence.ts';
import type { MonthPlace, Pattern } from '#shared/domain/seasons/recurrence.ts';
import { recurrenceDays } from '#shared/kernel/recurrence-dates.ts';
import { readRule } from '#shared/kernel/recurrence-rule.ts';
import type { RuleRefusal, Weekday } from '#shared/kernel/recurrence-rule.ts';
import type { Verdict } from '#shared/kernel/result.ts';
import { addDays, daysBetween, endOfMonth, startOfMonth, weekdayOf } from '#shared/kernel/time.ts';
import type { CalendarDay } from '#shared/kernel/time.ts';

const ZONE = 'Europe/London';
const WEEKDAYS: readonly Weekday[] = [1, 2, 3, 4, 5, 6, 7];

describe('a pattern read back', () => {
  it.each<[string, Pattern]>([
    ['Every Saturday', { kind: 'weekly', everyWeeks: 1, weekdays: [6] }],
    ['Every day', { kind: 'weekly', everyWeeks: 1, weekdays: WEEKDAYS }],
    ['Every second Saturday and Sunday', { kind: 'weekly', everyWeeks: 2, weekdays: [7, 6] }],
    ['Every 13th Monday', { kind: 'weekly', everyWeeks: 13, weekdays: [1] }],
    [
      'The first and last Saturday of each month',
      { kind: 'monthly-by-weekday', places: [-1, 1], weekdays: [6] },
    ],
    [
      'The second Saturday and the second Sunday of each month',
      { kind: 'monthly-by-weekday', places: [2], weekdays: [6, 7] },
    ],
    ['The 2nd and 15th of each month', { kind: 'monthly-by-day', days: [15, 2] }],
    ['The 1st and last day of each month', { kind: 'monthly-by-day', days: [-1, 1] }],
    [
      'The 11th, 23rd and 31st of each month, where the month has that day',
      { kind: 'monthly-by-day', days: [11, 23, 31] },
    ],
  ])('says %s', (sentence, pattern) => {
    expect(value(patternSentence(pattern, ZONE))).toBe(sentence);
  });

  it.each([
    ['FREQ=DAILY', 'Every day'],
    ['FREQ=DAILY;INTERVAL=3', 'Every third day'],
    ['FREQ=DAILY;BYDAY=SA,SU', 'Every Saturday and Sunday'],
    ['FREQ=WEEKLY', 'Every week, on the day it starts'],
    ['FREQ=MONTHLY', 'Every month, on the date it starts'],
    ['FREQ=YEARLY;BYMONTH=6,7;BYDAY=TH', 'Every Thursday in June and July'],
    ['FREQ=YEARLY;BYMONTH=6;BYDAY=1SA', 'The first Saturday of June'],
    ['FREQ=YEARLY;BYMONTH=7;BYMONTHDAY=31', 'The 31st of July'],
    ['FREQ=MONTHLY;BYDAY=FR;BYMONTHDAY=13', 'Every Friday that is the 13th of each month'],
    ['FREQ=MONTHLY;INTERVAL=2;BYDAY=TU', 'Every Tuesday of every second month'],
    ['FREQ=WEEKLY;BYDAY=SA;COUNT=10', 'Every Saturday, 10 times in all'],
    ['FREQ=WEEKLY;BYDAY=SA;UNTIL=20271023', 'Every Saturday, until 23 October 2027'],
    [
      'FREQ=WEEKLY;BYDAY=SA;UNTIL=20271023T233000Z',
      'Every Saturday, until 24 October 2027 at 00:30 BST',
    ],
  ])('says %s in words', (text, sentence) => {
    expect(value(patternSentence({ kind: 'rule', text }, ZONE))).toBe(sentence);
  });

  it.each([
    'FREQ=YEARLY;BYDAY=20MO',
    'FREQ=MONTHLY;BYMONTHDAY=-3',
    'FREQ=MONTHLY;BYDAY=TU,WE,TH;BYSETPOS=3',
    'FREQ=YEARLY;BYWEEKNO=20;BYDAY=MO',
    'FREQ=WEEKLY;INTERVAL=2;WKST=SU;BYDAY=TU,SU',
    // In words this would be taken for the second Saturday of June.
    'FREQ=WEEKLY;INTERVAL=2;BYMONTH=6;BYDAY=SA',
    'FREQ=MONTHLY;BYDAY=1SA,2SU',
  ])('gives %s as it is, since words would not say it truly', (text) => {
    expect(value(patternSentence({ kind: 'rule', text }, ZONE))).toBe(`By the rule ${text}`);
  });
});

describe('the text of a pattern', () => {
  const weekdays = fc.uniqueArray(fc.constantFrom(...WEEKDAYS), { minLength: 1 });
  const places = fc.uniqueArray(fc.constantFrom<MonthPlace>(1, 2, 3, 4, 5, -1), { minLength: 1 });
  const days = fc.uniqueArray(fc.integer({ min: 1, max: 31 }), { minLength: 1 });
  const anyPattern: fc.Arbitrary<Pattern> = fc.oneof(
    fc.record({
      kind: fc.constant('weekly' as const),
      everyWeeks: fc.integer({ min: 1, max: 520 }),
      weekdays: weekdays.map(rising),
    }),
    fc.record({
      kind: fc.constant('monthly-by-weekday' as const),
      places: places.map((chosen) => [
        ...rising(chosen.filter((place) => place > 0)),
        ...chosen.filter((place) => place < 0),
      ]),
      weekdays: weekdays.map(rising),
    }),
    fc
      .record({
        kind: fc.constant('monthly-by-day' as const),
        days: days.map(rising),
        hasLast: fc.boolean(),
      })
      .map(({ kind, days: chosen, hasLast }) => ({
        kind,
        days: hasLast ? [...chosen, -1] : chosen,
      })),
  );

  it('comes back as the same pattern', () => {
    fc.assert(
      fc.property(anyPattern, (pattern) => {
        expect(value(patternOf(value(patternText(pattern))))).toEqual(pattern);
      }),
      { numRuns: 300 },
    );
  });

  it.each([
    ['rrule:freq=weekly;byday=sa;', { kind: 'weekly', everyWeeks: 1, weekdays: [6] }],
    [
      'FREQ=MONTHLY;BYDAY=-1SU,+1SA,-1SA,1SU',
      { kind: 'monthly-by-weekday', places: [1, -1], weekdays: [6, 7] },
    ],
    ['FREQ=WEEKLY', { kind: 'rule', text: 'FREQ=WEEKLY' }],
    [
      'BYDAY=SA;COUNT=3;FREQ=WEEKLY;INTERVAL=01',
      { kind: 'rule', text: 'FREQ=WEEKLY;COUNT=3;BYDAY=SA' },
    ],
    ['FREQ=MONTHLY;BYDAY=1SA,2SU', { kind: 'rule', text: 'FREQ=MONTHLY;BYDAY=1SA,2SU' }],
    ['FREQ=MONTHLY;BYMONTHDAY=-3,1', { kind: 'rule', text: 'FREQ=MONTHLY;BYMONTHDAY=-3,1' }],
  ])('reads %s', (text, pattern) => {
    expect(value(patternOf(text))).toEqual(pattern);
  });

  it.each([
    'FREQ=WEEKLY;UNTIL=20271023',
    'FREQ=WEEKLY;UNTIL=20271023T100000',
    'FREQ=WEEKLY;UNTIL=20271023T100000Z',
    'FREQ=YEARLY;INTERVAL=2;COUNT=3;WKST=SU;BYMONTH=1,2;BYWEEKNO=-1;BYYEARDAY=-366;BYDAY=MO;BYSETPOS=-1',
  ])('keeps every part of %s', (text) => {
    expect(value(patternText({ kind: 'rule', text }))).toBe(text);
  });
});

describe('a rule that cannot be followed', () => {
  it.each<[string, RuleRefusal[]]>([
    ['', [{ why: 'empty-rule' }]],
    ['BYDAY=SA', [{ why: 'frequency-missing' }]],
    ['FREQ=FORTNIGHTLY', [{ why: 'unreadable-part', part: 'FREQ=FORTNIGHTLY' }]],
    [
      'FREQ=WEEKLY;BYDAY=SATURDAY;BYEASTER=1;constructor',
      [
        { why: 'unreadable-part', part: 'BYDAY=SATURDAY' },
        { why: 'unreadable-part', part: 'BYEASTER=1' },
        { why: 'unreadable-part', part: 'CONSTRUCTOR' },
      ],
    ],
    ['FREQ=DAILY;INTERVAL=0', [{ why: 'unreadable-part', part: 'INTERVAL=0' }]],
    ['FREQ=DAILY;UNTIL=20260230', [{ why: 'unreadable-part', part: 'UNTIL=20260230' }]],
    ['FREQ=MONTHLY;BYDAY=54MO', [{ why: 'unreadable-part', part: 'BYDAY=54MO' }]],
    ['FREQ=MONTHLY;BYMONTHDAY=32', [{ why: 'unreadable-part', part: 'BYMONTHDAY=32' }]],
    ['FREQ=DAILY;COUNT=1;COUNT=2', [{ why: 'part-named-twice', name: 'COUNT' }]],
    ['FREQ=SECONDLY', [{ why: 'more-often-than-daily', part: 'FREQ=SECONDLY' }]],
    ['FREQ=HOURLY;COUNT=3', [{ why: 'more-often-than-daily', part: 'FREQ=HOURLY' }]],
    ['FREQ=DAILY;BYHOUR=9,10', [{ why: 'clock-time-in-rule', part: 'BYHOUR=9,10' }]],
    ['FREQ=DAILY;COUNT=2;UNTIL=20260101', [{ why: 'count-and-until' }]],
    [
      'FREQ=WEEKLY;INTERVAL=999999999',
      [{ why: 'interval-too-large', part: 'INTERVAL=999999999', mostInterval: 520 }],
    ],
    [
      'FREQ=WEEKLY;BYDAY=1SA;BYMONTHDAY=3',
      [
        { why: 'part-out-of-place', part: 'BYDAY=1SA', frequency: 'WEEKLY' },
        { why: 'part-out-of-place', part: 'BYMONTHDAY=3', frequency: 'WEEKLY' },
      ],
    ],
    [
      'FREQ=MONTHLY;BYSETPOS=1',
      [{ why: 'part-out-of-place', part: 'BYSETPOS=1', frequency: 'MONTHLY' }],
    ],
    [
      'FREQ=DAILY;BYMONTH=2,4;BYMONTHDAY=31,-31',
      [{ why: 'never-comes', part: 'BYMONTH=2,4;BYMONTHDAY=31,-31' }],
    ],
  ])('is refused with what stands in the way: %s', (text, reasons) => {
    expect(readRule(text)).toEqual({ isGranted: false, reasons });
  });

  it('is refused when nothing was chosen for it', () => {
    expect(patternRule({ kind: 'monthly-by-weekday', places: [], weekdays: [] })).toEqual({
      isGranted: false,
      reasons: [
        { why: 'nothing-chosen', choice: 'weekdays' },
        { why: 'nothing-chosen', choice: 'places' },
      ],
    });
    expect(patternRule({ kind: 'weekly', everyWeeks: 1.5, weekdays: [6] })).toEqual({
      isGranted: false,
      reasons: [{ why: 'unreadable-part', part: 'INTERVAL=1.5' }],
    });
  });

  it('is refused soon, not looked for to the end of time, when its date never comes', () => {
    const never = { isGranted: false, reasons: [{ why: 'no-date-comes', days: 3660 }] };
    for (const text of [
      // A fifth Monday is never the first of its month.
      'FREQ=MONTHLY;BYDAY=5MO;BYMONTHDAY=1',
      'FREQ=YEARLY;BYMONTH=6;BYWEEKNO=53',
      'FREQ=MONTHLY;BYMONTHDAY=31;BYSETPOS=2',
      'FREQ=YEARLY;INTERVAL=2;BYYEARDAY=366',
      'FREQ=DAILY;INTERVAL=7;BYDAY=TU',
    ]) {
      // 1 January 2027 is a Friday, of an odd year.
      expect(nextDates({ kind: 'rule', text }, '2027-01-01', 5, ZONE), text).toEqual(never);
    }
  });

  it('is not looked through for more than ten years', () => {
    const recurrence = {
      rule: value(readRule('FREQ=DAILY')),
      startsOn: '2027-01-01',
      alsoOn: [],
      exceptOn: [],
    } as const;
    const lastOn = addDays('2027-01-01', 3659);
    expect(value(recurrenceDays(recurrence, '2027-01-01', lastOn, ZONE))).toHaveLength(3660);
    expect(recurrenceDays(recurrence, '2030-01-01', addDays(lastOn, 1), ZONE)).toEqual({
      isGranted: false,
      reasons: [{ why: 'span-too-long', days: 3661, mostDays: 3660 }],
    });
    expect(recurrenceDays(recurrence, '2027-02-01', '2027-01-31', ZONE)).toMatchObject({
      reasons: [{ why: 'ends-before-it-begins' }],
    });
  });
});

describe('the next dates of a pattern', () => {
  it('begin with the first day itself when it fits', () => {
    const saturdays: Pattern = { kind: 'weekly', everyWeeks: 2, weekdays: [6] };
    expect(value(nextDates(saturdays, '2027-06-05', 3, ZONE))).toEqual([
      '2027-06-05',
      '2027-06-19',
      '2027-07-03',
    ]);
    expect(value(nextDates(saturdays, '2027-06-06', 1, ZONE))).toEqual(['2027-06-19']);
  });

  it('are fewer where the rule ends', () => {
    const twice: Pattern = { kind: 'rule', text: 'FREQ=WEEKLY;COUNT=2;BYDAY=SA' };
    expect(value(nextDates(twice, '2027-06-05', 9, ZONE))).toEqual(['2027-06-05', '2027-06-12']);
    expect(() => nextDates(twice, '2027-06-05', 0, ZONE)).toThrow(RangeError);
  });

  it('take the week whole in which a rule with positions starts', () => {
    // RFC 5545 3.3.10: the positions are those of the whole week, whose first Monday is past.
    const text = 'FREQ=WEEKLY;BYDAY=MO,WE,FR;BYSETPOS=1';
    expect(value(nextDates({ kind: 'rule', text }, '2027-06-02', 2, ZONE))).toEqual([
      '2027-06-07',
      '2027-06-14',
    ]);
  });

  it('leave out what was taken out, without making up for it, and give what was added once', () => {
    const recurrence = {
      rule: value(readRule('FREQ=WEEKLY;BYDAY=SA;COUNT=3')),
      startsOn: '2027-06-05',
      alsoOn: ['2027-06-12', '2027-06-13', '2027-05-01'],
      exceptOn: ['2027-06-19', '2027-07-01'],
    } as const;
    expect(value(recurrenceDays(recurrence, '2027-05-01', '2027-12-31', ZONE))).toEqual([
      '2027-05-01',
      '2027-06-05',
      '2027-06-12',
      '2027-06-13',
    ]);
  });

  it('are the days that a walk through the calendar finds', () => {
    const start = fc.integer({ min: 0, max: 146_000 }).map((days) => addDays('2001-01-01', days));
    const weekday = fc.constantFrom(...WEEKDAYS);
    const place = fc.constantFrom<MonthPlace>(1, 2, 3, 4, 5, -1);
    const interval = fc.integer({ min: 1, max: 6 });
    fc.assert(
      fc.property(start, weekday, place, interval, (startsOn, chosen, chosenPlace, every) => {
        const toOn = addDays(startsOn, 400);
        const daysOf = (pattern: Pattern): CalendarDay[] => {
          const rule = value(patternRule(pattern));
          const recurrence = { rule, startsOn, alsoOn: [], exceptOn: [] };
          return value(recurrenceDays(recurrence, startsOn, toOn, ZONE));
        };
        const walked = Array.from({ length: 401 }, (_, index) => addDays(startsOn, index)).filter(
          (on) => weekdayOf(on) === chosen,
        );
        const monday = addDays(startsOn, 1 - weekdayOf(startsOn));
        expect(daysOf({ kind: 'weekly', everyWeeks: every, weekdays: [chosen] })).toEqual(
          walked.filter((on) => Math.floor(daysBetween(monday, on) / 7) % every === 0),
        );
        expect(
          daysOf({ kind: 'monthly-by-weekday', places: [chosenPlace], weekdays: [chosen] }),
        ).toEqual(
          walked.filter((on) =>
            chosenPlace === -1
              ? daysBetween(on, endOfMonth(on)) < 7
              : Math.floor(daysBetween(startOfMonth(on), on) / 7) === chosenPlace - 1,
          ),
        );
      }),
      { numRuns: 40 },
    );
  });
});

function rising<Value extends number>(values: readonly Value[]): Value[] {
  return values.toSorted((a, b) => a - b);
}

function value<Granted>(verdict: Verdict<Granted, unknown>): Granted {
  if (!verdict.isGranted) throw new Error(JSON.stringify(verdict.reasons));
  return verdict.value;
}
