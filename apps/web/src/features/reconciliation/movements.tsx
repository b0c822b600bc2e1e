import { Anchor, Button, Group, Skeleton, Table, Textarea } from '@mantine/core';
import { notifications } from '@mantine/notifications';
import { type Movement, type MovementAction, routes } from '@skyberth/shared';
import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { Link } from 'react-router-dom';
import { call } from '../../lib/api-client.js';
import { paths } from '../../lib/paths.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { usePageNumber } from '../../lib/use-page-number.js';
import { DayTime } from '../../ui/day-time.js';
import { EmptyState } from '../../ui/empty-state.js';
import { formatMoney } from '../../ui/format.js';
import { Pager } from '../../ui/pager.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { type BadgeTone, StateBadge } from '../../ui/state-badge.js';
import classes from './reconciliation.module.css';
import { reconciliationQueries } from './reconciliation-queries.js';

const TONES: Record<Movement['state'], BadgeTone> = { open: 'bad', matched: 'good', 'in suspense': 'look' };
const ACTION_WORDS: Record<MovementAction, string> = {
  fetch: 'Ask the provider',
  suspense: 'Put in suspense',
  withdrawal: 'Write the withdrawal',
};

/** Movements in one state, or all; open ones can be dealt with in place. */
export function Movements({ state }: { readonly state: Movement['state'] | undefined }) {
  const [address, setAddress] = usePageNumber();
  const [own, setOwn] = useState(1);
  // Only the list of all has its page in the address; two short lists on one tab would share it.
  const [page, setPage] = state === undefined ? [address, setAddress] : [own, setOwn];
  const movements = useQuery(reconciliationQueries.movements(state, page));
  const items = movements.data?.items ?? [];
  if (state === 'in suspense' && items.length === 0) return null;
  return (
    <section aria-label={state === undefined ? 'All movements' : `Movements ${state}`} aria-busy={movements.isFetching}>
      {state === 'in suspense' && <h2 className={classes.head}>In suspense</h2>}
      {movements.error && (
        <ProblemNotice title="The movements could not be read" onRetry={() => void movements.refetch()}>
          {sentenceOf(movements.error)}
        </ProblemNotice>
      )}
      {movements.isPending && <Skeleton height={160} />}
      {movements.data && items.length === 0 && (
        <EmptyState title={state === 'open' ? 'Every movement of the provider is explained' : 'No movement yet'}>
          {state === 'open' ? 'Nothing is to be done.' : 'The provider moves money when the first contact is charged.'}
        </EmptyState>
      )}
      {items.length > 0 && (
        <div className={classes.scroll}>
          <Table>
            <Table.Thead>
              <Table.Tr>
                <Table.Th>When</Table.Th>
                <Table.Th>What the provider did</Table.Th>
                <Table.Th ta="right">Amount</Table.Th>
                <Table.Th ta="right">Its fee</Table.Th>
                <Table.Th>State</Table.Th>
              </Table.Tr>
            </Table.Thead>
            <Table.Tbody>
              {items.map((movement) => (
                <Row key={movement.id} movement={movement} />
              ))}
            </Table.Tbody>
          </Table>
        </div>
      )}
      {movements.data && (
        <Pager
          pages={Math.ceil(movements.data.total / movements.data.pageSize)}
          page={page}
          onChange={(next) => setPage(next)}
        />
      )}
    </section>
  );
}

function Row({ movement }: { readonly movement: Movement }) {
  const { currency } = movement;
  return (
    <>
      <Table.Tr>
        <Table.Td>
          <DayTime atMs={Date.parse(movement.atUtc)} />
          {movement.state === 'open' && <div className={classes.small}>{ageWords(movement.ageDays)}</div>}
        </Table.Td>
        <Table.Td>
          {movement.type.replaceAll('_', ' ')}{' '}
          {movement.bookingId && (
            <Anchor component={Link} to={paths.booking(movement.bookingId)}>
              Berth {movement.bookingNumber}
            </Anchor>
          )}
          <div className={classes.small}>
            {movement.description || movement.id}
            {movement.importedFrom === 'file' && ', from a file'}
          </div>
        </Table.Td>
        <Table.Td ta="right">{formatMoney({ amountMinor: movement.amountMinor, currency })}</Table.Td>
        <Table.Td ta="right">{formatMoney({ amountMinor: movement.feeMinor, currency })}</Table.Td>
        <Table.Td>
          <StateBadge tone={TONES[movement.state]}>{movement.state}</StateBadge>
        </Table.Td>
      </Table.Tr>
      {movement.actions.length > 0 && (
        <Table.Tr>
          <Table.Td />
          <Table.Td colSpan={4}>
            <Difference movement={movement} />
          </Table.Td>
        </Table.Tr>
      )}
    </>
  );
}

const ageWords = (days: number): string => (days === 0 ? 'today' : days === 1 ? '1 day ago' : `${days} days ago`);
const SHORTEST_REASON = 3;

/** Why it differs, and the acts that help, each with its reason for the record. */
function Difference({ movement }: { readonly movement: Movement }) {
  const client = useQueryClient();
  const [reason, setReason] = useState('');
  const resolve = useMutation({
    mutationFn: (action: MovementAction) =>
      call(routes.resolveMovement, { params: { id: movement.id }, body: { action, reason: reason.trim() } }),
    onSuccess: (next) => {
      void client.invalidateQueries({ queryKey: reconciliationQueries.all });
      notifications.show({
        message: next.state === 'open' ? 'It is still not explained.' : `It is ${next.state} now.`,
      });
    },
  });
  const ready = reason.trim().length >= SHORTEST_REASON;
  return (
    <div className={classes.difference}>
      <p>{movement.why}</p>
      <Textarea
        label="Why you do this, for the record"
        autosize
        maxLength={300}
        value={reason}
        onChange={(event) => setReason(event.currentTarget.value)}
      />
      {resolve.error && <ProblemNotice title="Nothing was changed">{sentenceOf(resolve.error)}</ProblemNotice>}
      <Group gap="sm" mt="xs">
        {movement.actions.map((action, index) => (
          <Button
            key={action}
            size="sm"
            variant={index === 0 ? 'filled' : 'default'}
            disabled={!ready}
            loading={resolve.isPending && resolve.variables === action}
            onClick={() => resolve.mutate(action)}
          >
            {ACTION_WORDS[action]}
          </Button>
        ))}
      </Group>
    </div>
  );
}
