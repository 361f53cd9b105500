import { createServer } from 'node:net';
import { join } from 'node:path';
import { setTimeout as sleep } from 'node:timers/promises';
import { z } from 'zod';
import { readKept, writeKept } from './kept-file.ts';
import { CannotStart } from './say.ts';

/** Where things listen on this computer unless something else does: the first choice of each. */
const firstChoice = {
  page: 3700,
  signIn: 3701,
  mailWeb: 3702,
  smtp: 3703,
  postgres: 3704,
  appBehindPage: 3705,
} as const;

export type PortName = keyof typeof firstChoice;

const shape = z.partialRecord(
  z.enum(Object.keys(firstChoice) as [PortName, ...PortName[]]),
  z.int().min(1).max(65_535),
);

const waitForFreeMs = 3_000;
const highestPort = 65_535;

/** Ports that stay the same from one start to the next. */
export interface Ports {
  /**
   * The port of the last start if it is free or becomes so within three seconds, else the next
   * free one.
   */
  choose(name: PortName): Promise<number>;
  /**
   * The same, but a port once chosen never changes: the sign-in page's is part of what people
   * in the database are bound to. Throws CannotStart when something else listens there.
   */
  keep(name: PortName): Promise<number>;
  /** Forgets a kept port. */
  forget(name: PortName): void;
}

export function keptPorts(folder: string): Ports {
  const file = join(folder, 'ports.json');
  const kept = readKept(file, shape) ?? {};
  const taken = new Set<number>();
  const remember = (name: PortName, port: number): number => {
    taken.add(port);
    if (kept[name] !== port) {
      kept[name] = port;
      writeKept(file, kept);
    }
    return port;
  };
  const nextFree = async (from: number): Promise<number> => {
    const spoken = new Set([...taken, ...Object.values(kept)]);
    for (let port = from; port <= highestPort; port += 1) {
      if (!spoken.has(port) && (await isFree(port))) return port;
    }
    throw new CannotStart(`No free port from ${from} up.`);
  };
  return {
    async choose(name) {
      const before = kept[name];
      if (before !== undefined && (await becomesFree(before))) return remember(name, before);
      return remember(name, await nextFree(firstChoice[name]));
    },
    async keep(name) {
      const before = kept[name];
      if (before === undefined) return remember(name, await nextFree(firstChoice[name]));
      if (await becomesFree(before)) return remember(name, before);
      throw new CannotStart(
        `Port ${before} is where people of this database sign in, and another program listens there. Stop that program, or begin anew with: npm run demo:reset`,
      );
    },
    forget(name) {
      delete kept[name];
      writeKept(file, kept);
    },
  };
}

/** A port of this moment that nothing listens on. */
export function anyFreePort(): Promise<number> {
  return new Promise((resolve, reject) => {
    const probe = createServer();
    probe.once('error', reject);
    probe.listen(0, '127.0.0.1', () => {
      const address = probe.address();
      probe.close(() => {
        if (typeof address === 'object' && address !== null) resolve(address.port);
        else reject(new Error('The probe has no port'));
      });
    });
  });
}

async function becomesFree(port: number): Promise<boolean> {
  const untilMs = performance.now() + waitForFreeMs;
  while (!(await isFree(port))) {
    if (performance.now() > untilMs) return false;
    await sleep(100);
  }
  return true;
}

// 'localhost' leads to either address, so nothing may listen on the one that is not used here.
async function isFree(port: number): Promise<boolean> {
  return (await canListen(port, '127.0.0.1')) && (await canListen(port, '::1'));
}

function canListen(port: number, host: string): Promise<boolean> {
  return new Promise((resolve, reject) => {
    const probe = createServer();
    probe.once('error', (error: NodeJS.ErrnoException) => {
      if (error.code === 'EADDRINUSE' || error.code === 'EACCES') resolve(false);
      else if (error.code === 'EADDRNOTAVAIL' || error.code === 'EAFNOSUPPORT') resolve(true);
      else reject(error);
    });
    probe.listen(port, host, () => probe.close(() => resolve(true)));
  });
}
