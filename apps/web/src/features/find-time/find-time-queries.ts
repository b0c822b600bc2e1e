/** What the market is asked. Keys begin with 'passes', so that a hold or its end refreshes all of them. */
import { type BodyInput, routes, type SearchInput } from '@skyberth/shared';
import { keepPreviousData, queryOptions } from '@tanstack/react-query';
import { call, ProblemError } from '../../lib/api-client.js';

export type PassRequest = BodyInput<typeof routes.passDetail>;

export const findTimeQueries = {
  /** `searchId` only names the running search for `progress`; the answer does not depend on it. */
  search: (input: SearchInput, searchId?: string) =>
    queryOptions({
      queryKey: ['passes', 'search', input],
      queryFn: ({ signal }) =>
        call(routes.searchPasses, { body: searchId === undefined ? input : { ...input, searchId }, signal }),
      placeholderData: keepPreviousData,
      staleTime: 60_000,
    }),
  /** How far the search of that name is; null before the server has begun with it and after its end. */
  progress: (searchId: string) =>
    queryOptions({
      queryKey: ['passes', 'progress', searchId],
      queryFn: async ({ signal }) => {
        try {
          return await call(routes.searchProgress, { params: { searchId }, signal });
        } catch (error) {
          if (error instanceof ProblemError && error.problem?.code === 'not-found') return null;
          throw error;
        }
      },
      gcTime: 0,
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
