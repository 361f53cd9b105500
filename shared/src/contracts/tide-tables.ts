import { z } from 'zod';
import { contract } from './contract.ts';
import { endpoints } from './endpoints.ts';
import { calendarDay, heightM, instant, nothing, someText, uuid } from './wire.ts';

/** Larger texts are refused before they are read; a year of tides takes under 100 kB. */
export const longestTableCharacters = 5_000_000;

/** In JSON a character of the text may take up more than one byte. */
const longestTableBody = 2 * longestTableCharacters;

/** What is uploaded or pasted, and what a person must say about it. */
export const tableText = z.strictObject({
  stationId: z.string().min(1).max(200),
  name: someText(120).describe('What the table is called, to be shown as the source'),
  zone: z
    .string()
    .min(1)
    .max(60)
    .describe("An IANA zone for local clock time, or 'UTC', or a fixed offset like '+01:00'"),
  units: z.enum(['m', 'cm', 'ft']).nullable().describe('Null: as the table itself shows'),
  dateOrder: z
    .enum(['day-first', 'month-first'])
    .nullable()
    .default(null)
    .describe('Where the table leaves it open whether 3/4 is in March or in April'),
  year: z
    .number()
    .int()
    .min(1900)
    .max(2200)
    .nullable()
    .default(null)
    .describe('For dates that are printed without a year'),
  text: z.string().max(longestTableCharacters, { error: 'This is far more than a year of tides' }),
});

const tableEvent = z.strictObject({
  at: instant,
  kind: z.enum(['high', 'low']),
  heightM,
});

/** What was read, and how it compares with the prediction. */
export const tablePreview = z.strictObject({
  eventCount: z.number().int(),
  firstOn: calendarDay.nullable(),
  lastOn: calendarDay.nullable(),
  layout: z.string().describe('What was recognised, in words'),
  problems: z.array(z.strictObject({ row: z.number().int(), message: z.string() })),
  refusal: z.string().nullable().describe('Why the whole cannot be read; null where it can'),
  comparison: z
    .strictObject({
      verdict: z.enum(['agrees', 'zone-mistake', 'datum', 'units', 'swapped', 'other-place']),
      sentence: z.string(),
      pairs: z.number().int(),
      medianMinutes: z.number(),
      worstMinutes: z.number(),
      medianM: z.number(),
      worstM: z.number(),
    })
    .nullable(),
  clockChanges: z.array(
    z.strictObject({
      on: calendarDay,
      zoneName: z.string(),
      isChangeDay: z.boolean(),
      events: z.array(tableEvent),
    }),
  ),
  movedSessions: z.array(
    z.strictObject({
      sessionId: uuid,
      title: z.string(),
      shoreName: z.string(),
      zone: z.string(),
      fromLowWaterAt: instant,
      toLowWaterAt: instant.nullable().describe('Null where the table has no low water near'),
      movedMinutes: z.number().nullable().describe('Negative when it comes earlier'),
      heightChangeM: z.number().nullable(),
      newStartsAt: instant.nullable().describe('Null where no working window is left'),
      newOffTheShoreBy: instant.nullable(),
    }),
  ),
  mayAccept: z.boolean().describe('False while the whole is refused or looks like a mistake'),
});

export const seeTables = contract({
  ...endpoints.seeTables,
  summary: 'The official tables that were uploaded',
  params: nothing,
  query: nothing,
  body: nothing,
  reply: z.strictObject({
    tables: z.array(
      z.strictObject({
        id: uuid,
        stationId: z.string(),
        stationName: z.string(),
        name: z.string(),
        zone: z.string(),
        firstOn: calendarDay,
        lastOn: calendarDay,
        eventCount: z.number().int(),
        acceptedAt: instant,
        acceptedBy: z.string().nullable(),
        takenBackAt: instant.nullable(),
      }),
    ),
    stations: z.array(
      z.strictObject({
        id: z.string(),
        name: z.string(),
        shoreNames: z.array(z.string()),
        zone: z.string(),
      }),
    ),
  }),
});

export const previewTable = contract({
  ...endpoints.previewTable,
  longestBodyBytes: longestTableBody,
  summary: 'What a table says and would change; writes nothing',
  params: nothing,
  query: nothing,
  body: tableText,
  reply: tablePreview,
});

export const acceptTable = contract({
  ...endpoints.acceptTable,
  longestBodyBytes: longestTableBody,
  summary: 'Put an official table in force for its station; sessions move only where confirmed',
  params: nothing,
  query: nothing,
  body: tableText.extend({
    leavesOutProblems: z.boolean().describe('Accept although some rows could not be read'),
    movesSessionIds: z.array(uuid).max(800).describe('Sessions whose times follow the table'),
  }),
  reply: z.strictObject({ id: uuid, moved: z.number().int() }),
});

export const takeBackTable = contract({
  ...endpoints.takeBackTable,
  summary: 'Take an official table out of force; the prediction counts again',
  params: z.strictObject({ tableId: uuid }),
  query: nothing,
  body: nothing,
  reply: z.strictObject({ id: uuid }),
});

export type TablePreview = z.output<typeof tablePreview>;
export type TableText = z.output<typeof tableText>;
