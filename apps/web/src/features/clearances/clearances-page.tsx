/** All clearances of one side, or of everybody for staff: those that somebody must act on first. */
import { Anchor, Button, SegmentedControl, Skeleton, Table } from '@mantine/core';
import { CLEARANCE_STATE_FACTS, type Clearance, ClearanceState } from '@skyberth/shared';
import { useQuery } from '@tanstack/react-query';
import { Link, useSearchParams } from 'react-router-dom';
import { paths } from '../../lib/paths.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { useCan, useSession } from '../../lib/session.js';
import { usePageNumber } from '../../lib/use-page-number.js';
import { useTitle } from '../../lib/use-title.js';
import { DayTime } from '../../ui/day-time.js';
import { EmptyState } from '../../ui/empty-state.js';
import { PageTitle } from '../../ui/page-title.js';
import { Pager } from '../../ui/pager.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { ClearanceBadge } from './clearance-badge.js';
import { clearanceQueries } from './clearance-queries.js';
import classes from './clearances.module.css';

const PAGE_SIZE = 50;
const CHOICES = [
  { value: '', label: 'All' },
  { value: 'requested', label: 'Asked' },
  { value: 'granted', label: 'To check' },
  { value: 'in force', label: 'In force' },
  { value: 'expired', label: 'Expired' },
];

export function ClearancesPage() {
  useTitle('Clearances');
  const mayRequest = useCan()('clearances.request');
  const [search, setSearch] = useSearchParams();
  const state = ClearanceState.safeParse(search.get('state')).data;
  const [page, setPage] = usePageNumber();
  const list = useQuery(clearanceQueries.list({ page, pageSize: PAGE_SIZE, ...(state ? { state } : {}) }));
  return (
    <>
      <PageTitle
        title="Clearances"
        actions={
          mayRequest && (
            <Button component={Link} to={paths.newClearance}>
              Ask for a clearance
            </Button>
          )
        }
      >
        Leave to transmit to a spacecraft from a station in a band. The station grants it, the marketplace checks the
        papers, and uplink is sold only while it is in force.
      </PageTitle>
      <div className={classes.scroll}>
        <SegmentedControl
          aria-label="Clearances by state"
          data={CHOICES}
          value={CHOICES.some((choice) => choice.value === state) ? (state ?? '') : ''}
          onChange={(next) => setSearch(next === '' ? {} : { state: next })}
        />
      </div>
      {list.error && (
        <ProblemNotice title="The clearances could not be read" onRetry={() => void list.refetch()}>
          {sentenceOf(list.error)}
        </ProblemNotice>
      )}
      {list.isPending && <Skeleton height={180} />}
      {list.data?.items.length === 0 && (
        <EmptyState title={state ? 'None in this state' : 'No clearance yet'}>
          An operator asks for one with the licence and the coordination papers; the station answers.
        </EmptyState>
      )}
      {list.data && list.data.items.length > 0 && <ClearanceTable items={list.data.items} />}
      {list.data && <Pager page={page} pages={Math.ceil(list.data.total / PAGE_SIZE)} onChange={setPage} />}
    </>
  );
}

function ClearanceTable({ items }: { readonly items: readonly Clearance[] }) {
  const { active } = useSession();
  return (
    <div className={classes.scroll}>
      <Table>
        <Table.Thead>
          <Table.Tr>
            <Table.Th>Clearance</Table.Th>
            <Table.Th>{active.organisationKind === 'operator' ? 'Station' : 'Operator'}</Table.Th>
            <Table.Th>Band</Table.Th>
            <Table.Th>State</Table.Th>
            <Table.Th>From</Table.Th>
            <Table.Th>To</Table.Th>
            <Table.Th>Who is next</Table.Th>
          </Table.Tr>
        </Table.Thead>
        <Table.Tbody>
          {items.map((one) => (
            <Table.Tr key={one.id}>
              <Table.Td>
                <Anchor component={Link} to={paths.clearance(one.id)}>
                  {one.number}: {one.spacecraftName} at {one.stationName}
                </Anchor>
              </Table.Td>
              <Table.Td>{active.organisationKind === 'operator' ? one.ownerName : one.operatorName}</Table.Td>
              <Table.Td>{one.band}</Table.Td>
              <Table.Td>
                <ClearanceBadge state={one.state} />
              </Table.Td>
              <Table.Td>
                <DayTime atMs={Date.parse(one.validFromUtc)} show="day" />
              </Table.Td>
              <Table.Td>
                <DayTime atMs={Date.parse(one.validToUtc)} show="day" />
              </Table.Td>
              <Table.Td>{nextText(one)}</Table.Td>
            </Table.Tr>
          ))}
        </Table.Tbody>
      </Table>
    </div>
  );
}

/** Who must act for it to go on. */
export function nextText({ state, ownerName }: Pick<Clearance, 'state' | 'ownerName'>): string {
  const { next } = CLEARANCE_STATE_FACTS[state];
  if (next === 'owner') return ownerName;
  return next === 'admin' ? 'The marketplace' : 'nobody';
}
