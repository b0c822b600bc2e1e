/** The next contacts sold on an antenna, with the tracks they were sold with. */
import { useQueries, useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { bookingQueries } from '../../lib/booking-queries.js';
import { serverNowMs } from '../../lib/server-clock.js';
import type { SoldTrack } from './sold-contacts.js';

/** Tracks are computed on the server, so only the next few are asked for. */
const MOST_TRACKS = 10;
const SOLD = 'awaiting owner,confirmed,under way';

export function useSoldTracks(antennaId: string): SoldTrack[] {
  const [fromUtc] = useState(() => new Date(serverNowMs()).toISOString());
  const list = useQuery(bookingQueries.list({ antennaId, fromUtc, state: SOLD, sort: 'aos', pageSize: MOST_TRACKS }));
  const bookings = list.data?.items ?? [];
  const geometries = useQueries({ queries: bookings.map((booking) => bookingQueries.geometry(booking.id)) });
  return geometries.flatMap((one) => (one.data ? [one.data] : []));
}
