import { createServer } from 'node:net';
import { join } from 'node:path';
import { setTimeout as sleep } from 'node:timers/promises';
import { z } from 'zod';
import { readKept, writeKept } from './kept-file.ts';
import { CannotStart } from './say.ts';

/** Where things listen unless something else does, counted from the first port. */
const placeInRow = {
  page: 0,
  signIn: 1,
  mailWeb: 2,
  smtp: 3,
  postgres: 4,
  appBehindPage: 5,
} as const;

type PortName = keyof typeof placeInRow;

const shape = z.partialRecord(
  z.enum(Object.keys(placeInRow) as [PortName, ...PortName[]]),
  z.int().min(1).max(65_535),
);

const usualFirstPort = 3_700;
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

/** The ports kept in a data folder; the first choices are `firstPort` and those after it. */
export function keptPorts(folder: string, firstPort = firstPortWished()): Ports {
  const file = join(folder, 'ports.json');
  const kept = new Map(Object.entries(readKept(file, shape) ?? {}));
  const taken = new Set<number>();
  const write = (): void => writeKept(file, Object.fromEntries(kept));
  const remember = (name: PortName, port: number): number => {
    taken.add(port);
    if (kept.get(name) !== port) {
      kept.set(name, port);
      write();
    }
    return port;
  };
  const nextFree = async (from: number): Promise<number> => {
    const spoken = new Set([...taken, ...kept.values()]);
    for (let port = from; port <= highestPort; port += 1) {
      if (!spoken.has(port) && (await isFree(port))) return port;
    }
    throw new CannotStart(`No free port from ${from} up.`);
  };
  return {
    async choose(name) {
      const before = kept.get(name);
      if (before !== undefined && (await becomesFree(before))) return remember(name, before);
      return remember(name, await nextFree(firstPort + placeInRow[name]));
    },
    async keep(name) {
      const before = kept.get(name);
      if (before === undefined) return remember(name, await nextFree(firstPort + placeInRow[name]));
      if (await becomesFree(before)) return remember(name, before);
      throw new CannotStart(
        `Port ${before} is where people of this database sign in, and another program listens there. Stop that program, or begin anew with: npm run demo:reset`,
      );
    },
    forget(name) {
      kept.delete(name);
      write();
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

/** EBBFOLK_FIRST_PORT names another row of ports, for two checkouts on one computer. */
function firstPortWished(): number {
  const wished = Number(process.env['EBBFOLK_FIRST_PORT'] || usualFirstPort);
  if (Number.isInteger(wished) && wished > 0 && wished < highestPort) return wished;
  throw new CannotStart('EBBFOLK_FIRST_PORT must be a port number.');
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
