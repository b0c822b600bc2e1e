import { Skeleton } from '@mantine/core';
import { useQuery } from '@tanstack/react-query';
import { bookingQueries } from '../../lib/booking-queries.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { useCan } from '../../lib/session.js';
import { useTitle } from '../../lib/use-title.js';
import { EmptyState } from '../../ui/empty-state.js';
import { PageTitle } from '../../ui/page-title.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { byDeadline } from './deadline.js';
import { RequestCard } from './request-card.js';
import classes from './requests.module.css';

const MOST = 200;
/** A request may come at any moment while the page is open. */
const REFRESH_MS = 30_000;

export function RequestsPage() {
  useTitle('Requests');
  const mayDecide = useCan()('bookings.decide');
  const requests = useQuery({
    ...bookingQueries.list({ state: 'awaiting owner', sort: 'aos', pageSize: MOST }),
    refetchInterval: REFRESH_MS,
  });
  const items = [...(requests.data?.items ?? [])].sort(byDeadline);
  return (
    <>
      <PageTitle title="Requests">
        {items.length > 0 &&
          'The buyer has secured the funds and waits for your word. What is not answered in time lapses, and the buyer pays nothing.'}
      </PageTitle>
      {requests.error && (
        <ProblemNotice title="The requests could not be read" onRetry={() => void requests.refetch()}>
          {sentenceOf(requests.error)}
        </ProblemNotice>
      )}
      {requests.isPending && <Skeleton height={180} />}
      {requests.data && items.length === 0 && (
        <EmptyState title="Nobody waits for an answer">
          Requests come here from antennas whose bookings you accept yourself; the others are confirmed at once.
        </EmptyState>
      )}
      <div className={classes.list}>
        {items.map((booking) => (
          <RequestCard key={booking.id} summary={booking} mayDecide={mayDecide} />
        ))}
      </div>
    </>
  );
}
