/** Plans of the organisation, and what their form needs to know of the market. */
import { type Plan, routes } from '@skyberth/shared';
import { queryOptions } from '@tanstack/react-query';
import { call } from '../../lib/api-client.js';

/** How often a plan in the making is asked how far it is. */
const ASK_MS = 700;

export const planQueries = {
  all: ['plans'] as const,
  list: (page: number) =>
    queryOptions({
      queryKey: ['plans', 'list', page],
      queryFn: ({ signal }) => call(routes.listPlans, { query: { page, pageSize: 20 }, signal }),
    }),
  one: (id: string) =>
    queryOptions({
      queryKey: ['plans', 'one', id],
      queryFn: ({ signal }) => call(routes.getPlan, { params: { id }, signal }),
      refetchInterval: ({ state }: { state: { data?: Plan | undefined } }) =>
        state.data?.work === 'working' ? ASK_MS : false,
    }),
  stations: () =>
    queryOptions({
      queryKey: ['plans', 'stations'],
      queryFn: ({ signal }) => call(routes.listMarketStations, { signal }),
      staleTime: 5 * 60_000,
    }),
};
