/** What the pages of payouts ask for. */
import { routes } from '@skyberth/shared';
import { keepPreviousData, queryOptions } from '@tanstack/react-query';
import { call } from '../../lib/api-client.js';

export const payoutQueries = {
  all: ['payouts'] as const,
  runs: (page: number) =>
    queryOptions({
      queryKey: ['payouts', 'runs', page],
      queryFn: ({ signal }) => call(routes.listPayoutRuns, { query: { page, pageSize: 20 }, signal }),
      placeholderData: keepPreviousData,
    }),
  run: (id: string) =>
    queryOptions({
      queryKey: ['payouts', 'run', id],
      queryFn: ({ signal }) => call(routes.getPayoutRun, { params: { id }, signal }),
      // A transfer takes seconds; the page follows it.
      refetchInterval: ({ state }) => (state.data?.state === 'paying' ? 2_000 : false),
    }),
};
