import { spawn } from 'node:child_process';
import { closeSync, existsSync, openSync, readFileSync } from 'node:fs';
import { projectRoot } from './data-folder.ts';
import type { Runs } from './launch.ts';
import { CannotStart } from './say.ts';

interface PartWish {
  /** As people call it: 'The mail catcher'. */
  readonly name: string;
  /** The TypeScript file to run, from the root of the project. */
  readonly file: string;
  readonly env: Readonly<Record<string, string | undefined>>;
  /** Where it writes; null: to the terminal. */
  readonly logFile: string | null;
  /** How long it may take to end in order. */
  readonly graceMs: number;
}

/** A program that was started as a child, and that ends by itself when this process is gone. */
interface Part extends Runs {
  /** Waits until the part says that it is ready; throws CannotStart when it ends before. */
  untilReady(): Promise<void>;
  /** Asks it to end; after the grace it is ended, with everything that it began. */
  stop(): Promise<void>;
}

const linesOfLog = 25;

/**
 * Starts a part under Node itself, never through npx, which would leave it behind. It has a
 * channel to this process: it sends `{ready: true}` there, and ends when the channel closes.
 */
export function startPart(wish: PartWish): Part {
  const log = wish.logFile === null ? null : openSync(wish.logFile, 'w', 0o600);
  const child = spawn(process.execPath, ['--import', 'tsx', wish.file], {
    cwd: projectRoot,
    env: { ...process.env, ...wish.env },
    stdio: ['ignore', log ?? 2, log ?? 2, 'ipc'],
    // Its own process group: Ctrl-C reaches this process alone, which ends the parts in order.
    detached: true,
  });
  if (log !== null) closeSync(log);
  let isToldToStop = false;
  const ended = new Promise<void>((resolve) => {
    child.once('exit', () => resolve());
    child.once('error', () => resolve());
  });
  const gone = new Promise<string>((resolve) => {
    void ended.then(() => {
      if (!isToldToStop) resolve(lastLines(wish.logFile));
    });
  });
  const ready = new Promise<void>((resolve) => {
    child.on('message', (message) => {
      if (typeof message === 'object' && 'ready' in message) resolve();
    });
  });
  return {
    name: wish.name,
    untilReady: () =>
      Promise.race([
        ready,
        ended.then(() => {
          const lines = lastLines(wish.logFile);
          throw new CannotStart(`${wish.name} did not start.\n${lines}`.trimEnd());
        }),
      ]),
    gone,
    async stop() {
      isToldToStop = true;
      child.kill('SIGTERM');
      const late = setTimeout(() => {
        if (child.pid !== undefined) process.kill(-child.pid, 'SIGKILL');
      }, wish.graceMs);
      await ended;
      clearTimeout(late);
    },
  };
}

function lastLines(file: string | null): string {
  if (file === null || !existsSync(file)) return '';
  return readFileSync(file, 'utf8').trimEnd().split('\n').slice(-linesOfLog).join('\n');
}
