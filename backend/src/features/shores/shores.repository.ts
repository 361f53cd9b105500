import { ShoreEntity } from '#backend/database/entities/shore.entity.ts';
import type { ShoreRow } from '#backend/database/entities/shore.entity.ts';
import type { Tx } from '#backend/database/transaction.ts';
import type { ShoreId } from '#shared/kernel/ids.ts';
import type { Shore } from './shores.reader.ts';

/** A shore as it is written, without its id and its place in lists. */
export type ShoreValues = Omit<Shore, 'id'>;

/** Adds a shore behind all others. */
export async function insertShore(tx: Tx, id: ShoreId, values: ShoreValues): Promise<void> {
  const rows: { position: number }[] = await tx.query(
    'SELECT coalesce(max(position) + 1, 0)::int AS position FROM shore',
  );
  await tx.insert(ShoreEntity, { id, position: rows[0]?.position ?? 0, ...columnsOf(values) });
}

/** Locks a shore, so that two who change it come one after the other. */
export async function lockShore(tx: Tx, id: ShoreId): Promise<void> {
  await tx.query('SELECT id FROM shore WHERE id = $1 FOR NO KEY UPDATE', [id]);
}

export async function updateShore(tx: Tx, id: ShoreId, values: ShoreValues): Promise<void> {
  await tx.update(ShoreEntity, { id }, columnsOf(values));
}

function columnsOf({ differences, ...values }: ShoreValues): Omit<ShoreRow, 'id' | 'position'> {
  return {
    ...values,
    highLaterMinutes: differences.high.laterMinutes,
    highHigherM: differences.high.higherM,
    lowLaterMinutes: differences.low.laterMinutes,
    lowHigherM: differences.low.higherM,
  };
}
