import { queryOptions } from '@tanstack/react-query';
import { call } from '#frontend/api/call.ts';
import type { z } from 'zod';
import { seeAccount, seeFrontDoor } from '#shared/contracts/account.ts';

export type AccountView = z.output<typeof seeAccount.reply>;
export type FrontDoorView = z.output<typeof seeFrontDoor.reply>;

/** The replies that this feature keeps, under one root. */
export const accountQueries = {
  root: ['account'] as const,
  account: () =>
    queryOptions({
      queryKey: [...accountQueries.root, 'me'],
      queryFn: ({ signal }) => call(seeAccount, {}, signal),
    }),
  frontDoor: () =>
    queryOptions({
      queryKey: [...accountQueries.root, 'front-door'],
      queryFn: ({ signal }) => call(seeFrontDoor, {}, signal),
    }),
};
