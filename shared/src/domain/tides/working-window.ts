import { granted, refused } from '#shared/kernel/result.ts';
import type { Verdict } from '#shared/kernel/result.ts';
import type { SunDay } from '#shared/kernel/sun.ts';
import { addDays, instantOf, startOfDay } from '#shared/kernel/time.ts';
import type { CalendarDay, ClockTime, Instant } from '#shared/kernel/time.ts';
import { spanAtOrBelow } from './level-span.ts';
import type { TideCurve, TideExtreme } from './tide-curve.ts';

/** The times and margins by which a working window is cut. */
export interface WindowSettings {
  readonly beforeLowWaterMinutes: number;
  readonly afterLowWaterMinutes: number;
  /** Kept clear of sunrise and of sunset. */
  readonly daylightMarginMinutes: number;
  /** A shorter window is no session. */
  readonly minimumMinutes: number;
  readonly crewMeetsBeforeMinutes: number;
  readonly partyMeetsBeforeMinutes: number;
  /** Added to every predicted height that is held against the cut-off level. */
  readonly surgeM: number;
  /** Off the shore this long before the water reaches the cut-off level. */
  readonly cutOffMarginMinutes: number;
}

/**
 * The defaults of product rule R7. Published practice: about 2 hours before to 2 hours after low
 * water (US National Park Service, Cabrillo), on a falling tide only (University of Liverpool
 * fieldwork safety, 2019; HM Coastguard); the effect of pressure on the sea's level is seldom over
 * 0.3 m (National Oceanography Centre). The other figures are chosen here, on the careful side.
 */
export const DEFAULT_WINDOW_SETTINGS: WindowSettings = {
  beforeLowWaterMinutes: 120,
  afterLowWaterMinutes: 30,
  daylightMarginMinutes: 30,
  minimumMinutes: 90,
  crewMeetsBeforeMinutes: 45,
  partyMeetsBeforeMinutes: 20,
  surgeM: 0.3,
  cutOffMarginMinutes: 20,
};

/** What a working window of one local day is judged by. Levels are metres above chart datum. */
export interface WindowFacts {
  readonly curve: TideCurve;
  readonly on: CalendarDay;
  readonly zone: string;
  /** The sun of that day at the shore. */
  readonly sun: SunDay;
  /** Of the shore: the lower shore can be worked while the water stands at this level or below. */
  readonly workingLevelM: number;
  /** Of the shore: at this level the way off is under water. */
  readonly cutOffLevelM: number;
  /** Of the plan: it may ask for lower water than the shore does; a higher level changes nothing. */
  readonly planLevelM: number | null;
  /** Of the plan: no session before or after these hours on the clock of the zone. */
  readonly earliest: ClockTime | null;
  readonly latest: ClockTime | null;
  readonly settings: WindowSettings;
}

/** The limits of which the latest sets a window's start, the earliest its end. */
export type WindowLimit =
  'low-water-time' | 'working-level' | 'daylight' | 'hours' | 'cut-off-level';

/** Which limit set an edge of the window, and where. */
export interface WindowCut {
  readonly edge: 'start' | 'end' | 'off-the-shore';
  readonly by: WindowLimit;
  readonly at: Instant;
}

/** One low water's safe time on the shore. Instants are whole minutes, rounded to the safe side. */
export interface WorkingWindow {
  /** To the nearest minute, as tide tables give it. */
  readonly lowWaterAt: Instant;
  readonly lowWaterHeightM: number;
  readonly crewMeetsAt: Instant;
  readonly partyMeetsAt: Instant;
  readonly startsAt: Instant;
  readonly endsAt: Instant;
  /** The low water: from then on the water rises. */
  readonly lowerShoreClearBy: Instant;
  readonly offTheShoreBy: Instant;
  /** One for each edge: what set it. */
  readonly cuts: readonly WindowCut[];
}

/** Why a day has no working window; each names its low water, and the figures that decided. */
export type NoWindowReason =
  | { readonly why: 'no-low-water'; readonly on: CalendarDay }
  | {
      readonly why: 'too-high';
      readonly lowWaterAt: Instant;
      readonly lowWaterHeightM: number;
      readonly workingLevelM: number;
    }
  | {
      readonly why: 'dark';
      readonly lowWaterAt: Instant;
      /** Sunrise and sunset with their margins; null when the sun does not rise. */
      readonly lightFromAt: Instant | null;
      readonly lightToAt: Instant | null;
    }
  | {
      readonly why: 'out-of-hours';
      readonly lowWaterAt: Instant;
      readonly earliestAt: Instant | null;
      readonly latestAt: Instant | null;
    }
  | {
      readonly why: 'cut-off-at-low-water';
      readonly lowWaterAt: Instant;
      readonly lowWaterHeightM: number;
      readonly surgeM: number;
      readonly cutOffLevelM: number;
    }
  | {
      readonly why: 'off-the-shore-before-low-water';
      readonly lowWaterAt: Instant;
      readonly offTheShoreBy: Instant;
    }
  | {
      readonly why: 'too-short';
      readonly lowWaterAt: Instant;
      readonly lengthMinutes: number;
      readonly minimumMinutes: number;
      readonly cuts: readonly WindowCut[];
    };

type Cut = Omit<WindowCut, 'edge'>;

/** The limits that hold for the whole day, whatever its low waters. */
interface DayLimits {
  readonly levelM: number;
  readonly light: { readonly fromAt: Instant; readonly toAt: Instant } | null;
  readonly earliestAt: Instant | null;
  readonly latestAt: Instant | null;
}

const MINUTE_MS = 60_000;
const ALWAYS_LIGHT = { fromAt: -Infinity, toAt: Infinity };

/**
 * The working window of a local day, product rule R7: round each low water the span in which the
 * predicted height stays at or below the working level, cut to a time before and after the low, to
 * daylight with its margin, and to the plan's hours. Of two in a day the longer, then the earlier.
 *
 * On the safe side of the rule, the window also opens only when the falling water with the surge
 * added has left the cut-off level, and the time until everyone is off the shore must itself have
 * the minimum length and reach to the low water; else the low water is refused.
 *
 * A refusal names every cut that stood against each low water of the day, with its figures.
 */
export function workingWindow(facts: WindowFacts): Verdict<WorkingWindow, NoWindowReason> {
  const { curve, on, zone } = facts;
  const limits = dayLimits(facts);
  const verdicts = curve
    .extremes(startOfDay(on, zone), startOfDay(addDays(on, 1), zone))
    .filter(({ kind }) => kind === 'low')
    .map((low) => windowRound(low, facts, limits));
  let best: WorkingWindow | undefined;
  const reasons: NoWindowReason[] = [];
  for (const verdict of verdicts) {
    if (!verdict.isGranted) reasons.push(...verdict.reasons);
    else if (best === undefined || lengthMs(verdict.value) > lengthMs(best)) best = verdict.value;
  }
  if (best !== undefined) return granted(best);
  const [first, ...rest] = reasons;
  return first === undefined ? refused({ why: 'no-low-water', on }) : refused(first, ...rest);
}

/** When crew and party meet for a session that starts then (product rule R7). */
export function meetingTimes(
  startsAt: Instant,
  settings: WindowSettings,
): { readonly crewMeetsAt: Instant; readonly partyMeetsAt: Instant } {
  return {
    crewMeetsAt: startsAt - settings.crewMeetsBeforeMinutes * MINUTE_MS,
    partyMeetsAt: startsAt - settings.partyMeetsBeforeMinutes * MINUTE_MS,
  };
}

function dayLimits(facts: WindowFacts): DayLimits {
  const { on, zone, sun, settings, earliest, latest } = facts;
  const marginMs = settings.daylightMarginMinutes * MINUTE_MS;
  const isWithoutLight = sun.sunriseAt === null || sun.sunsetAt === null;
  const light = isWithoutLight
    ? null
    : {
        fromAt: sun.sunriseAt + marginMs,
        toAt: sun.sunsetAt - marginMs,
      };
  return {
    levelM: Math.min(facts.workingLevelM, facts.planLevelM ?? Infinity),
    light: sun.isUpAllDay ? ALWAYS_LIGHT : light,
    earliestAt: earliest === null ? null : instantOf(on, earliest, zone),
    latestAt: latest === null ? null : instantOf(on, latest, zone),
  };
}

function windowRound(
  low: TideExtreme,
  facts: WindowFacts,
  limits: DayLimits,
): Verdict<WorkingWindow, NoWindowReason> {
  const { settings, cutOffLevelM } = facts;
  const lowWaterAt = Math.round(low.at / MINUTE_MS) * MINUTE_MS;
  const [outside, ...furtherOutside] = reasonsOutside(low, lowWaterAt, facts, limits);
  if (outside !== undefined) return refused(outside, ...furtherOutside);

  const reachFromAt = lowWaterAt - settings.beforeLowWaterMinutes * MINUTE_MS;
  const reachToAt = lowWaterAt + settings.afterLowWaterMinutes * MINUTE_MS;
  const marginMs = settings.cutOffMarginMinutes * MINUTE_MS;
  const worked = spanAtOrBelow(facts.curve, low, limits.levelM, reachFromAt, reachToAt);
  const open = spanAtOrBelow(
    facts.curve,
    low,
    cutOffLevelM - settings.surgeM,
    reachFromAt,
    reachToAt + marginMs,
  );
  const start = latestOf([
    { by: 'low-water-time', at: reachFromAt },
    { by: 'working-level', at: worked.fromAt },
    { by: 'daylight', at: limits.light?.fromAt ?? -Infinity },
    { by: 'hours', at: limits.earliestAt ?? -Infinity },
    { by: 'cut-off-level', at: open.fromAt },
  ]);
  const end = earliestOf([
    { by: 'low-water-time', at: reachToAt },
    { by: 'working-level', at: worked.toAt },
    { by: 'daylight', at: limits.light?.toAt ?? Infinity },
    { by: 'hours', at: limits.latestAt ?? Infinity },
  ]);
  // The span's end is only a crossing of the level where it falls short of what was searched.
  const off = earliestOf([end, { by: 'cut-off-level', at: open.toAt - marginMs }]);
  const cuts: WindowCut[] = [
    { edge: 'start', ...start },
    { edge: 'end', ...end },
    { edge: 'off-the-shore', ...off },
  ];

  const reasons: NoWindowReason[] = [];
  if (off.at < lowWaterAt) {
    reasons.push({ why: 'off-the-shore-before-low-water', lowWaterAt, offTheShoreBy: off.at });
  }
  const lengthMinutes = Math.max(0, (off.at - start.at) / MINUTE_MS);
  if (lengthMinutes < settings.minimumMinutes) {
    const { minimumMinutes } = settings;
    reasons.push({ why: 'too-short', lowWaterAt, lengthMinutes, minimumMinutes, cuts });
  }
  const [first, ...rest] = reasons;
  if (first !== undefined) return refused(first, ...rest);
  return granted({
    lowWaterAt,
    lowWaterHeightM: low.heightM,
    ...meetingTimes(start.at, settings),
    startsAt: start.at,
    endsAt: end.at,
    lowerShoreClearBy: lowWaterAt,
    offTheShoreBy: off.at,
    cuts,
  });
}

/** Every limit outside which the low water itself lies. */
function reasonsOutside(
  low: TideExtreme,
  lowWaterAt: Instant,
  { settings, cutOffLevelM }: WindowFacts,
  { levelM, light, earliestAt, latestAt }: DayLimits,
): NoWindowReason[] {
  const reasons: NoWindowReason[] = [];
  const lowWaterHeightM = low.heightM;
  if (!(lowWaterHeightM <= levelM)) {
    reasons.push({ why: 'too-high', lowWaterAt, lowWaterHeightM, workingLevelM: levelM });
  }
  if (light === null || lowWaterAt < light.fromAt || lowWaterAt > light.toAt) {
    const lightFromAt = light?.fromAt ?? null;
    reasons.push({ why: 'dark', lowWaterAt, lightFromAt, lightToAt: light?.toAt ?? null });
  }
  if (lowWaterAt < (earliestAt ?? -Infinity) || lowWaterAt > (latestAt ?? Infinity)) {
    reasons.push({ why: 'out-of-hours', lowWaterAt, earliestAt, latestAt });
  }
  const { surgeM } = settings;
  if (!(lowWaterHeightM + surgeM < cutOffLevelM)) {
    const why = 'cut-off-at-low-water';
    reasons.push({ why, lowWaterAt, lowWaterHeightM, surgeM, cutOffLevelM });
  }
  return reasons;
}

function lengthMs(window: WorkingWindow): number {
  return window.endsAt - window.startsAt;
}

/** The limit that lets in last, its instant rounded up to a whole minute. */
function latestOf(limits: readonly [Cut, ...Cut[]]): Cut {
  const last = limits.reduce((latest, limit) => (limit.at > latest.at ? limit : latest));
  return { by: last.by, at: Math.ceil(last.at / MINUTE_MS) * MINUTE_MS };
}

/** The limit that lets out first, its instant rounded down to a whole minute. */
function earliestOf(limits: readonly [Cut, ...Cut[]]): Cut {
  const first = limits.reduce((earliest, limit) => (limit.at < earliest.at ? limit : earliest));
  return { by: first.by, at: Math.floor(first.at / MINUTE_MS) * MINUTE_MS };
}
