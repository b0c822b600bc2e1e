/** What the ledger page asks for. */
import { routes } from '@skyberth/shared';
import { infiniteQueryOptions, queryOptions } from '@tanstack/react-query';
import { call } from '../../lib/api-client.js';

const LINES_AT_ONCE = 50;

export interface JournalFilter {
  readonly currency: string | undefined;
  readonly bookingNumber: number | undefined;
  readonly fromMonth: string | undefined;
  readonly toMonth: string | undefined;
}

export interface LinesFilter {
  readonly account: string;
  readonly currency: string;
  readonly organisationId: string | undefined;
  readonly fromMonth: string | undefined;
  readonly toMonth: string | undefined;
}

export const ledgerQueries = {
  all: ['ledger'] as const,
  balances: () =>
    queryOptions({ queryKey: ['ledger', 'balances'], queryFn: ({ signal }) => call(routes.balances, { signal }) }),
  parties: (account: string, currency: string) =>
    queryOptions({
      queryKey: ['ledger', 'parties', account, currency],
      queryFn: ({ signal }) => call(routes.partyBalances, { query: { account, currency }, signal }),
    }),
  months: (currency: string) =>
    queryOptions({
      queryKey: ['ledger', 'months', currency],
      queryFn: ({ signal }) => call(routes.ledgerMonths, { query: { currency }, signal }),
    }),
  check: () =>
    queryOptions({ queryKey: ['ledger', 'check'], queryFn: ({ signal }) => call(routes.ledgerCheck, { signal }) }),
  journal: (filter: JournalFilter) =>
    infiniteQueryOptions({
      queryKey: ['ledger', 'journal', filter],
      queryFn: ({ signal, pageParam }) =>
        call(routes.journal, { query: { ...filter, after: pageParam ?? undefined, limit: LINES_AT_ONCE }, signal }),
      initialPageParam: null as string | null,
      getNextPageParam: (page) => page.next,
    }),
  lines: (filter: LinesFilter) =>
    infiniteQueryOptions({
      queryKey: ['ledger', 'lines', filter],
      queryFn: ({ signal, pageParam }) =>
        call(routes.ledgerLines, { query: { ...filter, after: pageParam ?? undefined, limit: LINES_AT_ONCE }, signal }),
      initialPageParam: null as string | null,
      getNextPageParam: (page) => page.next,
    }),
};
