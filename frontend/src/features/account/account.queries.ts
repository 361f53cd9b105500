import { queryOptions } from '@tanstack/react-query';
import type { Reply } from '#frontend/api/call.ts';
import { call } from '#frontend/api/call.ts';

export type AccountView = Reply<'seeAccount'>;
export type FrontDoorView = Reply<'seeFrontDoor'>;

/** The replies that this feature keeps, under one root. */
export const accountQueries = {
  root: ['account'] as const,
  account: () =>
    queryOptions({
      queryKey: [...accountQueries.root, 'me'],
      queryFn: ({ signal }) => call('seeAccount', {}, signal),
    }),
  frontDoor: () =>
    queryOptions({
      queryKey: [...accountQueries.root, 'front-door'],
      queryFn: ({ signal }) => call('seeFrontDoor', {}, signal),
    }),
};
