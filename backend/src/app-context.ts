import type { z } from 'zod';
import type { TrailEntry } from '#shared/domain/trail/trail-line.ts';
import type { PersonId } from '#shared/kernel/ids.ts';
import type { Transactions, Tx } from './database/transaction.ts';
import type { Clock } from './platform/clock/clock.ts';
import type { Job } from './platform/jobs/job.ts';
import type { Mailer } from './platform/mail/mailer.ts';
import type { Tides } from './platform/tides/tides.ts';

/** A letter before it is in the outbox. */
export interface Letter {
  readonly kind: string;
  /** The id of what it is about: a kind is written once about one thing. */
  readonly about: string;
  readonly to: {
    readonly personId: PersonId | null;
    readonly name: string;
    readonly address: string;
  };
  readonly subject: string;
  readonly text: string;
  readonly html: string;
}

/** All that a use case may touch. */
export interface AppContext extends Transactions {
  readonly clock: Clock;
  readonly tides: Tides;
  readonly mailer: Mailer;
  readonly group: {
    readonly name: string;
    readonly zone: string;
    /** Where links in letters lead, without a slash at the end. */
    readonly baseUrl: string;
  };
  /** A new UUID v4. */
  newId<Id extends string>(): Id;
  /** Puts a job in the queue; it is there if the transaction commits. */
  enqueue<Payload extends z.ZodType>(
    tx: Tx,
    job: Job<Payload>,
    payload: z.output<Payload>,
  ): Promise<void>;
  /** Puts a letter in the outbox and its sending in the queue; nothing if it is there already. */
  postLetter(tx: Tx, letter: Letter): Promise<void>;
  /**
   * Writes a line of the trail. The last thing in a transaction, since it holds the end of the
   * trail until the commit.
   */
  recordTrail(tx: Tx, ...entries: readonly TrailEntry[]): Promise<void>;
}

export type { Tx };
