/** Who did what, to what, when: append-only, each row chained to the one before. */
import { Button, Code, Group, Skeleton, Table, TextInput } from '@mantine/core';
import { type AuditRow, Id, routes } from '@skyberth/shared';
import { useInfiniteQuery, useMutation } from '@tanstack/react-query';
import { useSearchParams } from 'react-router-dom';
import { call } from '../../lib/api-client.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { useTitle } from '../../lib/use-title.js';
import { DayTime } from '../../ui/day-time.js';
import { EmptyState } from '../../ui/empty-state.js';
import { formatNumber } from '../../ui/format.js';
import { PageTitle } from '../../ui/page-title.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { StateBadge } from '../../ui/state-badge.js';
import classes from './oversight.module.css';
import { type AuditFilter, oversightQueries } from './oversight-queries.js';

const PAGE_SIZE = 100;

export function AuditPage() {
  useTitle('Audit');
  const [search, setSearch] = useSearchParams();
  const filter = readFilter(search);
  const audit = useInfiniteQuery(oversightQueries.audit(filter));
  const rows = audit.data?.pages.flatMap(({ items }) => items) ?? [];
  const change = (name: string, value: string) => {
    const next = new URLSearchParams(search);
    if (value) next.set(name, value);
    else next.delete(name);
    setSearch(next, { replace: true });
  };
  return (
    <>
      <PageTitle title="Audit" actions={<ChainCheck />}>
        What people and Skyberth itself did. Rows can be added, never changed.
      </PageTitle>
      <Group mb={12} gap={12} align="end">
        <TextInput
          label="What was done begins with"
          placeholder="booking. or station."
          value={filter.action ?? ''}
          onChange={(event) => change('action', event.currentTarget.value)}
        />
        <TextInput
          label="To what begins with"
          placeholder="booking:"
          value={filter.subject ?? ''}
          onChange={(event) => change('subject', event.currentTarget.value)}
        />
        {filter.organisationId && (
          <Button variant="default" onClick={() => change('organisation', '')}>
            Show every organisation
          </Button>
        )}
      </Group>
      {audit.error && (
        <ProblemNotice title="The audit trail could not be read" onRetry={() => void audit.refetch()}>
          {sentenceOf(audit.error)}
        </ProblemNotice>
      )}
      {audit.isPending && <Skeleton height={420} aria-label="Loading the audit trail" />}
      {audit.data && rows.length === 0 && <EmptyState title="No row fits this filter" />}
      {rows.length > 0 && <Rows rows={rows} />}
      {audit.hasNextPage && (
        <Group mt={12}>
          <Button variant="default" loading={audit.isFetchingNextPage} onClick={() => void audit.fetchNextPage()}>
            Show older rows
          </Button>
        </Group>
      )}
    </>
  );
}

function readFilter(search: URLSearchParams): AuditFilter {
  const organisation = Id.safeParse(search.get('organisation'));
  const [action, subject] = [search.get('action'), search.get('subject')];
  return {
    pageSize: PAGE_SIZE,
    ...(organisation.success ? { organisationId: organisation.data } : {}),
    ...(action ? { action: action.slice(0, 80) } : {}),
    ...(subject ? { subject: subject.slice(0, 120) } : {}),
  };
}

/** Recomputes the chain on request: it reads every row. */
function ChainCheck() {
  const check = useMutation({ mutationFn: () => call(routes.checkAudit, {}) });
  return (
    <>
      <span role="status">
        {check.data &&
          (check.data.intact ? (
            <StateBadge tone="good">{`${formatNumber(check.data.rows)} rows, chain unbroken`}</StateBadge>
          ) : (
            <StateBadge tone="bad">{`The chain breaks at row ${check.data.brokenSeq}`}</StateBadge>
          ))}
        {check.error && sentenceOf(check.error)}
      </span>
      <Button variant="default" loading={check.isPending} onClick={() => check.mutate()}>
        Check the chain
      </Button>
    </>
  );
}

function Rows({ rows }: { readonly rows: readonly AuditRow[] }) {
  return (
    // biome-ignore lint/a11y/noNoninteractiveTabindex: nothing inside takes the focus, so that the keyboard scrolls the region itself.
    <section className={classes.scroll} tabIndex={0} aria-label="Rows of the audit trail">
      <Table>
        <Table.Thead>
          <Table.Tr>
            <Table.Th ta="right">Row</Table.Th>
            <Table.Th>When</Table.Th>
            <Table.Th>Who</Table.Th>
            <Table.Th>Did</Table.Th>
            <Table.Th>To</Table.Th>
            <Table.Th>Recorded</Table.Th>
          </Table.Tr>
        </Table.Thead>
        <Table.Tbody>
          {rows.map((row) => (
            <Table.Tr key={row.seq}>
              <Table.Td ta="right">{row.seq}</Table.Td>
              <Table.Td>
                <DayTime atMs={Date.parse(row.atUtc)} />
              </Table.Td>
              <Table.Td>
                {row.personName ?? 'Skyberth'}
                {row.organisationName && <div className={classes.quiet}>{row.organisationName}</div>}
              </Table.Td>
              <Table.Td>{row.action}</Table.Td>
              <Table.Td className={classes.subject}>{row.subject}</Table.Td>
              <Table.Td className={classes.data}>{row.data === '{}' ? '' : <Code>{row.data}</Code>}</Table.Td>
            </Table.Tr>
          ))}
        </Table.Tbody>
      </Table>
    </section>
  );
}
