import { Anchor, Skeleton, Table } from '@mantine/core';
import { useQuery } from '@tanstack/react-query';
import { Link } from 'react-router-dom';
import { paths } from '../../lib/paths.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { usePageNumber } from '../../lib/use-page-number.js';
import { DayTime } from '../../ui/day-time.js';
import { EmptyState } from '../../ui/empty-state.js';
import { formatMoney } from '../../ui/format.js';
import { Pager } from '../../ui/pager.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { StateBadge } from '../../ui/state-badge.js';
import classes from './reconciliation.module.css';
import { reconciliationQueries } from './reconciliation-queries.js';

const TONES = { open: 'look', won: 'good', lost: 'bad' } as const;

/** Payments that banks took back, with what of the earnings is set aside meanwhile. */
export function Chargebacks() {
  const [page, setPage] = usePageNumber();
  const chargebacks = useQuery(reconciliationQueries.chargebacks(page));
  if (chargebacks.error)
    return <ProblemNotice title="The chargebacks could not be read">{sentenceOf(chargebacks.error)}</ProblemNotice>;
  if (!chargebacks.data) return <Skeleton height={160} />;
  const { items, total, pageSize } = chargebacks.data;
  if (items.length === 0)
    return <EmptyState title="No bank has taken a payment back">Should one, it stands here at once.</EmptyState>;
  return (
    <div className={classes.scroll}>
      <Table>
        <Table.Thead>
          <Table.Tr>
            <Table.Th>Opened</Table.Th>
            <Table.Th>Contact</Table.Th>
            <Table.Th>The bank says</Table.Th>
            <Table.Th ta="right">Taken back</Table.Th>
            <Table.Th ta="right">Set aside</Table.Th>
            <Table.Th>State</Table.Th>
          </Table.Tr>
        </Table.Thead>
        <Table.Tbody>
          {items.map((item) => (
            <Table.Tr key={item.id}>
              <Table.Td>
                <DayTime atMs={Date.parse(item.openedUtc)} />
              </Table.Td>
              <Table.Td>
                <Anchor component={Link} to={paths.booking(item.bookingId)}>
                  Berth {item.bookingNumber}
                </Anchor>
                <div className={classes.small}>
                  {item.operatorName} from {item.ownerName}
                </div>
              </Table.Td>
              <Table.Td>{item.reason}</Table.Td>
              <Table.Td ta="right">{formatMoney(item)}</Table.Td>
              <Table.Td ta="right">
                {formatMoney({
                  amountMinor: item.state === 'open' ? item.reservedMinor : 0,
                  currency: item.currency,
                })}
              </Table.Td>
              <Table.Td>
                <StateBadge tone={TONES[item.state]}>{item.state}</StateBadge>
              </Table.Td>
            </Table.Tr>
          ))}
        </Table.Tbody>
      </Table>
      <Pager pages={Math.ceil(total / pageSize)} page={page} onChange={setPage} />
    </div>
  );
}
