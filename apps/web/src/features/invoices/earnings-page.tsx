/** What an owner's settled contacts were sold for. Invoices are between Skyberth and the operator. */
import { Anchor, Pagination, Skeleton, Table } from '@mantine/core';
import type { BookingSummary } from '@skyberth/shared';
import { keepPreviousData, useQuery } from '@tanstack/react-query';
import { Link } from 'react-router-dom';
import { bookingQueries } from '../../lib/booking-queries.js';
import { paths } from '../../lib/paths.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { usePageNumber } from '../../lib/use-page-number.js';
import { useTitle } from '../../lib/use-title.js';
import { DayTime } from '../../ui/day-time.js';
import { EmptyState } from '../../ui/empty-state.js';
import { PageTitle } from '../../ui/page-title.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { MoneyText } from '../../ui/values.js';
import classes from './invoices.module.css';
import { PayoutSummary } from './payout-summary.js';

const PER_PAGE = 50;

export function EarningsPage() {
  useTitle('Earnings');
  const [page, setPage] = usePageNumber();
  const settled = useQuery({
    ...bookingQueries.list({ state: 'settled', sort: '-aos', page, pageSize: PER_PAGE }),
    placeholderData: keepPreviousData,
  });
  const total = settled.data?.total ?? 0;
  const pages = settled.data ? Math.ceil(total / settled.data.pageSize) : 0;
  return (
    <>
      <PageTitle title="Earnings">
        Settled contacts at your antennas, the newest first, at the price with VAT that the operator was shown. Skyberth
        invoices the operator; its fee comes off the price before VAT.
      </PageTitle>
      <PayoutSummary />
      {settled.error && (
        <ProblemNotice title="The settled contacts could not be read" onRetry={() => void settled.refetch()}>
          {sentenceOf(settled.error)}
        </ProblemNotice>
      )}
      {settled.isPending && <Skeleton height={280} />}
      {settled.data && total === 0 && (
        <EmptyState title="Nothing is settled yet">
          A contact is settled when you report it after LOS. It then stands here with its price.
        </EmptyState>
      )}
      {settled.data && settled.data.items.length > 0 && <SettledTable items={settled.data.items} />}
      {pages > 1 && <Pagination total={pages} value={page} onChange={setPage} mt="md" size="sm" withEdges />}
    </>
  );
}

function SettledTable({ items }: { readonly items: readonly BookingSummary[] }) {
  return (
    <div className={classes.scroll}>
      <Table>
        <Table.Thead>
          <Table.Tr>
            <Table.Th>Contact</Table.Th>
            <Table.Th>AOS, UTC</Table.Th>
            <Table.Th>Antenna</Table.Th>
            <Table.Th>Spacecraft</Table.Th>
            <Table.Th ta="right">Price with VAT</Table.Th>
          </Table.Tr>
        </Table.Thead>
        <Table.Tbody>
          {items.map((one) => (
            <Table.Tr key={one.id}>
              <Table.Td>
                <Anchor component={Link} to={paths.booking(one.id)} fw={700}>
                  Berth {one.number}
                </Anchor>
              </Table.Td>
              <Table.Td>
                <DayTime atMs={Date.parse(one.aosUtc)} placeTimeZone={one.stationTimeZone} />
              </Table.Td>
              <Table.Td>
                {one.antennaName}
                <div className={classes.quiet}>{one.stationName}</div>
              </Table.Td>
              <Table.Td>
                {one.spacecraftName}
                <div className={classes.quiet}>{one.operatorName}</div>
              </Table.Td>
              <Table.Td ta="right">
                <MoneyText amountMinor={one.toPayMinor} currency={one.currency} />
              </Table.Td>
            </Table.Tr>
          ))}
        </Table.Tbody>
      </Table>
    </div>
  );
}
