/** One run, line by line, with the acts of the two people. */
import { Anchor, Button, Group, Paper, Skeleton, Stack, Table, Text, TextInput } from '@mantine/core';
import { notifications } from '@mantine/notifications';
import { type PayoutLine, type PayoutRun, routes } from '@skyberth/shared';
import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { Link, useParams } from 'react-router-dom';
import { call } from '../../lib/api-client.js';
import { paths } from '../../lib/paths.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { useTitle } from '../../lib/use-title.js';
import { formatMoney } from '../../ui/format.js';
import { PageTitle } from '../../ui/page-title.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { type BadgeTone, StateBadge } from '../../ui/state-badge.js';
import { payoutQueries } from './payout-queries.js';
import { RUN_STATE_WORDS } from './payouts-page.js';

const TONES: Readonly<Record<PayoutLine['state'], BadgeTone>> = {
  ready: 'good',
  'held back': 'look',
  'below minimum': 'quiet',
  'nothing due': 'quiet',
  paying: 'active',
  paid: 'good',
  failed: 'bad',
};
const isOpen = (run: PayoutRun): boolean => run.state === 'draft' || run.state === 'reviewed';

/** An act on a run: shows its answer, or says why not. */
function useRunAct<T>(act: (input: T) => Promise<PayoutRun>) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: act,
    onSuccess: (run) => {
      client.setQueryData(payoutQueries.run(run.id).queryKey, run);
      void client.invalidateQueries({ queryKey: payoutQueries.all });
    },
    onError: (error) => notifications.show({ message: sentenceOf(error), color: 'buoy', autoClose: false }),
  });
}

export function PayoutRunPage() {
  const { id = '' } = useParams();
  const query = useQuery(payoutQueries.run(id));
  const run = query.data;
  useTitle(run ? `Payout run ${run.number}` : 'Payout run');
  if (query.error)
    return (
      <ProblemNotice title="The run could not be read" onRetry={() => void query.refetch()}>
        {sentenceOf(query.error)}
      </ProblemNotice>
    );
  if (!run) return <Skeleton height={320} />;
  return (
    <>
      <PageTitle title={`Payout run ${run.number}, ${run.currency}`} badge={RUN_STATE_WORDS[run.state]}>
        Prepared by {run.preparedBy}
        {run.reviewedBy && `, reviewed by ${run.reviewedBy}`}
        {run.approvedBy && `, approved by ${run.approvedBy}`}.
      </PageTitle>
      <Lines run={run} />
      {isOpen(run) && <TwoPairsOfEyes run={run} />}
    </>
  );
}

function Lines({ run }: { readonly run: PayoutRun }) {
  const money = (amountMinor: number) => formatMoney({ amountMinor, currency: run.currency });
  return (
    <Table.ScrollContainer minWidth={900}>
      <Table>
        <Table.Thead>
          <Table.Tr>
            {['Owner', 'Contacts', 'Settled', 'Fee', 'Refunds', 'Set aside', 'Adjusted', 'To pay', 'State'].map(
              (head, index) => (
                <Table.Th key={head} ta={index > 0 && index < 8 ? 'right' : 'left'}>
                  {head}
                </Table.Th>
              ),
            )}
          </Table.Tr>
        </Table.Thead>
        <Table.Tbody>
          {run.lines.map((line) => (
            <Table.Tr key={line.id}>
              <Table.Td fw={700}>{line.ownerName}</Table.Td>
              <Table.Td ta="right">{line.contactCount}</Table.Td>
              <Table.Td ta="right">{money(line.settledMinor)}</Table.Td>
              <Table.Td ta="right">{money(-line.feeMinor)}</Table.Td>
              <Table.Td ta="right">{money(-line.refundMinor)}</Table.Td>
              <Table.Td ta="right">{money(-line.reserveMinor)}</Table.Td>
              <Table.Td ta="right">{money(line.adjustedMinor)}</Table.Td>
              <Table.Td ta="right" fw={700}>
                {money(line.toPayMinor)}
              </Table.Td>
              <Table.Td>
                <StateBadge tone={TONES[line.state]}>{line.state}</StateBadge>
                {line.note && <Text size="sm">{line.note}</Text>}
                {isOpen(run) && line.toPayMinor > 0 && <HoldLine run={run} line={line} />}
              </Table.Td>
            </Table.Tr>
          ))}
        </Table.Tbody>
      </Table>
    </Table.ScrollContainer>
  );
}

function HoldLine({ run, line }: { readonly run: PayoutRun; readonly line: PayoutLine }) {
  const [reason, setReason] = useState('');
  const held = line.state !== 'ready';
  const act = useRunAct((why: string | null) =>
    call(routes.holdPayoutLine, { params: { id: run.id, lineId: line.id }, body: { reason: why } }),
  );
  return (
    <Group gap="xs" mt={4} wrap="nowrap">
      {!held && (
        <TextInput
          aria-label={`Why the line of ${line.ownerName} waits`}
          placeholder="Why it waits"
          value={reason}
          onChange={(event) => setReason(event.currentTarget.value)}
        />
      )}
      <Button variant="default" loading={act.isPending} onClick={() => act.mutate(held ? null : reason)}>
        {held ? 'Let it go' : 'Hold back'}
      </Button>
    </Group>
  );
}

function TwoPairsOfEyes({ run }: { readonly run: PayoutRun }) {
  const [code, setCode] = useState('');
  const params = { id: run.id };
  const done = (next: PayoutRun): PayoutRun => {
    setCode('');
    return next;
  };
  const review = useRunAct(async () => done(await call(routes.reviewPayoutRun, { params, body: { code } })));
  const approve = useRunAct(async () => {
    const body = { code, expectedMinor: run.sendsMinor };
    return done(await call(routes.approvePayoutRun, { params, body }));
  });
  const drop = useRunAct(() => call(routes.dropPayoutRun, { params }));
  const sum = formatMoney({ amountMinor: run.sendsMinor, currency: run.currency });
  const waits = run.state === 'reviewed' && !run.mayApprove;
  return (
    <Paper withBorder p="md" mt="lg" maw={480} component="section" aria-label="Two pairs of eyes">
      <Stack>
        <Text>
          {waits
            ? 'You prepared or reviewed this run, so someone else of finance must approve it.'
            : 'Give a code of your authenticator. '}
          {!waits && (
            <Anchor component={Link} to={paths.security}>
              Set one up
            </Anchor>
          )}
        </Text>
        {!waits && (
          <TextInput
            label="Six digits"
            inputMode="numeric"
            autoComplete="one-time-code"
            value={code}
            onChange={(event) => setCode(event.currentTarget.value)}
          />
        )}
        {run.state === 'draft' && (
          <Button loading={review.isPending} onClick={() => review.mutate(undefined)}>
            I have looked at every line: ask for approval of {sum}
          </Button>
        )}
        {run.state === 'reviewed' && run.mayApprove && (
          <Button loading={approve.isPending} onClick={() => approve.mutate(undefined)}>
            Send {sum} in {run.transfers} {run.transfers === 1 ? 'transfer' : 'transfers'}
          </Button>
        )}
        <Button variant="outline" color="buoy" loading={drop.isPending} onClick={() => drop.mutate(undefined)}>
          Drop this run
        </Button>
      </Stack>
    </Paper>
  );
}
