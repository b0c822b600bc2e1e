/** What the organisation waits for. */
import { routes } from '@skyberth/shared';
import { queryOptions } from '@tanstack/react-query';
import { call } from '../../lib/api-client.js';

export const standbyQueries = {
  list: () =>
    queryOptions({
      queryKey: ['standby', 'list'],
      queryFn: ({ signal }) => call(routes.listStandby, { signal }),
    }),
};
