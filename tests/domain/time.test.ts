import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  addDays,
  addMonths,
  clockAt,
  dayAt,
  daysBetween,
  daysTouched,
  endOfMonth,
  existsOnClock,
  formatDay,
  fromIso,
  instantOf,
  isCalendarDay,
  isClockTime,
  isZone,
  startOfDay,
  startOfMonth,
  toIso,
  weekdayOf,
  yearOf,
  zoneName,
  zoneOffsetMinutes,
} from '#shared/kernel/time.ts';
import type { CalendarDay, ClockTime } from '#shared/kernel/time.ts';

const zones = [
  'UTC',
  'Europe/London',
  'America/Los_Angeles',
  'America/New_York',
  'America/Sao_Paulo',
  'America/Havana',
  'Australia/Lord_Howe',
  'Asia/Kathmandu',
  'Pacific/Apia',
  'Pacific/Kiritimati',
  'Pacific/Marquesas',
] as const;

const anyZone = fc.constantFrom(...zones);
const anyInstant = fc.integer({
  min: fromIso('1975-01-01T00:00Z'),
  max: fromIso('2080-01-01T00:00Z'),
});
const anyDay = fc.integer({ min: 0, max: 60_000 }).map((days) => addDays('1950-01-01', days));
const anyClock = fc
  .integer({ min: 0, max: 1439 })
  .map((minute) => toIso(minute * 60_000).slice(11, 16) as ClockTime);

describe('a calendar day', () => {
  it.each(['2024-02-29', '2000-02-29', '1000-01-01', '9999-12-31'])('is real: %s', (text) => {
    expect(isCalendarDay(text)).toBe(true);
  });

  it.each([
    '2026-02-29',
    '1900-02-29',
    '2026-04-31',
    '2026-13-01',
    '2026-00-10',
    '2026-1-1',
    '26-01-01',
    '0999-12-31',
    '2026-01-01T00:00',
    ' 2026-01-01',
    '2026-01-01\n',
    '',
  ])('is refused when it is not real or not written out: %j', (text) => {
    expect(isCalendarDay(text)).toBe(false);
  });

  it('is refused by every function that works with days, rather than rolled over', () => {
    expect(() => addDays('2026-02-30', 1)).toThrow(RangeError);
    expect(() => daysBetween('2026-02-01', '2026-02-30')).toThrow(RangeError);
    expect(() => instantOf('2026-02-30', '10:00', 'UTC')).toThrow(RangeError);
    expect(() => formatDay('2026-02-30', 'long')).toThrow(RangeError);
  });

  it('never leaves the years whose text sorts like the calendar', () => {
    expect(() => addDays('9999-12-31', 1)).toThrow(RangeError);
    expect(() => addMonths('1000-01-31', -1)).toThrow(RangeError);
  });

  it('sorts as text in the order of the calendar', () => {
    fc.assert(
      fc.property(anyDay, anyDay, (one, other) => {
        expect(one < other).toBe(daysBetween(one, other) > 0);
      }),
    );
  });
});

describe('arithmetic with days', () => {
  it('goes over month ends, leap days and years', () => {
    expect(addDays('2024-02-28', 1)).toBe('2024-02-29');
    expect(addDays('2026-02-28', 1)).toBe('2026-03-01');
    expect(addDays('2026-12-31', 1)).toBe('2027-01-01');
    expect(addDays('2026-01-01', -1)).toBe('2025-12-31');
  });

  it('clamps to the end of a month that is too short', () => {
    expect(addMonths('2026-01-31', 1)).toBe('2026-02-28');
    expect(addMonths('2024-01-31', 1)).toBe('2024-02-29');
    expect(addMonths('2024-02-29', 12)).toBe('2025-02-28');
    expect(addMonths('2026-03-31', -1)).toBe('2026-02-28');
    expect(addMonths('2026-12-31', 2)).toBe('2027-02-28');
  });

  it('refuses parts of days and months', () => {
    expect(() => addDays('2026-01-01', 0.5)).toThrow(RangeError);
    expect(() => addMonths('2026-01-01', Number.NaN)).toThrow(RangeError);
  });

  it('counts back what it counted forward', () => {
    fc.assert(
      fc.property(anyDay, fc.integer({ min: -20_000, max: 20_000 }), (day, days) => {
        expect(daysBetween(day, addDays(day, days))).toBe(days);
        expect(addDays(addDays(day, days), -days)).toBe(day);
      }),
    );
  });

  it('moves by months to the month meant, and to the same date unless it is too short', () => {
    fc.assert(
      fc.property(anyDay, fc.integer({ min: -240, max: 240 }), (day, months) => {
        const moved = addMonths(day, months);
        const monthNumber = (of: CalendarDay) => yearOf(of) * 12 + Number(of.slice(5, 7));
        expect(monthNumber(moved) - monthNumber(day)).toBe(months);
        const sameDate = `${moved.slice(0, 8)}${day.slice(8)}`;
        expect(moved).toBe(isCalendarDay(sameDate) ? sameDate : endOfMonth(moved));
      }),
    );
  });

  it('knows the first and last day of a month', () => {
    expect(startOfMonth('2024-02-29')).toBe('2024-02-01');
    expect(endOfMonth('2024-02-01')).toBe('2024-02-29');
    expect(endOfMonth('2026-02-28')).toBe('2026-02-28');
    expect(endOfMonth('2026-12-05')).toBe('2026-12-31');
  });

  it('numbers the week from Monday 1 to Sunday 7', () => {
    const week = [0, 1, 2, 3, 4, 5, 6].map((days) => weekdayOf(addDays('2027-05-03', days)));
    expect(week).toEqual([1, 2, 3, 4, 5, 6, 7]);
  });
});

describe('a day in words', () => {
  it('is written in each of the styles', () => {
    expect(formatDay('2027-05-09', 'long')).toBe('Sunday 9 May');
    expect(formatDay('2027-05-09', 'longYear')).toBe('Sunday 9 May 2027');
    expect(formatDay('2027-05-09', 'short')).toBe('Sun 9 May');
    expect(formatDay('2027-05-09', 'dayMonth')).toBe('9 May');
    expect(formatDay('2027-05-09', 'dayMonthYear')).toBe('9 May 2027');
    expect(formatDay('2027-05-09', 'monthYear')).toBe('May 2027');
    expect(formatDay('2026-09-05', 'short')).toBe('Sat 5 Sep');
    expect(formatDay('2026-09-05', 'dayMonth')).toBe('5 September');
  });
});

describe('an instant as text', () => {
  it('is read with its offset and written in UTC', () => {
    expect(toIso(fromIso('2026-12-01T10:22:00.000Z'))).toBe('2026-12-01T10:22:00.000Z');
    expect(toIso(fromIso('2026-06-01T10:22+01:00'))).toBe('2026-06-01T09:22:00.000Z');
    expect(toIso(fromIso('2026-06-01T00:22:30-09:30'))).toBe('2026-06-01T09:52:30.000Z');
    expect(toIso(fromIso('2026-06-01T09:22:00.123456Z'))).toBe('2026-06-01T09:22:00.123Z');
    expect(fromIso('1970-01-01T00:00Z')).toBe(0);
  });

  it.each([
    '2026-12-01T10:22:00',
    '2026-12-01',
    '2026-12-01 10:22Z',
    '2026-02-30T10:22Z',
    '2026-12-01T24:00Z',
    '2026-12-01T10:60Z',
    '2026-12-01T10:22:60Z',
    '2026-12-01T10:22+25:00',
    '2026-12-01T10:22 GMT',
    'tomorrow',
    '',
  ])('is refused without an offset or when it is nonsense: %j', (text) => {
    expect(() => fromIso(text)).toThrow(RangeError);
  });

  it('comes back the same', () => {
    fc.assert(
      fc.property(anyInstant, (at) => {
        expect(fromIso(toIso(at))).toBe(at);
      }),
    );
  });

  it('is refused when it is no number', () => {
    expect(() => toIso(Number.NaN)).toThrow(RangeError);
  });
});

describe('a clock time', () => {
  it('is strictly two digits and two digits of one day', () => {
    expect(['00:00', '09:05', '23:59'].every(isClockTime)).toBe(true);
    expect(['24:00', '9:05', '10:60', '10:5', '10:05:00', ''].some(isClockTime)).toBe(false);
  });

  it('is refused when it is not one', () => {
    expect(() => instantOf('2026-01-01', '24:00', 'UTC')).toThrow(RangeError);
  });

  it('has begun when it is shown, and is never ahead', () => {
    expect(clockAt(fromIso('2026-06-01T09:22:59.999Z'), 'Europe/London')).toBe('10:22');
    expect(clockAt(fromIso('2026-06-01T09:23:00Z'), 'Europe/London')).toBe('10:23');
    expect(clockAt(fromIso('1969-12-31T23:59:59.999Z'), 'UTC')).toBe('23:59');
  });
});

describe('a zone', () => {
  it('is UTC or a place in the IANA database', () => {
    expect(['UTC', ...zones, 'Etc/GMT+5'].every(isZone)).toBe(true);
  });

  it('is not an abbreviation, a bare offset or a place unknown', () => {
    expect(['BST', 'EST', '+01:00', 'Z', 'Europe/Skerrow', 'Europe/', ''].some(isZone)).toBe(false);
    expect(() => dayAt(0, 'Europe/Skerrow')).toThrow(RangeError);
  });

  it('is named beside every time', () => {
    expect(zoneName(fromIso('2026-12-01T10:00Z'), 'Europe/London')).toBe('GMT');
    expect(zoneName(fromIso('2026-06-01T10:00Z'), 'Europe/London')).toBe('BST');
    expect(zoneName(fromIso('2026-06-01T10:00Z'), 'Asia/Kathmandu')).toBe('GMT+5:45');
    expect(zoneName(0, 'UTC')).toBe('UTC');
  });

  it('has its offset in minutes, ahead of UTC positive', () => {
    const june = fromIso('2026-06-01T10:00Z');
    expect(zoneOffsetMinutes(june, 'Europe/London')).toBe(60);
    expect(zoneOffsetMinutes(june, 'America/Los_Angeles')).toBe(-420);
    expect(zoneOffsetMinutes(june, 'Asia/Kathmandu')).toBe(345);
    expect(zoneOffsetMinutes(june, 'Pacific/Marquesas')).toBe(-570);
    expect(zoneOffsetMinutes(june + 999, 'Pacific/Kiritimati')).toBe(840);
  });
});

describe('from a clock on the wall to an instant and back', () => {
  it('shows the time asked for wherever the clocks show it at all', () => {
    fc.assert(
      fc.property(anyDay, anyClock, anyZone, (day, clock, zone) => {
        const at = instantOf(day, clock, zone);
        const isShown = dayAt(at, zone) === day && clockAt(at, zone) === clock;
        expect(existsOnClock(day, clock, zone)).toBe(isShown);
      }),
    );
  });

  it('finds every minute again, by its first showing if there are two', () => {
    fc.assert(
      fc.property(anyInstant, anyZone, (someAt, zone) => {
        const at = Math.floor(someAt / 60_000) * 60_000;
        const found = instantOf(dayAt(at, zone), clockAt(at, zone), zone);
        const isSecondShowing = zoneOffsetMinutes(found, zone) > zoneOffsetMinutes(at, zone);
        expect(existsOnClock(dayAt(at, zone), clockAt(at, zone), zone)).toBe(true);
        expect(isSecondShowing ? found < at : found === at).toBe(true);
      }),
      { numRuns: 500 },
    );
  });

  it('starts each day at the first instant that belongs to it', () => {
    fc.assert(
      fc.property(anyDay, anyZone, (day, zone) => {
        const at = startOfDay(day, zone);
        expect(dayAt(at, zone) >= day).toBe(true);
        expect(dayAt(at - 1, zone) < day).toBe(true);
      }),
      { numRuns: 500 },
    );
  });
});

describe('the days that a span touches', () => {
  const touched = (from: string, to: string, zone = 'Europe/London') =>
    daysTouched(fromIso(from), fromIso(to), zone);

  it('leaves out the day that begins as the span ends', () => {
    expect(touched('2026-06-01T10:00+01:00', '2026-06-02T00:00+01:00')).toEqual(['2026-06-01']);
    expect(touched('2026-06-01T10:00+01:00', '2026-06-02T00:01+01:00')).toEqual([
      '2026-06-01',
      '2026-06-02',
    ]);
  });

  it('is the one day of an instant for a span of no length, at midnight too', () => {
    expect(touched('2026-06-02T00:00+01:00', '2026-06-02T00:00+01:00')).toEqual(['2026-06-02']);
  });

  it('is judged in the zone of the shore, not in UTC', () => {
    expect(touched('2026-06-01T23:00Z', '2026-06-01T23:30Z')).toEqual(['2026-06-02']);
    expect(touched('2026-06-01T23:00Z', '2026-06-02T08:00Z', 'America/Los_Angeles')).toEqual([
      '2026-06-01',
      '2026-06-02',
    ]);
  });

  it('is refused when it ends before it begins', () => {
    expect(() => touched('2026-06-02T00:00Z', '2026-06-01T00:00Z')).toThrow(RangeError);
  });

  it('is in order, begins and ends with the days of its ends, and has none twice', () => {
    const anyLengthMs = fc.integer({ min: 0, max: 10 * 86_400_000 });
    fc.assert(
      fc.property(anyInstant, anyLengthMs, anyZone, (fromAt, lengthMs, zone) => {
        const days = daysTouched(fromAt, fromAt + lengthMs, zone);
        expect(days[0]).toBe(dayAt(fromAt, zone));
        expect(days.at(-1)).toBe(dayAt(fromAt + Math.max(0, lengthMs - 1), zone));
        expect([...new Set(days)].toSorted()).toEqual(days);
      }),
    );
  });
});
