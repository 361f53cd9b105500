import { spawnSync } from 'node:child_process';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';

const root = join(import.meta.dirname, '..', '..');

describe('npm run check', () => {
  it.each(['check:types', 'check:lint', 'check:format', 'check:unused'])(
    '%s is clean',
    (script) => {
      const npm = process.env['npm_execpath'];
      const [program, ...first] = npm === undefined ? ['npm'] : [process.execPath, npm];
      const run = spawnSync(program ?? 'npm', [...first, 'run', '--silent', script], {
        cwd: root,
        encoding: 'utf8',
      });
      expect({ status: run.status, said: run.status === 0 ? '' : run.stdout + run.stderr }).toEqual(
        {
          status: 0,
          said: '',
        },
      );
    },
  );
});
