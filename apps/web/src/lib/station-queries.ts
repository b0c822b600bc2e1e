/** Stations and antennas are shown to owners and to staff by several features, so their queries live here. */
import { type Antenna, type QueryInput, routes } from '@skyberth/shared';
import { type QueryClient, queryOptions } from '@tanstack/react-query';
import { call } from './api-client.js';

export type StationFilter = NonNullable<QueryInput<typeof routes.listStations>>;

export const stationQueries = {
  all: ['stations'] as const,
  list: (filter: StationFilter = {}) =>
    queryOptions({
      queryKey: ['stations', 'list', filter],
      queryFn: ({ signal }) => call(routes.listStations, { query: filter, signal }),
    }),
  one: (id: string) =>
    queryOptions({
      queryKey: ['stations', 'one', id],
      queryFn: ({ signal }) => call(routes.getStation, { params: { id }, signal }),
    }),
  antenna: (id: string) =>
    queryOptions({
      queryKey: ['stations', 'antenna', id],
      queryFn: ({ signal }) => call(routes.getAntenna, { params: { id }, signal }),
    }),
  masks: (antennaId: string) =>
    queryOptions({
      queryKey: ['stations', 'masks', antennaId],
      queryFn: ({ signal }) => call(routes.listMasks, { params: { id: antennaId }, signal }),
    }),
};

/** Puts a changed antenna in place, and lets lists that name it be read again. */
export function antennaChanged(client: QueryClient, antenna: Antenna): void {
  client.setQueryData(stationQueries.antenna(antenna.id).queryKey, antenna);
  void client.invalidateQueries({ queryKey: ['stations', 'list'] });
  void client.invalidateQueries({ queryKey: ['stations', 'one'] });
  void client.invalidateQueries({ queryKey: ['stations', 'masks', antenna.id] });
}
