import { z } from 'zod';
import { isZone } from '../kernel/time.ts';
import { contract } from './contract.ts';
import { endpoints } from './endpoints.ts';
import {
  calendarDay,
  clockTime,
  curvePoint,
  extreme,
  heightM,
  instant,
  minutes,
  nothing,
  someText,
  tideSource,
  uuid,
  waterAxis,
} from './wire.ts';

/** How high or low water at the shore differs from its tide station. */
const difference = z.strictObject({
  laterMinutes: z.number().int().min(-360).max(360).describe('Earlier if negative'),
  higherM: z.number().min(-10).max(10).describe('Lower if negative'),
});

const zone = z.string().refine(isZone, { error: 'Write a time zone like Europe/London' });
const latitude = z.number().min(-90).max(90);
const longitude = z.number().min(-180).max(180);
const levelM = z.number().min(-5).max(20).describe('Metres above chart datum');

/** What decides which days and hours a shore can be worked. */
export const shoreWaterSettings = z.strictObject({
  zone,
  latitude,
  longitude,
  tideStationId: z.string().min(1).max(200),
  differences: z.strictObject({ high: difference, low: difference }),
  workingLevelM: levelM,
  cutOffLevelM: levelM,
  minutesBeforeLow: minutes(360),
  minutesAfterLow: minutes(360),
  daylightMarginMinutes: minutes(240),
  minimumMinutes: minutes(720).min(1),
  earliestClock: clockTime,
  latestClock: clockTime,
  crewMeetsMinutes: minutes(240),
  partyMeetsMinutes: minutes(240),
});

/** The adults that a party needs: by one of three presets (product rule R6). */
export const ratioPreset = z.enum(['schools', 'families', 'strict']);

/** Everything that is set up of a shore. */
export const shoreSettings = shoreWaterSettings
  .extend({
    name: someText(80),
    meetingPlace: someText(500),
    hazards: z.string().max(2000),
    waysOff: z.string().max(2000),
    phoneSignal: z.string().max(500),
    emergencyWords: z.string().max(1000),
    ratioPreset,
  })
  .refine(({ earliestClock, latestClock }) => earliestClock < latestClock, {
    path: ['latestClock'],
    error: 'The latest hour comes after the earliest',
  });

/** A tide station to choose from. */
export const stationChoice = tideSource.extend({
  distanceKm: z.number().nonnegative(),
  licence: z.string(),
  zone: z.string(),
});

export const shoreView = z.strictObject({
  id: uuid,
  settings: z.strictObject(shoreSettings.shape),
  source: tideSource.nullable().describe('Null where the tide station can no longer be used'),
  tableYears: z.array(z.number().int()).describe('Years for which an official table is in force'),
  mayChange: z.boolean(),
});

export const seeShores = contract({
  ...endpoints.seeShores,
  summary: 'Every shore, the home shore first',
  params: nothing,
  query: nothing,
  body: nothing,
  reply: z.strictObject({
    shores: z.array(
      z.strictObject({
        id: uuid,
        name: z.string(),
        zone: z.string(),
        source: tideSource.nullable(),
        nextUsableOn: calendarDay.nullable().describe('Within the coming 60 days'),
      }),
    ),
    mayMake: z.boolean(),
  }),
});

export const seeShore = contract({
  ...endpoints.seeShore,
  summary: 'One shore with its settings',
  params: z.strictObject({ shoreId: uuid }),
  query: nothing,
  body: nothing,
  reply: shoreView,
});

export const makeShore = contract({
  ...endpoints.makeShore,
  summary: 'Add a shore',
  params: nothing,
  query: nothing,
  body: shoreSettings,
  reply: shoreView,
});

export const changeShore = contract({
  ...endpoints.changeShore,
  summary: 'Change the settings of a shore; sessions that are made keep their times',
  params: z.strictObject({ shoreId: uuid }),
  query: nothing,
  body: shoreSettings,
  reply: shoreView,
});

export const findStations = contract({
  ...endpoints.findStations,
  summary: 'The nearest tide stations that may be used',
  params: nothing,
  query: z.strictObject({
    latitude: z.coerce.number().min(-90).max(90),
    longitude: z.coerce.number().min(-180).max(180),
  }),
  body: nothing,
  reply: z.strictObject({ stations: z.array(stationChoice) }),
});

/** Which limit set an edge of a working window. */
export const windowCut = z.strictObject({
  edge: z.enum(['start', 'end', 'off-the-shore']),
  by: z.enum(['low-water-time', 'working-level', 'daylight', 'hours', 'cut-off-level']),
  at: instant,
});

export const workingWindowView = z.strictObject({
  lowWaterAt: instant,
  lowWaterHeightM: heightM,
  crewMeetsAt: instant,
  partyMeetsAt: instant,
  startsAt: instant,
  lowerShoreClearBy: instant,
  offTheShoreBy: instant,
  endsAt: instant,
  cuts: z.array(windowCut),
});

/** Why a low water of a day gives no working window, with the figures that decided. */
export const noWindowReason = z.discriminatedUnion('why', [
  z.strictObject({ why: z.literal('no-low-water'), on: calendarDay }),
  z.strictObject({
    why: z.literal('too-high'),
    lowWaterAt: instant,
    lowWaterHeightM: heightM,
    workingLevelM: heightM,
  }),
  z.strictObject({
    why: z.literal('dark'),
    lowWaterAt: instant,
    lightFromAt: instant.nullable(),
    lightToAt: instant.nullable(),
  }),
  z.strictObject({
    why: z.literal('out-of-hours'),
    lowWaterAt: instant,
    earliestAt: instant.nullable(),
    latestAt: instant.nullable(),
  }),
  z.strictObject({
    why: z.literal('cut-off-at-low-water'),
    lowWaterAt: instant,
    lowWaterHeightM: heightM,
    surgeM: z.number(),
    cutOffLevelM: heightM,
  }),
  z.strictObject({
    why: z.literal('off-the-shore-before-low-water'),
    lowWaterAt: instant,
    offTheShoreBy: instant,
  }),
  z.strictObject({
    why: z.literal('too-short'),
    lowWaterAt: instant,
    lengthMinutes: z.number(),
    minimumMinutes: z.number(),
    cuts: z.array(windowCut),
  }),
]);

/** The water of a local day with what it is good for. */
export const dayOfWater = z.strictObject({
  on: calendarDay,
  axis: waterAxis,
  curve: z.array(curvePoint),
  extremes: z.array(extreme),
  sunriseAt: instant.nullable(),
  sunsetAt: instant.nullable(),
  window: workingWindowView.nullable(),
  reasons: z.array(noWindowReason).describe('Empty where there is a window'),
});

export const previewShore = contract({
  ...endpoints.previewShore,
  summary: 'What settings would mean on a day and over the year ahead; writes nothing',
  params: nothing,
  query: nothing,
  body: z.strictObject({
    settings: shoreWaterSettings,
    on: calendarDay.nullable().describe('Null: the next day with a window, else today'),
  }),
  reply: z.strictObject({
    day: dayOfWater,
    source: tideSource,
    usableDays: z.number().int().describe('Days with a working window in the year ahead'),
  }),
});

export type ShoreSettings = z.output<typeof shoreSettings>;
export type ShoreView = z.output<typeof shoreView>;
export type DayOfWater = z.output<typeof dayOfWater>;
export type NoWindowView = z.output<typeof noWindowReason>;
export type WorkingWindowView = z.output<typeof workingWindowView>;
