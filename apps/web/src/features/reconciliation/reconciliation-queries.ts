/** What the pages of reconciliation ask for. */
import { type Movement, routes } from '@skyberth/shared';
import { keepPreviousData, queryOptions } from '@tanstack/react-query';
import { call } from '../../lib/api-client.js';

export const MOVEMENTS_PER_PAGE = 50;

export const reconciliationQueries = {
  all: ['reconciliation'] as const,
  view: () =>
    queryOptions({
      queryKey: ['reconciliation', 'view'],
      queryFn: ({ signal }) => call(routes.reconciliation, { signal }),
    }),
  movements: (state: Movement['state'] | undefined, page: number) =>
    queryOptions({
      queryKey: ['reconciliation', 'movements', state ?? '', page],
      queryFn: ({ signal }) =>
        call(routes.listMovements, { query: { state, page, pageSize: MOVEMENTS_PER_PAGE }, signal }),
      placeholderData: keepPreviousData,
    }),
  chargebacks: (page: number) =>
    queryOptions({
      queryKey: ['reconciliation', 'chargebacks', page],
      queryFn: ({ signal }) => call(routes.listChargebacks, { query: { page, pageSize: MOVEMENTS_PER_PAGE }, signal }),
      placeholderData: keepPreviousData,
    }),
  months: () =>
    queryOptions({
      queryKey: ['reconciliation', 'months'],
      queryFn: ({ signal }) => call(routes.listMonths, { signal }),
    }),
};
