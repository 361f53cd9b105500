import { spawn } from 'node:child_process';
import { createHash } from 'node:crypto';
import { once } from 'node:events';
import { existsSync, readdirSync, readFileSync, statSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { projectRoot } from './data-folder.ts';
import { CannotStart, say } from './say.ts';

const builtFolder = join('frontend', 'dist');
/** The name begins with a dot so that it is not served. */
const stampFile = join(projectRoot, builtFolder, '.built-from');
const sources = ['frontend', 'shared/src', 'package.json', 'package-lock.json', 'tsconfig.json'];

/** Builds the pages where their sources differ from those of the last build. */
export async function buildFrontend(signal?: AbortSignal): Promise<void> {
  const wanted = hashOfSources();
  if (existsSync(stampFile) && readFileSync(stampFile, 'utf8') === wanted) return;
  say('Building the pages. A few seconds.');
  const vite = join(projectRoot, 'node_modules', 'vite', 'bin', 'vite.js');
  const build = spawn(process.execPath, [vite, 'build', 'frontend', '--logLevel', 'warn'], {
    cwd: projectRoot,
    env: { ...process.env, NODE_ENV: 'production' },
    stdio: ['ignore', 2, 2],
    ...(signal === undefined ? {} : { signal }),
  });
  const [code] = (await once(build, 'exit')) as [number | null];
  if (code !== 0) throw new CannotStart('The pages could not be built. The lines above say why.');
  writeFileSync(stampFile, wanted);
}

function hashOfSources(): string {
  const hash = createHash('sha256');
  for (const file of sources.flatMap(filesIn)) {
    hash
      .update(`${file}\0`)
      .update(readFileSync(join(projectRoot, file)))
      .update('\0');
  }
  return hash.digest('hex');
}

function filesIn(path: string): string[] {
  if (path === builtFolder) return [];
  if (!statSync(join(projectRoot, path)).isDirectory()) return [path];
  return readdirSync(join(projectRoot, path))
    .sort()
    .flatMap((name) => filesIn(join(path, name)));
}
