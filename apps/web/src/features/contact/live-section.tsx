/** What the station reports as it happens; the station's own side has the buttons. */
import type { Booking, ContactEvent } from '@skyberth/shared';
import { useQuery, useQueryClient } from '@tanstack/react-query';
import { useCallback } from 'react';
import { bookingQueries } from '../../lib/booking-queries.js';
import { contactStream, type LiveLine, liveQueries, useLive } from '../../lib/live.js';
import { useCan } from '../../lib/session.js';
import { useNow } from '../../lib/use-now.js';
import { Caution } from '../../ui/caution.js';
import { formatBytes, formatNumber, formatTime } from '../../ui/format.js';
import { LiveLineNotice } from '../../ui/live-line.js';
import { LiveReport } from '../../ui/live-report.js';
import { Figure, Figures } from '../../ui/values.js';
import classes from './contact.module.css';
import { reportedOf } from './live-reports.js';

const FOLLOWED: readonly Booking['state'][] = ['awaiting owner', 'confirmed', 'under way', 'reporting'];

export interface LiveContact {
  readonly events: readonly ContactEvent[];
  readonly dishStop: string | null;
  readonly line: LiveLine;
}

/** All events of the contact, kept up to date by the stream for as long as something can still happen. */
export function useLiveContact(booking: Booking): LiveContact {
  const client = useQueryClient();
  const { id } = booking;
  const isFollowed = FOLLOWED.includes(booking.state);
  const events = useQuery(liveQueries.events(id));
  const hear = useCallback(
    (event: ContactEvent) => {
      const key = liveQueries.events(id).queryKey;
      const known = client.getQueryData(key);
      if (!known || known.items.some((one) => one.seq === event.seq)) return;
      client.setQueryData(key, { ...known, items: [...known.items, event] });
      // A line of the diary means that the booking itself changed: its state, its times, its money.
      if (event.kind !== 'diary') return;
      void client.invalidateQueries({ queryKey: bookingQueries.one(id).queryKey });
      void client.invalidateQueries({ queryKey: bookingQueries.geometry(id).queryKey });
      void client.invalidateQueries({ queryKey: liveQueries.orbit(id).queryKey });
      void client.invalidateQueries({ queryKey: ['drift', id] });
    },
    [client, id],
  );
  const line = useLive(isFollowed && events.data ? contactStream(id) : null, hear);
  return { events: events.data?.items ?? [], dishStop: events.data?.dishStop ?? null, line };
}

export function LiveSection({ booking, live }: { readonly booking: Booking; readonly live: LiveContact }) {
  const nowMs = useNow();
  const mayReport = useCan()('bookings.report');
  const isFollowed = FOLLOWED.includes(booking.state);
  const reported = reportedOf(live.events);
  const hasReports = live.events.some((event) => event.kind !== 'diary');
  const isNear = nowMs >= Date.parse(booking.setupStartsUtc) && isFollowed && booking.state !== 'awaiting owner';
  if (!isNear && !hasReports && live.dishStop === null) return null;
  return (
    <section className={classes.stack} aria-labelledby="live-title">
      <h2 id="live-title" className={classes.heading}>
        From the station
      </h2>
      <LiveLineNotice line={live.line} isWanted={isNear} />
      {live.dishStop !== null && (
        <Caution title="Stop: the dish is not clear">{live.dishStop} The contact waits until it is.</Caution>
      )}
      {hasReports && (
        <Figures columns={2} ruled>
          <Figure label="Acquired" value={timeOr(reported.acquiredUtc, 'not yet')} />
          <Figure label="Lost" value={timeOr(reported.lostUtc, 'no')} />
          <Figure
            label="Received"
            value={reported.bytes === null ? 'not said' : formatBytes(reported.bytes)}
            size="large"
          />
          <Figure
            label="Eb/N0"
            value={reported.ebN0Db === null ? 'not said' : formatNumber(reported.ebN0Db, 1)}
            {...(reported.ebN0Db === null ? {} : { unit: 'dB' })}
            size="large"
          />
        </Figures>
      )}
      {mayReport && isNear && (
        <LiveReport
          bookingId={booking.id}
          name={booking.spacecraftName}
          reported={reported}
          isUnderWay={booking.state === 'under way'}
        />
      )}
    </section>
  );
}

const timeOr = (utc: string | null, words: string): string => (utc ? formatTime(Date.parse(utc)) : words);
