import { createHmac } from 'node:crypto';
import type { Tx } from '#backend/database/transaction.ts';
import type { Clock } from '#backend/platform/clock/clock.ts';
import type { TrailEntry } from '#shared/domain/trail/trail-line.ts';
import { trailLineText, trailStart } from '#shared/domain/trail/trail-line.ts';
import type { PersonId } from '#shared/kernel/ids.ts';
import { insertTrailLines, lockEndOfTrail } from './trail.repository.ts';

/** The HMAC-SHA-256 of a line's text, in hexadecimal. */
export function trailMac(key: string, text: string): string {
  return createHmac('sha256', key).update(text).digest('hex');
}

/**
 * Writes lines at the end of the trail, numbered without gaps and each chained to the one
 * before. Holds the end of the trail until the transaction ends, so it comes last in it.
 */
export function trailRecorder(key: string, clock: Clock) {
  return async (tx: Tx, ...entries: readonly TrailEntry[]): Promise<void> => {
    const at = clock.now();
    const last = await lockEndOfTrail(tx);
    let seq = last?.seq ?? 0;
    let mac = last?.mac ?? trailStart;
    const lines = entries.map((entry) => {
      seq += 1;
      mac = trailMac(key, trailLineText(mac, { ...entry, seq, at }));
      return { ...entry, actorId: entry.actorId as PersonId | null, seq, at: new Date(at), mac };
    });
    await insertTrailLines(tx, lines);
  };
}
