import { existsSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { z } from 'zod';
import { isAlive } from './alive.ts';
import { readKept, writeKept } from './kept-file.ts';
import { CannotStart } from './say.ts';

const shape = z.strictObject({
  pid: z.int().positive(),
  /** When the kernel says that the process began; null where it does not tell. */
  beganAt: z.string().nullable(),
  /** Where the application answers; null until it does. */
  address: z.string().nullable(),
});

/** The start command that is at work on a data folder. */
type Running = z.output<typeof shape>;

/** This process's place as the only one at work on a data folder. */
export interface Place {
  tellAddress(address: string): void;
  leave(): void;
}

/** Who is at work on the data folder; null when nobody is, whatever an ended process left. */
export function whoIsRunning(folder: string): Running | null {
  const held = readKept(placeFile(folder), shape);
  return held !== null && beganAt(held.pid) === held.beganAt && isAlive(held.pid) ? held : null;
}

/** Takes the place of the one that works on the data folder; null when it is taken. */
export function takePlace(folder: string): Place | null {
  if (whoIsRunning(folder) !== null) return null;
  const file = placeFile(folder);
  const own: Running = { pid: process.pid, beganAt: beganAt(process.pid), address: null };
  rmSync(file, { force: true });
  try {
    writeFileSync(file, JSON.stringify(own), { flag: 'wx', mode: 0o600 });
  } catch (error) {
    if (error instanceof Error && Reflect.get(error, 'code') === 'EEXIST') return null;
    throw new CannotStart(`${file} cannot be written (${String(error)}).`);
  }
  return {
    tellAddress: (address) => writeKept(file, { ...own, address }),
    leave: () => rmSync(file, { force: true }),
  };
}

function placeFile(folder: string): string {
  return join(folder, 'running.json');
}

// A process id is given again to another process; the id and the moment it began are not.
function beganAt(pid: number): string | null {
  const file = `/proc/${pid}/stat`;
  if (!existsSync(file)) return null;
  // The name in brackets may hold anything; the fields are counted from behind it (proc(5)).
  const fields = readFileSync(file, 'utf8').split(') ').at(-1)?.split(' ') ?? [];
  return fields[19] ?? null;
}
