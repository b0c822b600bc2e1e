/** Payout runs: the list, and how one begins. */
import { Anchor, Button, Group, Skeleton, Table, TextInput } from '@mantine/core';
import { type PayoutRun, routes } from '@skyberth/shared';
import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { Link, useNavigate } from 'react-router-dom';
import { call } from '../../lib/api-client.js';
import { paths } from '../../lib/paths.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { usePageNumber } from '../../lib/use-page-number.js';
import { useTitle } from '../../lib/use-title.js';
import { DayTime } from '../../ui/day-time.js';
import { EmptyState } from '../../ui/empty-state.js';
import { formatMoney } from '../../ui/format.js';
import { MoneyInput } from '../../ui/money-input.js';
import { PageTitle } from '../../ui/page-title.js';
import { Pager } from '../../ui/pager.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { payoutQueries } from './payout-queries.js';

export const RUN_STATE_WORDS: Readonly<Record<PayoutRun['state'], string>> = {
  draft: 'In review',
  reviewed: 'Waits for a second person',
  paying: 'On its way',
  done: 'Done',
  dropped: 'Dropped',
};

export function PayoutsPage() {
  useTitle('Payouts');
  const [page, setPage] = usePageNumber();
  const runs = useQuery(payoutQueries.runs(page));
  return (
    <>
      <PageTitle title="Payouts" actions={<Begin />}>
        A run gathers what owners have earned, less fee, refunds and what is set aside. One person reviews it, another
        approves it; then the money leaves.
      </PageTitle>
      {runs.error && (
        <ProblemNotice title="The runs could not be read" onRetry={() => void runs.refetch()}>
          {sentenceOf(runs.error)}
        </ProblemNotice>
      )}
      {runs.isPending && <Skeleton height={240} />}
      {runs.data?.total === 0 && (
        <EmptyState title="No run yet">Begin one: it sends nothing before two people have agreed.</EmptyState>
      )}
      {runs.data && runs.data.items.length > 0 && (
        <Table.ScrollContainer minWidth={520}>
          <Table>
            <Table.Thead>
              <Table.Tr>
                <Table.Th>Run</Table.Th>
                <Table.Th>Prepared</Table.Th>
                <Table.Th ta="right">Transfers</Table.Th>
                <Table.Th ta="right">Sends</Table.Th>
                <Table.Th>State</Table.Th>
              </Table.Tr>
            </Table.Thead>
            <Table.Tbody>
              {runs.data.items.map((run) => (
                <Table.Tr key={run.id}>
                  <Table.Td>
                    <Anchor component={Link} to={paths.payoutRun(run.id)} fw={700}>
                      Run {run.number}, {run.currency}
                    </Anchor>
                  </Table.Td>
                  <Table.Td>
                    <DayTime atMs={Date.parse(run.preparedUtc)} />
                  </Table.Td>
                  <Table.Td ta="right">{run.transfers}</Table.Td>
                  <Table.Td ta="right">{formatMoney({ amountMinor: run.sendsMinor, currency: run.currency })}</Table.Td>
                  <Table.Td>
                    {RUN_STATE_WORDS[run.state]}
                    {run.failed > 0 && `, ${run.failed} failed`}
                  </Table.Td>
                </Table.Tr>
              ))}
            </Table.Tbody>
          </Table>
        </Table.ScrollContainer>
      )}
      {runs.data && <Pager pages={Math.ceil(runs.data.total / runs.data.pageSize)} page={page} onChange={setPage} />}
    </>
  );
}

function Begin() {
  const client = useQueryClient();
  const navigate = useNavigate();
  const [currency, setCurrency] = useState('EUR');
  const [minimumMinor, setMinimumMinor] = useState<number | ''>(0);
  const code = currency.trim().toUpperCase();
  const prepare = useMutation({
    mutationFn: () => call(routes.preparePayoutRun, { body: { currency: code, minimumMinor: Number(minimumMinor) } }),
    onSuccess: (run) => {
      void client.invalidateQueries({ queryKey: payoutQueries.all });
      navigate(paths.payoutRun(run.id));
    },
  });
  return (
    <form
      onSubmit={(event) => {
        event.preventDefault();
        prepare.mutate();
      }}
    >
      <Group align="flex-end" gap="sm">
        <TextInput
          label="Currency"
          w={96}
          maxLength={3}
          value={currency}
          onChange={(event) => setCurrency(event.currentTarget.value)}
          error={prepare.error ? sentenceOf(prepare.error) : undefined}
        />
        <MoneyInput
          label="Least to send"
          w={140}
          currency={/^[A-Z]{3}$/.test(code) ? code : 'EUR'}
          value={minimumMinor}
          onChange={setMinimumMinor}
        />
        <Button type="submit" loading={prepare.isPending}>
          Prepare a run
        </Button>
      </Group>
    </form>
  );
}
