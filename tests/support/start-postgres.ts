import { rmSync } from 'node:fs';
import { join } from 'node:path';
import type { TestProject } from 'vitest/node';
import { prepareDatabase } from '#backend/database/prepare-database.ts';
import { queueNames } from '#backend/jobs.ts';
import { throwAwayHome } from '#backend/launch/cluster-home.ts';
import { lockHolder, openCluster } from '#backend/launch/cluster.ts';
import { findOrInstallPostgres } from '#backend/launch/find-postgres.ts';
import {
  appUser,
  makeDatabase,
  makeUsers,
  ownerUser,
  withClient,
} from '#backend/launch/make-database.ts';
import { anyFreePort } from '#backend/launch/ports.ts';
import { makeSecrets } from '#backend/launch/secrets.ts';
import './test-database.ts';

const templateDatabase = 'template_of_tests';

/**
 * A PostgreSQL server for this run alone, with a migrated template that every test file clones.
 * It runs as the application will meet it: with an owner and an application user that owns nothing.
 */
export default async function startPostgres(project: TestProject): Promise<() => Promise<void>> {
  const home = throwAwayHome();
  const passwords = makeSecrets();
  // A run that is broken off calls no teardown.
  const endAtOnce = (): void => {
    const holder = lockHolder(home);
    if (holder !== null) process.kill(holder.pid, 'SIGQUIT');
  };
  process.once('exit', endAtOnce);
  try {
    const cluster = await openCluster({
      programs: findOrInstallPostgres(),
      home,
      superuserPassword: passwords.superuserPassword,
      logFile: join(home.folder, 'server.log'),
      choosePort: anyFreePort,
      isThrowAway: true,
    });
    await withClient(cluster.superuserUrl, async (client) => {
      await makeUsers(client, { owner: passwords.ownerPassword, app: passwords.appPassword });
      await makeDatabase(client, templateDatabase);
    });
    const ownerUrl = cluster.url(ownerUser, passwords.ownerPassword, templateDatabase);
    await prepareDatabase({ ownerUrl, appUser, queueNames });
    project.provide('testServer', {
      superuserUrl: cluster.superuserUrl,
      ownerUrl,
      appUrl: cluster.url(appUser, passwords.appPassword, templateDatabase),
      templateDatabase,
    });
    return async () => {
      process.off('exit', endAtOnce);
      await cluster.stop();
      rmSync(home.folder, { recursive: true });
    };
  } catch (error) {
    process.off('exit', endAtOnce);
    endAtOnce();
    rmSync(home.folder, { recursive: true, force: true });
    throw error;
  }
}
