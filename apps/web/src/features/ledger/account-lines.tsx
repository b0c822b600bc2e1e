import { Anchor, Button, Group, Skeleton, Table } from '@mantine/core';
import type { ResponseOf, routes } from '@skyberth/shared';
import { useInfiniteQuery, useQuery } from '@tanstack/react-query';
import { Link } from 'react-router-dom';
import { paths } from '../../lib/paths.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { DayTime } from '../../ui/day-time.js';
import { EmptyState } from '../../ui/empty-state.js';
import { formatMoney, formatNumber } from '../../ui/format.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { Figure, Figures } from '../../ui/values.js';
import classes from './ledger.module.css';
import { ledgerQueries } from './ledger-queries.js';
import { isPartyAccount, type LedgerFilter } from './ledger-view.js';

type Line = ResponseOf<typeof routes.ledgerLines>['items'][number];

interface AccountLinesProps {
  readonly filter: LedgerFilter & { readonly account: string; readonly currency: string };
  readonly onChange: (part: Partial<LedgerFilter>) => void;
}

/** One account: its sums, whom it is kept for, and every line with the balance that it left behind. */
export function AccountLines({ filter, onChange }: AccountLinesProps) {
  const { account, currency, organisationId, fromMonth, toMonth } = filter;
  const lines = useInfiniteQuery(ledgerQueries.lines({ account, currency, organisationId, fromMonth, toMonth }));
  const sums = lines.data?.pages[0];
  const items = lines.data?.pages.flatMap((page) => page.items) ?? [];
  const money = (amountMinor: number) => formatMoney({ amountMinor, currency });
  return (
    <section aria-label={`Lines of ${account}`} aria-busy={lines.isFetching}>
      {isPartyAccount(account) && <Parties filter={filter} onChange={onChange} />}
      {lines.error && (
        <ProblemNotice title="The lines could not be read" onRetry={() => void lines.refetch()}>
          {sentenceOf(lines.error)}
        </ProblemNotice>
      )}
      {lines.isPending && <Skeleton height={420} />}
      {sums && (
        <Figures columns={4}>
          <Figure label="Before" value={money(sums.openingMinor)} />
          <Figure label="Debits" value={money(sums.debitMinor)} />
          <Figure label="Credits" value={money(sums.creditMinor)} />
          <Figure label="Balance" value={money(sums.closingMinor)} note={`${formatNumber(sums.postings)} lines`} />
        </Figures>
      )}
      {sums && items.length === 0 && <EmptyState title="No line here">Choose other months or accounts.</EmptyState>}
      {items.length > 0 && <Lines items={items} />}
      {lines.hasNextPage && (
        <Button variant="default" mt="md" loading={lines.isFetchingNextPage} onClick={() => void lines.fetchNextPage()}>
          Show older lines
        </Button>
      )}
    </section>
  );
}

function Lines({ items }: { readonly items: readonly Line[] }) {
  return (
    <div className={classes.scroll}>
      <Table mt="md">
        <Table.Thead>
          <Table.Tr>
            <Table.Th>When</Table.Th>
            <Table.Th>Cause</Table.Th>
            <Table.Th ta="right">Debit</Table.Th>
            <Table.Th ta="right">Credit</Table.Th>
            <Table.Th ta="right">Balance</Table.Th>
          </Table.Tr>
        </Table.Thead>
        <Table.Tbody>
          {items.map((line, index) => (
            // biome-ignore lint/suspicious/noArrayIndexKey: lines of a sealed entry never change their place
            <Table.Tr key={index}>
              <Table.Td>
                <DayTime atMs={Date.parse(line.atUtc)} />
              </Table.Td>
              <Table.Td>
                {line.cause}{' '}
                {line.bookingId && (
                  <Anchor component={Link} to={paths.booking(line.bookingId)}>
                    Berth {line.bookingNumber}
                  </Anchor>
                )}
                {line.organisationName && <span className={classes.holds}>{line.organisationName}</span>}
              </Table.Td>
              <Cell minor={line.amountMinor > 0 ? line.amountMinor : null} currency={line.currency} />
              <Cell minor={line.amountMinor < 0 ? -line.amountMinor : null} currency={line.currency} />
              <Cell minor={line.balanceMinor} currency={line.currency} />
            </Table.Tr>
          ))}
        </Table.Tbody>
      </Table>
    </div>
  );
}

function Cell({ minor, currency }: { readonly minor: number | null; readonly currency: string }) {
  return (
    <Table.Td ta="right" style={{ whiteSpace: 'nowrap' }}>
      {minor === null ? '' : formatMoney({ amountMinor: minor, currency })}
    </Table.Td>
  );
}

const PARTIES_SHOWN = 12;

function Parties({ filter, onChange }: AccountLinesProps) {
  const { account, currency, organisationId } = filter;
  const parties = useQuery(ledgerQueries.parties(account, currency));
  const items = parties.data?.items ?? [];
  const picked = items.find((item) => item.organisationId === organisationId);
  if (picked) {
    return (
      <p>
        Of {picked.organisationName} alone.{' '}
        <Anchor component="button" type="button" onClick={() => onChange({ organisationId: undefined })}>
          Show everybody
        </Anchor>
      </p>
    );
  }
  return (
    <Group gap="xs" mb="sm" role="group" aria-label="Kept for">
      {items.slice(0, PARTIES_SHOWN).map((item) => (
        <Button
          key={item.organisationId}
          variant="default"
          size="xs"
          onClick={() => onChange({ organisationId: item.organisationId })}
        >
          {item.organisationName}: {formatMoney({ amountMinor: item.balanceMinor, currency })}
        </Button>
      ))}
    </Group>
  );
}
