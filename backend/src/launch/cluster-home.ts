import { spawnSync } from 'node:child_process';
import { chmodSync, chownSync, existsSync, mkdirSync, mkdtempSync, statSync } from 'node:fs';
import { join } from 'node:path';
import { z } from 'zod';
import { readKept, writeKept } from './kept-file.ts';
import { CannotStart, say } from './say.ts';

/** The user that PostgreSQL runs as; null: the one who started this process. */
export type Account = { readonly uid: number; readonly gid: number } | null;

/** A folder for one cluster, and the user that it belongs to. */
export interface ClusterHome {
  readonly folder: string;
  readonly account: Account;
}

const kept = z.strictObject({ folder: z.string() });
const placeForAnyUser = '/var/tmp/ebbfolk-';

/**
 * Where the cluster of this data folder lives: inside it, or under /var/tmp when it runs as
 * another user who cannot reach the data folder. Made with mode 0700 where it is missing.
 */
export function clusterHome(dataFolder: string): ClusterHome {
  const file = join(dataFolder, 'cluster-home.json');
  const before = readKept(file, kept)?.folder;
  if (before !== undefined && existsSync(before)) {
    return { folder: before, account: ownerOf(before) };
  }
  const account = unprivilegedAccount();
  const inside = join(dataFolder, 'postgres');
  mkdirSync(inside, { recursive: true });
  giveTo(inside, account);
  const folder = canReach(inside, account) ? inside : throwAwayHome(account).folder;
  if (folder !== inside) say(`The database lives in ${folder}, where its user can reach it.`);
  writeKept(file, { folder });
  return { folder, account };
}

/** A new folder for a cluster that nobody keeps. */
export function throwAwayHome(account: Account = unprivilegedAccount()): ClusterHome {
  const folder = mkdtempSync(placeForAnyUser);
  giveTo(folder, account);
  return { folder, account };
}

function giveTo(folder: string, account: Account): void {
  chmodSync(folder, 0o700);
  if (account !== null) chownSync(folder, account.uid, account.gid);
}

/** PostgreSQL refuses to run as root; Debian's package brings the user `postgres`. */
function unprivilegedAccount(): Account {
  if (process.getuid?.() !== 0) return null;
  const id = (flag: string): number => {
    const asked = spawnSync('id', [flag, 'postgres'], { encoding: 'utf8' });
    if (asked.status === 0) return Number(asked.stdout);
    throw new CannotStart(
      'PostgreSQL does not run as root, and there is no user named postgres. Start as another user.',
    );
  };
  return { uid: id('-u'), gid: id('-g') };
}

function ownerOf(folder: string): Account {
  const { uid, gid } = statSync(folder);
  const self = process.getuid?.() ?? uid;
  if (uid === self) return null;
  if (self === 0) return { uid, gid };
  throw new CannotStart(
    `The database in ${folder} belongs to another user. Start as that user, or as root.`,
  );
}

function canReach(folder: string, account: Account): boolean {
  if (account === null) return true;
  return spawnSync('test', ['-w', folder], { ...account, cwd: '/' }).status === 0;
}
