/** Every monthly account for finance: who waits for a decision, who owes what, whose bill is overdue. */
import { Button, Group, NumberInput, Skeleton, Textarea } from '@mantine/core';
import { notifications } from '@mantine/notifications';
import { type BodyInput, type CreditAccount, routes } from '@skyberth/shared';
import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { call } from '../../lib/api-client.js';
import { creditQueries } from '../../lib/credit-queries.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { useTitle } from '../../lib/use-title.js';
import { EmptyState } from '../../ui/empty-state.js';
import { formatMoney } from '../../ui/format.js';
import { MoneyInput } from '../../ui/money-input.js';
import { PageTitle } from '../../ui/page-title.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { AccountCard } from './account-card.js';
import classes from './credit-accounts.module.css';

export function CreditAccountsPage() {
  useTitle('Monthly accounts');
  const accounts = useQuery(creditQueries.everybody());
  const items = accounts.data?.items ?? [];
  const waiting = items.filter((account) => account.state === 'asked').length;
  return (
    <>
      <PageTitle title="Monthly accounts">
        {items.length > 0 &&
          `${waiting === 0 ? 'Nobody waits' : waiting === 1 ? 'One waits' : `${waiting} wait`} for a decision. An overdue bill blocks an account by itself.`}
      </PageTitle>
      {accounts.error && (
        <ProblemNotice title="The accounts could not be read" onRetry={() => void accounts.refetch()}>
          {sentenceOf(accounts.error)}
        </ProblemNotice>
      )}
      {accounts.isPending && <Skeleton height={240} />}
      {accounts.data && items.length === 0 && (
        <EmptyState title="No operator has a monthly account">They ask for one on their page of invoices.</EmptyState>
      )}
      <div className={classes.stack}>
        {items.map((account) => (
          <AccountCard key={account.id} account={account} isOwn={false}>
            <Decide account={account} />
          </AccountCard>
        ))}
      </div>
    </>
  );
}

type Decision = BodyInput<typeof routes.decideCredit>['decision'];
const SHORTEST_REASON = 3;

function Decide({ account }: { readonly account: CreditAccount }) {
  const client = useQueryClient();
  const isOpen = account.state === 'open';
  const [limitMinor, setLimit] = useState<number | ''>(isOpen ? account.limitMinor : account.wishedMinor);
  const [termsDays, setTerms] = useState<number>(account.termsDays);
  const [reason, setReason] = useState('');
  const decide = useMutation({
    mutationFn: (decision: Decision) =>
      call(routes.decideCredit, {
        params: { id: account.id },
        body: { decision, limitMinor: Number(limitMinor), termsDays, reason: reason.trim() },
      }),
    onSuccess: (next) => {
      void client.invalidateQueries({ queryKey: creditQueries.all });
      setReason('');
      notifications.show({ message: `The account of ${next.operatorName} is ${next.state}.` });
    },
  });
  const ready = reason.trim().length >= SHORTEST_REASON;
  const wished = formatMoney({ amountMinor: account.wishedMinor, currency: account.currency });
  return (
    <details open={account.state === 'asked'}>
      <summary>{account.state === 'asked' ? `They ask for ${wished}` : 'Change it'}</summary>
      {decide.error && <ProblemNotice title="Nothing was decided">{sentenceOf(decide.error)}</ProblemNotice>}
      <div className={classes.form}>
        <MoneyInput label="Limit" currency={account.currency} value={limitMinor} onChange={setLimit} />
        <NumberInput
          label="Days to pay a bill"
          min={1}
          max={90}
          allowDecimal={false}
          value={termsDays}
          onChange={(next) => setTerms(Number(next))}
        />
        <Textarea
          label="Reason, read by the operator"
          required
          autosize
          maxLength={500}
          value={reason}
          onChange={(event) => setReason(event.currentTarget.value)}
        />
        <Group gap="sm">
          <Button
            size="sm"
            disabled={!ready || !limitMinor}
            loading={decide.isPending}
            onClick={() => decide.mutate('open')}
          >
            {isOpen ? 'Set this limit' : 'Open the account'}
          </Button>
          <Button
            size="sm"
            variant="outline"
            color="buoy"
            disabled={!ready || account.state === 'closed' || account.state === 'refused'}
            onClick={() => decide.mutate(isOpen ? 'close' : 'refuse')}
          >
            {isOpen ? 'Close it' : 'Refuse'}
          </Button>
        </Group>
      </div>
    </details>
  );
}
