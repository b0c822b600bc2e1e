/** One organisation: its people, its bookings, its trail, and its standing. */
import { Anchor, Button, Group, Paper, Skeleton, Table, Textarea } from '@mantine/core';
import { notifications } from '@mantine/notifications';
import { type AccountView, routes } from '@skyberth/shared';
import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { Link, useParams } from 'react-router-dom';
import { call } from '../../lib/api-client.js';
import { paths } from '../../lib/paths.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { useCan } from '../../lib/session.js';
import { useTitle } from '../../lib/use-title.js';
import { DayTime } from '../../ui/day-time.js';
import { PageTitle } from '../../ui/page-title.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { Figure, Figures } from '../../ui/values.js';
import { StandingBadge } from './accounts-page.js';
import classes from './oversight.module.css';
import { oversightQueries } from './oversight-queries.js';

export function AccountPage() {
  const { id = '' } = useParams();
  const { data, error, refetch } = useQuery(oversightQueries.account(id));
  useTitle(data?.name ?? 'Account');
  if (error && !data)
    return (
      <ProblemNotice title="The account could not be read" onRetry={() => void refetch()}>
        {sentenceOf(error)}
      </ProblemNotice>
    );
  if (!data) return <Skeleton height={360} aria-label="Loading the account" />;
  return (
    <>
      <PageTitle title={data.name} badge={<StandingBadge account={data} />}>
        <Anchor component={Link} to={paths.accounts}>
          All accounts
        </Anchor>
      </PageTitle>
      <div className={classes.columns}>
        <div className={classes.stack}>
          <Figures columns={4} ruled>
            <Figure label="Country" value={data.country} />
            <Figure label="Open bookings" value={data.openBookings} />
            <Figure label="VAT number" value={data.vatNumber ?? 'none given'} />
            <Figure label="Bills go to" value={data.billingEmail} />
          </Figures>
          <People account={data} />
          <Anchor component={Link} to={`${paths.audit}?organisation=${data.id}`}>
            What its people did, in the audit trail
          </Anchor>
        </div>
        {data.kind !== 'staff' && <StandingDesk account={data} />}
      </div>
    </>
  );
}

function People({ account }: { readonly account: AccountView }) {
  return (
    <div className={classes.scroll}>
      <Table>
        <Table.Thead>
          <Table.Tr>
            <Table.Th>Person</Table.Th>
            <Table.Th>E-mail</Table.Th>
            <Table.Th>Role</Table.Th>
            <Table.Th>Last seen</Table.Th>
          </Table.Tr>
        </Table.Thead>
        <Table.Tbody>
          {account.people.map((person) => (
            <Table.Tr key={person.id}>
              <Table.Td>{person.name}</Table.Td>
              <Table.Td>{person.email}</Table.Td>
              <Table.Td>{person.role}</Table.Td>
              <Table.Td>{person.lastSeenUtc ? <DayTime atMs={Date.parse(person.lastSeenUtc)} /> : 'never'}</Table.Td>
            </Table.Tr>
          ))}
        </Table.Tbody>
      </Table>
    </div>
  );
}

/** Suspending and reinstating, each with the reason that its managers read. */
function StandingDesk({ account }: { readonly account: AccountView }) {
  const client = useQueryClient();
  const may = useCan()('accounts.suspend');
  const [reason, setReason] = useState('');
  const route = account.suspended ? routes.reinstateAccount : routes.suspendAccount;
  const change = useMutation({
    mutationFn: () => call(route, { params: { id: account.id }, body: { reason: reason.trim() } }),
    onSuccess: () => {
      notifications.show({
        message: account.suspended ? `${account.name} is in good standing again.` : `${account.name} is suspended.`,
      });
      setReason('');
      void client.invalidateQueries({ queryKey: ['accounts'] });
      void client.invalidateQueries({ queryKey: ['audit'] });
    },
  });
  return (
    <Paper component="section" withBorder className={classes.desk} aria-labelledby="standing-title">
      <h2 id="standing-title">{account.suspended ? 'Suspended' : 'In good standing'}</h2>
      {account.suspended && (
        <p>
          By {account.suspended.byName}, <DayTime atMs={Date.parse(account.suspended.sinceUtc)} />:{' '}
          {account.suspended.reason}
        </p>
      )}
      {may && (
        <>
          {change.error && <ProblemNotice title="Nothing was changed">{sentenceOf(change.error)}</ProblemNotice>}
          <Textarea
            label="Reason, read by its managers"
            required
            autosize
            minRows={3}
            maxLength={2_000}
            value={reason}
            onChange={(event) => setReason(event.currentTarget.value)}
          />
          <Group>
            <Button
              {...(account.suspended ? {} : { variant: 'outline', color: 'buoy' })}
              disabled={reason.trim() === ''}
              loading={change.isPending}
              onClick={() => change.mutate()}
            >
              {account.suspended ? 'Lift the suspension' : 'Suspend this organisation'}
            </Button>
          </Group>
          <p className={classes.quiet}>
            {account.suspended
              ? 'Everything works again at once; its managers are told by mail.'
              : 'Its people read on and report contacts, but buy, sell and change nothing. Contacts already sold stay. Its managers are told by mail.'}
          </p>
        </>
      )}
    </Paper>
  );
}
