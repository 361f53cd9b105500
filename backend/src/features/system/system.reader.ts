import type { Read } from '#backend/database/transaction.ts';

/** Asks the database for an answer; throws when there is none. */
export async function hasAnswer(read: Read): Promise<void> {
  await read.query('SELECT 1');
}
