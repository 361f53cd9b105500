import { describe, expect, it } from 'vitest';
import { tideCurve } from '#shared/domain/tides/prediction.ts';
import type { StationConstituent } from '#shared/domain/tides/prediction.ts';
import type { TideCurve } from '#shared/domain/tides/tide-curve.ts';
import {
  DEFAULT_WINDOW_SETTINGS,
  meetingTimes,
  workingWindow,
} from '#shared/domain/tides/working-window.ts';
import type {
  NoWindowReason,
  WindowFacts,
  WorkingWindow,
} from '#shared/domain/tides/working-window.ts';
import { sunOn } from '#shared/kernel/sun.ts';
import type { SunDay } from '#shared/kernel/sun.ts';
import { clockAt, dayAt, fromIso } from '#shared/kernel/time.ts';
import type { Instant } from '#shared/kernel/time.ts';

const MINUTE_MS = 60_000;
const DAY = '2027-06-01';
const ALL_DAY: SunDay = { sunriseAt: null, sunsetAt: null, isUpAllDay: true };

// The solar tide alone keeps the same hours each day, so that every edge can be reckoned by hand:
// t hours from low water it stands at 2.5 - 2 cos(30 t) metres, between 0.5 and 4.5.
// A phase of 180 degrees puts the lows at 00:00 and 12:00 UTC, every 30 degrees an hour later.
function lowAtHour(hour: number): TideCurve {
  return curveOf([{ name: 'S2', amplitudeM: 2, phaseDeg: 180 + 30 * hour }]);
}

const NOON: WindowFacts = {
  curve: lowAtHour(12),
  on: DAY,
  zone: 'UTC',
  sun: lightBetween('04:00', '20:00'),
  workingLevelM: 2.5,
  cutOffLevelM: 6,
  planLevelM: null,
  earliest: null,
  latest: null,
  settings: DEFAULT_WINDOW_SETTINGS,
};

describe('the working window', () => {
  it('opens two hours before low water and closes half an hour after it', () => {
    expect(onTheClock(NOON)).toEqual({
      lowWater: '12:00',
      crewMeets: '09:15',
      partyMeets: '09:40',
      starts: '10:00',
      lowerShoreClearBy: '12:00',
      offTheShoreBy: '12:30',
      ends: '12:30',
      cuts: ['start low-water-time', 'end low-water-time', 'off-the-shore low-water-time'],
    });
    expect(grantedWindow(NOON).lowWaterHeightM).toBeCloseTo(0.5, 9);
  });

  it.each<[string, Partial<WindowFacts>, string, string, string]>([
    // 2.5 - 2 cos(30 t) = 1.0 where t is 82.8 minutes.
    ['the working level', { workingLevelM: 1 }, '10:38', '12:30', 'start working-level'],
    ['a lower level of the plan', { planLevelM: 1 }, '10:38', '12:30', 'start working-level'],
    ['no higher level of the plan', { workingLevelM: 1, planLevelM: 2 }, '10:38', '12:30', 'start'],
    // Half an hour clear of a sunrise at 10:10, and of a sunset at 12:40.
    ['daylight', { sun: lightBetween('10:10', '20:00') }, '10:40', '12:30', 'start daylight'],
    ['dusk', { sun: lightBetween('04:00', '12:40') }, '10:00', '12:10', 'end daylight'],
    ['the plan’s earliest hour', { earliest: '10:45' }, '10:45', '12:30', 'start hours'],
    ['the plan’s latest hour', { latest: '12:05' }, '10:00', '12:05', 'end hours'],
    // With the surge at the cut-off level of 1.3 m: 2.5 - 2 cos(30 t) = 1.0 again.
    ['the cut-off level', { cutOffLevelM: 1.3 }, '10:38', '12:30', 'start cut-off-level'],
  ])('is cut by %s', (_, change, starts, ends, cut) => {
    const window = onTheClock({ ...NOON, ...change });
    expect(window).toMatchObject({ starts, ends });
    expect(window.cuts.join()).toContain(cut);
  });

  it.each<[string, Partial<WindowFacts>, NoWindowReason[]]>([
    [
      'the low water is above the working level',
      { workingLevelM: 0.4, sun: ALL_DAY },
      [0, 12].map((hour) => ({
        why: 'too-high' as const,
        lowWaterAt: at(hour),
        lowWaterHeightM: expect.closeTo(0.5, 9) as number,
        workingLevelM: 0.4,
      })),
    ],
    [
      'the plan asks for lower water than comes',
      { planLevelM: 0.4, sun: lightBetween('00:00', '10:00') },
      [
        tooHigh(0),
        { ...dark(0), lightFromAt: at(0.5), lightToAt: at(9.5) },
        tooHigh(12),
        { ...dark(12), lightFromAt: at(0.5), lightToAt: at(9.5) },
      ],
    ],
    [
      'the sun does not rise',
      { sun: { sunriseAt: null, sunsetAt: null, isUpAllDay: false } },
      [dark(0), dark(12)],
    ],
    [
      'the low water is out of hours',
      { sun: ALL_DAY, earliest: '13:00', latest: '18:00' },
      [0, 12].map((hour) => ({
        why: 'out-of-hours' as const,
        lowWaterAt: at(hour),
        earliestAt: at(13),
        latestAt: at(18),
      })),
    ],
    [
      'the hours leave too little',
      { sun: lightBetween('04:00', '20:00'), earliest: '11:01' },
      [
        expect.objectContaining({ why: 'dark', lowWaterAt: at(0) }) as NoWindowReason,
        expect.objectContaining({ why: 'out-of-hours', lowWaterAt: at(0) }) as NoWindowReason,
        {
          why: 'too-short',
          lowWaterAt: at(12),
          lengthMinutes: 89,
          minimumMinutes: 90,
          cuts: [
            { edge: 'start', by: 'hours', at: at(11) + MINUTE_MS },
            { edge: 'end', by: 'low-water-time', at: at(12.5) },
            { edge: 'off-the-shore', by: 'low-water-time', at: at(12.5) },
          ],
        },
      ],
    ],
  ])('is refused with its figures when %s', (_, change, reasons) => {
    expect(workingWindow({ ...NOON, ...change })).toEqual({ isGranted: false, reasons });
  });

  it('has the minimum length exactly and is granted, a minute less and is refused', () => {
    expect(workingWindow({ ...NOON, earliest: '11:00' }).isGranted).toBe(true);
    expect(workingWindow({ ...NOON, earliest: '11:01' }).isGranted).toBe(false);
  });

  it('takes a low water that stands exactly at the limits of light and hours', () => {
    const facts = { ...NOON, sun: lightBetween('04:00', '12:30'), latest: '12:00' } as const;
    expect(onTheClock(facts)).toMatchObject({ starts: '10:00', ends: '12:00' });
  });

  it('takes the longer of two windows in a day', () => {
    // Lows at 04:30 and 16:30; the first has light from 04:00 only.
    const settings = { ...DEFAULT_WINDOW_SETTINGS, minimumMinutes: 30 };
    const facts = { ...NOON, settings, curve: lowAtHour(4.5), sun: lightBetween('03:30', '20:30') };
    expect(onTheClock(facts).lowWater).toBe('16:30');
    expect(onTheClock({ ...facts, latest: '12:00' }).lowWater).toBe('04:30');
  });

  it('takes the earlier of two that are as long', () => {
    expect(onTheClock({ ...NOON, curve: lowAtHour(6), sun: ALL_DAY }).lowWater).toBe('06:00');
  });

  it('goes on over a high water that itself stays under the working level', () => {
    const settings = { ...DEFAULT_WINDOW_SETTINGS, beforeLowWaterMinutes: 600 };
    const facts = { ...NOON, settings, workingLevelM: 5 };
    expect(onTheClock(facts)).toMatchObject({ starts: '04:30', ends: '12:30' });
  });

  it('uses the one low water of a diurnal tide', () => {
    const curve = curveOf([{ name: 'S1', amplitudeM: 1, phaseDeg: 180 }]);
    expect(onTheClock({ ...NOON, curve })).toMatchObject({ lowWater: '12:00', starts: '10:00' });
  });

  it('says so on a day to which a diurnal tide gives no low water', () => {
    const curve = curveOf([{ name: 'O1', amplitudeM: 1, phaseDeg: 0 }]);
    const fromAt = fromIso('2027-06-01T00:00Z');
    const lows = curve.extremes(fromAt, fromAt + 60 * 1440 * MINUTE_MS);
    const withLow = new Set(
      lows.filter(({ kind }) => kind === 'low').map((low) => dayAt(low.at, 'UTC')),
    );
    const without = [...Array(58).keys()]
      .map((days) => dayAt(fromAt + days * 1440 * MINUTE_MS, 'UTC'))
      .filter((day) => !withLow.has(day));
    expect(without.length).toBeGreaterThan(0);
    for (const on of without) {
      expect(workingWindow({ ...NOON, curve, on, sun: ALL_DAY })).toEqual({
        isGranted: false,
        reasons: [{ why: 'no-low-water', on }],
      });
    }
  });
});

describe('off the shore by', () => {
  const careful = { ...DEFAULT_WINDOW_SETTINGS, minimumMinutes: 30, afterLowWaterMinutes: 60 };

  it('is twenty minutes before the rising water, with the surge, reaches the cut-off level', () => {
    // 2.5 - 2 cos(30 t) = 0.9 - 0.3 where t is 36.4 minutes; the way is open from 36.4 before.
    expect(onTheClock({ ...NOON, settings: careful, cutOffLevelM: 0.9 })).toMatchObject({
      starts: '11:24',
      offTheShoreBy: '12:16',
      ends: '13:00',
      cuts: ['start cut-off-level', 'end low-water-time', 'off-the-shore cut-off-level'],
    });
  });

  it('is the end of the window where the water is slower than that', () => {
    const window = onTheClock({ ...NOON, settings: careful, cutOffLevelM: 1.6 });
    expect(window).toMatchObject({ offTheShoreBy: '13:00', ends: '13:00' });
  });

  it('looks past the end of the window for the water that comes just after it', () => {
    // 1.0 m with the surge at 83 minutes after low water, less 20: 13:02, or 12:59 for 0.95 m.
    const facts = { ...NOON, settings: careful };
    expect(onTheClock({ ...facts, cutOffLevelM: 1.3 }).offTheShoreBy).toBe('13:00');
    // 2.5 - 2 cos(30 t) = 0.95 where t is 78.4 minutes.
    expect(onTheClock({ ...facts, cutOffLevelM: 1.25 }).offTheShoreBy).toBe('12:58');
  });

  it('refuses when the time until then is too short, and names the cut-off level', () => {
    const answer = workingWindow({
      ...NOON,
      earliest: '11:00',
      latest: '13:00',
      cutOffLevelM: 0.9,
    });
    expect(answer).toMatchObject({
      isGranted: false,
      reasons: expect.arrayContaining([
        expect.objectContaining({
          why: 'too-short',
          lengthMinutes: 52,
          cuts: expect.arrayContaining([
            { edge: 'off-the-shore', by: 'cut-off-level', at: at(12) + 16 * MINUTE_MS },
          ]) as unknown,
        }),
      ]) as unknown,
    });
  });

  it('refuses when everyone must be off before the low water', () => {
    // 2.5 - 2 cos(30 t) = 0.51 where t is 11.5 minutes.
    const settings = { ...careful, minimumMinutes: 0 };
    const facts = { ...NOON, settings, cutOffLevelM: 0.81, earliest: '06:00' } as const;
    expect(workingWindow(facts)).toMatchObject({
      isGranted: false,
      reasons: expect.arrayContaining([
        {
          why: 'off-the-shore-before-low-water',
          lowWaterAt: at(12),
          offTheShoreBy: at(12) - 9 * MINUTE_MS,
        },
      ]) as unknown,
    });
  });

  it('refuses when low water itself, with the surge, reaches the cut-off level', () => {
    const facts = { ...NOON, settings: careful, cutOffLevelM: 0.8, sun: ALL_DAY };
    expect(workingWindow(facts)).toMatchObject({
      isGranted: false,
      reasons: [{ why: 'cut-off-at-low-water' }, { why: 'cut-off-at-low-water' }],
    });
  });
});

describe('the local day', () => {
  it.each([
    // Europe/London goes forward on 28 March 2027 and back on 31 October.
    ['2027-03-27', '10:45', '10:45Z'],
    ['2027-03-28', '11:45', '10:45Z'],
    ['2027-10-30', '11:45', '10:45Z'],
    ['2027-10-31', '10:45', '10:45Z'],
  ] as const)('of %s reads the plan’s hour %s by its own clock', (on, earliest, startsUtc) => {
    const zone = 'Europe/London';
    const window = grantedWindow({ ...NOON, on, sun: sunOn(on, 54, 0, zone), zone, earliest });
    expect(window.startsAt).toBe(fromIso(`${on}T${startsUtc}`));
  });

  it('keeps its 25 hours when the clocks go back', () => {
    // In London 31 October 2027 runs from 23:00Z to 24:00Z: lows at 23:30Z, 11:30Z and 23:30Z again.
    const facts = { ...NOON, curve: lowAtHour(11.5), zone: 'Europe/London', sun: ALL_DAY };
    const answer = workingWindow({ ...facts, on: '2027-10-31', workingLevelM: 0 });
    const lows = answer.isGranted ? [] : answer.reasons;
    expect(lows).toMatchObject([
      { why: 'too-high', lowWaterAt: fromIso('2027-10-30T23:30Z') },
      { why: 'too-high', lowWaterAt: fromIso('2027-10-31T11:30Z') },
      { why: 'too-high', lowWaterAt: fromIso('2027-10-31T23:30Z') },
    ]);
  });

  it('has light at any hour under the midnight sun, and at none in the polar night', () => {
    const summer = sunOn('2027-06-21', 70, 25, 'Europe/Oslo');
    const winter = sunOn('2027-12-21', 70, 25, 'Europe/Oslo');
    const facts = { ...NOON, zone: 'Europe/Oslo', curve: lowAtHour(9) };
    // The low at 21:00 UTC is at 23:00 by the clock; the one at 09:00 UTC is as long and earlier.
    const night = { ...facts, on: '2027-06-21', sun: summer, earliest: '20:00' } as const;
    expect(clockAt(grantedWindow(night).lowWaterAt, 'Europe/Oslo')).toBe('23:00');
    expect(workingWindow({ ...facts, on: '2027-12-21', sun: winter })).toMatchObject({
      isGranted: false,
      reasons: [
        { why: 'dark', lightFromAt: null, lightToAt: null },
        { why: 'dark', lightFromAt: null, lightToAt: null },
      ],
    });
  });
});

describe('meeting times', () => {
  it('are 45 and 20 minutes before the start, unless the shore says otherwise', () => {
    const settings = { ...DEFAULT_WINDOW_SETTINGS, crewMeetsBeforeMinutes: 60 };
    expect(meetingTimes(at(10), DEFAULT_WINDOW_SETTINGS)).toEqual({
      crewMeetsAt: at(9.25),
      partyMeetsAt: at(10) - 20 * MINUTE_MS,
    });
    expect(meetingTimes(at(10), settings).crewMeetsAt).toBe(at(9));
  });
});

function at(hour: number): Instant {
  return fromIso(`${DAY}T00:00Z`) + hour * 60 * MINUTE_MS;
}

function lightBetween(sunrise: string, sunset: string): SunDay {
  return {
    sunriseAt: fromIso(`${DAY}T${sunrise}Z`),
    sunsetAt: fromIso(`${DAY}T${sunset}Z`),
    isUpAllDay: false,
  };
}

function dark(hour: number): NoWindowReason & { readonly why: 'dark' } {
  return { why: 'dark', lowWaterAt: at(hour), lightFromAt: null, lightToAt: null };
}

function tooHigh(hour: number): NoWindowReason {
  const lowWaterHeightM = expect.closeTo(0.5, 9) as number;
  return { why: 'too-high', lowWaterAt: at(hour), lowWaterHeightM, workingLevelM: 0.4 };
}

function curveOf(constituents: readonly StationConstituent[]): TideCurve {
  const curve = tideCurve({ id: 'made up', meanLevelM: 2.5, constituents });
  if (!curve.isGranted) throw new Error(JSON.stringify(curve.reasons));
  return curve.value;
}

function grantedWindow(facts: WindowFacts): WorkingWindow {
  const answer = workingWindow(facts);
  if (!answer.isGranted) throw new Error(JSON.stringify(answer.reasons));
  return answer.value;
}

function onTheClock(facts: WindowFacts) {
  const window = grantedWindow(facts);
  const clock = (instant: Instant) => clockAt(instant, facts.zone);
  return {
    lowWater: clock(window.lowWaterAt),
    crewMeets: clock(window.crewMeetsAt),
    partyMeets: clock(window.partyMeetsAt),
    starts: clock(window.startsAt),
    lowerShoreClearBy: clock(window.lowerShoreClearBy),
    offTheShoreBy: clock(window.offTheShoreBy),
    ends: clock(window.endsAt),
    cuts: window.cuts.map(({ edge, by }) => `${edge} ${by}`),
  };
}
