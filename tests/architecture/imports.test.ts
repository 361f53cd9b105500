import { spawnSync } from 'node:child_process';
import { existsSync, readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';

const root = join(import.meta.dirname, '..', '..');

interface Cruise {
  readonly summary: {
    readonly totalCruised: number;
    readonly totalDependenciesCruised: number;
    readonly violations: readonly {
      readonly rule: { readonly name: string };
      readonly from: string;
      readonly to: string;
    }[];
  };
}

function cruise(): Cruise {
  const program = join(root, 'node_modules', 'dependency-cruiser', 'bin', 'dependency-cruise.mjs');
  const run = spawnSync(
    process.execPath,
    [
      program,
      '--config',
      '.dependency-cruiser.cjs',
      '-T',
      'json',
      'backend',
      'frontend',
      'shared',
      'dev-idp',
    ],
    { cwd: root, encoding: 'utf8', maxBuffer: 256 * 1024 * 1024 },
  );
  return JSON.parse(run.stdout) as Cruise;
}

/** Our own source files, counted without the cruiser. */
function sources(folder: string): string[] {
  return readdirSync(join(root, folder), { recursive: true, encoding: 'utf8' })
    .filter(
      (file) => /\.tsx?$/.test(file) && !file.includes('node_modules') && !file.startsWith('dist'),
    )
    .map((file) => join(folder, file));
}

describe('the fences between rooms', () => {
  it('hold, and the cruiser saw every source file and what it imports', () => {
    const { summary } = cruise();
    const ours = ['backend', 'frontend', 'shared', 'dev-idp'].flatMap(sources);
    process.stdout.write(
      `the cruiser saw ${summary.totalCruised} modules and ${summary.totalDependenciesCruised} imports\n`,
    );
    expect(
      summary.violations.map(({ rule, from, to }) => `${rule.name}: ${from} -> ${to}`),
    ).toEqual([]);
    expect(ours.length).toBeGreaterThan(100);
    expect(summary.totalCruised).toBeGreaterThanOrEqual(ours.length);
    expect(summary.totalDependenciesCruised).toBeGreaterThan(ours.length);
  });
});

describe('DEVELOPERS.md', () => {
  it('names only folders that are there, and every feature that is', () => {
    const page = readFileSync(join(root, 'DEVELOPERS.md'), 'utf8');
    const named = [
      ...page.matchAll(/`((?:backend|frontend|shared|tests|dev-idp)\/[\w./-]*)`/g),
    ].map(([, path]) => path ?? '');
    expect(named.length).toBeGreaterThan(20);
    expect(named.filter((path) => !existsSync(join(root, path)))).toEqual([]);
    const features = readdirSync(join(root, 'backend/src/features'));
    expect(features.filter((feature) => !page.includes(`backend/src/features/${feature}`))).toEqual(
      [],
    );
  });
});
