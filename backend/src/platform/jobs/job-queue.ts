import PgBoss from 'pg-boss';
import type { z } from 'zod';
import type { Logger } from 'pino';
import type { Job } from './job.ts';

/** Runs one statement on the caller's connection. */
export interface Connection {
  query(text: string, values: unknown[]): Promise<unknown>;
}

/** A job with the work that it stands for. */
export interface JobWork {
  readonly job: Job;
  readonly work: (payload: never) => Promise<void>;
}

export interface JobQueue {
  /** Puts a job in the queue inside the caller's transaction: it is there if that commits. */
  enqueue<Payload extends z.ZodType>(
    connection: Connection,
    job: Job<Payload>,
    payload: z.output<Payload>,
  ): Promise<void>;
  /** Starts to work through the queues and to keep the timetables. */
  work(works: readonly JobWork[], zone: string): Promise<void>;
  /** Lets the jobs in hand finish, then closes. */
  stop(): Promise<void>;
}

const retries = { retryLimit: 8, retryDelay: 15, retryBackoff: true, expireInMinutes: 5 };
const pollingSeconds = 1;
const batchSize = 20;
const stopTimeoutMs = 3_000;

/**
 * The queue in PostgreSQL, as the application user. A job that outlives its five minutes
 * runs again beside the first, so every job is harmless when doubled.
 */
export async function startJobQueue(databaseUrl: string, log: Logger): Promise<JobQueue> {
  const boss = new PgBoss({
    connectionString: databaseUrl,
    max: 3,
    migrate: false,
    application_name: 'ebbfolk jobs',
  });
  boss.on('error', (error) => log.error({ err: error }, 'job queue'));
  await boss.start();
  return {
    async enqueue(connection, job, payload) {
      await boss.send(job.name, payload as object, {
        ...retries,
        db: {
          executeSql: async (text, values) => ({
            rows: (await connection.query(text, values)) as unknown[],
          }),
        },
      });
    },
    async work(works, zone) {
      for (const { job, work } of works) {
        await boss.work(job.name, { pollingIntervalSeconds: pollingSeconds, batchSize }, (batch) =>
          workThrough(
            batch.map(
              ({ data }) =>
                () =>
                  work(job.payload.parse(data ?? {}) as never),
            ),
          ),
        );
        if (job.timetable !== null) await boss.schedule(job.name, job.timetable, {}, { tz: zone });
      }
    },
    stop: () => boss.stop({ graceful: true, wait: true, timeout: stopTimeoutMs }),
  };
}

/**
 * Does all the work of a batch, one after the other, then fails if any failed: the queue tries
 * the whole batch again, and what was done is not done twice.
 */
async function workThrough(works: readonly (() => Promise<void>)[]): Promise<void> {
  const failures: unknown[] = [];
  for (const work of works) {
    try {
      await work();
    } catch (error) {
      failures.push(error);
    }
  }
  if (failures.length > 0) throw new AggregateError(failures, 'Some jobs of a batch failed');
}
