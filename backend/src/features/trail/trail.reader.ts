import type { Read } from '#backend/database/transaction.ts';
import type { SessionId } from '#shared/kernel/ids.ts';
import type { Instant } from '#shared/kernel/time.ts';

/** A line of the trail about a session, with the names that its ids stand for today. */
export interface SessionTrailEntry {
  readonly at: Instant;
  readonly actorName: string | null;
  readonly action: string;
  readonly slotKindName: string | null;
}

/** What happened to a session and its slots, newest first, at most 50 lines. */
export async function readTrailOfSession(
  read: Read,
  sessionId: SessionId,
): Promise<readonly SessionTrailEntry[]> {
  const rows: { entries: SessionTrailEntry[] }[] = await read.query(
    `SELECT coalesce(json_agg(e ORDER BY e.seq DESC), '[]') AS entries FROM (
       SELECT t.seq, epoch_ms(t.at) AS at, p.name AS "actorName", t.action,
              k.name AS "slotKindName"
         FROM trail t
         LEFT JOIN person p ON p.id = t.actor_id
         LEFT JOIN slot_kind k ON k.id = (t.details ->> 'slotKindId')::uuid
        WHERE t.record_id = $1 OR t.details ->> 'sessionId' = $1::text
        ORDER BY t.seq DESC LIMIT 50) e`,
    [sessionId],
  );
  return rows[0]?.entries ?? [];
}
