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
  seeShores: { method: 'get', path: '/api/shores' },
  seeShore: { method: 'get', path: '/api/shores/:shoreId' },
  makeShore: { method: 'post', path: '/api/shores' },
  changeShore: { method: 'put', path: '/api/shores/:shoreId' },
  findStations: { method: 'get', path: '/api/tide-stations' },
  previewShore: { method: 'post', path: '/api/shores/preview' },
  previewPlan: { method: 'post', path: '/api/season-plans/preview' },
  readPattern: { method: 'post', path: '/api/season-plans/read-pattern' },
  seePlans: { method: 'get', path: '/api/season-plans' },
  seePlan: { method: 'get', path: '/api/season-plans/:planId' },
  keepPlan: { method: 'post', path: '/api/season-plans' },
  changePlan: { method: 'put', path: '/api/season-plans/:planId' },
  makeSessions: { method: 'post', path: '/api/season-plans/:planId/make-sessions' },
  publishSessions: { method: 'post', path: '/api/season-plans/:planId/publish' },
  seeTables: { method: 'get', path: '/api/tide-tables' },
  previewTable: { method: 'post', path: '/api/tide-tables/preview' },
  acceptTable: { method: 'post', path: '/api/tide-tables' },
  takeBackTable: { method: 'post', path: '/api/tide-tables/:tableId/take-back' },
} as const satisfies Record<string, Pick<Contract, 'method' | 'path'>>;

export type EndpointName = keyof typeof endpoints;
