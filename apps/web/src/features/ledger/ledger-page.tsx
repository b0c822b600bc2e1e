/** Every movement of money: what each account holds, and the journal it is the sum of. */
import { Anchor, Group, Pagination, Paper, Select, Skeleton } from '@mantine/core';
import { routes } from '@skyberth/shared';
import { keepPreviousData, queryOptions, useQuery } from '@tanstack/react-query';
import { useSearchParams } from 'react-router-dom';
import { call } from '../../lib/api-client.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { useTitle } from '../../lib/use-title.js';
import { EmptyState } from '../../ui/empty-state.js';
import { FilterPart, FilterSentence } from '../../ui/filter-sentence.js';
import { formatMoney, formatNumber } from '../../ui/format.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { Sign } from '../../ui/signs.js';
import { JournalTable } from './journal-table.js';
import classes from './ledger.module.css';
import {
  accountNames,
  byCurrency,
  type CurrencyBalances,
  type LedgerFilter,
  readFilter,
  SIDE_WORDS,
  writeFilter,
} from './ledger-view.js';

const PAGE_SIZE = 50;

const ledgerQueries = {
  balances: () =>
    queryOptions({ queryKey: ['ledger', 'balances'], queryFn: ({ signal }) => call(routes.balances, { signal }) }),
  journal: ({ account, page }: LedgerFilter) =>
    queryOptions({
      queryKey: ['ledger', 'journal', account ?? '', page],
      queryFn: ({ signal }) => call(routes.journal, { query: { account, page, pageSize: PAGE_SIZE }, signal }),
      placeholderData: keepPreviousData,
    }),
};

export function LedgerPage() {
  useTitle('Ledger');
  const [search, setSearch] = useSearchParams();
  const filter = readFilter(search);
  const balances = useQuery(ledgerQueries.balances());
  const journal = useQuery(ledgerQueries.journal(filter));
  const choose = (account: string | undefined) => setSearch(writeFilter({ account, page: 1 }));
  const error = balances.error ?? journal.error;
  return (
    <>
      <FilterSentence>
        The journal of{' '}
        <FilterPart name="Account" value={filter.account ?? 'every account'}>
          {(close) => (
            <Select
              aria-label="Account"
              data={accountNames()}
              value={filter.account ?? null}
              placeholder="every account"
              clearable
              searchable
              comboboxProps={{ withinPortal: false }}
              onChange={(account) => {
                choose(account ?? undefined);
                close();
              }}
            />
          )}
        </FilterPart>
        , newest first{journal.data && `: ${formatNumber(journal.data.total)} entries`}.
      </FilterSentence>
      {error && (
        <ProblemNotice
          title="The ledger could not be read"
          onRetry={() => {
            void balances.refetch();
            void journal.refetch();
          }}
        >
          {sentenceOf(error)}
        </ProblemNotice>
      )}
      <div className={classes.columns}>
        <section aria-label="Journal" aria-busy={journal.isFetching}>
          {journal.isPending && <Skeleton height={420} />}
          {journal.data?.items.length === 0 && (
            <EmptyState title="No entry here">
              The first one is written when a contact is reported and charged.
            </EmptyState>
          )}
          {journal.data && journal.data.items.length > 0 && (
            <JournalTable entries={journal.data.items} account={filter.account} onAccount={choose} />
          )}
          {journal.data && journal.data.total > PAGE_SIZE && (
            <Group mt={12}>
              <Pagination
                total={Math.ceil(journal.data.total / PAGE_SIZE)}
                value={filter.page}
                onChange={(page) => setSearch(writeFilter({ ...filter, page }))}
                getControlProps={(control) => ({ 'aria-label': `${control} page` })}
              />
            </Group>
          )}
        </section>
        <div className={classes.stack}>
          {balances.isPending && <Skeleton height={320} />}
          {balances.data && balances.data.items.length === 0 && (
            <p className={classes.quiet}>Every account is empty.</p>
          )}
          {balances.data &&
            byCurrency(balances.data.items).map((one) => (
              <BalanceCard key={one.currency} balances={one} picked={filter.account} onPick={choose} />
            ))}
        </div>
      </div>
    </>
  );
}

interface BalanceCardProps {
  readonly balances: CurrencyBalances;
  readonly picked: string | undefined;
  readonly onPick: (account: string | undefined) => void;
}

function BalanceCard({ balances, picked, onPick }: BalanceCardProps) {
  const { currency, rows, sumMinor } = balances;
  return (
    <Paper component="section" withBorder className={classes.card} aria-label={`Balances in ${currency}`}>
      <h2>Balances, {currency}</h2>
      <table className={classes.balances}>
        <tbody>
          {rows.map((row, index) => (
            <tr
              key={row.account}
              data-picked={row.account === picked || undefined}
              data-first={row.side !== rows[index - 1]?.side || undefined}
            >
              <th scope="row">
                {row.side !== rows[index - 1]?.side && row.side && <small>{SIDE_WORDS[row.side]}</small>}
                <Anchor
                  component="button"
                  type="button"
                  aria-pressed={row.account === picked}
                  onClick={() => onPick(row.account === picked ? undefined : row.account)}
                >
                  {row.account}
                </Anchor>
                <span className={classes.holds}>{row.holds}</span>
              </th>
              <td data-quiet={row.balanceMinor === 0 || undefined}>
                {formatMoney({ amountMinor: row.balanceMinor, currency })}
              </td>
            </tr>
          ))}
        </tbody>
      </table>
      <p className={sumMinor === 0 ? classes.level : classes.off}>
        <Sign shape={sumMinor === 0 ? 'check' : 'square'} />
        {sumMinor === 0
          ? 'Debits and credits are level to the cent.'
          : `Debits and credits differ by ${formatMoney({ amountMinor: sumMinor, currency })}. Stop and look.`}
      </p>
    </Paper>
  );
}
