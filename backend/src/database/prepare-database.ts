import type { DataSource } from 'typeorm';
import { createQueues } from '#backend/platform/jobs/create-queues.ts';
import { ownerDataSource } from './data-source.ts';

/**
 * Brings a database up to date as its owner: migrations, the job queues, and what the
 * application user may do. Running it again changes nothing. `appUser` exists already, owns
 * nothing, and may only insert and read on the trail.
 */
export async function prepareDatabase({
  ownerUrl,
  appUser,
  queueNames,
}: {
  readonly ownerUrl: string;
  readonly appUser: string;
  readonly queueNames: readonly string[];
}): Promise<void> {
  const owner = await ownerDataSource(ownerUrl).initialize();
  try {
    await owner.runMigrations({ transaction: 'each' });
    await createQueues(ownerUrl, queueNames);
    await grant(owner, appUser);
  } finally {
    await owner.destroy();
  }
}

async function grant(owner: DataSource, appUser: string): Promise<void> {
  const user = `"${appUser.replaceAll('"', '""')}"`;
  for (const schema of ['public', 'pgboss']) {
    await owner.query(`GRANT USAGE ON SCHEMA ${schema} TO ${user}`);
    await owner.query(
      `GRANT SELECT, INSERT, UPDATE, DELETE ON ALL TABLES IN SCHEMA ${schema} TO ${user}`,
    );
    await owner.query(`GRANT USAGE, SELECT ON ALL SEQUENCES IN SCHEMA ${schema} TO ${user}`);
    await owner.query(`GRANT EXECUTE ON ALL FUNCTIONS IN SCHEMA ${schema} TO ${user}`);
  }
  await owner.query(`REVOKE ALL ON trail FROM ${user}`);
  await owner.query(`GRANT SELECT, INSERT ON trail TO ${user}`);
  await owner.query(`REVOKE INSERT, UPDATE, DELETE ON migration FROM ${user}`);
  await owner.query(`REVOKE CREATE ON SCHEMA public FROM PUBLIC`);
}
