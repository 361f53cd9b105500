import type { DataSource, EntityManager } from 'typeorm';

declare const reading: unique symbol;
declare const writing: unique symbol;

/** A connection on which one may read. */
export type Read = EntityManager & { readonly [reading]: true };

/** A connection inside a transaction. No repository writes without one. */
export type Tx = Read & { readonly [writing]: true };

export interface Transactions {
  /**
   * Runs the work in one READ COMMITTED transaction and commits it, or rolls all of it back.
   * A deadlock (40P01) or serialisation failure (40001) is tried three times more; nothing
   * else is. The work may run more than once, so its only effects are those of `tx`.
   */
  inTransaction<Result>(work: (tx: Tx) => Promise<Result>): Promise<Result>;
  /** Runs work that only reads, each statement on its own. */
  reading<Result>(work: (read: Read) => Promise<Result>): Promise<Result>;
}

const retryable = new Set(['40P01', '40001']);
const triesMore = 3;

export function transactionsOf(dataSource: DataSource): Transactions {
  return {
    async inTransaction(work) {
      for (let triesLeft = triesMore; ; triesLeft -= 1) {
        try {
          return await dataSource.transaction((manager) => work(manager as Tx));
        } catch (error) {
          if (triesLeft === 0 || !retryable.has(databaseError(error)?.code ?? '')) throw error;
        }
      }
    },
    reading: (work) => work(dataSource.manager as Read),
  };
}

/** What PostgreSQL said, if the error came from it: the five-letter code and the named constraint. */
export function databaseError(
  error: unknown,
): { readonly code: string; readonly constraint: string | null } | null {
  if (typeof error !== 'object' || error === null) return null;
  const cause: unknown = Reflect.get(error, 'driverError') ?? error;
  if (typeof cause !== 'object' || cause === null) return null;
  const code: unknown = Reflect.get(cause, 'code');
  const constraint: unknown = Reflect.get(cause, 'constraint');
  if (typeof code !== 'string' || !/^[0-9A-Z]{5}$/.test(code)) return null;
  return { code, constraint: typeof constraint === 'string' ? constraint : null };
}
