import { spawn } from 'node:child_process';
import { once } from 'node:events';
import { join } from 'node:path';
import type { TestProject } from 'vitest/node';
import { prepareDatabase } from '#backend/database/prepare-database.ts';
import { queueNames } from '#backend/jobs.ts';
import { throwAwayHome } from '#backend/launch/cluster-home.ts';
import { openCluster } from '#backend/launch/cluster.ts';
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
  const clearAway = clearAwayWithThisProcess(home.folder);
  const passwords = makeSecrets();
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
      await cluster.stop();
      await clearAway();
    };
  } catch (error) {
    await clearAway();
    throw error;
  }
}

/**
 * A shell that waits for the end of its input, which comes with the end of this process, however
 * it ends; then it ends the server, if one is left, and removes the folder. Answers how to have
 * that done at once.
 */
function clearAwayWithThisProcess(folder: string): () => Promise<void> {
  const script = `
    cat > /dev/null
    if [ -f "$1/cluster/postmaster.pid" ]; then
      kill -QUIT "$(head -n 1 "$1/cluster/postmaster.pid")"
      while [ -f "$1/cluster/postmaster.pid" ]; do sleep 0.1; done
    fi
    rm -rf "$1"`;
  const shell = spawn('/bin/sh', ['-c', script, 'clear-away', folder], {
    stdio: ['pipe', 'ignore', 'inherit'],
    detached: true,
  });
  shell.unref();
  return async () => {
    shell.ref();
    const ended = once(shell, 'exit');
    shell.stdin.end();
    await ended;
  };
}
