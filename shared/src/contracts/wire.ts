import { z } from 'zod';
import type { CalendarDay, ClockTime } from '../kernel/time.ts';
import { isCalendarDay, isClockTime } from '../kernel/time.ts';

/** Nothing in this place of a request. */
export const nothing = z.strictObject({});

/** An instant on the wire: ISO 8601 in UTC, with milliseconds. */
export const instant = z.iso.datetime().describe('An instant, ISO 8601 in UTC');

/** A calendar day on the wire: YYYY-MM-DD, a day that exists. */
export const calendarDay = z
  .custom<CalendarDay>((value) => typeof value === 'string' && isCalendarDay(value), {
    error: 'Write a day that exists, like 2027-05-09',
  })
  .meta({ type: 'string', format: 'date', description: 'A calendar day, YYYY-MM-DD' });

export const uuid = z.uuid();

/** A height above the chart datum of the shore's tide source, in metres. */
export const heightM = z.number().describe('Metres above chart datum');

/** One point of a water curve. */
export const curvePoint = z.strictObject({ at: instant, heightM });

/** One high or low water. */
export const extreme = z.strictObject({ at: instant, kind: z.enum(['high', 'low']), heightM });

/** Where a prediction comes from and what it is measured from, to be shown with it. */
export const tideSource = z.strictObject({
  stationId: z.string(),
  stationName: z.string(),
  latitude: z.number(),
  longitude: z.number(),
  datum: z.string().describe('What heights are measured from, for example LAT or MLLW'),
  attribution: z.string(),
  table: z
    .string()
    .nullable()
    .describe('What an official table in force for the shown days is called; null: predicted'),
});

/** The vertical axis of a shore's drawings: lowest astronomical tide less 0.3 m, to the highest. */
export const waterAxis = z.strictObject({ bottomM: heightM, topM: heightM });

/** A time on the clock, HH:MM. */
export const clockTime = z
  .custom<ClockTime>((value) => typeof value === 'string' && isClockTime(value), {
    error: 'Write a time like 07:30',
  })
  .meta({ type: 'string', description: 'A time on the clock, HH:MM' });

/** Whole minutes from 0 to a largest number. */
export function minutes(most: number) {
  return z.number().int().min(0).max(most);
}

/** Text that says something, at most so many characters, without space at its ends. */
export function someText(most: number) {
  return z.string().trim().min(1, { error: 'Write something here' }).max(most);
}
