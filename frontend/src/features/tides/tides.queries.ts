import { queryOptions } from '@tanstack/react-query';
import { call } from '#frontend/api/call.ts';

/** The replies that this feature keeps, under one root. */
export const tidesQueries = {
  root: ['tide-tables'] as const,
  tables: () =>
    queryOptions({
      queryKey: [...tidesQueries.root, 'list'],
      queryFn: ({ signal }) => call('seeTables', {}, signal),
    }),
};
