/** Messages stand on the contact's page and on their own, so their queries live here. */
import { type QueryInput, routes } from '@skyberth/shared';
import { keepPreviousData, queryOptions } from '@tanstack/react-query';
import { call } from './api-client.js';

export const messageQueries = {
  threads: (filter: NonNullable<QueryInput<typeof routes.listThreads>>) =>
    queryOptions({
      queryKey: ['messages', 'threads', filter],
      queryFn: ({ signal }) => call(routes.listThreads, { query: filter, signal }),
      placeholderData: keepPreviousData,
      refetchInterval: 30_000,
    }),
  of: (bookingId: string) =>
    queryOptions({
      queryKey: ['messages', 'of', bookingId],
      queryFn: ({ signal }) => call(routes.listMessages, { params: { id: bookingId }, signal }),
      refetchInterval: 15_000,
    }),
};
