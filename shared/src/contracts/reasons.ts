import { z } from 'zod';
import { calendarDay, instant, uuid } from './wire.ts';

const competency = { competencyId: uuid, competencyName: z.string(), howToGet: z.string() };
const otherSession = {
  sessionId: uuid,
  shoreName: z.string(),
  dayOn: calendarDay,
  meetsAt: instant,
  endsAt: instant,
  zone: z.string(),
};

/**
 * One reason why a person may not take a slot (R3), with the facts that a sentence about
 * it needs. Mirrors the reasons of shared/src/domain/slots/eligibility.ts.
 */
export const reasonAgainst = z.discriminatedUnion('why', [
  z.strictObject({ why: z.literal('person-not-active') }),
  z.strictObject({ why: z.literal('session-not-published') }),
  z.strictObject({ why: z.literal('session-stood-down') }),
  z.strictObject({ why: z.literal('session-started'), meetsAt: instant, zone: z.string() }),
  z.strictObject({
    why: z.literal('slot-taken'),
    holderName: z.string().nullable(),
    claimedAt: instant.nullable(),
  }),
  z.strictObject({
    why: z.literal('competency-not-held'),
    ...competency,
  }),
  z.strictObject({
    why: z.literal('competency-lapses'),
    ...competency,
    lastValidOn: calendarDay,
    neededOn: calendarDay.describe('The last local day that the session touches'),
    daysShort: z.number().int().positive(),
    hasLapsed: z.boolean().describe('Whether it has lapsed today already'),
  }),
  z.strictObject({
    why: z.literal('competency-starts-later'),
    ...competency,
    validFrom: calendarDay,
    neededOn: calendarDay.describe('The first local day that the session touches'),
  }),
  z.strictObject({ why: z.literal('under-18'), turns18On: calendarDay.nullable() }),
  z.strictObject({ why: z.literal('overlap'), ...otherSession }),
  z.strictObject({
    why: z.literal('travel-time'),
    ...otherSession,
    travelMinutes: z.number().int(),
    gapMinutes: z.number().int(),
  }),
]);

export type ReasonAgainst = z.output<typeof reasonAgainst>;
