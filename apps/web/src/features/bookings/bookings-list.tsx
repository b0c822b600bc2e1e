import { Anchor, Button, Skeleton, Table } from '@mantine/core';
import type { BookingSummary } from '@skyberth/shared';
import { keepPreviousData, useQuery } from '@tanstack/react-query';
import { Link } from 'react-router-dom';
import { bookingQueries } from '../../lib/booking-queries.js';
import { paths } from '../../lib/paths.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { useCan, useSession } from '../../lib/session.js';
import { BookingBadge } from '../../ui/booking-badge.js';
import { DayTime } from '../../ui/day-time.js';
import { EmptyState } from '../../ui/empty-state.js';
import { Pager } from '../../ui/pager.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { Degrees, Duration, MoneyText } from '../../ui/values.js';
import classes from './bookings.module.css';
import { exportAddress, type ListFilter, listQuery, PAGE_SIZE } from './list-filter.js';

export interface BookingsViewProps {
  readonly filter: ListFilter;
  readonly nowMs: number;
  readonly onChange: (part: Partial<ListFilter>) => void;
}

export function BookingsList({ filter, nowMs, onChange }: BookingsViewProps) {
  const { organisationKind } = useSession().active;
  const { data, error, refetch, isPlaceholderData } = useQuery({
    ...bookingQueries.list(listQuery(filter, nowMs)),
    placeholderData: keepPreviousData,
    refetchInterval: 60_000,
  });
  if (error && !data)
    return (
      <ProblemNotice title="The bookings could not be read" onRetry={() => void refetch()}>
        {sentenceOf(error)}
      </ProblemNotice>
    );
  if (!data) return <Skeleton height={420} aria-label="Loading bookings" />;
  if (data.total === 0) return <NoBookings filter={filter} onChange={onChange} />;
  const pages = Math.ceil(data.total / PAGE_SIZE);
  return (
    <>
      <div className={classes.scroll} data-stale={isPlaceholderData || undefined}>
        <Table highlightOnHover={false}>
          <Table.Thead>
            <Table.Tr>
              <Table.Th>Berth</Table.Th>
              <Table.Th>AOS</Table.Th>
              <Table.Th ta="right">Length</Table.Th>
              <Table.Th>Spacecraft</Table.Th>
              <Table.Th>Antenna</Table.Th>
              {organisationKind !== 'operator' && <Table.Th>For</Table.Th>}
              {organisationKind !== 'owner' && <Table.Th>Owner</Table.Th>}
              <Table.Th ta="right">Highest</Table.Th>
              <Table.Th>State</Table.Th>
              <Table.Th ta="right">Price, VAT included</Table.Th>
            </Table.Tr>
          </Table.Thead>
          <Table.Tbody>
            {data.items.map((one) => (
              <Row key={one.id} booking={one} kind={organisationKind} />
            ))}
          </Table.Tbody>
        </Table>
      </div>
      <div className={classes.foot}>
        <span role="status">
          {data.total} {data.total === 1 ? 'booking' : 'bookings'}
        </span>
        <Anchor href={exportAddress(filter, nowMs)} download="bookings.csv">
          All of them as CSV
        </Anchor>
        <Pager pages={pages} page={filter.page} onChange={(page) => onChange({ page })} />
      </div>
    </>
  );
}

function Row({ booking, kind }: { booking: BookingSummary; kind: 'operator' | 'owner' | 'staff' }) {
  const [aosMs, losMs] = [Date.parse(booking.aosUtc), Date.parse(booking.losUtc)];
  return (
    <Table.Tr>
      <Table.Td>
        <Anchor component={Link} to={paths.booking(booking.id)}>
          {booking.number}
        </Anchor>
      </Table.Td>
      <Table.Td>
        <DayTime atMs={aosMs} placeTimeZone={booking.stationTimeZone} />
      </Table.Td>
      <Table.Td ta="right">
        <Duration ms={losMs - aosMs} />
      </Table.Td>
      <Table.Td>{booking.spacecraftName}</Table.Td>
      <Table.Td>{booking.antennaName}</Table.Td>
      {kind !== 'operator' && <Table.Td>{booking.operatorName}</Table.Td>}
      {kind !== 'owner' && <Table.Td>{booking.ownerName}</Table.Td>}
      <Table.Td ta="right">
        <Degrees deg={booking.maxElevationDeg} />
      </Table.Td>
      <Table.Td>
        <BookingBadge state={booking.state} />
      </Table.Td>
      <Table.Td ta="right">
        <MoneyText amountMinor={booking.toPayMinor} currency={booking.currency} />
      </Table.Td>
    </Table.Tr>
  );
}

function NoBookings({ filter, onChange }: Pick<BookingsViewProps, 'filter' | 'onChange'>) {
  const maySearch = useCan()('market.search');
  if (filter.states.length > 0 || filter.spacecraftId || filter.when !== 'coming')
    return (
      <EmptyState
        title="No booking fits this filter"
        action={
          <Button variant="default" onClick={() => onChange({ states: [], spacecraftId: null, when: 'all' })}>
            Show all of them
          </Button>
        }
      />
    );
  return (
    <EmptyState
      title="Nothing booked to come"
      action={
        maySearch && (
          <Button component={Link} to={paths.findTime}>
            Find contact time
          </Button>
        )
      }
    >
      {maySearch
        ? 'Hold a pass on the board and pay for it; it then stands here until it has been flown and settled.'
        : 'Contacts stand here as soon as they are bought.'}
    </EmptyState>
  );
}
