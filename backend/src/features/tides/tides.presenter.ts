import type { z } from 'zod';
import type { curvePoint, extreme, tideSource, waterAxis } from '#shared/contracts/wire.ts';
import type { DayOfWater, NoWindowView, WorkingWindowView } from '#shared/contracts/shores.ts';
import { windowOn } from '#shared/domain/tides/shore-water.ts';
import type { ShoreRules } from '#shared/domain/tides/shore-water.ts';
import type { TideExtreme, TideHeight } from '#shared/domain/tides/tide-curve.ts';
import type {
  NoWindowReason,
  WindowCut,
  WorkingWindow,
} from '#shared/domain/tides/working-window.ts';
import { sunOn } from '#shared/kernel/sun.ts';
import type { CalendarDay, Instant } from '#shared/kernel/time.ts';
import { addDays, startOfDay, toIso } from '#shared/kernel/time.ts';
import type { ShoreTide } from './tides.reader.ts';

/** Drawings begin this far under the lowest astronomical tide. */
const floorM = 0.3;

/** A millimetre is finer than any drawing or sentence needs. */
export function presentHeightM(heightM: number): number {
  return Math.round(heightM * 1000) / 1000;
}

export function presentCurve(points: readonly TideHeight[]): z.input<typeof curvePoint>[] {
  return points.map(({ at, heightM }) => ({ at: toIso(at), heightM: presentHeightM(heightM) }));
}

export function presentExtreme(one: TideExtreme): z.input<typeof extreme> {
  return { at: toIso(one.at), kind: one.kind, heightM: presentHeightM(one.heightM) };
}

export function presentAxis(shore: {
  readonly lowestTideM: number;
  readonly highestTideM: number;
}): z.input<typeof waterAxis> {
  return {
    bottomM: presentHeightM(shore.lowestTideM - floorM),
    topM: presentHeightM(shore.highestTideM),
  };
}

export function presentSource(
  { station, tables }: Pick<ShoreTide, 'station' | 'tables'>,
  fromAt: Instant,
  toAt: Instant,
): z.input<typeof tideSource> {
  const inForce = tables.filter(({ firstAt, lastAt }) => firstAt < toAt && fromAt < lastAt);
  return {
    stationId: station.id,
    stationName: station.name,
    latitude: station.latitude,
    longitude: station.longitude,
    datum: station.datum,
    attribution: station.attribution,
    table: inForce.length === 0 ? null : inForce.map(({ name }) => name).join(', '),
  };
}

const stripStepMinutes = 15;

/** The water of a local day with its working window, or why it has none. */
export function presentDayOfWater(
  rules: ShoreRules,
  { curve }: Pick<ShoreTide, 'curve'>,
  axis: z.input<typeof waterAxis>,
  on: CalendarDay,
  window = windowOn(rules, curve, on),
): DayOfWater {
  const fromAt = startOfDay(on, rules.zone);
  const toAt = startOfDay(addDays(on, 1), rules.zone);
  const heights = curve.series(fromAt, toAt, stripStepMinutes);
  const sun = sunOn(on, rules.latitude, rules.longitude, rules.zone);
  return {
    on,
    axis,
    curve: presentCurve(heights),
    extremes: curve.extremes(fromAt, toAt).map(presentExtreme),
    sunriseAt: sun.sunriseAt === null ? null : toIso(sun.sunriseAt),
    sunsetAt: sun.sunsetAt === null ? null : toIso(sun.sunsetAt),
    window: window.isGranted ? presentWindow(window.value) : null,
    reasons: window.isGranted ? [] : window.reasons.map(presentNoWindow),
  };
}

export function presentWindow(window: WorkingWindow): WorkingWindowView {
  return {
    lowWaterAt: toIso(window.lowWaterAt),
    lowWaterHeightM: presentHeightM(window.lowWaterHeightM),
    crewMeetsAt: toIso(window.crewMeetsAt),
    partyMeetsAt: toIso(window.partyMeetsAt),
    startsAt: toIso(window.startsAt),
    lowerShoreClearBy: toIso(window.lowerShoreClearBy),
    offTheShoreBy: toIso(window.offTheShoreBy),
    endsAt: toIso(window.endsAt),
    cuts: window.cuts.map(presentCut),
  };
}

function presentCut({ edge, by, at }: WindowCut): WorkingWindowView['cuts'][number] {
  return { edge, by, at: toIso(at) };
}

export function presentNoWindow(reason: NoWindowReason): NoWindowView {
  const isoOrNull = (at: Instant | null): string | null => (at === null ? null : toIso(at));
  if (reason.why === 'no-low-water') return { why: reason.why, on: reason.on };
  const lowWaterAt = toIso(reason.lowWaterAt);
  switch (reason.why) {
    case 'too-high':
      return {
        why: reason.why,
        lowWaterAt,
        lowWaterHeightM: presentHeightM(reason.lowWaterHeightM),
        workingLevelM: reason.workingLevelM,
      };
    case 'dark':
      return {
        why: reason.why,
        lowWaterAt,
        lightFromAt: isoOrNull(reason.lightFromAt),
        lightToAt: isoOrNull(reason.lightToAt),
      };
    case 'out-of-hours':
      return {
        why: reason.why,
        lowWaterAt,
        earliestAt: isoOrNull(reason.earliestAt),
        latestAt: isoOrNull(reason.latestAt),
      };
    case 'cut-off-at-low-water':
      return {
        why: reason.why,
        lowWaterAt,
        lowWaterHeightM: presentHeightM(reason.lowWaterHeightM),
        surgeM: reason.surgeM,
        cutOffLevelM: reason.cutOffLevelM,
      };
    case 'off-the-shore-before-low-water':
      return { why: reason.why, lowWaterAt, offTheShoreBy: toIso(reason.offTheShoreBy) };
    case 'too-short':
      return {
        why: reason.why,
        lowWaterAt,
        lengthMinutes: reason.lengthMinutes,
        minimumMinutes: reason.minimumMinutes,
        cuts: reason.cuts.map(presentCut),
      };
  }
}
