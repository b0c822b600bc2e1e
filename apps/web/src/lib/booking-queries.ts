/** Bookings are shown by several features (the tray, lists, the contact page), so their queries live here. */
import { type QueryInput, routes } from '@skyberth/shared';
import { queryOptions } from '@tanstack/react-query';
import { call } from './api-client.js';

export type BookingFilter = NonNullable<QueryInput<typeof routes.listBookings>>;

export const bookingQueries = {
  all: ['bookings'] as const,
  list: (filter: BookingFilter) =>
    queryOptions({
      queryKey: ['bookings', 'list', filter],
      queryFn: ({ signal }) => call(routes.listBookings, { query: filter, signal }),
    }),
  one: (id: string) =>
    queryOptions({
      queryKey: ['bookings', 'one', id],
      queryFn: ({ signal }) => call(routes.getBooking, { params: { id }, signal }),
    }),
  geometry: (id: string) =>
    queryOptions({
      queryKey: ['bookings', 'geometry', id],
      queryFn: ({ signal }) => call(routes.bookingGeometry, { params: { id }, signal }),
      staleTime: 5 * 60_000,
    }),
};

export const paymentQueries = {
  cards: () =>
    queryOptions({
      queryKey: ['payments', 'cards'],
      queryFn: ({ signal }) => call(routes.savedCards, { signal }),
      staleTime: 60_000,
    }),
};
