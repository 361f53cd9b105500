import type { Role } from '../policy/policy.ts';

/** Somebody who can sign in at the stand-in provider of the demo. */
export interface DemoPerson {
  /** The provider's own id for them, which never changes. */
  readonly subject: string;
  readonly name: string;
  readonly email: string;
  readonly isEmailVerified: boolean;
  /** The roles in the demo group; none: the group has not invited them. */
  readonly roles: readonly Role[];
  /** One line that says what can be seen by signing in as them. */
  readonly description: string;
}

/** The people of the demo group who can sign in. */
export const demoPeople = [
  {
    subject: 'demo-ines-thackeray',
    name: 'Ines Thackeray',
    email: 'ines.thackeray@example.org',
    isEmailVerified: true,
    roles: ['volunteer', 'coordinator'],
    description: 'Plans the season, publishes sessions and fills the gaps.',
  },
  {
    subject: 'demo-callum-marrack',
    name: 'Callum Marrack',
    email: 'callum.marrack@example.org',
    isEmailVerified: true,
    roles: ['volunteer'],
    description: 'Leads on the shore, and has a certificate to renew.',
  },
  {
    subject: 'demo-wei-ling-foo',
    name: 'Wei-Ling Foo',
    email: 'wei-ling.foo@example.org',
    isEmailVerified: true,
    roles: ['volunteer', 'trainer'],
    description: 'Checks certificates and trains first aid and tide safety.',
  },
  {
    subject: 'demo-dorothy-ashdown',
    name: 'Dorothy Ashdown',
    email: 'dorothy.ashdown@example.org',
    isEmailVerified: true,
    roles: ['volunteer', 'administrator'],
    description: 'Invites people, gives roles and keeps the settings.',
  },
] as const satisfies readonly DemoPerson[];

/** People whom the sign-in refuses, to show how. */
export const demoRefusedPeople = [
  {
    subject: 'demo-rafe-penhallow',
    name: 'Rafe Penhallow',
    email: 'rafe.penhallow@example.org',
    isEmailVerified: true,
    roles: [],
    description: 'A stranger: the group has not invited this address.',
  },
  {
    subject: 'demo-oona-birdsall',
    name: 'Oona Birdsall',
    email: 'oona.birdsall@example.org',
    isEmailVerified: false,
    roles: [],
    description: 'Has not shown that the e-mail address is theirs.',
  },
] as const satisfies readonly DemoPerson[];
