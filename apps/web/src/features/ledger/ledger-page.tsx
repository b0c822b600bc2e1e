/** Every movement of money: what each account holds, the journal it is the sum of, and the way from a balance to a contact. */
import { Anchor, Button, Group, NumberInput, Select, Skeleton } from '@mantine/core';
import { useQuery } from '@tanstack/react-query';
import { useSearchParams } from 'react-router-dom';
import { sentenceOf } from '../../lib/problem-fields.js';
import { useTitle } from '../../lib/use-title.js';
import { FilterPart, FilterSentence } from '../../ui/filter-sentence.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { AccountLines } from './account-lines.js';
import { BalanceCard } from './balance-card.js';
import { JournalSection } from './journal-section.js';
import classes from './ledger.module.css';
import { LedgerChart } from './ledger-chart.js';
import { LedgerCheckCard } from './ledger-check-card.js';
import { ledgerQueries } from './ledger-queries.js';
import { accountNames, byCurrency, type LedgerFilter, monthsBack, readFilter, writeFilter } from './ledger-view.js';

export function LedgerPage() {
  useTitle('Ledger');
  const [search, setSearch] = useSearchParams();
  const filter = readFilter(search);
  const balances = useQuery(ledgerQueries.balances());
  const currencies = [...new Set((balances.data?.items ?? []).map((item) => item.currency))].sort();
  const currency = filter.currency ?? currencies[0];
  const change = (part: Partial<LedgerFilter>) => setSearch(writeFilter({ ...filter, ...part }));
  const account = filter.account;
  return (
    <>
      <FilterSentence>
        The journal of{' '}
        <AccountPart account={account} onChange={(next) => change({ account: next, organisationId: undefined })} />
        {currencies.length > 0 && (
          <>
            {' '}
            in <CurrencyPart filter={filter} currencies={currencies} onChange={change} />
          </>
        )}
        , <MonthPart filter={filter} onChange={change} />
        {!account && (
          <>
            , <BerthPart bookingNumber={filter.bookingNumber} onChange={change} />
          </>
        )}
        .
      </FilterSentence>
      {balances.error && (
        <ProblemNotice title="The balances could not be read" onRetry={() => void balances.refetch()}>
          {sentenceOf(balances.error)}
        </ProblemNotice>
      )}
      <div className={classes.columns} data-picked={account !== undefined || undefined}>
        {account && currency ? (
          <AccountLines filter={{ ...filter, account, currency }} onChange={change} />
        ) : (
          <JournalSection
            filter={filter}
            onAccount={(picked, inCurrency) => change({ account: picked, currency: inCurrency })}
          />
        )}
        <div className={classes.stack}>
          {balances.isPending && <Skeleton height={320} />}
          {balances.data?.items.length === 0 && <p className={classes.quiet}>Every account is empty.</p>}
          {balances.data &&
            byCurrency(balances.data.items)
              .filter((one) => filter.currency === undefined || one.currency === filter.currency)
              .map((one) => (
                <BalanceCard
                  key={one.currency}
                  balances={one}
                  picked={one.currency === currency ? account : undefined}
                  onPick={(picked) => change({ account: picked, currency: one.currency, organisationId: undefined })}
                />
              ))}
          {currency && <LedgerChart currency={currency} />}
          <LedgerCheckCard />
          <Files month={filter.fromMonth ?? monthsBack(1)[0] ?? ''} />
        </div>
      </div>
    </>
  );
}

interface PartProps {
  readonly filter: LedgerFilter;
  readonly onChange: (part: Partial<LedgerFilter>) => void;
}

function AccountPart(props: { account: string | undefined; onChange: (account: string | undefined) => void }) {
  return (
    <FilterPart name="Account" value={props.account ?? 'every account'}>
      {(close) => (
        <Select
          aria-label="Account"
          data={accountNames()}
          value={props.account ?? null}
          placeholder="every account"
          clearable
          searchable
          comboboxProps={{ withinPortal: false }}
          onChange={(account) => {
            props.onChange(account ?? undefined);
            close();
          }}
        />
      )}
    </FilterPart>
  );
}

function CurrencyPart({ filter, currencies, onChange }: PartProps & { readonly currencies: readonly string[] }) {
  return (
    <FilterPart name="Currency" value={filter.currency ?? (filter.account ? (currencies[0] ?? '') : 'all currencies')}>
      {(close) => (
        <Select
          aria-label="Currency"
          data={[...currencies]}
          value={filter.currency ?? null}
          placeholder="all currencies"
          clearable
          comboboxProps={{ withinPortal: false }}
          onChange={(currency) => {
            onChange({ currency: currency ?? undefined });
            close();
          }}
        />
      )}
    </FilterPart>
  );
}

const MONTHS_OFFERED = 36;

function MonthPart({ filter, onChange }: PartProps) {
  const { fromMonth, toMonth } = filter;
  const value = fromMonth || toMonth ? `${fromMonth ?? 'the beginning'} to ${toMonth ?? 'now'}` : 'of all time';
  return (
    <FilterPart name="Months" value={value}>
      <Select
        label="From"
        data={monthsBack(MONTHS_OFFERED)}
        value={fromMonth ?? null}
        placeholder="the beginning"
        clearable
        comboboxProps={{ withinPortal: false }}
        onChange={(month) => onChange({ fromMonth: month ?? undefined })}
      />
      <Select
        label="To, that month included"
        mt="xs"
        data={monthsBack(MONTHS_OFFERED)}
        value={toMonth ?? null}
        placeholder="now"
        clearable
        comboboxProps={{ withinPortal: false }}
        onChange={(month) => onChange({ toMonth: month ?? undefined })}
      />
    </FilterPart>
  );
}

function BerthPart(props: { bookingNumber: number | undefined; onChange: PartProps['onChange'] }) {
  return (
    <FilterPart name="Berth" value={props.bookingNumber ? `of berth ${props.bookingNumber}` : 'of every berth'}>
      {(close) => (
        <form
          onSubmit={(event) => {
            event.preventDefault();
            const number = Number(new FormData(event.currentTarget).get('berth'));
            props.onChange({ bookingNumber: number > 0 ? number : undefined });
            close();
          }}
        >
          <NumberInput
            name="berth"
            label="Number of the berth"
            defaultValue={props.bookingNumber ?? ''}
            min={1}
            allowDecimal={false}
          />
          <Button type="submit" mt="xs" size="sm">
            Show
          </Button>
        </form>
      )}
    </FilterPart>
  );
}

/** Files of one month for accounting software. */
function Files({ month }: { readonly month: string }) {
  const href = (file: string) => `/api/ledger/files/${file}?month=${month}`;
  return (
    <section aria-label="Files" className={classes.files}>
      <h2>Files of {month}</h2>
      <Group gap="md">
        <Anchor href={href('journal.csv')}>Journal, CSV</Anchor>
        <Anchor href={href('trial-balance.csv')}>Trial balance, CSV</Anchor>
        <Anchor href={href('vat-summary.csv')}>VAT summary, CSV</Anchor>
      </Group>
    </section>
  );
}
