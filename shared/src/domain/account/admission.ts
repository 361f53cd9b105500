import type { Verdict } from '../../kernel/result.ts';
import { granted, refused } from '../../kernel/result.ts';

/** A person of the group as far as being let in goes. */
export interface InvitedPerson {
  readonly state: 'invited' | 'active' | 'paused' | 'left';
  readonly isBoundToIdentity: boolean;
}

/** Why somebody who signed in at the provider is not let in. */
export type AdmissionReason =
  | { readonly why: 'email-not-verified' }
  | { readonly why: 'not-invited' }
  | { readonly why: 'other-identity' }
  | { readonly why: 'paused' };

/**
 * Whether somebody whom the provider vouches for is let in. Bound to their identity already,
 * the address no longer matters. Else only a verified address that was invited lets them in,
 * and binds them; an address whose person is bound to another identity does not, for whoever
 * has it now may not be who had it then.
 */
export function mayEnter(facts: {
  readonly byIdentity: InvitedPerson | null;
  readonly isEmailVerified: boolean;
  readonly byEmail: InvitedPerson | null;
}): Verdict<{ readonly bindsIdentity: boolean }, AdmissionReason> {
  const { byIdentity, isEmailVerified, byEmail } = facts;
  if (byIdentity !== null) return admit(byIdentity, false);
  if (!isEmailVerified) return refused({ why: 'email-not-verified' });
  if (byEmail === null) return refused({ why: 'not-invited' });
  if (byEmail.isBoundToIdentity) return refused({ why: 'other-identity' });
  return admit(byEmail, true);
}

function admit(
  person: InvitedPerson,
  bindsIdentity: boolean,
): Verdict<{ readonly bindsIdentity: boolean }, AdmissionReason> {
  if (person.state === 'paused') return refused({ why: 'paused' });
  if (person.state === 'left') return refused({ why: 'not-invited' });
  return granted({ bindsIdentity });
}
