import { spawn } from 'node:child_process';
import type { ChildProcess } from 'node:child_process';
import { once } from 'node:events';
import { mkdtempSync, readdirSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { setTimeout as sleep } from 'node:timers/promises';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { launchBrowser } from '../support/browser.ts';

const projectRoot = join(import.meta.dirname, '..', '..');
/** Away from the ports of a start on the same computer. */
const firstPort = '23700';
const stopLimitMs = 4_000;

/** One run of the start command, and what it has written so far. */
interface Run {
  readonly process: ChildProcess;
  readonly ended: Promise<number | null>;
  output(): string;
}

let folder: string;

beforeAll(() => {
  folder = mkdtempSync(join(tmpdir(), 'ebbfolk-start-'));
});

afterAll(async () => {
  for (const { pid } of ours()) process.kill(pid, 'SIGKILL');
  await until(() => ours().length === 0);
  rmSync(folder, { recursive: true });
});

function start(): Run {
  // The variables of the test runner (BASE_URL is one) are none of its business.
  const { PATH, HOME } = process.env;
  const child = spawn(process.execPath, ['--import', 'tsx', 'backend/src/launch/start.ts'], {
    cwd: projectRoot,
    env: { PATH, HOME, EBBFOLK_DATA: folder, EBBFOLK_FIRST_PORT: firstPort },
    // With a channel it stops when this process is gone, however that comes about.
    stdio: ['ignore', 'pipe', 'pipe', 'ipc'],
  });
  let output = '';
  const add = (chunk: Buffer): void => {
    output += chunk.toString();
  };
  child.stdout?.on('data', add);
  child.stderr?.on('data', add);
  return {
    process: child,
    ended: once(child, 'exit').then(([code]) => code as number | null),
    output: () => output,
  };
}

/** Waits until the run is ready, and answers the addresses in the order in which it prints them. */
async function addressesOf(run: Run): Promise<string[]> {
  await until(() => run.output().includes('Ebbfolk is ready') || run.process.exitCode !== null);
  const addresses = run.output().match(/http:\/\/localhost:\d+/g);
  if (addresses === null) throw new Error(`No address in:\n${run.output()}`);
  return addresses;
}

/** Every process that works on this test's data folder, PostgreSQL's own helpers included. */
function ours(): { readonly pid: number; readonly command: string }[] {
  return readdirSync('/proc')
    .filter((name) => /^\d+$/.test(name) && Number(name) !== process.pid)
    .filter((pid) => readProcess(pid, 'environ').split('\0').includes(`EBBFOLK_DATA=${folder}`))
    .map((pid) => ({
      pid: Number(pid),
      command: readProcess(pid, 'cmdline').replaceAll('\0', ' '),
    }));
}

/** Empty when the process has ended in the meantime, or belongs to somebody else. */
function readProcess(pid: string, file: string): string {
  try {
    return readFileSync(`/proc/${pid}/${file}`, 'utf8');
  } catch (error) {
    if (['ENOENT', 'ESRCH', 'EACCES'].includes(String(Reflect.get(error as Error, 'code'))))
      return '';
    throw error;
  }
}

function isDatabase({ command }: { readonly command: string }): boolean {
  return command.startsWith('postgres') || command.includes('/bin/postgres');
}

async function until(isSo: () => boolean): Promise<void> {
  const limitMs = performance.now() + 60_000;
  while (!isSo()) {
    if (performance.now() > limitMs) throw new Error('Waited for a minute in vain');
    await sleep(50);
  }
}

describe('the start command', () => {
  let run: Run;
  let addresses: string[];

  it('brings up everything from nothing, and says first where the application answers', async () => {
    run = start();
    addresses = await addressesOf(run);
    const [application = '', letters = ''] = addresses;
    const page = await fetch(application);
    expect(page.status).toBe(200);
    expect(await page.text()).toContain('<title>Ebbfolk</title>');
    const account = await fetch(`${application}/api/account`);
    expect(await account.json()).toMatchObject({
      group: { name: 'Skerrow Bay Shore Group' },
      person: null,
    });
    expect((await fetch(`${letters}/api/email`)).status).toBe(200);
    expect(run.output()).toMatch(/Ines Thackeray +coordinator/);
  });

  it('lets a person of the demo sign in with one click', async () => {
    const browser = await launchBrowser();
    try {
      const page = await browser.newPage();
      await page.goto(`${addresses[0]}/auth/sign-in`);
      await page.getByRole('button', { name: 'Ines Thackeray' }).click();
      await page.waitForURL(`${addresses[0]}/**`);
      const account = await page.request.get(`${addresses[0]}/api/account`);
      expect(await account.json()).toMatchObject({
        person: { name: 'Ines Thackeray', roles: ['coordinator', 'volunteer'] },
      });
    } finally {
      await browser.close();
    }
  });

  it('says, when it is started again, that it is running already and where', async () => {
    const second = start();
    expect(await second.ended).toBe(0);
    expect(second.output()).toBe(`Ebbfolk is already running at ${addresses[0]}\n`);
  });

  it('leaves the database alone when it is killed, and picks it up at the next start', async () => {
    run.process.kill('SIGKILL');
    await run.ended;
    await until(() => ours().every(isDatabase));
    const [databaseBefore] = ours().filter(({ command }) => command.includes('/bin/postgres'));
    expect(databaseBefore).toBeDefined();
    run = start();
    expect(await addressesOf(run)).toEqual(addresses);
    expect((await fetch(`${addresses[0]}/api/account`)).status).toBe(200);
    expect(ours().map(({ pid }) => pid)).toContain(databaseBefore?.pid);
  });

  it('stops everything when one part dies, and says which', async () => {
    const [mailCatcher] = ours().filter(({ command }) => command.includes('run-mail-catcher'));
    process.kill(mailCatcher?.pid ?? 0, 'SIGKILL');
    expect(await run.ended).toBe(1);
    expect(run.output()).toContain('The mail catcher has ended unexpectedly');
    expect(ours()).toEqual([]);
  });

  it('stops within four seconds on Ctrl-C and leaves no process', async () => {
    run = start();
    await addressesOf(run);
    const toldAt = performance.now();
    run.process.kill('SIGINT');
    expect(await run.ended).toBe(0);
    expect(performance.now() - toldAt).toBeLessThan(stopLimitMs);
    expect(ours()).toEqual([]);
  });

  it('stops just as well while it is still starting', async () => {
    run = start();
    await until(() => run.output().includes('Starting PostgreSQL'));
    run.process.kill('SIGTERM');
    expect(await run.ended).toBe(0);
    expect(ours()).toEqual([]);
  });
});
