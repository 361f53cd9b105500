import { spawnSync } from 'node:child_process';
import { existsSync, readdirSync, readFileSync } from 'node:fs';
import { delimiter, dirname, join } from 'node:path';
import { installDebianPackages, rootPrefix, runAsRoot } from './debian.ts';
import { CannotStart } from './say.ts';

/** The folder that holds `postgres` and `initdb`, and the major version of both. */
export interface PostgresPrograms {
  readonly folder: string;
  readonly major: number;
}

/** From 15 on the schema `public` belongs to the owner of the database. */
const oldestMajor = 15;
const debianFolder = '/usr/lib/postgresql';
const createClusterSettings = '/etc/postgresql-common/createcluster.conf';

/** The newest PostgreSQL on this computer that is new enough; null when there is none. */
function findPostgres(): PostgresPrograms | null {
  const folders = [
    ...(existsSync(debianFolder)
      ? readdirSync(debianFolder).map((version) => join(debianFolder, version, 'bin'))
      : []),
    ...(process.env['PATH'] ?? '').split(delimiter),
  ];
  const found = folders
    .filter((folder) => existsSync(join(folder, 'postgres')) && existsSync(join(folder, 'initdb')))
    .map((folder) => ({ folder, major: majorOf(join(folder, 'postgres')) }))
    .filter(({ major }) => major >= oldestMajor)
    .sort((one, other) => other.major - one.major);
  return found[0] ?? null;
}

/** PostgreSQL, installed from Debian first where it is missing and that is possible. */
export function findOrInstallPostgres(): PostgresPrograms {
  const found = findPostgres();
  if (found !== null) return found;
  makeNoDebianCluster();
  installDebianPackages(['postgresql'], `PostgreSQL ${oldestMajor} or newer`);
  const installed = findPostgres();
  if (installed !== null) return installed;
  throw new CannotStart(
    `The PostgreSQL that apt-get offers is older than ${oldestMajor}. Install a newer one and put its bin folder in PATH.`,
  );
}

/** Debian's package would start a server of its own on port 5432, which nobody asked for. */
function makeNoDebianCluster(): void {
  const prefix = rootPrefix();
  if (prefix === null || !existsSync('/usr/bin/apt-get')) return;
  const before = existsSync(createClusterSettings)
    ? readFileSync(createClusterSettings, 'utf8')
    : '';
  const others = before
    .split('\n')
    .filter((line) => !/^\s*create_main_cluster\s*=/.test(line))
    .join('\n')
    .trimEnd();
  runAsRoot(prefix, ['mkdir', '-p', dirname(createClusterSettings)]);
  runAsRoot(
    prefix,
    ['sh', '-c', `cat > ${createClusterSettings}`],
    `${others === '' ? '' : `${others}\n`}create_main_cluster = false\n`,
  );
}

function majorOf(program: string): number {
  const answer = spawnSync(program, ['--version'], { encoding: 'utf8', cwd: '/' });
  return Number(/\(PostgreSQL\) (\d+)/.exec(answer.stdout)?.[1] ?? 0);
}
