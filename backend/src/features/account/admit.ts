import type { AppContext } from '#backend/app-context.ts';
import type { PersonRow } from '#backend/database/entities/person.entity.ts';
import type { Identity } from '#backend/platform/sign-in/identity-provider.ts';
import type { AdmissionReason, InvitedPerson } from '#shared/domain/account/admission.ts';
import { mayEnter } from '#shared/domain/account/admission.ts';
import type { PersonId } from '#shared/kernel/ids.ts';
import { bindIdentity, lockByEmail, lockByIdentity } from './account.repository.ts';

export type Admission =
  | { readonly isAdmitted: true; readonly personId: PersonId }
  | { readonly isAdmitted: false; readonly why: AdmissionReason['why'] };

/**
 * Lets in a person whom the provider vouches for, or says why not. The first time binds the
 * invited person to the issuer and subject, with a line on the trail.
 */
export function admit(ctx: AppContext, identity: Identity): Promise<Admission> {
  const { issuer, subject, email, isEmailVerified } = identity;
  return ctx.inTransaction(async (tx) => {
    const byIdentity = await lockByIdentity(tx, issuer, subject);
    const byEmail =
      byIdentity === null && isEmailVerified && email !== null
        ? await lockByEmail(tx, email)
        : null;
    const person = byIdentity ?? byEmail;
    const verdict = mayEnter({
      byIdentity: asInvited(byIdentity),
      isEmailVerified: isEmailVerified && email !== null,
      byEmail: asInvited(byEmail),
    });
    if (!verdict.isGranted) return { isAdmitted: false, why: verdict.reasons[0].why };
    if (person === null) return { isAdmitted: false, why: 'not-invited' };
    if (verdict.value.bindsIdentity) {
      await bindIdentity(tx, person.id, issuer, subject);
      await ctx.recordTrail(tx, {
        actorId: person.id,
        action: 'person.identity-bound',
        recordKind: 'person',
        recordId: person.id,
        details: { issuer },
      });
    }
    return { isAdmitted: true, personId: person.id };
  });
}

function asInvited(person: PersonRow | null): InvitedPerson | null {
  return person === null
    ? null
    : { state: person.state, isBoundToIdentity: person.oidcSubject !== null };
}
