import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { PlanWindowRules } from '#shared/domain/seasons/plan-window.ts';
import { plannedSessions } from '#shared/domain/seasons/season-plan.ts';
import type {
  PlanDate,
  PlanException,
  SeasonPlan,
  TakenDate,
} from '#shared/domain/seasons/season-plan.ts';
import type { Pattern } from '#shared/domain/seasons/recurrence.ts';
import type { ShoreRules } from '#shared/domain/tides/shore-water.ts';
import type { TideCurve } from '#shared/domain/tides/tide-curve.ts';
import { sunOn } from '#shared/kernel/sun.ts';
import { addDays, dayAt, instantOf } from '#shared/kernel/time.ts';
import type { CalendarDay } from '#shared/kernel/time.ts';
import { curveOf, datesOf, SHORE } from '../support/given-plan.ts';

const MINUTE_MS = 60_000;
const SURGE_M = 0.3;
const CUT_OFF_MARGIN_MINUTES = 20;

describe('whatever the tide, the pattern and the decisions, a plan', () => {
  // The moon's tide moves its lows round the clock, the daily tide sets one of two lower.
  const anyCurve = fc
    .record({ phase: fc.integer({ min: 0, max: 359 }), k1: fc.integer({ min: 0, max: 8 }) })
    .map(({ phase, k1 }) =>
      curveOf([
        { name: 'M2', amplitudeM: 1.6, phaseDeg: phase },
        { name: 'S2', amplitudeM: 0.5, phaseDeg: 40 },
        { name: 'K1', amplitudeM: k1 / 10, phaseDeg: 100 },
      ]),
    );
  const someDay = fc.integer({ min: 0, max: 50 }).map((days) => addDays('2027-04-20', days));
  const anyPattern = fc.constantFrom<Pattern>(
    { kind: 'weekly', everyWeeks: 1, weekdays: [6] },
    { kind: 'weekly', everyWeeks: 2, weekdays: [2, 7] },
    { kind: 'monthly-by-weekday', places: [1, -1], weekdays: [3, 6] },
    { kind: 'monthly-by-day', days: [1, 10, 20] },
    { kind: 'rule', text: 'FREQ=DAILY;INTERVAL=3' },
  );
  const anyException = fc
    .record({
      kind: fc.constantFrom('skip' as const, 'take' as const, 'add' as const, 'move' as const),
      on: someDay,
      toOn: someDay,
      isByHand: fc.boolean(),
    })
    .map(({ kind, on, toOn, isByHand }): PlanException => {
      const reason = 'asked for';
      if (kind === 'skip' || kind === 'take') return { kind, on, reason };
      return kind === 'add' ? { kind, on, reason, isByHand } : { kind, on, toOn, reason, isByHand };
    });
  const anyPlan: fc.Arbitrary<SeasonPlan> = fc.record({
    pattern: anyPattern,
    fromOn: fc.constant('2027-04-24' as const),
    toOn: fc.constant('2027-06-06' as const),
    windowRules: fc.record({
      planLevelM: fc.constantFrom(null, 0.8, 1.2),
      earliestClock: fc.constantFrom(null, '06:00' as const, '09:30' as const),
      latestClock: fc.constantFrom(null, '15:00' as const, '19:00' as const),
      minutesBeforeLow: fc.constantFrom(null, 90),
      minutesAfterLow: fc.constantFrom(null, 10, 60),
      daylightMarginMinutes: fc.constantFrom(null, 60),
      minimumMinutes: fc.constantFrom(null, 100),
    }),
    exceptions: fc.uniqueArray(anyException, { selector: ({ on }) => on, maxLength: 12 }),
    closures: fc.array(
      someDay.map((fromOn) => ({ fromOn, toOn: addDays(fromOn, 2), reason: 'seals' })),
      { maxLength: 1 },
    ),
  });
  const anyShore = fc
    .constantFrom('UTC', 'Europe/London', 'Pacific/Auckland')
    .map((zone) => ({ ...SHORE, zone, longitude: zone === 'Pacific/Auckland' ? 175 : 0 }));

  it('has no session outside its rules unless taken by hand, and none outside safety at all', () => {
    let byRules = 0;
    let byHand = 0;
    fc.assert(
      fc.property(anyPlan, anyShore, anyCurve, (plan, shore, curve) => {
        for (const date of plannedSessions(datesOf(plan, shore, curve))) {
          expectSafe(date, shore, curve);
          if (date.byHand) byHand += 1;
          else {
            byRules += 1;
            expectWithinRules(date, plan.windowRules, shore, curve);
          }
        }
      }),
      { numRuns: 40 },
    );
    expect(byRules).toBeGreaterThan(50);
    expect(byHand).toBeGreaterThan(10);
  });

  it('has its taken dates for sessions and no others, one a day, none skipped or closed', () => {
    fc.assert(
      fc.property(anyPlan, anyCurve, (plan, curve) => {
        const dates = datesOf(plan, SHORE, curve);
        const sessions = plannedSessions(dates);
        expect(sessions).toEqual(dates.filter(({ state }) => state === 'taken'));
        expect(sessions.length + dates.filter(({ state }) => state === 'skipped').length).toBe(
          dates.length,
        );
        const days = sessions.map(({ on }) => on);
        expect(new Set(days).size).toBe(days.length);
        expect(days).toEqual(days.toSorted());
        const skipped = plan.exceptions.filter(({ kind }) => kind === 'skip').map(({ on }) => on);
        for (const { on, originalOn, window } of sessions) {
          expect(skipped).not.toContain(originalOn);
          expect(plan.closures.some(({ fromOn, toOn }) => fromOn <= on && on <= toOn)).toBe(false);
          expect(dayAt(window.lowWaterAt, SHORE.zone)).toBe(on);
        }
      }),
      { numRuns: 40 },
    );
  });

  it('loses no date when the working level is raised', () => {
    let gained = 0;
    fc.assert(
      fc.property(anyPlan, anyCurve, fc.integer({ min: 1, max: 100 }), (plan, curve, raisedCm) => {
        const raised = { ...SHORE, workingLevelM: SHORE.workingLevelM + raisedCm / 100 };
        const before = takenDays(datesOf(plan, SHORE, curve));
        const after = takenDays(datesOf(plan, raised, curve));
        expect(after).toEqual(expect.arrayContaining(before));
        gained += after.length - before.length;
      }),
      { numRuns: 40 },
    );
    expect(gained).toBeGreaterThan(0);
  });

  it('keeps what was skipped, added and moved when the pattern changes', () => {
    fc.assert(
      fc.property(anyPlan, anyPattern, anyCurve, (plan, pattern, curve) => {
        const dates = datesOf({ ...plan, pattern }, SHORE, curve);
        for (const exception of plan.exceptions) {
          const found = dates.filter(({ originalOn }) => originalOn === exception.on);
          if (exception.kind === 'skip') {
            expect(found.every(({ state }) => state === 'skipped')).toBe(true);
          } else if (exception.kind === 'add') {
            expect(found.map(({ on }) => on)).toEqual([exception.on]);
          } else if (exception.kind === 'move') {
            expect(found.map(({ on }) => on)).toEqual([exception.toOn]);
          }
        }
        const originals = dates.map(({ originalOn }) => originalOn);
        expect(new Set(originals).size).toBe(originals.length);
      }),
      { numRuns: 40 },
    );
  });
});

/** What no hand overrules: daylight, a low water, off the shore after it and under the cut-off. */
function expectSafe({ on, window }: TakenDate, shore: ShoreRules, curve: TideCurve): void {
  const { startsAt, lowWaterAt, offTheShoreBy } = window;
  expect(startsAt).toBeLessThanOrEqual(lowWaterAt);
  expect(startsAt).toBeLessThan(offTheShoreBy);
  expect(lowWaterAt).toBeLessThanOrEqual(offTheShoreBy);
  const sun = sunOn(on, shore.latitude, shore.longitude, shore.zone);
  const marginMs = shore.daylightMarginMinutes * MINUTE_MS;
  expect(startsAt).toBeGreaterThanOrEqual((sun.sunriseAt ?? Infinity) + marginMs);
  expect(offTheShoreBy).toBeLessThanOrEqual((sun.sunsetAt ?? -Infinity) - marginMs);
  const underWaterAt = offTheShoreBy + CUT_OFF_MARGIN_MINUTES * MINUTE_MS;
  for (const { heightM } of curve.series(startsAt, underWaterAt, 5)) {
    expect(heightM + SURGE_M).toBeLessThanOrEqual(shore.cutOffLevelM);
  }
}

function expectWithinRules(
  { on, window, leftMinutes }: TakenDate,
  rules: PlanWindowRules,
  shore: ShoreRules,
  curve: TideCurve,
): void {
  const { startsAt, lowWaterAt, offTheShoreBy } = window;
  const levelM = Math.min(shore.workingLevelM, rules.planLevelM ?? Infinity);
  for (const { heightM } of curve.series(startsAt, offTheShoreBy, 5)) {
    expect(heightM).toBeLessThanOrEqual(levelM);
  }
  for (const clock of [shore.earliestClock, rules.earliestClock ?? shore.earliestClock]) {
    expect(startsAt).toBeGreaterThanOrEqual(instantOf(on, clock, shore.zone));
  }
  for (const clock of [shore.latestClock, rules.latestClock ?? shore.latestClock]) {
    expect(offTheShoreBy).toBeLessThanOrEqual(instantOf(on, clock, shore.zone));
  }
  const minutes = (fromAt: number, toAt: number): number => (toAt - fromAt) / MINUTE_MS;
  expect(leftMinutes).toBe(minutes(startsAt, offTheShoreBy));
  expect(leftMinutes).toBeGreaterThanOrEqual(rules.minimumMinutes ?? shore.minimumMinutes);
  expect(minutes(startsAt, lowWaterAt)).toBeLessThanOrEqual(rules.minutesBeforeLow ?? 120);
  expect(minutes(lowWaterAt, offTheShoreBy)).toBeLessThanOrEqual(
    Math.min(shore.minutesAfterLow, rules.minutesAfterLow ?? Infinity),
  );
  const sun = sunOn(on, shore.latitude, shore.longitude, shore.zone);
  const marginMs = (rules.daylightMarginMinutes ?? shore.daylightMarginMinutes) * MINUTE_MS;
  expect(startsAt).toBeGreaterThanOrEqual((sun.sunriseAt ?? Infinity) + marginMs);
}

function takenDays(dates: readonly PlanDate[]): CalendarDay[] {
  return plannedSessions(dates).map(({ on }) => on);
}
