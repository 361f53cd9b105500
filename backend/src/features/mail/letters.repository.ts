import { LetterEntity } from '#backend/database/entities/letter.entity.ts';
import type { LetterRow } from '#backend/database/entities/letter.entity.ts';
import type { Tx } from '#backend/database/transaction.ts';
import type { LetterId } from '#shared/kernel/ids.ts';

/** Plans a letter unless one of its kind about the same thing is planned; whether it was new. */
export async function planOnce(tx: Tx, letter: LetterRow): Promise<boolean> {
  const result = await tx
    .createQueryBuilder()
    .insert()
    .into(LetterEntity)
    .values(letter)
    .orIgnore()
    .returning('id')
    .execute();
  return (result.raw as unknown[]).length === 1;
}

/** Locks a letter that is not sent yet; null when it is sent, or another is sending it now. */
export async function lockUnsent(tx: Tx, id: LetterId): Promise<LetterRow | null> {
  return tx
    .createQueryBuilder(LetterEntity, 'letter')
    .where('letter.id = :id AND letter.sent_at IS NULL', { id })
    .setLock('pessimistic_write')
    .setOnLocked('skip_locked')
    .getOne();
}

/** Marks a letter as handed over, with what the mail server said. */
export async function markSent(
  tx: Tx,
  id: LetterId,
  sentAt: Date,
  serverAnswer: string,
): Promise<void> {
  await tx.update(LetterEntity, { id }, { sentAt, serverAnswer });
}
