/** What the market is asked. Keys begin with 'passes', so that a hold or its end refreshes all of them. */
import { type BodyInput, routes, type SearchInput } from '@skyberth/shared';
import { keepPreviousData, queryOptions } from '@tanstack/react-query';
import { call } from '../../lib/api-client.js';

export type PassRequest = BodyInput<typeof routes.passDetail>;

export const findTimeQueries = {
  search: (input: SearchInput) =>
    queryOptions({
      queryKey: ['passes', 'search', input],
      queryFn: ({ signal }) => call(routes.searchPasses, { body: input, signal }),
      placeholderData: keepPreviousData,
      staleTime: 60_000,
    }),
  detail: (request: PassRequest) =>
    queryOptions({
      queryKey: ['passes', 'detail', request],
      queryFn: ({ signal }) => call(routes.passDetail, { body: request, signal }),
      staleTime: 60_000,
    }),
  stations: () =>
    queryOptions({
      queryKey: ['passes', 'stations'],
      queryFn: ({ signal }) => call(routes.listMarketStations, { signal }),
      staleTime: 5 * 60_000,
    }),
};
