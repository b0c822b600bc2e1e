import { type QueryInput, routes } from '@skyberth/shared';
import { infiniteQueryOptions, keepPreviousData, queryOptions } from '@tanstack/react-query';
import { call } from '../../lib/api-client.js';

export type AccountFilter = NonNullable<QueryInput<typeof routes.listAccounts>>;
export type AuditFilter = Omit<NonNullable<QueryInput<typeof routes.listAudit>>, 'beforeSeq'>;

export const oversightQueries = {
  accounts: (filter: AccountFilter) =>
    queryOptions({
      queryKey: ['accounts', 'list', filter],
      queryFn: ({ signal }) => call(routes.listAccounts, { query: filter, signal }),
      placeholderData: keepPreviousData,
    }),
  account: (id: string) =>
    queryOptions({
      queryKey: ['accounts', 'one', id],
      queryFn: ({ signal }) => call(routes.getAccount, { params: { id }, signal }),
    }),
  audit: (filter: AuditFilter) =>
    infiniteQueryOptions({
      queryKey: ['audit', filter],
      queryFn: ({ signal, pageParam }) =>
        call(routes.listAudit, { query: { ...filter, ...(pageParam ? { beforeSeq: pageParam } : {}) }, signal }),
      initialPageParam: null as number | null,
      getNextPageParam: (last) => last.nextBeforeSeq,
    }),
};
