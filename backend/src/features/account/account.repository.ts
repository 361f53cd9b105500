import { PersonEntity } from '#backend/database/entities/person.entity.ts';
import type { PersonRow } from '#backend/database/entities/person.entity.ts';
import type { Tx } from '#backend/database/transaction.ts';
import type { PersonId } from '#shared/kernel/ids.ts';

/** Locks the person bound to an identity at a provider; null when nobody is. */
export function lockByIdentity(tx: Tx, issuer: string, subject: string): Promise<PersonRow | null> {
  return tx
    .createQueryBuilder(PersonEntity, 'person')
    .where('person.oidc_issuer = :issuer AND person.oidc_subject = :subject', { issuer, subject })
    .setLock('pessimistic_write')
    .getOne();
}

/** Locks the person invited by an address, in lower case; null when nobody was. */
export function lockByEmail(tx: Tx, email: string): Promise<PersonRow | null> {
  return tx
    .createQueryBuilder(PersonEntity, 'person')
    .where('person.email = :email', { email })
    .setLock('pessimistic_write')
    .getOne();
}

/** Ties a person to the identity by which they signed in first, and makes them active. */
export async function bindIdentity(
  tx: Tx,
  personId: PersonId,
  issuer: string,
  subject: string,
): Promise<void> {
  await tx.update(
    PersonEntity,
    { id: personId },
    { oidcIssuer: issuer, oidcSubject: subject, state: 'active' },
  );
}
