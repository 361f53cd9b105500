import { describe, expect, it } from 'vitest';
import { may, policy, roles } from '#shared/policy/policy.ts';
import type { Action } from '#shared/policy/policy.ts';

const actions = Object.keys(policy) as Action[];

describe('the policy', () => {
  it('lets nobody who is not signed in try what is for people', () => {
    const open = actions.filter((action) => may(null, action));
    expect(open).toEqual(actions.filter((action) => policy[action].of === 'everyone'));
    expect(open).not.toContain('slot.claim');
  });

  it('lets somebody who holds no role at all try nothing that is for people', () => {
    expect(actions.filter((action) => may([], action))).toEqual(
      actions.filter((action) => policy[action].of === 'everyone'),
    );
  });

  it('only ever adds: with one more role nothing is taken away', () => {
    for (const action of actions) {
      for (const role of roles) {
        if (may(['volunteer'], action)) expect(may(['volunteer', role], action)).toBe(true);
      }
    }
  });

  it('shows drafts to coordinators alone', () => {
    expect(roles.filter((role) => may([role], 'session.see-drafts'))).toEqual(['coordinator']);
  });
});
