/** The next contacts sold on an antenna, with the tracks they were sold with. */
import type { BookingSummary } from '@skyberth/shared';
import { useQueries, useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { bookingQueries } from '../../lib/booking-queries.js';
import { serverNowMs } from '../../lib/server-clock.js';
import type { SoldTrack } from './sold-contacts.js';

/** Tracks are computed on the server, so only the next few are asked for. */
const MOST_TRACKS = 10;
const SOLD = 'awaiting owner,confirmed,under way';

export interface SoldContacts {
  /** All that are to come. */
  readonly total: number;
  readonly tracks: readonly { readonly booking: BookingSummary; readonly sold: SoldTrack }[];
  readonly isPending: boolean;
}

export function useSoldTracks(antennaId: string): SoldContacts {
  const [fromUtc] = useState(() => new Date(serverNowMs()).toISOString());
  const list = useQuery(bookingQueries.list({ antennaId, fromUtc, state: SOLD, sort: 'aos', pageSize: MOST_TRACKS }));
  const bookings = list.data?.items ?? [];
  const geometries = useQueries({ queries: bookings.map((booking) => bookingQueries.geometry(booking.id)) });
  const tracks = bookings.flatMap((booking, index) => {
    const sold = geometries[index]?.data;
    return sold ? [{ booking, sold }] : [];
  });
  return {
    total: list.data?.total ?? 0,
    tracks,
    isPending: list.isPending || geometries.some((one) => one.isPending),
  };
}
