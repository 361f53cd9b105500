import type { Instant } from '#shared/kernel/time.ts';

/** The only place that knows what time it is. */
export interface Clock {
  now(): Instant;
}

export const systemClock: Clock = { now: () => Date.now() };

/** A clock that stands still until it is set. */
export function stoppedClock(at: Instant): Clock & { setTo(next: Instant): void } {
  let now = at;
  return {
    now: () => now,
    setTo(next) {
      now = next;
    },
  };
}
