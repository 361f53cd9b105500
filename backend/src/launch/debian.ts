import { spawnSync } from 'node:child_process';
import { existsSync } from 'node:fs';
import { CannotStart, say } from './say.ts';

/**
 * Installs packages of Debian. Needs root, or sudo that asks for no password; otherwise throws
 * CannotStart with the one line that the person has to run.
 */
export function installDebianPackages(names: readonly string[], whatFor: string): void {
  const prefix = rootPrefix();
  if (!existsSync('/usr/bin/apt-get') || prefix === null) {
    throw new CannotStart(
      `${whatFor} is missing. Install it, on Debian with: sudo apt-get install ${names.join(' ')}`,
    );
  }
  say(`Installing ${whatFor} with apt-get. Up to a minute or two.`);
  runAsRoot(prefix, ['apt-get', 'update', '-q']);
  runAsRoot(prefix, [
    'apt-get',
    'install',
    '-q',
    '-y',
    '--no-install-recommends',
    '-o',
    'Dpkg::Options::=--force-confold',
    ...names,
  ]);
}

/** Runs a command as root, its output on standard error. Throws CannotStart when it fails. */
export function runAsRoot(prefix: readonly string[], command: readonly string[], input = ''): void {
  const [program = '', ...args] = [...prefix, ...command];
  const run = spawnSync(program, args, {
    input,
    stdio: ['pipe', 2, 2],
    env: { ...process.env, DEBIAN_FRONTEND: 'noninteractive' },
  });
  if (run.status !== 0) {
    throw new CannotStart(`This failed, the lines above say why: ${command.join(' ')}`);
  }
}

/** What to put before a command so that it runs as root; null: there is no way. */
export function rootPrefix(): readonly string[] | null {
  if (process.getuid?.() === 0) return [];
  const asked = spawnSync('sudo', ['-n', 'true'], { stdio: 'ignore' });
  return asked.status === 0 ? ['sudo', '-n', '--preserve-env=DEBIAN_FRONTEND'] : null;
}
