/**
 * Brings node_modules in line with the lock file before anything else runs.
 * Plain Node without packages, since it runs when there are none. Output goes to
 * standard error, so that commands which print data keep their output clean.
 */
import { createHash } from 'node:crypto';
import { spawnSync } from 'node:child_process';
import { existsSync, mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';

const oldestNode = [20, 19];
const [major = 0, minor = 0] = process.versions.node.split('.').map(Number);
if (major < oldestNode[0] || (major === oldestNode[0] && minor < oldestNode[1])) {
  process.stderr.write(
    `Ebbfolk needs Node ${oldestNode.join('.')} or newer, and this is ${process.versions.node}.\n`,
  );
  process.exit(1);
}

const projectRoot = join(dirname(fileURLToPath(import.meta.url)), '..', '..', '..');
const stampFile = join(projectRoot, 'node_modules', '.ebbfolk-lock');
const wanted = createHash('sha256')
  .update(readFileSync(join(projectRoot, 'package-lock.json')))
  .digest('hex');
const present = existsSync(stampFile) ? readFileSync(stampFile, 'utf8') : '';

if (present !== wanted) {
  const npm = process.env['npm_execpath'];
  if (npm === undefined) {
    process.stderr.write('Start this through npm, for example: npm start\n');
    process.exit(1);
  }
  process.stderr.write('Installing packages from the lock file. About 30 seconds.\n');
  const run = spawnSync(process.execPath, [npm, 'ci', '--include=dev', '--no-fund', '--no-audit'], {
    cwd: projectRoot,
    stdio: ['ignore', 2, 2],
  });
  if (run.status !== 0) {
    process.stderr.write('The packages could not be installed. The lines above say why.\n');
    process.exit(run.status ?? 1);
  }
  mkdirSync(dirname(stampFile), { recursive: true });
  writeFileSync(stampFile, wanted);
}
