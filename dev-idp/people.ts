import { demoPeople, demoRefusedPeople } from '#shared/demo/demo-people.ts';
import type { DemoPerson } from '#shared/demo/demo-people.ts';

/** The person with this subject; undefined when there is none. */
export function findPerson(subject: string): DemoPerson | undefined {
  return [...demoPeople, ...demoRefusedPeople].find((person) => person.subject === subject);
}

/** What the ID token and userinfo say about a person (OpenID Connect Core 5.1). */
export function claimsOf(person: DemoPerson) {
  return {
    sub: person.subject,
    email: person.email,
    email_verified: person.isEmailVerified,
    name: person.name,
  };
}
