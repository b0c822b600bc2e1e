import { routes } from '@skyberth/shared';
import { queryOptions } from '@tanstack/react-query';
import { call } from '../../lib/api-client.js';

export const organisationQueries = {
  details: () =>
    queryOptions({
      queryKey: ['organisation', 'details'],
      queryFn: ({ signal }) => call(routes.organisation, { signal }),
    }),
  members: () =>
    queryOptions({ queryKey: ['organisation', 'members'], queryFn: ({ signal }) => call(routes.members, { signal }) }),
};
