import { z } from 'zod';
import { contract } from './contract.ts';
import { endpoints } from './endpoints.ts';
import { dayOfWater } from './shores.ts';
import {
  calendarDay,
  clockTime,
  minutes,
  nothing,
  someText,
  tideSource,
  uuid,
  waterAxis,
} from './wire.ts';

/** A date of a plan that does not follow its pattern and rules. */
export const planException = z.strictObject({
  on: calendarDay,
  kind: z
    .enum(['skip', 'take', 'add'])
    .describe(
      'Skip a date that the rules take; take one that they refuse; add one off the pattern',
    ),
  reason: z.string().trim().max(200).nullable(),
});

/** What a plan says; a plan may narrow what its shore allows. */
export const planSettings = z
  .strictObject({
    name: someText(80).describe('Also the title of its sessions'),
    shoreId: uuid,
    pattern: someText(500).describe(
      'A recurrence rule as RFC 5545 writes it, FREQ=WEEKLY;BYDAY=SA',
    ),
    fromOn: calendarDay,
    toOn: calendarDay.describe('Included; at most two years after the first'),
    minutesBeforeLow: minutes(360),
    minutesAfterLow: minutes(360),
    daylightMarginMinutes: minutes(240),
    minimumMinutes: minutes(720).min(1),
    earliestClock: clockTime,
    latestClock: clockTime,
    lowestLevelM: z
      .number()
      .min(-5)
      .max(20)
      .nullable()
      .describe("Low water up to this height; null: the shore's working level"),
    slots: z
      .array(z.strictObject({ slotKindId: uuid, count: z.number().int().min(0).max(20) }))
      .max(20)
      .refine((slots) => slots.some(({ count }) => count > 0), {
        error: 'A session needs at least one slot',
      }),
    exceptions: z.array(planException).max(800),
  })
  .refine(({ fromOn, toOn }) => fromOn <= toOn, {
    path: ['toOn'],
    error: 'The last day comes after the first',
  })
  .refine(({ earliestClock, latestClock }) => earliestClock < latestClock, {
    path: ['latestClock'],
    error: 'The latest hour comes after the earliest',
  });

/** One date of a plan with its strip of water, taken or skipped. */
export const planDate = z.strictObject({
  on: calendarDay,
  source: z.enum(['pattern', 'added']),
  isTaken: z.boolean(),
  isByHand: z.boolean().describe('Skipped by hand, or taken although the rules refuse it'),
  handReason: z.string().nullable(),
  skippedBy: z.enum(['hand', 'closure', 'other-date', 'rules']).nullable(),
  leftMinutes: z.number().nullable().describe('From the start to off the shore, where taken'),
  isPast: z.boolean().describe('Its crew would have met already: no session is made of it'),
  mayTake: z.boolean().describe('Whether a skipped date could be taken by hand'),
  day: dayOfWater,
  sessionId: uuid.nullable().describe('The session that was made of it'),
  sessionState: z.enum(['draft', 'published', 'stood-down', 'closed']).nullable(),
});

export const planPreview = z.strictObject({
  sentence: z.string().describe('The pattern in words'),
  nextDates: z.array(calendarDay).describe('The first five dates of the pattern'),
  zone: z.string(),
  axis: waterAxis,
  source: tideSource,
  dates: z.array(planDate),
});

export const previewPlan = contract({
  ...endpoints.previewPlan,
  summary: 'Every date of a plan, taken or skipped with the reason; writes nothing',
  params: nothing,
  query: nothing,
  body: planSettings,
  reply: planPreview,
});

/** Reads a pattern back, for the field that takes any rule. */
export const readPattern = contract({
  ...endpoints.readPattern,
  summary: 'A recurrence rule as a sentence and its next five dates',
  params: nothing,
  query: nothing,
  body: z.strictObject({ pattern: z.string().max(500), fromOn: calendarDay }),
  reply: z.strictObject({
    sentence: z.string(),
    nextDates: z.array(calendarDay),
  }),
});

export const planView = z.strictObject({
  id: uuid,
  settings: z.strictObject(planSettings.shape),
  preview: planPreview,
  made: z.number().int().describe('Sessions made of it'),
  published: z.number().int(),
  mayChange: z.boolean().describe('False once sessions are made: they keep their times'),
});

export const seePlans = contract({
  ...endpoints.seePlans,
  summary: 'Every season plan, and what is needed to write one',
  params: nothing,
  query: nothing,
  body: nothing,
  reply: z.strictObject({
    plans: z.array(
      z.strictObject({
        id: uuid,
        name: z.string(),
        shoreName: z.string(),
        sentence: z.string(),
        fromOn: calendarDay,
        toOn: calendarDay,
        made: z.number().int(),
        published: z.number().int(),
      }),
    ),
    shores: z.array(
      z.strictObject({
        id: uuid,
        name: z.string(),
        zone: z.string(),
        workingLevelM: z.number(),
        minutesBeforeLow: z.number(),
        minutesAfterLow: z.number(),
        daylightMarginMinutes: z.number(),
        minimumMinutes: z.number(),
        earliestClock: clockTime,
        latestClock: clockTime,
      }),
    ),
    slotKinds: z.array(z.strictObject({ id: uuid, name: z.string() })),
    today: calendarDay,
  }),
});

const planId = z.strictObject({ planId: uuid });

export const seePlan = contract({
  ...endpoints.seePlan,
  summary: 'One season plan with its dates',
  params: planId,
  query: nothing,
  body: nothing,
  reply: planView,
});

export const keepPlan = contract({
  ...endpoints.keepPlan,
  summary: 'Save the draft of a plan; nothing is on the calendar yet',
  params: nothing,
  query: nothing,
  body: planSettings,
  reply: planView,
});

export const changePlan = contract({
  ...endpoints.changePlan,
  summary: 'Change a plan of which no session is made',
  params: planId,
  query: nothing,
  body: planSettings,
  reply: planView,
});

export const makeSessions = contract({
  ...endpoints.makeSessions,
  summary: 'Make a draft session of every taken date',
  params: planId,
  query: nothing,
  body: nothing,
  reply: planView,
});

export const publishSessions = contract({
  ...endpoints.publishSessions,
  summary: 'Publish draft sessions of a plan: people can then claim their slots',
  params: planId,
  query: nothing,
  body: z.strictObject({ sessionIds: z.array(uuid).min(1).max(800) }),
  reply: planView,
});

export type PlanSettings = z.output<typeof planSettings>;
export type PlanPreview = z.output<typeof planPreview>;
export type PlanView = z.output<typeof planView>;
export type PlanDate = z.output<typeof planDate>;
