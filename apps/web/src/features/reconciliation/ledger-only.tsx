import { Anchor, Table } from '@mantine/core';
import type { ResponseOf, routes } from '@skyberth/shared';
import { Link } from 'react-router-dom';
import { paths } from '../../lib/paths.js';
import { DayTime } from '../../ui/day-time.js';
import { formatMoney } from '../../ui/format.js';
import classes from './reconciliation.module.css';

type Entry = ResponseOf<typeof routes.reconciliation>['ledgerOnly'][number];

/** Entries that no movement of the provider stands behind. */
export function LedgerOnly({ entries }: { readonly entries: readonly Entry[] }) {
  if (entries.length === 0) return null;
  return (
    <section aria-label="In the ledger alone">
      <h2 className={classes.head}>In the ledger, and not at the provider</h2>
      <p className={classes.small}>
        A refund that waits for funds, or a transfer on its way. If one stays for days, ask the provider’s support.
      </p>
      <div className={classes.scroll}>
        <Table>
          <Table.Tbody>
            {entries.map((entry) => (
              <Table.Tr key={entry.entryId}>
                <Table.Td>
                  <DayTime atMs={Date.parse(entry.atUtc)} />
                </Table.Td>
                <Table.Td>
                  {entry.cause}{' '}
                  {entry.bookingId && (
                    <Anchor component={Link} to={paths.booking(entry.bookingId)}>
                      Berth {entry.bookingNumber}
                    </Anchor>
                  )}
                </Table.Td>
                <Table.Td ta="right">{formatMoney(entry)}</Table.Td>
              </Table.Tr>
            ))}
          </Table.Tbody>
        </Table>
      </div>
    </section>
  );
}
