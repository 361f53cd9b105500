import { z } from 'zod';
import { contract } from './contract.ts';
import { endpoints } from './endpoints.ts';
import { slotView } from './slots.ts';
import {
  calendarDay,
  curvePoint,
  extreme,
  heightM,
  instant,
  nothing,
  tideSource,
  uuid,
  waterAxis,
} from './wire.ts';

/** Where a session stands. A draft is seen by coordinators only. */
export const sessionState = z.enum(['draft', 'published', 'stood-down', 'closed']);

/** One line of what happened to a session, newest first. */
export const trailEntry = z.strictObject({
  at: instant,
  actorName: z.string().nullable().describe('Null for the system itself'),
  action: z.enum(['session.made', 'slot.claimed', 'slot.released']),
  slotKindName: z.string().nullable(),
});

export const seeSession = contract({
  ...endpoints.seeSession,
  summary: 'One session: its water line, slots, meeting place and trail',
  params: z.strictObject({ sessionId: uuid }),
  query: nothing,
  body: nothing,
  reply: z.strictObject({
    id: uuid,
    kind: z.enum(['shore', 'training']),
    title: z.string(),
    state: sessionState,
    dayOn: calendarDay,
    shore: z.strictObject({
      id: uuid,
      name: z.string(),
      zone: z.string(),
      meetingPlace: z.string(),
      latitude: z.number(),
      longitude: z.number(),
    }),
    crewMeetsAt: instant,
    partyMeetsAt: instant,
    startsAt: instant,
    lowWaterAt: instant.nullable(),
    lowWaterHeightM: heightM.nullable(),
    lowerShoreClearBy: instant.nullable(),
    offTheShoreBy: instant.nullable(),
    endsAt: instant,
    water: z
      .strictObject({
        axis: waterAxis,
        curve: z.array(curvePoint).describe('The local day, a point every 6 minutes'),
        extremes: z.array(extreme),
        sunriseAt: instant.nullable(),
        sunsetAt: instant.nullable(),
        source: tideSource,
      })
      .nullable()
      .describe('Null where no tide data covers the day'),
    slots: z.array(slotView),
    trail: z.array(trailEntry),
  }),
});

/** The sessions and the water of a span of whole local days, for the month and the strand list. */
export const seeCalendar = contract({
  ...endpoints.seeCalendar,
  summary: 'Sessions and water from one day to another',
  params: nothing,
  query: z.strictObject({
    from: calendarDay,
    to: calendarDay.describe('The last day, included; at most 62 days after the first'),
  }),
  body: nothing,
  reply: z.strictObject({
    zone: z.string(),
    today: calendarDay,
    now: instant,
    homeShore: z
      .strictObject({
        id: uuid,
        name: z.string(),
        axis: waterAxis,
        source: tideSource,
        curve: z
          .array(curvePoint)
          .describe('A point every 30 minutes from the first midnight to the last'),
        days: z.array(
          z.strictObject({
            on: calendarDay,
            daylightLow: extreme.nullable().describe('The low water in daylight nearest to noon'),
            isUsable: z.boolean().describe('Whether a working window can be had at that low water'),
            whyNot: z
              .enum(['dark', 'too-high', 'out-of-hours', 'too-short', 'no-low-water'])
              .nullable()
              .describe('What bars it, where it is not usable'),
          }),
        ),
        tideMarks: z.array(
          z.strictObject({
            on: calendarDay,
            kind: z.enum(['springs', 'neaps']),
            rangeM: z.number(),
          }),
        ),
      })
      .nullable(),
    shores: z.array(z.strictObject({ id: uuid, name: z.string() })),
    sessions: z.array(
      z.strictObject({
        id: uuid,
        title: z.string(),
        shoreId: uuid,
        shoreName: z.string(),
        zone: z.string(),
        state: sessionState,
        dayOn: calendarDay,
        startsAt: instant,
        lowWaterAt: instant.nullable(),
        lowWaterHeightM: heightM.nullable(),
        offTheShoreBy: instant.nullable(),
        endsAt: instant,
        hasStarted: z.boolean(),
        hasEnded: z.boolean(),
        slots: z.array(
          z.strictObject({
            id: uuid,
            slotKindName: z.string(),
            state: z.enum(['gap', 'claimed', 'in-doubt']),
            isYours: z.boolean(),
            mayClaim: z.boolean().describe('Whether the reader may take this gap now'),
          }),
        ),
      }),
    ),
  }),
});

export type SessionView = z.output<typeof seeSession.reply>;
export type CalendarView = z.output<typeof seeCalendar.reply>;
export type CalendarSession = CalendarView['sessions'][number];
