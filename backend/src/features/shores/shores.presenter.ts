import type { z } from 'zod';
import {
  presentAxis,
  presentDayOfWater,
  presentSource,
} from '#backend/features/tides/tides.presenter.ts';
import type { ShoreTide, TableInForce } from '#backend/features/tides/tides.reader.ts';
import type { StationNearby } from '#backend/platform/tides/tide-stations.ts';
import type {
  findStations,
  previewShore as previewContract,
  seeShores,
  ShoreSettings,
  ShoreView,
} from '#shared/contracts/shores.ts';
import type { CalendarDay, Instant } from '#shared/kernel/time.ts';
import { addDays, startOfDay, yearOf, dayAt } from '#shared/kernel/time.ts';
import type { ShoreRules } from '#shared/domain/tides/shore-water.ts';
import type { ShorePreview } from './preview-shore.ts';
import type { ShoreWish } from './save-shore.ts';
import type { Shore } from './shores.reader.ts';

/** The settings of the wire as the shore that they wish for. */
export function shoreWish(settings: ShoreSettings): ShoreWish {
  const { high, low } = settings.differences;
  return {
    ...settings,
    differences: { high: { ...high, heightFactor: 1 }, low: { ...low, heightFactor: 1 } },
  };
}

export function presentShore(
  shore: Shore,
  tide: ShoreTide | null,
  now: Instant,
  mayChange: boolean,
): ShoreView {
  const { differences } = shore;
  return {
    id: shore.id,
    settings: {
      name: shore.name,
      zone: shore.zone,
      latitude: shore.latitude,
      longitude: shore.longitude,
      tideStationId: shore.tideStationId,
      differences: {
        high: {
          laterMinutes: differences.high.laterMinutes,
          higherM: differences.high.higherM,
        },
        low: { laterMinutes: differences.low.laterMinutes, higherM: differences.low.higherM },
      },
      workingLevelM: shore.workingLevelM,
      cutOffLevelM: shore.cutOffLevelM,
      minutesBeforeLow: shore.minutesBeforeLow,
      minutesAfterLow: shore.minutesAfterLow,
      daylightMarginMinutes: shore.daylightMarginMinutes,
      minimumMinutes: shore.minimumMinutes,
      earliestClock: shore.earliestClock,
      latestClock: shore.latestClock,
      crewMeetsMinutes: shore.crewMeetsMinutes,
      partyMeetsMinutes: shore.partyMeetsMinutes,
      meetingPlace: shore.meetingPlace,
      hazards: shore.hazards,
      waysOff: shore.waysOff,
      phoneSignal: shore.phoneSignal,
      emergencyWords: shore.emergencyWords,
      ratioPreset: shore.ratioPreset,
    },
    source: tide === null ? null : presentSource(tide, now, now),
    tableYears: tide === null ? [] : yearsOf(tide.tables, shore.zone),
    mayChange,
  };
}

function yearsOf(tables: readonly TableInForce[], zone: string): number[] {
  const middle = ({ firstAt, lastAt }: TableInForce): number => (firstAt + lastAt) / 2;
  return [...new Set(tables.map((table) => yearOf(dayAt(middle(table), zone))))];
}

export function presentShores(
  shores: readonly {
    readonly shore: Shore;
    readonly tide: ShoreTide | null;
    readonly nextUsableOn: CalendarDay | null;
  }[],
  now: Instant,
  mayMake: boolean,
): z.input<typeof seeShores.reply> {
  return {
    shores: shores.map(({ shore, tide, nextUsableOn }) => ({
      id: shore.id,
      name: shore.name,
      zone: shore.zone,
      source: tide === null ? null : presentSource(tide, now, now),
      nextUsableOn,
    })),
    mayMake,
  };
}

export function presentPreview(
  rules: ShoreRules,
  { tide, range, on, usableDays }: ShorePreview,
): z.input<typeof previewContract.reply> {
  return {
    day: presentDayOfWater(rules, tide, presentAxis(range), on),
    source: presentSource(tide, startOfDay(on, rules.zone), startOfDay(addDays(on, 1), rules.zone)),
    usableDays,
  };
}

export function presentStations(
  nearby: readonly StationNearby[],
): z.input<typeof findStations.reply> {
  return {
    stations: nearby.map(({ station, distanceKm }) => ({
      ...presentSource({ station, tables: [] }, 0, 0),
      distanceKm: Math.round(distanceKm * 10) / 10,
      licence: station.licence,
      zone: station.zone,
    })),
  };
}
