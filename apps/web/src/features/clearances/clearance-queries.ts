/** Clearances as they are read, and what is read again after one has moved. */
import { type Clearance, type QueryInput, routes } from '@skyberth/shared';
import { type QueryClient, queryOptions } from '@tanstack/react-query';
import { call } from '../../lib/api-client.js';

export const clearanceQueries = {
  list: (filter: NonNullable<QueryInput<typeof routes.listClearances>>) =>
    queryOptions({
      queryKey: ['clearances', 'list', filter],
      queryFn: ({ signal }) => call(routes.listClearances, { query: filter, signal }),
    }),
  one: (id: string) =>
    queryOptions({
      queryKey: ['clearances', 'one', id],
      queryFn: ({ signal }) => call(routes.getClearance, { params: { id }, signal }),
    }),
  choices: queryOptions({
    queryKey: ['clearances', 'choices'],
    queryFn: ({ signal }) => call(routes.clearanceChoices, { signal }),
  }),
};

/** Passes may be for sale now, or no longer, and contacts may be gone. */
export function clearanceMoved(client: QueryClient, clearance: Clearance): void {
  client.setQueryData(clearanceQueries.one(clearance.id).queryKey, clearance);
  for (const key of ['list', 'choices']) void client.invalidateQueries({ queryKey: ['clearances', key] });
  for (const key of ['passes', 'bookings', 'home']) void client.invalidateQueries({ queryKey: [key] });
}
