/** Calendars of antennas, price cards, and what a change would do before it is saved. */
import { type BodyInput, routes } from '@skyberth/shared';
import { keepPreviousData, queryOptions } from '@tanstack/react-query';
import { call } from './api-client.js';

export type AntennaChange = BodyInput<typeof routes.previewAntennaChange>;
export type ExampleInput = BodyInput<typeof routes.priceExample>;

/** All begin with `stations`, so that whatever changes an antenna lets them be read again. */
export const availabilityQueries = {
  calendar: (id: string, fromUtc: string, toUtc: string) =>
    queryOptions({
      queryKey: ['stations', 'calendar', id, fromUtc, toUtc],
      queryFn: ({ signal }) => call(routes.antennaCalendar, { params: { id }, query: { fromUtc, toUtc }, signal }),
    }),
  preview: (id: string, change: AntennaChange) =>
    queryOptions({
      queryKey: ['stations', 'preview', id, change],
      queryFn: ({ signal }) => call(routes.previewAntennaChange, { params: { id }, body: change, signal }),
      placeholderData: keepPreviousData,
      retry: false,
    }),
  priceExample: (id: string, input: ExampleInput) =>
    queryOptions({
      queryKey: ['stations', 'price example', id, input],
      queryFn: ({ signal }) => call(routes.priceExample, { params: { id }, body: input, signal }),
      placeholderData: keepPreviousData,
      retry: false,
    }),
  priceCards: (id: string) =>
    queryOptions({
      queryKey: ['stations', 'price cards', id],
      queryFn: ({ signal }) => call(routes.listPriceCards, { params: { id }, signal }),
    }),
};
