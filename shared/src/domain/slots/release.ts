import type { PersonId } from '../../kernel/ids.ts';
import type { Verdict } from '../../kernel/result.ts';
import { granted, refused } from '../../kernel/result.ts';
import type { Instant } from '../../kernel/time.ts';

/** One reason why a person may not release a slot. */
export type ReleaseReason =
  | { readonly why: 'not-the-holder' }
  | { readonly why: 'session-started'; readonly meetsAt: Instant };

/**
 * Whether a person may give back their own slot: until the crew meets. After that somebody
 * would stand on the shore one short, and the shore leader decides.
 */
export function mayRelease(facts: {
  readonly now: Instant;
  readonly personId: PersonId;
  readonly holderId: PersonId | null;
  readonly meetsAt: Instant;
}): Verdict<null, ReleaseReason> {
  const { now, personId, holderId, meetsAt } = facts;
  if (holderId !== personId) return refused({ why: 'not-the-holder' });
  if (now >= meetsAt) return refused({ why: 'session-started', meetsAt });
  return granted(null);
}
