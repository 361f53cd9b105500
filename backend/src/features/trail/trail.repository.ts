import { TrailEntity } from '#backend/database/entities/trail.entity.ts';
import type { TrailRow } from '#backend/database/entities/trail.entity.ts';
import type { Tx } from '#backend/database/transaction.ts';

/** Locks the end of the trail until the transaction ends; its last line, or null for the first. */
export async function lockEndOfTrail(
  tx: Tx,
): Promise<{ readonly seq: number; readonly mac: string } | null> {
  const rows: { seq: string; mac: string }[] = await tx.query(
    'SELECT seq, mac FROM last_trail_line()',
  );
  const last = rows[0];
  return last === undefined ? null : { seq: Number(last.seq), mac: last.mac };
}

/** Adds lines at the end of the trail. */
export async function insertTrailLines(tx: Tx, lines: readonly TrailRow[]): Promise<void> {
  await tx.insert(TrailEntity, [...lines]);
}
