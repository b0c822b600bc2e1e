/** Spacecraft are chosen on several pages (search, filters, their own), so their queries live here. */
import { routes } from '@skyberth/shared';
import { queryOptions } from '@tanstack/react-query';
import { call } from './api-client.js';

/** More than an organisation on this market flies; the search itself takes at most a hundred. */
const MOST_SPACECRAFT = 200;

export const spacecraftQueries = {
  all: ['spacecraft'] as const,
  list: (state: 'active' | 'retired' | 'all' = 'active') =>
    queryOptions({
      queryKey: ['spacecraft', 'list', state],
      queryFn: ({ signal }) => call(routes.listSpacecraft, { query: { state, pageSize: MOST_SPACECRAFT }, signal }),
    }),
  one: (id: string) =>
    queryOptions({
      queryKey: ['spacecraft', 'one', id],
      queryFn: ({ signal }) => call(routes.getSpacecraft, { params: { id }, signal }),
    }),
  ephemerides: (id: string) =>
    queryOptions({
      queryKey: ['spacecraft', 'ephemerides', id],
      queryFn: ({ signal }) => call(routes.listEphemerides, { params: { id }, signal }),
    }),
  elements: (id: string, page: number) =>
    queryOptions({
      queryKey: ['spacecraft', 'elements', id, page],
      queryFn: ({ signal }) => call(routes.listElements, { params: { id }, query: { page, pageSize: 20 }, signal }),
    }),
};
