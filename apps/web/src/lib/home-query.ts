/** What waits for the person, read by the head line (counts) and by the home page. */
import { routes } from '@skyberth/shared';
import { queryOptions } from '@tanstack/react-query';
import { call } from './api-client.js';

export const homeQuery = queryOptions({
  queryKey: ['home'],
  queryFn: ({ signal }) => call(routes.home, { signal }),
  refetchInterval: 60_000,
});
