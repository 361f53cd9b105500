import type { Contract } from './contract.ts';

/**
 * Where each contract is called. It stands apart from the schemas so that the browser, which
 * trusts the server's replies, carries none of them; a contract takes its method and path from
 * here under its own name.
 */
export const endpoints = {
  seeAccount: { method: 'get', path: '/api/account' },
  signOut: { method: 'post', path: '/api/account/sign-out' },
  seeFrontDoor: { method: 'get', path: '/api/front-door' },
  seeSession: { method: 'get', path: '/api/sessions/:sessionId' },
  seeCalendar: { method: 'get', path: '/api/calendar' },
  claimSlot: { method: 'post', path: '/api/slots/:slotId/claim' },
  releaseSlot: { method: 'post', path: '/api/slots/:slotId/release' },
} as const satisfies Record<string, Pick<Contract, 'method' | 'path'>>;

export type EndpointName = keyof typeof endpoints;
