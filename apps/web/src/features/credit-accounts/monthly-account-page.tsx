/** The operator's own monthly accounts: what they bear, their bills, and asking for one. */
import { Button, Paper, Select, Skeleton, Textarea } from '@mantine/core';
import { notifications } from '@mantine/notifications';
import { routes } from '@skyberth/shared';
import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { call } from '../../lib/api-client.js';
import { creditQueries } from '../../lib/credit-queries.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { useCan } from '../../lib/session.js';
import { useTitle } from '../../lib/use-title.js';
import { MoneyInput } from '../../ui/money-input.js';
import { PageTitle } from '../../ui/page-title.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { AccountCard } from './account-card.js';
import classes from './credit-accounts.module.css';

export function MonthlyAccountPage() {
  useTitle('Monthly account');
  const mayAsk = useCan()('credit.ask');
  const accounts = useQuery(creditQueries.mine());
  return (
    <>
      <PageTitle title="Monthly account">
        Contacts bought on account need no card. They are billed when the month is over, and each has an invoice of its
        own.
      </PageTitle>
      {accounts.error && (
        <ProblemNotice title="The account could not be read" onRetry={() => void accounts.refetch()}>
          {sentenceOf(accounts.error)}
        </ProblemNotice>
      )}
      {accounts.isPending && <Skeleton height={200} />}
      <div className={classes.stack}>
        {accounts.data?.items.map((account) => (
          <AccountCard key={account.id} account={account} isOwn />
        ))}
        {accounts.data && (mayAsk ? <Ask /> : <p>A manager of your organisation can ask for a monthly account.</p>)}
      </div>
    </>
  );
}

/** Currencies that stations here sell in most; any other may be typed to finance in the note. */
const CURRENCIES = ['EUR', 'NOK', 'SEK', 'USD', 'GBP', 'JPY', 'CLP', 'CAD', 'AUD', 'NZD', 'ZAR'];

function Ask() {
  const client = useQueryClient();
  const [currency, setCurrency] = useState('EUR');
  const [wishedMinor, setWished] = useState<number | ''>('');
  const [note, setNote] = useState('');
  const ask = useMutation({
    mutationFn: () => call(routes.askCredit, { body: { currency, wishedMinor: Number(wishedMinor), note } }),
    onSuccess: () => {
      void client.invalidateQueries({ queryKey: creditQueries.all });
      notifications.show({ message: 'Finance has been asked. You get a mail with the answer.' });
    },
  });
  return (
    <Paper component="section" withBorder className={classes.card} aria-labelledby="ask-title">
      <h2 id="ask-title">Ask for an account or another limit</h2>
      {ask.error && <ProblemNotice title="Finance was not asked">{sentenceOf(ask.error)}</ProblemNotice>}
      <form
        className={classes.form}
        onSubmit={(event) => {
          event.preventDefault();
          ask.mutate();
        }}
      >
        <Select
          label="Currency"
          data={CURRENCIES}
          value={currency}
          allowDeselect={false}
          onChange={(next) => setCurrency(next ?? 'EUR')}
        />
        <MoneyInput label="Limit that you need" required currency={currency} value={wishedMinor} onChange={setWished} />
        <Textarea
          label="What you plan, for finance"
          autosize
          maxLength={2_000}
          value={note}
          onChange={(event) => setNote(event.currentTarget.value)}
        />
        <Button type="submit" disabled={!wishedMinor} loading={ask.isPending}>
          Ask finance
        </Button>
      </form>
    </Paper>
  );
}
