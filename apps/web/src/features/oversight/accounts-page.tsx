/** Every organisation and its standing. */
import { Anchor, Group, SegmentedControl, Select, Skeleton, Table, TextInput } from '@mantine/core';
import { type AccountSummary, OrganisationKind } from '@skyberth/shared';
import { useQuery } from '@tanstack/react-query';
import { Link, useSearchParams } from 'react-router-dom';
import { paths } from '../../lib/paths.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { useTitle } from '../../lib/use-title.js';
import { DayTime } from '../../ui/day-time.js';
import { EmptyState } from '../../ui/empty-state.js';
import { PageTitle } from '../../ui/page-title.js';
import { Pager } from '../../ui/pager.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { StateBadge } from '../../ui/state-badge.js';
import classes from './oversight.module.css';
import { type AccountFilter, oversightQueries } from './oversight-queries.js';

const PAGE_SIZE = 50;
const KINDS = [
  { value: 'operator', label: 'Operators' },
  { value: 'owner', label: 'Station owners' },
  { value: 'staff', label: 'Marketplace' },
];
const STANDINGS = [
  { value: 'all', label: 'All' },
  { value: 'good', label: 'In good standing' },
  { value: 'suspended', label: 'Suspended' },
];

export function AccountsPage() {
  useTitle('Accounts');
  const [search, setSearch] = useSearchParams();
  const filter = readFilter(search);
  const { data, error, isPending, refetch } = useQuery(oversightQueries.accounts(filter));
  const change = (name: string, value: string | null) => {
    const next = new URLSearchParams(search);
    if (value) next.set(name, value);
    else next.delete(name);
    if (name !== 'page') next.delete('page');
    setSearch(next, { replace: name === 'search' });
  };
  return (
    <>
      <PageTitle
        title="Accounts"
        actions={
          <SegmentedControl
            aria-label="Standing"
            data={STANDINGS}
            value={filter.standing ?? 'all'}
            onChange={(next) => change('standing', next === 'all' ? null : next)}
          />
        }
      >
        {data && `${data.total} ${data.total === 1 ? 'organisation' : 'organisations'} here.`}
      </PageTitle>
      <Group mb={12} gap={12} align="end">
        <TextInput
          label="Name, or a member's address"
          type="search"
          value={filter.search ?? ''}
          onChange={(event) => change('search', event.currentTarget.value)}
        />
        <Select
          label="Kind"
          data={KINDS}
          value={filter.kind ?? null}
          placeholder="every kind"
          clearable
          onChange={(kind) => change('kind', kind)}
        />
      </Group>
      {error && (
        <ProblemNotice title="The accounts could not be read" onRetry={() => void refetch()}>
          {sentenceOf(error)}
        </ProblemNotice>
      )}
      {isPending && <Skeleton height={320} aria-label="Loading accounts" />}
      {data?.items.length === 0 && <EmptyState title="No organisation fits this filter" />}
      {data && data.items.length > 0 && <AccountTable accounts={data.items} />}
      {data && (
        <div className={classes.foot}>
          <Pager
            pages={Math.ceil(data.total / PAGE_SIZE)}
            page={data.page}
            onChange={(page) => change('page', String(page))}
          />
        </div>
      )}
    </>
  );
}

function readFilter(search: URLSearchParams): AccountFilter {
  const kind = OrganisationKind.safeParse(search.get('kind'));
  const standing = search.get('standing');
  const text = search.get('search');
  return {
    page: Math.max(1, Math.floor(Number(search.get('page'))) || 1),
    pageSize: PAGE_SIZE,
    ...(kind.success ? { kind: kind.data } : {}),
    ...(standing === 'good' || standing === 'suspended' ? { standing } : {}),
    ...(text ? { search: text.slice(0, 120) } : {}),
  };
}

const KIND_WORDS = { operator: 'operator', owner: 'station owner', staff: 'marketplace' } as const;

function AccountTable({ accounts }: { readonly accounts: readonly AccountSummary[] }) {
  return (
    <div className={classes.scroll}>
      <Table>
        <Table.Thead>
          <Table.Tr>
            <Table.Th>Organisation</Table.Th>
            <Table.Th>Kind</Table.Th>
            <Table.Th>Country</Table.Th>
            <Table.Th ta="right">Members</Table.Th>
            <Table.Th ta="right">Open bookings</Table.Th>
            <Table.Th>Since</Table.Th>
            <Table.Th>Last seen</Table.Th>
            <Table.Th>Standing</Table.Th>
          </Table.Tr>
        </Table.Thead>
        <Table.Tbody>
          {accounts.map((one) => (
            <Table.Tr key={one.id}>
              <Table.Td>
                <Anchor component={Link} to={paths.account(one.id)}>
                  {one.name}
                </Anchor>
              </Table.Td>
              <Table.Td>{KIND_WORDS[one.kind]}</Table.Td>
              <Table.Td>{one.country}</Table.Td>
              <Table.Td ta="right">{one.members}</Table.Td>
              <Table.Td ta="right">{one.openBookings}</Table.Td>
              <Table.Td>
                <DayTime atMs={Date.parse(one.createdUtc)} show="day" />
              </Table.Td>
              <Table.Td>{one.lastSeenUtc ? <DayTime atMs={Date.parse(one.lastSeenUtc)} /> : 'never'}</Table.Td>
              <Table.Td>
                <StandingBadge account={one} />
              </Table.Td>
            </Table.Tr>
          ))}
        </Table.Tbody>
      </Table>
    </div>
  );
}

export function StandingBadge({ account }: { readonly account: AccountSummary }) {
  return account.suspended ? (
    <StateBadge tone="bad">Suspended</StateBadge>
  ) : (
    <StateBadge tone="good">In good standing</StateBadge>
  );
}
