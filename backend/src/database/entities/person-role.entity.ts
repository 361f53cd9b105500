import { EntitySchema } from 'typeorm';
import type { PersonId } from '#shared/kernel/ids.ts';
import type { Role } from '#shared/policy/policy.ts';

/** A role beyond volunteer. */
export interface PersonRoleRow {
  personId: PersonId;
  role: Exclude<Role, 'volunteer'>;
}

export const PersonRoleEntity = new EntitySchema<PersonRoleRow>({
  name: 'person_role',
  columns: {
    personId: { name: 'person_id', type: 'uuid', primary: true },
    role: { type: 'text', primary: true },
  },
});
