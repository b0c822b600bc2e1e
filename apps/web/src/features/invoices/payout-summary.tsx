/** What an owner is owed, what is on its way and what was paid, by currency; and where the money goes. */
import { Button, Paper, Skeleton, Table, Text } from '@mantine/core';
import { notifications } from '@mantine/notifications';
import { type ResponseOf, routes } from '@skyberth/shared';
import { queryOptions, useMutation, useQuery } from '@tanstack/react-query';
import { call } from '../../lib/api-client.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { useCan } from '../../lib/session.js';
import { DayTime } from '../../ui/day-time.js';
import { formatMoney } from '../../ui/format.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { Figure, Figures } from '../../ui/values.js';

type Earnings = ResponseOf<typeof routes.earnings>;

const earningsQuery = () =>
  queryOptions({ queryKey: ['earnings'], queryFn: ({ signal }) => call(routes.earnings, { signal }) });

export function PayoutSummary() {
  const earnings = useQuery(earningsQuery());
  if (earnings.error)
    return (
      <ProblemNotice title="Your earnings could not be read" onRetry={() => void earnings.refetch()}>
        {sentenceOf(earnings.error)}
      </ProblemNotice>
    );
  if (!earnings.data) return <Skeleton height={140} />;
  return (
    <Paper withBorder p="md" mb="lg" component="section" aria-label="Payouts to you">
      {earnings.data.account === 'none' && <GiveAccount />}
      {earnings.data.currencies.map(({ currency, dueMinor, onTheWayMinor, paidMinor }) => (
        <Figures key={currency} columns={3}>
          <Figure label="Due, after fee" value={formatMoney({ amountMinor: dueMinor, currency })} />
          <Figure label="On its way" value={formatMoney({ amountMinor: onTheWayMinor, currency })} />
          <Figure label="Paid so far" value={formatMoney({ amountMinor: paidMinor, currency })} />
        </Figures>
      ))}
      {earnings.data.payouts.length > 0 && <Payouts payouts={earnings.data.payouts} />}
    </Paper>
  );
}

function GiveAccount() {
  const may = useCan()('earnings.manage');
  const give = useMutation({
    mutationFn: () => call(routes.givePayoutAccount, {}),
    onSuccess: ({ url }) => window.location.assign(url),
    onError: (error) => notifications.show({ message: sentenceOf(error), color: 'buoy', autoClose: false }),
  });
  return (
    <>
      <Text mb="xs">
        Nothing can be paid to you before you have said where the money goes. The payment service asks you for it.
      </Text>
      {may ? (
        <Button mb="md" loading={give.isPending} onClick={() => give.mutate()}>
          Say where the money goes
        </Button>
      ) : (
        <Text mb="md">A manager of your organisation does that.</Text>
      )}
    </>
  );
}

function Payouts({ payouts }: { readonly payouts: Earnings['payouts'] }) {
  return (
    <Table.ScrollContainer minWidth={640} mt="md">
      <Table>
        <Table.Thead>
          <Table.Tr>
            <Table.Th>Payout</Table.Th>
            <Table.Th ta="right">Contacts</Table.Th>
            <Table.Th ta="right">Settled</Table.Th>
            <Table.Th ta="right">Fee</Table.Th>
            <Table.Th ta="right">Paid</Table.Th>
            <Table.Th>State</Table.Th>
          </Table.Tr>
        </Table.Thead>
        <Table.Tbody>
          {payouts.map((line) => {
            const money = (amountMinor: number) => formatMoney({ amountMinor, currency: line.currency });
            return (
              <Table.Tr key={line.id}>
                <Table.Td fw={700}>Run {line.runNumber}</Table.Td>
                <Table.Td ta="right">{line.contactCount}</Table.Td>
                <Table.Td ta="right">{money(line.settledMinor)}</Table.Td>
                <Table.Td ta="right">{money(-line.feeMinor)}</Table.Td>
                <Table.Td ta="right" fw={700}>
                  {money(line.state === 'paid' ? line.toPayMinor : 0)}
                </Table.Td>
                <Table.Td>{line.paidUtc ? <DayTime atMs={Date.parse(line.paidUtc)} /> : line.state}</Table.Td>
              </Table.Tr>
            );
          })}
        </Table.Tbody>
      </Table>
    </Table.ScrollContainer>
  );
}
