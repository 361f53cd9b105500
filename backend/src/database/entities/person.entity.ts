import { EntitySchema } from 'typeorm';
import type { CalendarDay } from '#shared/kernel/time.ts';
import type { PersonId } from '#shared/kernel/ids.ts';

/** Somebody in the group. Nobody is deleted: people leave, or are erased to a pseudonym. */
export interface PersonRow {
  id: PersonId;
  name: string;
  /** In lower case; the address by which the person was invited. */
  email: string;
  bornOn: CalendarDay | null;
  state: 'invited' | 'active' | 'paused' | 'left';
  oidcIssuer: string | null;
  oidcSubject: string | null;
  createdAt: Date;
}

export const PersonEntity = new EntitySchema<PersonRow>({
  name: 'person',
  columns: {
    id: { type: 'uuid', primary: true },
    name: { type: 'text' },
    email: { type: 'text' },
    bornOn: { name: 'born_on', type: 'date', nullable: true },
    state: { type: 'text' },
    oidcIssuer: { name: 'oidc_issuer', type: 'text', nullable: true },
    oidcSubject: { name: 'oidc_subject', type: 'text', nullable: true },
    createdAt: { name: 'created_at', type: 'timestamptz' },
  },
});
