import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { prepareDatabase } from '#backend/database/prepare-database.ts';
import { queueNames } from '#backend/jobs.ts';
import type { Cluster } from './cluster.ts';
import type { Launch } from './launch.ts';
import type { LocalSettings } from './local-settings.ts';
import { appUser } from './make-database.ts';
import { makeOwnDatabase, openOwnCluster } from './own-database.ts';
import type { Ports } from './ports.ts';
import { say } from './say.ts';
import type { Secrets } from './secrets.ts';

const linesOfLog = 8;

/** Starts this data folder's PostgreSQL as part of the launch. */
export async function startOwnCluster(
  launch: Launch,
  folder: string,
  ports: Ports,
  secrets: Secrets,
): Promise<Cluster> {
  const cluster = await openOwnCluster(folder, ports, secrets);
  const logFile = join(folder, 'log', 'postgres.log');
  await launch.add({
    name: 'PostgreSQL',
    stop: () => cluster.stop(),
    gone: cluster.gone.then(() =>
      readFileSync(logFile, 'utf8').trimEnd().split('\n').slice(-linesOfLog).join('\n'),
    ),
  });
  return cluster;
}

/** Makes this data folder's database where it is missing, brings it up to date, answers where the application finds it. */
export async function readyOwnDatabase(cluster: Cluster, secrets: Secrets): Promise<string> {
  const { ownerUrl, appUrl, isNew } = await makeOwnDatabase(cluster, secrets);
  if (isNew) say('Making the database. The demo that fills it takes some seconds more.');
  await prepareDatabase({ ownerUrl, appUser, queueNames });
  return appUrl;
}

/** Brings a database that others keep up to date, if its owner's address is given. */
export async function readyGivenDatabase(env: LocalSettings['env']): Promise<string> {
  const appUrl = env['DATABASE_URL'] ?? '';
  const ownerUrl = env['DATABASE_OWNER_URL'];
  if (ownerUrl !== undefined) {
    const { username } = new URL(appUrl);
    await prepareDatabase({ ownerUrl, appUser: decodeURIComponent(username), queueNames });
  }
  return appUrl;
}
