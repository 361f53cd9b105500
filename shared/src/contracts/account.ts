import { z } from 'zod';
import { roles } from '../policy/policy.ts';
import type { Contract } from './contract.ts';
import { contract } from './contract.ts';
import { endpoints } from './endpoints.ts';
import {
  curvePoint,
  extreme,
  heightM,
  instant,
  nothing,
  tideSource,
  uuid,
  waterAxis,
} from './wire.ts';

/** Who is signed in, and what every page needs to know. */
export const seeAccount = contract({
  ...endpoints.seeAccount,
  summary: 'Who is signed in, and the group',
  params: nothing,
  query: nothing,
  body: nothing,
  reply: z.strictObject({
    group: z.strictObject({ name: z.string(), zone: z.string() }),
    now: instant.describe("The server's clock"),
    person: z
      .strictObject({ id: uuid, name: z.string(), roles: z.array(z.enum(roles)) })
      .nullable(),
    homeShoreToday: z
      .strictObject({
        shoreName: z.string(),
        zone: z.string(),
        lowWater: extreme.nullable().describe('The low water of today nearest to noon'),
        axis: waterAxis,
        curve: z.array(curvePoint),
      })
      .nullable(),
  }),
});

/** Ends the sign-in here; the browser then goes to `goTo` to end it at the provider too. */
export const signOut = contract({
  ...endpoints.signOut,
  summary: 'Sign out here and at the provider',
  params: nothing,
  query: nothing,
  body: nothing,
  reply: z.strictObject({ goTo: z.string() }),
});

/** What anybody may see before signing in: the group, its shores, the next open session. */
export const seeFrontDoor = contract({
  ...endpoints.seeFrontDoor,
  summary: 'The group, its shores and the next open session',
  params: nothing,
  query: nothing,
  body: nothing,
  reply: z.strictObject({
    group: z.strictObject({ name: z.string(), zone: z.string() }),
    shoreNames: z.array(z.string()),
    nextSession: z
      .strictObject({
        shoreName: z.string(),
        zone: z.string(),
        state: z.enum(['on', 'stood-down']),
        partyMeetsAt: instant,
        startsAt: instant,
        lowWaterAt: instant,
        lowWaterHeightM: heightM,
        offTheShoreBy: instant,
        axis: waterAxis,
        curve: z.array(curvePoint),
      })
      .nullable(),
    fortnight: z
      .strictObject({
        zone: z.string(),
        axis: waterAxis,
        source: tideSource,
        curve: z.array(curvePoint).describe('The home shore from local midnight, 14 days'),
        sessions: z.array(
          z.strictObject({ startsAt: instant, lowWaterAt: instant, offTheShoreBy: instant }),
        ),
        springs: z.array(z.strictObject({ at: instant, rangeM: z.number() })),
        neaps: z.array(z.strictObject({ at: instant, rangeM: z.number() })),
      })
      .nullable(),
  }),
});

/** Sends the browser to the group's sign-in page. */
export const beginSignIn = {
  method: 'get',
  path: '/auth/sign-in',
  summary: "Go to the group's sign-in page",
  answer: 'redirect',
  params: nothing,
  query: z.object({
    returnTo: z
      .string()
      .regex(/^\/(?![/\\])/)
      .catch('/')
      .describe('The page of this site to come back to; anything else counts as the first page'),
  }),
  body: nothing,
  reply: nothing,
} as const satisfies Contract;

/** Where the group's sign-in page sends the browser back to. */
export const finishSignIn = {
  method: 'get',
  path: '/auth/callback',
  summary: "Come back from the group's sign-in page",
  answer: 'redirect',
  params: nothing,
  query: z.object({}),
  body: nothing,
  reply: nothing,
} as const satisfies Contract;

/** Why somebody who signed in at the provider is not let in. */
export const signInRefusals = [
  'not-invited',
  'email-not-verified',
  'paused',
  'other-identity',
  'failed',
] as const;
export type SignInRefusal = (typeof signInRefusals)[number];
