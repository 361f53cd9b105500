import { describe, expect, it } from 'vitest';
import { mayRelease } from '#shared/domain/slots/release.ts';
import type { PersonId } from '#shared/kernel/ids.ts';

const holder = 'holder' as PersonId;
const facts = { now: 999, personId: holder, holderId: holder, meetsAt: 1000 };

describe('releasing a slot', () => {
  it('is granted to its holder until the crew meets', () => {
    expect(mayRelease(facts).isGranted).toBe(true);
    expect(mayRelease({ ...facts, now: 1000 })).toEqual({
      isGranted: false,
      reasons: [{ why: 'session-started', meetsAt: 1000 }],
    });
  });

  it('is refused to anybody else, and where nobody holds it', () => {
    for (const holderId of ['somebody else' as PersonId, null]) {
      expect(mayRelease({ ...facts, holderId })).toEqual({
        isGranted: false,
        reasons: [{ why: 'not-the-holder' }],
      });
    }
  });
});
