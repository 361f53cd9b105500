import { join } from 'node:path';
import { clusterHome } from './cluster-home.ts';
import { openCluster } from './cluster.ts';
import type { Cluster } from './cluster.ts';
import { findOrInstallPostgres } from './find-postgres.ts';
import { appUser, makeDatabase, makeUsers, ownerUser, withClient } from './make-database.ts';
import type { Ports } from './ports.ts';
import { say } from './say.ts';
import type { Secrets } from './secrets.ts';

const database = 'ebbfolk';

/** One database, for its owner and for the application. */
interface OwnDatabase {
  readonly ownerUrl: string;
  readonly appUrl: string;
  /** Whether it was made just now. */
  readonly isNew: boolean;
}

/** Starts the PostgreSQL server of this data folder, made there at the first start. */
export function openOwnCluster(folder: string, ports: Ports, secrets: Secrets): Promise<Cluster> {
  const programs = findOrInstallPostgres();
  say('Starting PostgreSQL.');
  return openCluster({
    programs,
    home: clusterHome(folder),
    superuserPassword: secrets.superuserPassword,
    logFile: join(folder, 'log', 'postgres.log'),
    choosePort: () => ports.choose('postgres'),
    isThrowAway: false,
  });
}

/** Makes the users and the database where they are missing. It may be empty still. */
export async function makeOwnDatabase(cluster: Cluster, secrets: Secrets): Promise<OwnDatabase> {
  const isNew = await withClient(cluster.superuserUrl, async (client) => {
    await makeUsers(client, { owner: secrets.ownerPassword, app: secrets.appPassword });
    return makeDatabase(client, database);
  });
  return {
    isNew,
    ownerUrl: cluster.url(ownerUser, secrets.ownerPassword, database),
    appUrl: cluster.url(appUser, secrets.appPassword, database),
  };
}

/** Removes the database with everything in it. */
export function dropOwnDatabase(cluster: Cluster): Promise<unknown> {
  return withClient(cluster.superuserUrl, (client) =>
    client.query(`DROP DATABASE IF EXISTS ${database}`),
  );
}
