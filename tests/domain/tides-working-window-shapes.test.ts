import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { tideCurve } from '#shared/domain/tides/prediction.ts';
import type { StationConstituent } from '#shared/domain/tides/prediction.ts';
import type { TideCurve } from '#shared/domain/tides/tide-curve.ts';
import { DEFAULT_WINDOW_SETTINGS, workingWindow } from '#shared/domain/tides/working-window.ts';
import type { WindowFacts, WorkingWindow } from '#shared/domain/tides/working-window.ts';
import type { SunDay } from '#shared/kernel/sun.ts';
import { dayAt, fromIso, toIso } from '#shared/kernel/time.ts';

const MINUTE_MS = 60_000;
const DAY = '2027-06-01';
const ALL_DAY: SunDay = { sunriseAt: null, sunsetAt: null, isUpAllDay: true };

describe('whatever the tide, the light and the levels, a working window', () => {
  // Whole numbers, since random fractions crowd round zero.
  const between = (least: number, most: number) =>
    fc.integer({ min: least * 1000, max: most * 1000 }).map((thousandths) => thousandths / 1000);
  const amplitude = between(0.05, 3);
  const phase = between(0, 360);
  const anyFacts: fc.Arbitrary<WindowFacts> = fc.record({
    curve: fc
      .tuple(amplitude, phase, amplitude, phase, amplitude, phase)
      .map(([m2, m2Phase, k1, k1Phase, m4, m4Phase]) =>
        curveOf([
          { name: 'M2', amplitudeM: m2, phaseDeg: m2Phase },
          { name: 'K1', amplitudeM: k1, phaseDeg: k1Phase },
          { name: 'M4', amplitudeM: m4 / 4, phaseDeg: m4Phase },
        ]),
      ),
    on: fc.constant(DAY),
    zone: fc.constantFrom('UTC', 'Europe/London', 'America/Los_Angeles', 'Pacific/Auckland'),
    sun: fc.constantFrom(ALL_DAY, lightBetween('04:00', '20:00'), lightBetween('09:00', '16:00')),
    workingLevelM: between(0, 5),
    cutOffLevelM: between(1, 8),
    planLevelM: fc.constant(null),
    earliest: fc.constantFrom(null, '07:00' as const, '10:30' as const),
    latest: fc.constantFrom(null, '12:00' as const, '19:00' as const),
    settings: fc.constantFrom(DEFAULT_WINDOW_SETTINGS, {
      ...DEFAULT_WINDOW_SETTINGS,
      minimumMinutes: 20,
      afterLowWaterMinutes: 180,
    }),
  });

  it('keeps every limit', () => {
    let count = 0;
    fc.assert(
      fc.property(anyFacts, (facts) => {
        const answer = workingWindow(facts);
        if (!answer.isGranted) return;
        count += 1;
        const window = answer.value;
        const { settings, curve } = facts;
        expect(window.startsAt).toBeLessThanOrEqual(window.lowerShoreClearBy);
        expect(window.lowerShoreClearBy).toBeLessThanOrEqual(window.offTheShoreBy);
        expect(window.offTheShoreBy).toBeLessThanOrEqual(window.endsAt);
        expect(window.offTheShoreBy - window.startsAt).toBeGreaterThanOrEqual(
          settings.minimumMinutes * MINUTE_MS,
        );
        expect(dayAt(window.lowWaterAt, facts.zone)).toBe(facts.on);
        expect(window.startsAt % MINUTE_MS).toBe(0);
        for (const { at: when, heightM } of curve.series(window.startsAt, window.endsAt, 1)) {
          expect(heightM, toIso(when)).toBeLessThanOrEqual(facts.workingLevelM);
        }
        const offAt = window.offTheShoreBy + settings.cutOffMarginMinutes * MINUTE_MS;
        for (const { at: when, heightM } of curve.series(window.startsAt, offAt, 1)) {
          expect(heightM + settings.surgeM, toIso(when)).toBeLessThanOrEqual(facts.cutOffLevelM);
        }
      }),
      { numRuns: 400 },
    );
    expect(count).toBeGreaterThan(60);
  });

  it('never grows when the working level is lowered', () => {
    fc.assert(
      fc.property(anyFacts, between(0, 2), (facts, lowerByM) => {
        const lower = workingWindow({ ...facts, planLevelM: facts.workingLevelM - lowerByM });
        if (!lower.isGranted) return;
        const whole = workingWindow(facts);
        if (!whole.isGranted) throw new Error('Granted only for lower water');
        const lengthMs = (window: WorkingWindow) => window.endsAt - window.startsAt;
        expect(lengthMs(lower.value)).toBeLessThanOrEqual(lengthMs(whole.value));
        if (lower.value.lowWaterAt !== whole.value.lowWaterAt) return;
        expect(lower.value.startsAt).toBeGreaterThanOrEqual(whole.value.startsAt);
        expect(lower.value.offTheShoreBy).toBeLessThanOrEqual(whole.value.offTheShoreBy);
      }),
      { numRuns: 300 },
    );
  });
});

function lightBetween(sunrise: string, sunset: string): SunDay {
  return {
    sunriseAt: fromIso(`${DAY}T${sunrise}Z`),
    sunsetAt: fromIso(`${DAY}T${sunset}Z`),
    isUpAllDay: false,
  };
}

function curveOf(constituents: readonly StationConstituent[]): TideCurve {
  const curve = tideCurve({ id: 'made up', meanLevelM: 2.5, constituents });
  if (!curve.isGranted) throw new Error(JSON.stringify(curve.reasons));
  return curve.value;
}
