import { readFileSync } from 'node:fs';
import { beforeAll, expect, it } from 'vitest';
import type * as RecurrenceDates from '#shared/kernel/recurrence-dates.ts';
import type { Recurrence } from '#shared/kernel/recurrence-dates.ts';
import { readRule } from '#shared/kernel/recurrence-rule.ts';
import type { Verdict } from '#shared/kernel/result.ts';
import { addDays, toIso } from '#shared/kernel/time.ts';
import type { CalendarDay, ClockTime } from '#shared/kernel/time.ts';
import { describeInEachProcessZone } from '../support/process-zones.ts';

interface Example {
  readonly id: string;
  readonly title: string;
  readonly dtstart: `${CalendarDay}T${ClockTime}`;
  readonly rrule: string;
  readonly exp: readonly CalendarDay[];
  /** Whether these are all the dates, rather than the first of an unending rule. */
  readonly complete: boolean;
}

const NEW_YORK = 'America/New_York';
const LONDON = 'Europe/London';

// RFC 5545 3.8.5.3; what was taken in and left out stands in the file.
const { vectors: examples } = JSON.parse(
  readFileSync(new URL('data/rfc5545-recurrence.json', import.meta.url), 'utf8'),
) as { vectors: Example[] };

it('has all the examples', () => {
  expect(examples).toHaveLength(25);
});

let dates: typeof RecurrenceDates;

describeInEachProcessZone(() => {
  beforeAll(async () => {
    dates = await import('#shared/kernel/recurrence-dates.ts');
  });

  it.each(examples)('gives the dates of $id, $title', (example) => {
    const startsOn = example.dtstart.slice(0, 10) as CalendarDay;
    const clock = example.dtstart.slice(11) as ClockTime;
    // A year of quiet after the last date shows that a whole example has ended.
    const lastOn = example.exp.at(-1) ?? startsOn;
    const toOn = example.complete ? addDays(lastOn, 366) : lastOn;
    const set = recurrence(example.rrule, startsOn);
    expect(value(dates.recurrenceDays(set, startsOn, toOn, NEW_YORK))).toEqual(example.exp);
    const times = value(dates.recurrenceTimes(set, clock, NEW_YORK, startsOn, toOn));
    expect(times.map(({ on }) => on)).toEqual(example.exp);
  });

  it('keeps nine o’clock in New York over the end of summer time', () => {
    // RFC 5545 3.8.5.3, daily until 24 December 1997: EDT to 25 October, EST from 26 October.
    const set = recurrence('FREQ=DAILY;UNTIL=19971224T000000Z', '1997-09-02');
    const times = value(dates.recurrenceTimes(set, '09:00', NEW_YORK, '1997-10-25', '1997-10-26'));
    expect(times.map(({ at }) => toIso(at))).toEqual([
      '1997-10-25T13:00:00.000Z',
      '1997-10-26T14:00:00.000Z',
    ]);
  });

  it('keeps ten o’clock on Saturdays in London over the start of summer time', () => {
    // Summer time in the United Kingdom began on 29 March 2026.
    const set = recurrence('FREQ=WEEKLY;BYDAY=SA;COUNT=4', '2026-03-14');
    expect(isoTimes(set, '10:00', '2026-03-14', '2026-12-31')).toEqual([
      '2026-03-14T10:00:00.000Z',
      '2026-03-21T10:00:00.000Z',
      '2026-03-28T10:00:00.000Z',
      '2026-04-04T09:00:00.000Z',
    ]);
  });

  it('drops a time that the clocks skip, and does not count it', () => {
    // RFC 5545 3.3.10: 01:30 did not exist in London on 29 March 2026.
    const set = recurrence('FREQ=DAILY;COUNT=3', '2026-03-28');
    expect(isoTimes(set, '01:30', '2026-03-28', '2026-04-30')).toEqual([
      '2026-03-28T01:30:00.000Z',
      '2026-03-30T00:30:00.000Z',
      '2026-03-31T00:30:00.000Z',
    ]);
  });

  it('takes a time shown twice for the first, and an added one in a gap by the offset before', () => {
    // RFC 5545 3.3.5, in London on 25 October and 29 March 2026.
    const twice = recurrence('FREQ=DAILY;COUNT=1', '2026-10-25');
    expect(isoTimes(twice, '01:30', '2026-10-25', '2026-10-31')).toEqual([
      '2026-10-25T00:30:00.000Z',
    ]);
    const added: Recurrence = {
      ...recurrence('FREQ=DAILY;COUNT=1', '2026-03-28'),
      alsoOn: ['2026-03-29'],
    };
    expect(isoTimes(added, '01:30', '2026-03-28', '2026-03-31')).toEqual([
      '2026-03-28T01:30:00.000Z',
      '2026-03-29T01:30:00.000Z',
    ]);
  });

  it('finds the last weekday of each month of 2026', () => {
    // Reckoned from the calendar of 2026, whose 1 January is a Thursday.
    const set = recurrence('FREQ=MONTHLY;BYDAY=MO,TU,WE,TH,FR;BYSETPOS=-1', '2026-01-01');
    expect(value(dates.recurrenceDays(set, '2026-01-01', '2026-12-31', LONDON))).toEqual([
      '2026-01-30',
      '2026-02-27',
      '2026-03-31',
      '2026-04-30',
      '2026-05-29',
      '2026-06-30',
      '2026-07-31',
      '2026-08-31',
      '2026-09-30',
      '2026-10-30',
      '2026-11-30',
      '2026-12-31',
    ]);
  });

  it('ends with the day, the wall time or the instant that the rule names, itself included', () => {
    const lastOf = (until: string, clock: ClockTime) => {
      const set = recurrence(`FREQ=DAILY;UNTIL=${until}`, '2026-06-01');
      return value(dates.recurrenceTimes(set, clock, LONDON, '2026-06-01', '2026-07-01')).at(-1)
        ?.on;
    };
    expect(lastOf('20260610', '23:30')).toBe('2026-06-10');
    expect(lastOf('20260610T100000', '10:00')).toBe('2026-06-10');
    expect(lastOf('20260610T095900', '10:00')).toBe('2026-06-09');
    // 09:00Z is ten o'clock in London in summer.
    expect(lastOf('20260610T090000Z', '10:00')).toBe('2026-06-10');
    expect(lastOf('20260610T085900Z', '10:00')).toBe('2026-06-09');
    // Half past midnight in London on the 11th.
    const set = recurrence('FREQ=DAILY;UNTIL=20260610T233000Z', '2026-06-01');
    const days = value(dates.recurrenceDays(set, '2026-06-01', '2026-07-01', LONDON));
    expect(days.at(-1)).toBe('2026-06-11');
  });
});

function recurrence(rule: string, startsOn: CalendarDay): Recurrence {
  return { rule: value(readRule(rule)), startsOn, alsoOn: [], exceptOn: [] };
}

function isoTimes(
  set: Recurrence,
  clock: ClockTime,
  fromOn: CalendarDay,
  toOn: CalendarDay,
): string[] {
  return value(dates.recurrenceTimes(set, clock, LONDON, fromOn, toOn)).map(({ at }) => toIso(at));
}

function value<Granted>(verdict: Verdict<Granted, unknown>): Granted {
  if (!verdict.isGranted) throw new Error(JSON.stringify(verdict.reasons));
  return verdict.value;
}
