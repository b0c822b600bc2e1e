/** Monthly accounts, asked for by the account's own page and where a hold is paid. */
import { routes } from '@skyberth/shared';
import { queryOptions } from '@tanstack/react-query';
import { call } from './api-client.js';

export const creditQueries = {
  all: ['credit'] as const,
  mine: () =>
    queryOptions({ queryKey: ['credit', 'mine'], queryFn: ({ signal }) => call(routes.myCredit, { signal }) }),
  everybody: () =>
    queryOptions({ queryKey: ['credit', 'everybody'], queryFn: ({ signal }) => call(routes.listCredit, { signal }) }),
};
