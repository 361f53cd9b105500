import { z } from 'zod';
import { contract } from './contract.ts';
import { endpoints } from './endpoints.ts';
import { reasonAgainst } from './reasons.ts';
import { calendarDay, instant, nothing, uuid } from './wire.ts';

/** Whether the server would grant a claim now, and if not, every reason. */
export const claimVerdict = z.discriminatedUnion('isGranted', [
  z.strictObject({ isGranted: z.literal(true) }),
  z.strictObject({ isGranted: z.literal(false), reasons: z.array(reasonAgainst).min(1) }),
]);

/** How the reader stands in one competency today, and whether they are current on a session's days. */
export const standing = z.strictObject({
  competencyId: uuid,
  competencyName: z.string(),
  isCurrent: z.boolean().describe('On every local day of the session'),
  lastValidOn: calendarDay.nullable(),
  shareLeft: z
    .number()
    .min(0)
    .max(1)
    .nullable()
    .describe('Share of the validity left today; null without an end, or where none counts'),
  noticeShare: z
    .number()
    .min(0)
    .max(1)
    .nullable()
    .describe('Notice days as a share of the validity'),
  state: z.enum(['current', 'renew-by', 'lapsed', 'not-held']).describe('Today'),
});

/** One slot of a session as its reader sees it. */
export const slotView = z.strictObject({
  id: uuid,
  slotKindId: uuid,
  slotKindName: z.string(),
  needs: z.array(z.string()).describe('Names of the competencies that the slot kind requires'),
  isFor18AndOver: z.boolean(),
  state: z.enum(['gap', 'claimed', 'in-doubt']),
  isYours: z.boolean(),
  holder: z.strictObject({ personId: uuid, name: z.string(), claimedAt: instant }).nullable(),
  claim: claimVerdict.nullable().describe('For a gap: whether the reader may take it. Else null'),
  release: z
    .strictObject({ isGranted: z.boolean(), sentence: z.string().nullable() })
    .nullable()
    .describe('For the reader’s own slot: whether they may release it'),
  standings: z.array(standing).describe('The reader’s own standing in what the slot needs'),
});

export const claimSlot = contract({
  ...endpoints.claimSlot,
  summary: 'Take a slot for oneself',
  params: z.strictObject({ slotId: uuid }),
  query: nothing,
  body: nothing,
  reply: slotView,
});

export const releaseSlot = contract({
  ...endpoints.releaseSlot,
  summary: 'Give back a slot that one holds',
  params: z.strictObject({ slotId: uuid }),
  query: nothing,
  body: nothing,
  reply: slotView,
});

export type SlotView = z.output<typeof slotView>;
export type Standing = z.output<typeof standing>;
