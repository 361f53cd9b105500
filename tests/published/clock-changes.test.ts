import { describe, expect, it } from 'vitest';
import {
  clockAt,
  dayAt,
  daysTouched,
  existsOnClock,
  fromIso,
  instantOf,
  startOfDay,
  toIso,
  zoneName,
  zoneOffsetMinutes,
} from '#shared/kernel/time.ts';
import type { CalendarDay, ClockTime } from '#shared/kernel/time.ts';

const isoOf = (day: CalendarDay, clock: ClockTime, zone: string) =>
  toIso(instantOf(day, clock, zone));

describe('times that clocks skip or show twice, by RFC 5545 3.3.5', () => {
  it.each<[CalendarDay, ClockTime, string, string, string]>([
    // RFC 5545 3.3.5, the two examples of its text.
    ['2007-11-04', '01:30', 'America/New_York', '2007-11-04T05:30:00.000Z', 'the first'],
    ['2007-03-11', '02:30', 'America/New_York', '2007-03-11T07:30:00.000Z', 'offset before'],
    // The same rule with the dates of UK summer time (The Summer Time Order 2002: last Sundays of
    // March and October, 01:00 GMT).
    ['2026-10-25', '01:30', 'Europe/London', '2026-10-25T00:30:00.000Z', 'the first'],
    ['2026-10-25', '01:00', 'Europe/London', '2026-10-25T00:00:00.000Z', 'the first'],
    ['2026-10-25', '00:59', 'Europe/London', '2026-10-24T23:59:00.000Z', 'once'],
    ['2026-10-25', '02:00', 'Europe/London', '2026-10-25T02:00:00.000Z', 'once'],
    ['2026-03-29', '00:59', 'Europe/London', '2026-03-29T00:59:00.000Z', 'once'],
    ['2026-03-29', '01:00', 'Europe/London', '2026-03-29T01:00:00.000Z', 'offset before'],
    ['2026-03-29', '02:00', 'Europe/London', '2026-03-29T01:00:00.000Z', 'once'],
    // IANA time zone database, file australasia, rule LH: half an hour, at 02:00.
    ['2026-04-05', '01:45', 'Australia/Lord_Howe', '2026-04-04T14:45:00.000Z', 'the first'],
    ['2026-10-04', '02:15', 'Australia/Lord_Howe', '2026-10-03T15:45:00.000Z', 'offset before'],
    ['2026-10-04', '02:30', 'Australia/Lord_Howe', '2026-10-03T15:30:00.000Z', 'once'],
    // IANA time zone database, file asia: Nepal, 5:45 since 1986.
    ['2026-05-05', '05:45', 'Asia/Kathmandu', '2026-05-05T00:00:00.000Z', 'once'],
    // IANA time zone database, file northamerica, rule Cuba: forward at midnight, back at 01:00.
    ['2026-11-01', '00:30', 'America/Havana', '2026-11-01T04:30:00.000Z', 'the first'],
    ['2026-03-08', '00:30', 'America/Havana', '2026-03-08T05:30:00.000Z', 'offset before'],
  ])('reads %s %s in %s as %s (%s)', (day, clock, zone, iso, how) => {
    expect(isoOf(day, clock, zone)).toBe(iso);
    expect(existsOnClock(day, clock, zone)).toBe(how !== 'offset before');
  });
});

describe('a day whose midnight the clocks skip', () => {
  // IANA time zone database, file southamerica, rule Brazil: 2018-11-04 00:00 to 01:00.
  it('begins at one in the morning in Sao Paulo', () => {
    const zone = 'America/Sao_Paulo';
    const at = startOfDay('2018-11-04', zone);
    expect(toIso(at)).toBe('2018-11-04T03:00:00.000Z');
    expect([dayAt(at, zone), clockAt(at, zone)]).toEqual(['2018-11-04', '01:00']);
    expect([dayAt(at - 1, zone), clockAt(at - 1, zone)]).toEqual(['2018-11-03', '23:59']);
    expect(existsOnClock('2018-11-04', '00:00', zone)).toBe(false);
  });

  it('begins at one in the morning in Havana', () => {
    const at = startOfDay('2026-03-08', 'America/Havana');
    expect(toIso(at)).toBe('2026-03-08T05:00:00.000Z');
    expect(clockAt(at, 'America/Havana')).toBe('01:00');
  });

  // IANA time zone database, file northamerica, rule Toronto: 1919-03-30 23:30 to 00:30.
  it('begins at the change, half an hour in, where the gap lies across midnight', () => {
    const at = startOfDay('1919-03-31', 'America/Toronto');
    expect(toIso(at)).toBe('1919-03-31T04:30:00.000Z');
    expect(clockAt(at, 'America/Toronto')).toBe('00:30');
  });
});

describe('a midnight that the clocks show twice', () => {
  it('is the first one at the start of the day in Havana', () => {
    expect(toIso(startOfDay('2026-11-01', 'America/Havana'))).toBe('2026-11-01T04:00:00.000Z');
  });

  // IANA time zone database, file southamerica, rule Brazil: 2018-02-18 00:00 back to 23:00.
  it('does not begin the day early where the clocks go back to the evening before', () => {
    const zone = 'America/Sao_Paulo';
    const at = startOfDay('2018-02-18', zone);
    expect(toIso(at)).toBe('2018-02-18T03:00:00.000Z');
    expect(dayAt(at - 1, zone)).toBe('2018-02-17');
    expect(toIso(instantOf('2018-02-17', '23:30', zone))).toBe('2018-02-18T01:30:00.000Z');
  });

  // IANA time zone database, file northamerica, rule StJohns: 2010-11-07 00:01 back to 23:01.
  it('never leaves a span without days where the date itself goes back', () => {
    const zone = 'America/St_Johns';
    const fromAt = fromIso('2010-11-07T02:30:30Z');
    const toAt = fromIso('2010-11-07T03:00:00Z');
    expect(dayAt(fromAt, zone)).toBe('2010-11-07');
    expect(dayAt(toAt, zone)).toBe('2010-11-06');
    expect(daysTouched(fromAt, toAt, zone)).toEqual(['2010-11-06', '2010-11-07']);
  });
});

describe('a day that a zone left out', () => {
  // IANA time zone database, file australasia: Samoa had no 30 December 2011.
  const zone = 'Pacific/Apia';

  it('is no day that a span can touch', () => {
    const days = daysTouched(
      fromIso('2011-12-29T20:00:00-10:00'),
      fromIso('2011-12-31T09:00:00+14:00'),
      zone,
    );
    expect(days).toEqual(['2011-12-29', '2011-12-31']);
  });

  it('has no time on the clock, and its times are read with the offset before', () => {
    expect(existsOnClock('2011-12-30', '12:00', zone)).toBe(false);
    expect(isoOf('2011-12-30', '00:00', zone)).toBe('2011-12-30T10:00:00.000Z');
    expect(isoOf('2011-12-30', '23:59', zone)).toBe('2011-12-31T09:59:00.000Z');
    expect(isoOf('2011-12-31', '00:00', zone)).toBe('2011-12-30T10:00:00.000Z');
    expect(isoOf('2011-12-29', '23:59', zone)).toBe('2011-12-30T09:59:00.000Z');
  });

  it('begins where the next day begins', () => {
    expect(startOfDay('2011-12-30', zone)).toBe(startOfDay('2011-12-31', zone));
    expect(dayAt(startOfDay('2011-12-30', zone) - 1, zone)).toBe('2011-12-29');
  });
});

describe('summer time in London', () => {
  // Computed from The Summer Time Order 2002: Saturdays at 10:00 from 14 March 2026.
  it('moves a Saturday session at ten by an hour in UTC, not on the clock', () => {
    const saturdays: CalendarDay[] = ['2026-03-14', '2026-03-21', '2026-03-28', '2026-04-04'];
    expect(saturdays.map((day) => isoOf(day, '10:00', 'Europe/London').slice(11, 16))).toEqual([
      '10:00',
      '10:00',
      '10:00',
      '09:00',
    ]);
  });

  // RFC 5545 3.3.10: a recurring time that does not exist is dropped, so callers must be able to ask.
  it('leaves out 01:30 on 29 March 2026 only', () => {
    const days: CalendarDay[] = ['2026-03-28', '2026-03-29', '2026-03-30', '2026-03-31'];
    const shown = days.filter((day) => existsOnClock(day, '01:30', 'Europe/London'));
    expect(shown).toEqual(['2026-03-28', '2026-03-30', '2026-03-31']);
  });

  // A published low water at Plymouth, 4 June 2020: 10:31 GMT is 11:31 BST.
  it('adds its hour once, and says which time it is', () => {
    const at = fromIso('2020-06-04T10:31:00Z');
    expect(clockAt(at, 'Europe/London')).toBe('11:31');
    expect(zoneName(at, 'Europe/London')).toBe('BST');
  });

  // IANA time zone database, file europe: British Standard Time, 1968-10-27 to 1971-10-31.
  it('knows the years in which it lasted through the winter', () => {
    expect(zoneOffsetMinutes(fromIso('1970-01-01T12:00Z'), 'Europe/London')).toBe(60);
  });
});
