import { describe, expect, it } from 'vitest';
import type { InvitedPerson } from '#shared/domain/account/admission.ts';
import { mayEnter } from '#shared/domain/account/admission.ts';

const invited: InvitedPerson = { state: 'invited', isBoundToIdentity: false };
const bound: InvitedPerson = { state: 'active', isBoundToIdentity: true };

describe('somebody whom the provider vouches for', () => {
  it('enters the first time by an invited, verified address, and is bound to that identity', () => {
    const facts = { byIdentity: null, isEmailVerified: true, byEmail: invited };
    expect(mayEnter(facts)).toEqual({ isGranted: true, value: { bindsIdentity: true } });
  });

  it('enters afterwards by the identity, whatever the address says', () => {
    const facts = { byIdentity: bound, isEmailVerified: false, byEmail: null };
    expect(mayEnter(facts)).toEqual({ isGranted: true, value: { bindsIdentity: false } });
  });

  it.each([
    ['an unverified address', null, false, invited, 'email-not-verified'],
    ['an address that nobody invited', null, true, null, 'not-invited'],
    ['the address of somebody bound elsewhere', null, true, bound, 'other-identity'],
    ['the identity of a paused person', { ...bound, state: 'paused' }, true, null, 'paused'],
    ['the identity of a person who left', { ...bound, state: 'left' }, true, null, 'not-invited'],
    ['the address of a paused person', null, true, { ...invited, state: 'paused' }, 'paused'],
    ['the address of a person who left', null, true, { ...invited, state: 'left' }, 'not-invited'],
  ] as const)('is not let in with %s', (_words, byIdentity, isEmailVerified, byEmail, why) => {
    expect(mayEnter({ byIdentity, isEmailVerified, byEmail })).toEqual({
      isGranted: false,
      reasons: [{ why }],
    });
  });
});
