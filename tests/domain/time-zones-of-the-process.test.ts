import { beforeAll, expect, it } from 'vitest';
import type * as Expiry from '#shared/domain/competencies/expiry.ts';
import type * as Sun from '#shared/kernel/sun.ts';
import type * as Time from '#shared/kernel/time.ts';
import type { CalendarDay, ClockTime } from '#shared/kernel/time.ts';
import { describeInEachProcessZone } from '../support/process-zones.ts';

const wallTimes: [CalendarDay, ClockTime, string, string][] = [
  ['2026-03-29', '01:30', 'Europe/London', '2026-03-29T01:30:00.000Z'],
  ['2026-10-25', '01:30', 'Europe/London', '2026-10-25T00:30:00.000Z'],
  ['2026-07-01', '00:00', 'Europe/London', '2026-06-30T23:00:00.000Z'],
  ['2007-03-11', '02:30', 'America/New_York', '2007-03-11T07:30:00.000Z'],
  ['2007-11-04', '01:30', 'America/New_York', '2007-11-04T05:30:00.000Z'],
  ['2026-11-01', '01:30', 'America/Los_Angeles', '2026-11-01T08:30:00.000Z'],
  ['2026-03-08', '02:30', 'America/Los_Angeles', '2026-03-08T10:30:00.000Z'],
  ['2026-01-01', '12:00', 'Asia/Kathmandu', '2026-01-01T06:15:00.000Z'],
];

describeInEachProcessZone(() => {
  let time: typeof Time;
  let sun: typeof Sun;
  let expiry: typeof Expiry;

  beforeAll(async () => {
    time = await import('#shared/kernel/time.ts');
    sun = await import('#shared/kernel/sun.ts');
    expiry = await import('#shared/domain/competencies/expiry.ts');
  });

  it.each(wallTimes)('reads %s %s in %s as %s', (day, clock, zone, iso) => {
    expect(time.toIso(time.instantOf(day, clock, zone))).toBe(iso);
  });

  it('shows the same day, clock and zone for an instant', () => {
    const at = time.fromIso('2026-06-30T23:30:00Z');
    expect(time.dayAt(at, 'Europe/London')).toBe('2026-07-01');
    expect(time.clockAt(at, 'Europe/London')).toBe('00:30');
    expect(time.zoneName(at, 'Europe/London')).toBe('BST');
    expect(time.zoneOffsetMinutes(at, 'America/Los_Angeles')).toBe(-420);
  });

  it('counts days and months alike over the clock changes of every zone', () => {
    expect(time.addDays('2026-03-28', 1)).toBe('2026-03-29');
    expect(time.addDays('2026-03-29', 1)).toBe('2026-03-30');
    expect(time.addDays('2026-11-01', 1)).toBe('2026-11-02');
    expect(time.daysBetween('2026-03-01', '2026-04-01')).toBe(31);
    expect(time.daysBetween('2026-10-01', '2026-11-30')).toBe(60);
    expect(time.addMonths('2026-01-31', 1)).toBe('2026-02-28');
    expect(time.startOfMonth('2026-03-31')).toBe('2026-03-01');
    expect(time.endOfMonth('2026-03-01')).toBe('2026-03-31');
    expect(time.weekdayOf('2027-05-09')).toBe(7);
    expect(time.formatDay('2027-05-09', 'longYear')).toBe('Sunday 9 May 2027');
  });

  it('finds real every day of a year in which the clocks change', () => {
    for (let day: CalendarDay = '2026-01-01'; day < '2027-01-01'; day = time.addDays(day, 1)) {
      expect(time.isCalendarDay(day)).toBe(true);
      expect(time.dayAt(time.startOfDay(day, 'Europe/London'), 'Europe/London')).toBe(day);
    }
  });

  it('judges the days of a session, the end of an award and the sun alike', () => {
    expect(
      time.daysTouched(
        time.fromIso('2026-06-30T22:30:00Z'),
        time.fromIso('2026-06-30T23:30:00Z'),
        'Europe/London',
      ),
    ).toEqual(['2026-06-30', '2026-07-01']);
    const threeYears = {
      validityMonths: 36,
      renewal: { kind: 'from-new-date' },
      graceDays: 0,
    } as const;
    expect(expiry.expiryOf(threeYears, '2023-05-14', null).lastValidOn).toBe('2026-05-13');
    const { sunsetAt } = sun.sunOn('2026-10-08', 34.4046, -119.844, 'America/Los_Angeles');
    expect(sunsetAt).not.toBeNull();
    expect(time.clockAt(sunsetAt ?? 0, 'America/Los_Angeles')).toBe('18:33');
  });
});
