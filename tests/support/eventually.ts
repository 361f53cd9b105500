import { setTimeout as sleep } from 'node:timers/promises';

const patienceMs = 15_000;
const pauseMs = 50;

/** Asks again until the answer holds something, for at most fifteen seconds. */
export async function eventually<Item>(
  ask: () => readonly Item[] | Promise<readonly Item[]>,
): Promise<readonly Item[]> {
  for (const until = Date.now() + patienceMs; ;) {
    const found = await ask();
    if (found.length > 0 || Date.now() > until) return found;
    await sleep(pauseMs);
  }
}
