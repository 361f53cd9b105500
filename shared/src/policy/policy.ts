/** The roles a person may hold. Roles add up; everybody who is in the group is a volunteer. */
export const roles = ['volunteer', 'coordinator', 'trainer', 'administrator'] as const;
export type Role = (typeof roles)[number];

const everyone = { of: 'everyone' } as const;

function holds(...held: readonly [Role, ...Role[]]) {
  return { of: 'people', roles: held } as const;
}

const anyPerson = holds('volunteer', 'coordinator', 'trainer', 'administrator');

/**
 * Who may try what. "May a person try?" is decided here and answered with 401 or 403;
 * "does it succeed today?" is a rule and answered with 409. No endpoint can be written
 * without one of these actions.
 */
export const policy = {
  'front-door.see': everyone,
  'health.see': everyone,
  'openapi.see': everyone,
  'account.see': everyone,
  'account.sign-in': everyone,
  'account.sign-out': everyone,
  'calendar.see': anyPerson,
  'session.see': anyPerson,
  'session.see-drafts': holds('coordinator'),
  'shore.see': anyPerson,
  'shore.change': holds('coordinator', 'administrator'),
  'tide-table.see': holds('coordinator', 'administrator'),
  'tide-table.change': holds('coordinator', 'administrator'),
  'season-plan.see': holds('coordinator'),
  'season-plan.change': holds('coordinator'),
  'slot.claim': anyPerson,
  'slot.release-own': anyPerson,
} as const;

export type Action = keyof typeof policy;

/** Whether somebody who holds these roles (null: nobody is signed in) may try the action. */
export function may(held: readonly Role[] | null, action: Action): boolean {
  const permission = policy[action];
  if (permission.of === 'everyone') return true;
  return held !== null && held.some((role) => permission.roles.includes(role));
}
