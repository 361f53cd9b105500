import { spawnSync } from 'node:child_process';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';

const root = join(import.meta.dirname, '..', '..');

describe('npm run check', () => {
  it.each(['check:types', 'check:lint', 'check:format', 'check:unused'])(
    '%s is clean',
    (script) => {
      const run = spawnSync('npm', ['run', '--silent', script], { cwd: root, encoding: 'utf8' });
      const said = run.status === 0 ? '' : `${run.stdout}${run.stderr}`;
      expect({ status: run.status, said }).toEqual({ status: 0, said: '' });
    },
  );
});
