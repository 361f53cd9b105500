import type { z } from 'zod';
import {
  findStations,
  noWindowReason,
  previewShore,
  seeShore,
  seeShores,
} from '#shared/contracts/shores.ts';
import type { NoWindowView, ShoreSettings, ShoreView } from '#shared/contracts/shores.ts';
import type { CalendarDay } from '#shared/kernel/time.ts';
import { addDays, startOfDay, toIso } from '#shared/kernel/time.ts';
import { account, idOf, zone } from './made-up-replies.ts';
import { madeUpCurve, madeUpLows, madeUpNoonLow } from './made-up-tide.ts';

/** Replies about invented shores, each parsed by its own contract. */
const MINUTE_MS = 60_000;

/** The account of somebody who may change shores and tide tables. */
export function coordinator() {
  return account({ id: idOf(4), name: 'Ines Thackeray', roles: ['coordinator'] });
}

export const source = {
  stationId: 'made-up/outer-skerrow',
  stationName: 'Outer Skerrow',
  latitude: 54.61,
  longitude: -1.14,
  datum: 'LAT',
  attribution: 'Invented for these pages.',
  table: null,
};

export const settings: ShoreSettings = {
  name: 'Gull Ledges',
  zone,
  latitude: 54.6,
  longitude: -1.1,
  tideStationId: source.stationId,
  differences: {
    high: { laterMinutes: 5, higherM: 0 },
    low: { laterMinutes: 10, higherM: -0.1 },
  },
  workingLevelM: 1.3,
  cutOffLevelM: 2.4,
  minutesBeforeLow: 120,
  minutesAfterLow: 30,
  daylightMarginMinutes: 30,
  minimumMinutes: 90,
  earliestClock: '07:00',
  latestClock: '18:00',
  crewMeetsMinutes: 45,
  partyMeetsMinutes: 20,
  meetingPlace: 'Blue hut at the head of the slipway',
  hazards: 'The gully fills first',
  waysOff: 'The slip, or the iron ladder',
  phoneSignal: 'One bar by the hut',
  emergencyWords: 'Ring the coastguard and say Gull Ledges',
  ratioPreset: 'families',
};

export const shoreId = idOf(11);

export function shore(changes: Partial<ShoreView> = {}): ShoreView {
  return seeShore.reply.parse({
    id: shoreId,
    settings,
    source,
    tableYears: [],
    mayChange: true,
    ...changes,
  });
}

export function shores(mayMake: boolean) {
  return seeShores.reply.parse({
    shores: [
      { id: shoreId, name: 'Gull Ledges', zone, source, nextUsableOn: '2027-05-06' },
      { id: idOf(12), name: 'Kettle Reef', zone, source: null, nextUsableOn: null },
    ],
    mayMake,
  });
}

export function stations() {
  return findStations.reply.parse({
    stations: [
      { ...source, distanceKm: 3.4, licence: 'cc-by-4.0', zone },
      {
        ...source,
        stationId: 'made-up/inner-skerrow',
        stationName: 'Inner Skerrow',
        latitude: 54.7,
        datum: 'MLLW',
        distanceKm: 12.2,
        licence: 'public-domain',
        zone,
      },
    ],
  });
}

/** The preview of a day: with a window round its low water, or with reasons against one. */
export function preview(on: CalendarDay, reasons: readonly NoWindowView[] = []) {
  const low = madeUpNoonLow(on, zone);
  const after = (minutes: number): string => toIso(low.at + minutes * MINUTE_MS);
  const fromAt = startOfDay(on, zone);
  return previewShore.reply.parse({
    day: {
      on,
      axis: { bottomM: 0.07, topM: 5.87 },
      curve: madeUpCurve(fromAt, startOfDay(addDays(on, 1), zone), 15).map((point) => ({
        at: toIso(point.at),
        heightM: point.heightM,
      })),
      extremes: madeUpLows(on, zone).map(({ at, heightM }) => ({
        at: toIso(at),
        kind: 'low',
        heightM,
      })),
      sunriseAt: toIso(fromAt + 5 * 60 * MINUTE_MS),
      sunsetAt: toIso(fromAt + 20.5 * 60 * MINUTE_MS),
      window:
        reasons.length > 0
          ? null
          : {
              lowWaterAt: after(0),
              lowWaterHeightM: low.heightM,
              crewMeetsAt: after(-165),
              partyMeetsAt: after(-140),
              startsAt: after(-120),
              lowerShoreClearBy: after(0),
              offTheShoreBy: after(30),
              endsAt: after(30),
              cuts: [],
            },
      reasons,
    },
    source,
    usableDays: 214,
  });
}

export function reason(one: z.input<typeof noWindowReason>): NoWindowView {
  return noWindowReason.parse(one);
}
