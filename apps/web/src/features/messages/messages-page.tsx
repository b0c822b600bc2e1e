/** Contacts with messages, the latest first. The words themselves stand on the contact's page. */
import { Anchor, SegmentedControl, Skeleton } from '@mantine/core';
import { useQuery } from '@tanstack/react-query';
import { Link, useSearchParams } from 'react-router-dom';
import { messageQueries } from '../../lib/message-queries.js';
import { paths } from '../../lib/paths.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { useTitle } from '../../lib/use-title.js';
import { BookingBadge } from '../../ui/booking-badge.js';
import { DayTime } from '../../ui/day-time.js';
import { EmptyState } from '../../ui/empty-state.js';
import { PageTitle } from '../../ui/page-title.js';
import { Pager } from '../../ui/pager.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import classes from './messages.module.css';

const PAGE_SIZE = 30;

export function MessagesPage() {
  useTitle('Messages');
  const [search, setSearch] = useSearchParams();
  const isOnlyNew = search.get('only') === 'new';
  const page = Math.max(1, Math.floor(Number(search.get('page'))) || 1);
  const { data, error, isPending, refetch } = useQuery(
    messageQueries.threads({ page, pageSize: PAGE_SIZE, ...(isOnlyNew ? { only: 'new' as const } : {}) }),
  );
  return (
    <>
      <PageTitle
        title="Messages"
        actions={
          <SegmentedControl
            aria-label="Which messages"
            data={[
              { value: 'all', label: 'All' },
              { value: 'new', label: 'New to you' },
            ]}
            value={isOnlyNew ? 'new' : 'all'}
            onChange={(next) => setSearch(next === 'new' ? { only: 'new' } : {})}
          />
        }
      >
        {data && `${data.total} ${data.total === 1 ? 'contact' : 'contacts'} here.`}
      </PageTitle>
      {error && (
        <ProblemNotice title="The messages could not be read" onRetry={() => void refetch()}>
          {sentenceOf(error)}
        </ProblemNotice>
      )}
      {isPending && <Skeleton height={240} aria-label="Loading messages" />}
      {data?.items.length === 0 && (
        <EmptyState title={isOnlyNew ? 'Nothing new' : 'No messages yet'}>
          Write to the other side on the page of a contact.
        </EmptyState>
      )}
      <ul className={classes.threads}>
        {data?.items.map((thread) => (
          <li key={thread.bookingId} data-new={thread.newCount > 0 || undefined}>
            <div className={classes.line}>
              <Anchor component={Link} to={`${paths.booking(thread.bookingId)}#messages`}>
                {thread.spacecraftName} at {thread.antennaName}
              </Anchor>
              <span className={classes.quiet}>
                berth {thread.bookingNumber}, {thread.otherName}
              </span>
              <BookingBadge state={thread.bookingState} />
              {thread.newCount > 0 && <span className={classes.new}>{thread.newCount} new</span>}
              <span className={classes.when}>
                <DayTime atMs={Date.parse(thread.lastUtc)} />
              </span>
            </div>
            <p>
              <strong>{thread.lastByName}:</strong> {thread.lastText}
            </p>
          </li>
        ))}
      </ul>
      {data && (
        <Pager
          pages={Math.ceil(data.total / PAGE_SIZE)}
          page={data.page}
          onChange={(next) => setSearch({ ...(isOnlyNew ? { only: 'new' } : {}), page: String(next) })}
        />
      )}
    </>
  );
}
