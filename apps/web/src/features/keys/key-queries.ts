/** The API keys of the organisation. */
import { routes } from '@skyberth/shared';
import { queryOptions } from '@tanstack/react-query';
import { call } from '../../lib/api-client.js';

export const keysQuery = () =>
  queryOptions({
    queryKey: ['api-keys'],
    queryFn: ({ signal }) => call(routes.listApiKeys, { signal }),
  });
