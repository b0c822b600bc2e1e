/** The lines that the organisation stands in, the offers that are open, and how earlier ones ended. */
import { Anchor, Button, Skeleton, Table } from '@mantine/core';
import { modals } from '@mantine/modals';
import { notifications } from '@mantine/notifications';
import { routes, type StandbyEntry } from '@skyberth/shared';
import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { Link } from 'react-router-dom';
import { call } from '../../lib/api-client.js';
import { bookingQueries } from '../../lib/booking-queries.js';
import { paths } from '../../lib/paths.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { useCan } from '../../lib/session.js';
import { useNow } from '../../lib/use-now.js';
import { useTitle } from '../../lib/use-title.js';
import { DayTime } from '../../ui/day-time.js';
import { EmptyState } from '../../ui/empty-state.js';
import { formatCountdown } from '../../ui/format.js';
import { PageTitle } from '../../ui/page-title.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import classes from './standby.module.css';
import { standbyQueries } from './standby-queries.js';
import { standingOf } from './standing-words.js';

/** An offer may come at any moment while the page is open. */
const REFRESH_MS = 10_000;

export function StandbyPage() {
  useTitle('Standby');
  const standby = useQuery({ ...standbyQueries.list(), refetchInterval: REFRESH_MS });
  const items = standby.data?.items ?? [];
  return (
    <>
      <PageTitle title="Standby">
        When a pass you wait for becomes free, it is held for you for half an hour at the price of that moment. Whoever
        joined first is asked first.
      </PageTitle>
      {standby.error && (
        <ProblemNotice title="Standby could not be read" onRetry={() => void standby.refetch()}>
          {sentenceOf(standby.error)}
        </ProblemNotice>
      )}
      {standby.isPending && <Skeleton height={220} aria-label="Loading standby" />}
      {standby.data && items.length === 0 && (
        <EmptyState
          title="You wait for nothing"
          action={
            <Anchor component={Link} to={paths.findTime}>
              Find time
            </Anchor>
          }
        >
          Pick a pass that somebody else has on Find time, and join its line.
        </EmptyState>
      )}
      {items.length > 0 && (
        <div className={classes.scroll}>
          <Table>
            <Table.Thead>
              <Table.Tr>
                <Table.Th>Spacecraft</Table.Th>
                <Table.Th>Antenna</Table.Th>
                <Table.Th>AOS</Table.Th>
                <Table.Th>Standing</Table.Th>
                <Table.Th>Joined</Table.Th>
                <Table.Th>
                  <span className={classes.hidden}>Actions</span>
                </Table.Th>
              </Table.Tr>
            </Table.Thead>
            <Table.Tbody>
              {items.map((entry) => (
                <EntryRow key={entry.id} entry={entry} />
              ))}
            </Table.Tbody>
          </Table>
        </div>
      )}
    </>
  );
}

function EntryRow({ entry }: { readonly entry: StandbyEntry }) {
  return (
    <Table.Tr data-state={entry.state}>
      <Table.Td>{entry.spacecraftName}</Table.Td>
      <Table.Td>
        {entry.antennaName}, {entry.stationName}
      </Table.Td>
      <Table.Td>
        <DayTime atMs={Date.parse(entry.aosUtc)} />
      </Table.Td>
      <Table.Td>
        <Standing entry={entry} />
      </Table.Td>
      <Table.Td>
        <DayTime atMs={Date.parse(entry.joinedUtc)} />
      </Table.Td>
      <Table.Td>
        <Leave entry={entry} />
      </Table.Td>
    </Table.Tr>
  );
}

function Standing({ entry }: { readonly entry: StandbyEntry }) {
  const nowMs = useNow();
  const left = entry.offerEndsUtc === null ? null : Date.parse(entry.offerEndsUtc) - nowMs;
  return (
    <>
      {standingOf(entry)}
      {left !== null && left > 0 && <strong> {formatCountdown(left)} left</strong>}{' '}
      {entry.bookingId && (
        <Anchor component={Link} to={paths.booking(entry.bookingId)}>
          {entry.state === 'offered' ? 'Open and pay' : 'Open the booking'}
        </Anchor>
      )}
    </>
  );
}

function Leave({ entry }: { readonly entry: StandbyEntry }) {
  const mayBuy = useCan()('bookings.buy');
  const client = useQueryClient();
  const leave = useMutation({
    mutationFn: () => call(routes.leaveStandby, { params: { id: entry.id } }),
    onSuccess: () =>
      Promise.all([
        client.invalidateQueries({ queryKey: standbyQueries.list().queryKey }),
        client.invalidateQueries({ queryKey: bookingQueries.all }),
      ]),
    onError: (error) =>
      notifications.show({ title: 'The line was not left', message: sentenceOf(error), color: 'buoy' }),
  });
  if (!mayBuy || (entry.state !== 'waiting' && entry.state !== 'offered')) return null;
  const ask = () =>
    modals.openConfirmModal({
      title: `Leave the line for ${entry.spacecraftName} over ${entry.antennaName}?`,
      children: 'Your place is gone, and the next in line moves up. An open offer is let go; nothing is charged.',
      labels: { confirm: 'Leave the line', cancel: 'Stay' },
      onConfirm: () => leave.mutate(),
    });
  return (
    <Button variant="outline" size="xs" onClick={ask} loading={leave.isPending}>
      Leave
    </Button>
  );
}
