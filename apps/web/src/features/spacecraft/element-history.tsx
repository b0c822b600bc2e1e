/** Every element set that was ever kept for a spacecraft. */
import { Pagination, Skeleton, Table } from '@mantine/core';
import type { ElementSummary, Spacecraft } from '@skyberth/shared';
import { keepPreviousData, useQuery } from '@tanstack/react-query';
import { sentenceOf } from '../../lib/problem-fields.js';
import { spacecraftQueries } from '../../lib/spacecraft-queries.js';
import { usePageNumber } from '../../lib/use-page-number.js';
import { useIsPhone } from '../../lib/use-phone.js';
import { DayTime } from '../../ui/day-time.js';
import { formatDegrees, formatNumber } from '../../ui/format.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { StateBadge } from '../../ui/state-badge.js';
import { ageWords, formatWords, heightWords } from './element-words.js';
import classes from './spacecraft.module.css';

export function ElementHistory({ craft }: { readonly craft: Spacecraft }) {
  const isPhone = useIsPhone();
  const [page, setPage] = usePageNumber();
  const history = useQuery({ ...spacecraftQueries.elements(craft.id, page), placeholderData: keepPreviousData });
  if (history.data?.total === 0 && !craft.elements) return null;
  const History = isPhone ? HistoryList : HistoryTable;
  const pages = history.data ? Math.ceil(history.data.total / history.data.pageSize) : 0;
  return (
    <section aria-labelledby="history">
      <h2 id="history" className={classes.heading}>
        Every set kept{history.data ? `, ${formatNumber(history.data.total)}` : ''}
      </h2>
      <p className={classes.help}>
        Newest epoch first. A pass is computed from the newest epoch that is not after it, so an older pass can be
        computed again as it was sold.
      </p>
      {history.error && (
        <ProblemNotice title="The history could not be read" onRetry={() => void history.refetch()}>
          {sentenceOf(history.error)}
        </ProblemNotice>
      )}
      {history.isPending && <Skeleton height={160} />}
      {history.data && <History items={history.data.items} inForceId={craft.elements?.id ?? null} />}
      {pages > 1 && <Pagination total={pages} value={page} onChange={setPage} mt="md" size="sm" withEdges />}
    </section>
  );
}

interface HistoryProps {
  readonly items: readonly ElementSummary[];
  readonly inForceId: string | null;
}

function HistoryTable({ items, inForceId }: HistoryProps) {
  return (
    <div className={classes.scroll}>
      <Table>
        <Table.Thead>
          <Table.Tr>
            <Table.Th>Epoch, UTC</Table.Th>
            <Table.Th>Age</Table.Th>
            <Table.Th ta="right">Height, km</Table.Th>
            <Table.Th ta="right">Inclination</Table.Th>
            <Table.Th ta="right">Turns a day</Table.Th>
            <Table.Th>Came as</Table.Th>
            <Table.Th>Added</Table.Th>
          </Table.Tr>
        </Table.Thead>
        <Table.Tbody>
          {items.map((set) => (
            <Table.Tr key={set.id} data-on={set.id === inForceId || undefined} className={classes.historyRow}>
              <Table.Td>
                <DayTime atMs={Date.parse(set.epochUtc)} /> {set.id === inForceId && <InForceBadge />}
              </Table.Td>
              <Table.Td className={classes.keep}>{ageWords(set.ageH)}</Table.Td>
              <Table.Td ta="right" className={classes.keep}>
                {heightWords(set)}
              </Table.Td>
              <Table.Td ta="right">{formatDegrees(set.inclinationDeg, 2)}</Table.Td>
              <Table.Td ta="right">{formatNumber(set.meanMotionRevPerDay, 5)}</Table.Td>
              <Table.Td>
                <span className={classes.keep}>{formatWords(set.format)}</span>
                <div className={classes.quiet}>{set.source}</div>
              </Table.Td>
              <Table.Td>
                <DayTime atMs={Date.parse(set.addedUtc)} />
                {set.addedByName && <div className={classes.quiet}>{set.addedByName}</div>}
              </Table.Td>
            </Table.Tr>
          ))}
        </Table.Tbody>
      </Table>
    </div>
  );
}

function InForceBadge() {
  return (
    <StateBadge tone="good" sign="circle">
      In force
    </StateBadge>
  );
}

function HistoryList({ items, inForceId }: HistoryProps) {
  return (
    <ul className={classes.plainList}>
      {items.map((set) => (
        <li key={set.id} data-on={set.id === inForceId || undefined}>
          <strong>
            <DayTime atMs={Date.parse(set.epochUtc)} />
          </strong>{' '}
          {set.id === inForceId && <InForceBadge />}
          <div>
            {ageWords(set.ageH)}, {heightWords(set)}&nbsp;km, {formatDegrees(set.inclinationDeg, 2)}
          </div>
          <div className={classes.quiet}>
            {formatWords(set.format)}, {set.source}
            {set.addedByName && `, by ${set.addedByName}`}
          </div>
        </li>
      ))}
    </ul>
  );
}
