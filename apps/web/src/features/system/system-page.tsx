import { Button, Skeleton, Table } from '@mantine/core';
import { routes, type SystemView } from '@skyberth/shared';
import { queryOptions, useQuery } from '@tanstack/react-query';
import { call } from '../../lib/api-client.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { serverNowMs } from '../../lib/server-clock.js';
import { useTitle } from '../../lib/use-title.js';
import { DayTime } from '../../ui/day-time.js';
import { EmptyState } from '../../ui/empty-state.js';
import { formatBytes, formatDuration, formatNumber } from '../../ui/format.js';
import { PageTitle } from '../../ui/page-title.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { type BadgeTone, StateBadge } from '../../ui/state-badge.js';
import { Figure, Figures } from '../../ui/values.js';
import { LedgerFigure } from './ledger-figure.js';
import classes from './system.module.css';
import { faultsOf, servicesAndJobs } from './system-words.js';

const REFRESH_MS = 10_000;

const systemQuery = queryOptions({
  queryKey: ['system'],
  queryFn: ({ signal }) => call(routes.system, { signal }),
  refetchInterval: REFRESH_MS,
});

export function SystemPage() {
  useTitle('System');
  const system = useQuery(systemQuery);
  const faults = system.data ? faultsOf(system.data) : [];
  return (
    <>
      <PageTitle
        title="System"
        badge={
          system.data && (
            <StateBadge tone={faults.length === 0 ? 'good' : 'bad'}>
              {faults.length === 0 ? 'All is well' : `${faults.length} to look at`}
            </StateBadge>
          )
        }
        actions={
          <Button variant="default" onClick={() => void system.refetch()} loading={system.isFetching}>
            Look again
          </Button>
        }
      >
        {system.data && (
          <>
            Version {system.data.version}, up for {formatDuration(serverNowMs() - Date.parse(system.data.startedUtc))}{' '}
            since <DayTime atMs={Date.parse(system.data.startedUtc)} />.
          </>
        )}
      </PageTitle>
      {system.error && (
        <ProblemNotice title="The system could not be read" onRetry={() => void system.refetch()}>
          {sentenceOf(system.error)}
        </ProblemNotice>
      )}
      {system.isPending && <Skeleton height={420} />}
      {system.data && <View view={system.data} faults={faults} />}
    </>
  );
}

function View({ view, faults }: { readonly view: SystemView; readonly faults: readonly string[] }) {
  const { services, jobs } = servicesAndJobs(view.services);
  const waiting = view.outbox.oldestPendingUtc;
  return (
    <div className={classes.page}>
      {faults.length > 0 && (
        <ProblemNotice title="Not fine" items={faults.map((message) => ({ message }))}>
          What failed for good stays below with its reason.
        </ProblemNotice>
      )}
      <Figures columns={5} ruled>
        <Figure
          label="Database"
          value={formatBytes(view.database.sizeBytes)}
          note={`${view.database.migrations} migrations, integrity ${view.database.integrity}`}
        />
        <Figure
          label="To be sent"
          value={formatNumber(view.outbox.pending)}
          note={waiting ? `oldest for ${formatDuration(serverNowMs() - Date.parse(waiting))}` : 'nothing waits'}
        />
        <Figure
          label="Failed for good"
          value={formatNumber(view.outbox.failed)}
          tone={view.outbox.failed > 0 ? 'bad' : 'plain'}
        />
        <Figure
          label="Events of the payment provider"
          value={formatNumber(view.providerEvents.received)}
          note={`${formatNumber(view.providerEvents.processed)} processed`}
        />
        <LedgerFigure />
      </Figures>
      <div className={classes.columns}>
        <StateTable title="Services beside the server" rows={services} />
        <StateTable title="Jobs" rows={jobs} />
      </div>
      <Outbox rows={view.outbox.recent} />
    </div>
  );
}

function StateTable({
  title,
  rows,
}: {
  readonly title: string;
  readonly rows: readonly SystemView['services'][number][];
}) {
  return (
    <section aria-label={title}>
      <h2 className={classes.heading}>{title}</h2>
      {rows.length === 0 ? (
        <p className={classes.quiet}>None is configured.</p>
      ) : (
        <Table>
          <Table.Tbody>
            {rows.map((row) => (
              <Table.Tr key={row.name}>
                <Table.Td fw={700}>{row.name}</Table.Td>
                <Table.Td>
                  <StateBadge tone={row.ok ? 'good' : 'bad'}>{row.ok ? 'Fine' : 'Not fine'}</StateBadge>
                </Table.Td>
                <Table.Td className={classes.quiet}>{row.detail}</Table.Td>
              </Table.Tr>
            ))}
          </Table.Tbody>
        </Table>
      )}
    </section>
  );
}

const TONES: Readonly<Record<string, BadgeTone>> = { pending: 'waiting', failed: 'bad', done: 'good' };

function Outbox({ rows }: { readonly rows: SystemView['outbox']['recent'] }) {
  return (
    <section aria-label="Lately sent or to be sent">
      <h2 className={classes.heading}>Lately sent or to be sent</h2>
      {rows.length === 0 ? (
        <EmptyState level={3} title="Nothing was sent yet">
          Mails and payment acts appear here as they are carried out.
        </EmptyState>
      ) : (
        <div className={classes.scroll}>
          <Table>
            <Table.Thead>
              <Table.Tr>
                <Table.Th>What</Table.Th>
                <Table.Th>State</Table.Th>
                <Table.Th ta="right">Attempts</Table.Th>
                <Table.Th>Asked for</Table.Th>
                <Table.Th>Next attempt</Table.Th>
                <Table.Th>Last error</Table.Th>
              </Table.Tr>
            </Table.Thead>
            <Table.Tbody>
              {rows.map((row) => (
                <Table.Tr key={row.id}>
                  <Table.Td fw={700}>{row.kind}</Table.Td>
                  <Table.Td>
                    <StateBadge tone={TONES[row.state] ?? 'quiet'}>{row.state}</StateBadge>
                  </Table.Td>
                  <Table.Td ta="right">{row.attempts}</Table.Td>
                  <Table.Td>
                    <DayTime atMs={Date.parse(row.createdUtc)} />
                  </Table.Td>
                  <Table.Td>
                    {row.nextAttemptUtc ? (
                      <DayTime atMs={Date.parse(row.nextAttemptUtc)} />
                    ) : (
                      <span className={classes.quiet}>none</span>
                    )}
                  </Table.Td>
                  <Table.Td className={classes.error}>{row.lastError}</Table.Td>
                </Table.Tr>
              ))}
            </Table.Tbody>
          </Table>
        </div>
      )}
    </section>
  );
}
