import { type QueryInput, routes } from '@skyberth/shared';
import { keepPreviousData, queryOptions } from '@tanstack/react-query';
import { call } from '../../lib/api-client.js';

export type DisputeFilter = NonNullable<QueryInput<typeof routes.listDisputes>>;

export const disputeQueries = {
  all: ['disputes'] as const,
  list: (filter: DisputeFilter) =>
    queryOptions({
      queryKey: ['disputes', 'list', filter],
      queryFn: ({ signal }) => call(routes.listDisputes, { query: filter, signal }),
      placeholderData: keepPreviousData,
    }),
  one: (id: string) =>
    queryOptions({
      queryKey: ['disputes', 'one', id],
      queryFn: ({ signal }) => call(routes.getDispute, { params: { id }, signal }),
      refetchInterval: 60_000,
    }),
  precedents: (reason: NonNullable<QueryInput<typeof routes.precedents>>['reason']) =>
    queryOptions({
      queryKey: ['disputes', 'precedents', reason ?? ''],
      queryFn: ({ signal }) => call(routes.precedents, { query: reason ? { reason } : {}, signal }),
    }),
};
