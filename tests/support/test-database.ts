import { randomUUID } from 'node:crypto';
import { setTimeout as sleep } from 'node:timers/promises';
import pg from 'pg';
import { inject } from 'vitest';
import { withClient } from '#backend/launch/make-database.ts';

/** The throw-away server of this run, as start-postgres.ts provides it. */
interface TestServer {
  readonly superuserUrl: string;
  readonly ownerUrl: string;
  readonly appUrl: string;
  readonly templateDatabase: string;
}

declare module 'vitest' {
  interface ProvidedContext {
    readonly testServer: TestServer;
  }
}

/** A database of its own, migrated and empty, for the owner and for the application user. */
export interface TestDatabase {
  readonly ownerUrl: string;
  readonly appUrl: string;
  /** Close every connection first. */
  drop(): Promise<void>;
}

const dropTries = 40;
const dropPauseMs = 50;
const objectInUse = '55006';

/** Clones the migrated template. */
export async function cloneDatabase(): Promise<TestDatabase> {
  const server = inject('testServer');
  const database = `test_${randomUUID().replaceAll('-', '')}`;
  await withClient(server.superuserUrl, (client) =>
    client.query(
      `CREATE DATABASE ${pg.escapeIdentifier(database)} OWNER ebbfolk_owner
         TEMPLATE ${pg.escapeIdentifier(server.templateDatabase)}`,
    ),
  );
  return {
    ownerUrl: onDatabase(server.ownerUrl, database),
    appUrl: onDatabase(server.appUrl, database),
    drop: () => dropDatabase(server.superuserUrl, database),
  };
}

// The server notices a closed connection a moment later than the client does.
async function dropDatabase(superuserUrl: string, database: string): Promise<void> {
  await withClient(superuserUrl, async (client) => {
    for (let triesLeft = dropTries; ; triesLeft -= 1) {
      try {
        await client.query(`DROP DATABASE ${pg.escapeIdentifier(database)}`);
        return;
      } catch (error) {
        const isInUse = error instanceof pg.DatabaseError && error.code === objectInUse;
        if (!isInUse || triesLeft === 0) throw error;
        await sleep(dropPauseMs);
      }
    }
  });
}

function onDatabase(url: string, database: string): string {
  const changed = new URL(url);
  changed.pathname = `/${database}`;
  return changed.href;
}
