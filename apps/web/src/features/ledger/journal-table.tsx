import { Anchor, Table } from '@mantine/core';
import type { ResponseOf, routes } from '@skyberth/shared';
import { Link } from 'react-router-dom';
import { paths } from '../../lib/paths.js';
import { DayTime } from '../../ui/day-time.js';
import { formatMoney } from '../../ui/format.js';
import classes from './ledger.module.css';

type Entry = ResponseOf<typeof routes.journal>['items'][number];

interface JournalTableProps {
  readonly entries: readonly Entry[];
  readonly onAccount: (account: string, currency: string) => void;
}

/** Entries with their lines: debits at the left, credits at the right, each entry level. */
export function JournalTable({ entries, onAccount }: JournalTableProps) {
  return (
    <div className={classes.scroll}>
      <Table className={classes.journal}>
        <Table.Thead>
          <Table.Tr>
            <Table.Th>When</Table.Th>
            <Table.Th>Cause and accounts</Table.Th>
            <Table.Th ta="right">Debit</Table.Th>
            <Table.Th ta="right">Credit</Table.Th>
          </Table.Tr>
        </Table.Thead>
        {entries.map((entry) => (
          <Table.Tbody key={entry.id}>
            <Table.Tr className={classes.entry}>
              <Table.Td>
                <DayTime atMs={Date.parse(entry.atUtc)} />
              </Table.Td>
              <Table.Td colSpan={3}>
                <strong>{entry.cause}</strong>{' '}
                {entry.bookingId && (
                  <Anchor component={Link} to={paths.booking(entry.bookingId)}>
                    Berth {entry.bookingNumber}
                  </Anchor>
                )}
              </Table.Td>
            </Table.Tr>
            {entry.postings.map((posting, index) => (
              // biome-ignore lint/suspicious/noArrayIndexKey: lines of a sealed entry never change their place
              <Table.Tr key={index} className={classes.line}>
                <Table.Td />
                <Table.Td>
                  <Anchor component="button" type="button" onClick={() => onAccount(posting.account, entry.currency)}>
                    {posting.account}
                  </Anchor>
                  {posting.organisationName && <span className={classes.holds}>{posting.organisationName}</span>}
                </Table.Td>
                <Amount amountMinor={posting.amountMinor > 0 ? posting.amountMinor : null} currency={entry.currency} />
                <Amount amountMinor={posting.amountMinor < 0 ? -posting.amountMinor : null} currency={entry.currency} />
              </Table.Tr>
            ))}
          </Table.Tbody>
        ))}
      </Table>
    </div>
  );
}

function Amount({ amountMinor, currency }: { readonly amountMinor: number | null; readonly currency: string }) {
  return (
    <Table.Td ta="right" style={{ whiteSpace: 'nowrap' }}>
      {amountMinor === null ? '' : formatMoney({ amountMinor, currency })}
    </Table.Td>
  );
}
