import { Anchor, Group, Pagination, SegmentedControl, Skeleton, Table } from '@mantine/core';
import { type Station, StationState } from '@skyberth/shared';
import { useQuery } from '@tanstack/react-query';
import { Link, useSearchParams } from 'react-router-dom';
import { paths } from '../../lib/paths.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { stationQueries } from '../../lib/station-queries.js';
import { useTitle } from '../../lib/use-title.js';
import { EmptyState } from '../../ui/empty-state.js';
import { PageTitle } from '../../ui/page-title.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { StationBadge } from '../../ui/station-badges.js';
import classes from './approvals.module.css';

const PAGE_SIZE = 50;
const CHOICES = [
  { value: 'waiting', label: 'Waiting' },
  { value: 'approved', label: 'Approved' },
  { value: 'refused', label: 'Refused' },
  { value: 'suspended', label: 'Suspended' },
  { value: 'draft', label: 'Draft' },
] satisfies { value: StationState; label: string }[];

export function ApprovalsPage() {
  useTitle('Approvals');
  const [search, setSearch] = useSearchParams();
  const state = StationState.catch('waiting').parse(search.get('state'));
  const page = Math.max(1, Number(search.get('page')) || 1);
  const stations = useQuery(stationQueries.list({ state, page, pageSize: PAGE_SIZE }));
  return (
    <>
      <PageTitle
        title="Approvals"
        actions={
          <SegmentedControl
            aria-label="Stations by state"
            data={CHOICES}
            value={state}
            onChange={(next) => setSearch(next === 'waiting' ? {} : { state: next })}
          />
        }
      >
        {stations.data && `${stations.data.total} ${stations.data.total === 1 ? 'station' : 'stations'} here.`}
      </PageTitle>
      {stations.error && (
        <ProblemNotice title="The stations could not be read" onRetry={() => void stations.refetch()}>
          {sentenceOf(stations.error)}
        </ProblemNotice>
      )}
      {stations.isPending && <Skeleton height={180} />}
      {stations.data?.items.length === 0 && (
        <EmptyState title={state === 'waiting' ? 'No station waits for approval' : 'No station in this state'}>
          An owner asks for approval when the station and its antennas are described.
        </EmptyState>
      )}
      {stations.data && stations.data.items.length > 0 && <StationTable stations={stations.data.items} />}
      {stations.data && stations.data.total > PAGE_SIZE && (
        <Group mt={12}>
          <Pagination
            total={Math.ceil(stations.data.total / PAGE_SIZE)}
            value={page}
            onChange={(next) => setSearch({ state, page: String(next) })}
          />
        </Group>
      )}
    </>
  );
}

function StationTable({ stations }: { readonly stations: readonly Station[] }) {
  return (
    <div className={classes.scroll}>
      <Table>
        <Table.Thead>
          <Table.Tr>
            <Table.Th>Station</Table.Th>
            <Table.Th>Owner</Table.Th>
            <Table.Th>Country</Table.Th>
            <Table.Th>Antennas</Table.Th>
            <Table.Th>State</Table.Th>
            <Table.Th>Note</Table.Th>
          </Table.Tr>
        </Table.Thead>
        <Table.Tbody>
          {stations.map((station) => (
            <Table.Tr key={station.id}>
              <Table.Td>
                <Anchor component={Link} to={paths.approval(station.id)} fw={700}>
                  {station.name}
                </Anchor>
              </Table.Td>
              <Table.Td>{station.ownerName}</Table.Td>
              <Table.Td>{station.country}</Table.Td>
              <Table.Td>
                {station.antennas
                  .map((antenna) => `${antenna.name} (${antenna.bands.join(', ') || 'no band'})`)
                  .join('; ') || 'none'}
              </Table.Td>
              <Table.Td>
                <StationBadge state={station.state} />
              </Table.Td>
              <Table.Td className={classes.quiet}>{station.stateNote}</Table.Td>
            </Table.Tr>
          ))}
        </Table.Tbody>
      </Table>
    </div>
  );
}
