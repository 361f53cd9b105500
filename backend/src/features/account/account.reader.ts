import type { Read } from '#backend/database/transaction.ts';
import type { PersonId } from '#shared/kernel/ids.ts';
import type { Role } from '#shared/policy/policy.ts';

/** Somebody who may be signed in. */
export interface SignedInPerson {
  readonly personId: PersonId;
  readonly name: string;
  readonly roles: readonly Role[];
}

/**
 * The person with the roles of this moment; null when there is none of this id, or when they
 * are not active (paused, left): then nobody is signed in.
 */
export async function readActor(read: Read, personId: PersonId): Promise<SignedInPerson | null> {
  const rows: { person: SignedInPerson }[] = await read.query(
    `SELECT json_build_object(
         'personId', p.id, 'name', p.name,
         'roles', (SELECT json_agg(role ORDER BY role) FROM (
            SELECT 'volunteer' AS role UNION ALL
            SELECT r.role FROM person_role r WHERE r.person_id = p.id) held)) AS person
       FROM person p WHERE p.id = $1 AND p.state = 'active'`,
    [personId],
  );
  return rows[0]?.person ?? null;
}

/** Whether anybody is in the group at all. */
export async function hasPeople(read: Read): Promise<boolean> {
  const rows: { some: boolean }[] = await read.query('SELECT EXISTS (SELECT FROM person) AS some');
  return rows[0]?.some === true;
}
