import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { sunOn } from '#shared/kernel/sun.ts';
import { addDays, dayAt, instantOf } from '#shared/kernel/time.ts';

const HOUR_MS = 3_600_000;

// Places and their own zones, from the equator to beyond both polar circles.
const places = [
  [54.5, -0.6, 'Europe/London'],
  [44.39, -68.2, 'America/New_York'],
  [-36.8, 174.8, 'Pacific/Auckland'],
  [1.87, -157.4, 'Pacific/Kiritimati'],
  [69.65, 18.96, 'Europe/Oslo'],
  [71.3, -156.78, 'America/Anchorage'],
  [-77.85, 166.67, 'Antarctica/McMurdo'],
] as const;

describe('the daylight of a local day', () => {
  it('is one stretch: sunrise, then sunset, round the middle of that day', () => {
    const anyDay = fc.integer({ min: 0, max: 9000 }).map((days) => addDays('2020-01-01', days));
    fc.assert(
      fc.property(anyDay, fc.constantFrom(...places), (day, [latitude, longitude, zone]) => {
        const { sunriseAt, sunsetAt } = sunOn(day, latitude, longitude, zone);
        expect(sunriseAt === null).toBe(sunsetAt === null);
        if (sunriseAt === null || sunsetAt === null) return;
        expect(sunriseAt).toBeLessThan(sunsetAt);
        const middleAt = (sunriseAt + sunsetAt) / 2;
        expect(dayAt(middleAt, zone)).toBe(day);
        expect(Math.abs(middleAt - instantOf(day, '12:00', zone))).toBeLessThan(3.5 * HOUR_MS);
      }),
      { numRuns: 500 },
    );
  });

  it('is given on the shortest and longest day of Britain, and is no polar day', () => {
    const shortest = sunOn('2026-12-21', 54.5, -0.6, 'Europe/London');
    const longest = sunOn('2026-06-21', 54.5, -0.6, 'Europe/London');
    for (const { sunriseAt, sunsetAt, isUpAllDay } of [shortest, longest]) {
      expect(sunriseAt).not.toBeNull();
      expect(sunsetAt).not.toBeNull();
      expect(isUpAllDay).toBe(false);
    }
  });

  it('keeps the sunset that belongs to its own sunrise, past midnight if need be', () => {
    const { sunriseAt, sunsetAt } = sunOn('2013-08-01', 71.3, -156.783, 'America/Anchorage');
    expect(dayAt(sunriseAt ?? 0, 'America/Anchorage')).toBe('2013-08-01');
    expect(dayAt(sunsetAt ?? 0, 'America/Anchorage')).toBe('2013-08-02');
  });

  it('is refused for a place that is not on the earth', () => {
    expect(() => sunOn('2026-06-21', 90.1, 0, 'UTC')).toThrow(RangeError);
    expect(() => sunOn('2026-06-21', 0, -180.1, 'UTC')).toThrow(RangeError);
    expect(() => sunOn('2026-06-21', Number.NaN, 0, 'UTC')).toThrow(RangeError);
  });
});
