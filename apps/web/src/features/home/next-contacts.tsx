import { Anchor, Skeleton } from '@mantine/core';
import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { Link } from 'react-router-dom';
import { bookingQueries } from '../../lib/booking-queries.js';
import { paths } from '../../lib/paths.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { serverNowMs } from '../../lib/server-clock.js';
import { useNow } from '../../lib/use-now.js';
import { BookingBadge } from '../../ui/booking-badge.js';
import { DayTime } from '../../ui/day-time.js';
import { formatDuration } from '../../ui/format.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { Degrees, Duration } from '../../ui/values.js';
import classes from './home.module.css';

const SHOWN = 6;
const MINUTE_MS = 60_000;

/** The next contacts of the organisation, with how long until each. */
export function NextContacts() {
  const [fromUtc] = useState(() => new Date(Math.floor(serverNowMs() / MINUTE_MS) * MINUTE_MS).toISOString());
  const query = { fromUtc, state: 'awaiting owner,confirmed,under way', sort: 'aos', pageSize: SHOWN } as const;
  const { data, error, refetch } = useQuery({ ...bookingQueries.list(query), refetchInterval: 60_000 });
  const nowMs = useNow(MINUTE_MS / 2);
  return (
    <section aria-labelledby="next">
      <h2 id="next">Next contacts</h2>
      {!data && !error && <Skeleton height={180} aria-label="Loading the next contacts" />}
      {error && !data && (
        <ProblemNotice title="The contacts could not be read" onRetry={() => void refetch()}>
          {sentenceOf(error)}
        </ProblemNotice>
      )}
      {data?.items.length === 0 && <p className={classes.calm}>No contact is booked to come.</p>}
      <ul className={classes.contacts}>
        {data?.items.map((one) => {
          const [aosMs, losMs] = [Date.parse(one.aosUtc), Date.parse(one.losUtc)];
          return (
            <li key={one.id}>
              <div className={classes.waitingLine}>
                <Anchor component={Link} to={paths.booking(one.id)}>
                  {one.spacecraftName} over {one.antennaName}
                </Anchor>
                <BookingBadge state={one.state} />
              </div>
              <div className={classes.quiet}>
                <DayTime atMs={aosMs} placeTimeZone={one.stationTimeZone} /> · <Duration ms={losMs - aosMs} /> · up to{' '}
                <Degrees deg={one.maxElevationDeg} /> ·{' '}
                {aosMs > nowMs ? `in ${formatDuration(aosMs - nowMs)}` : 'under way'}
              </div>
            </li>
          );
        })}
      </ul>
      {data && data.total > SHOWN && (
        <Anchor component={Link} to={paths.bookings}>
          All {data.total} to come
        </Anchor>
      )}
    </section>
  );
}
