/** The payment provider's books against ours: two levels, what differs and why, chargebacks, and closing months. */
import { Button, FileButton, Group, Skeleton, Tabs } from '@mantine/core';
import { notifications } from '@mantine/notifications';
import { routes } from '@skyberth/shared';
import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { useSearchParams } from 'react-router-dom';
import { call } from '../../lib/api-client.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { useTitle } from '../../lib/use-title.js';
import { DayTime } from '../../ui/day-time.js';
import { PageTitle } from '../../ui/page-title.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { Chargebacks } from './chargebacks.js';
import { LedgerOnly } from './ledger-only.js';
import { Levels } from './levels.js';
import { Months } from './months.js';
import { Movements } from './movements.js';
import { reconciliationQueries } from './reconciliation-queries.js';

const TABS = [
  { value: 'differences', label: 'Differences' },
  { value: 'movements', label: 'All movements' },
  { value: 'chargebacks', label: 'Chargebacks' },
  { value: 'months', label: 'Month close' },
] as const;
type Tab = (typeof TABS)[number]['value'];

export function ReconciliationPage() {
  useTitle('Reconciliation');
  const [search, setSearch] = useSearchParams();
  const tab: Tab = TABS.find((one) => one.value === search.get('tab'))?.value ?? 'differences';
  const view = useQuery(reconciliationQueries.view());
  return (
    <>
      <PageTitle title="Reconciliation" actions={<Acts />}>
        {view.data && (
          <>
            {view.data.readUtc ? (
              <>
                The provider was read <DayTime atMs={Date.parse(view.data.readUtc)} />:{' '}
              </>
            ) : null}
            {view.data.note}. It is read every ten minutes.
          </>
        )}
      </PageTitle>
      {view.error && (
        <ProblemNotice title="The provider’s books could not be shown" onRetry={() => void view.refetch()}>
          {sentenceOf(view.error)}
        </ProblemNotice>
      )}
      {view.isPending && <Skeleton height={140} />}
      {view.data && <Levels currencies={view.data.currencies} ageing={view.data.ageing} />}
      <Tabs
        mt="lg"
        value={tab}
        keepMounted={false}
        onChange={(next) => setSearch(next && next !== 'differences' ? { tab: next } : {})}
      >
        <Tabs.List aria-label="About reconciliation">
          {TABS.map((one) => (
            <Tabs.Tab key={one.value} value={one.value}>
              {one.label}
            </Tabs.Tab>
          ))}
        </Tabs.List>
        <Tabs.Panel value="differences" pt="md">
          <Movements state="open" />
          {view.data && <LedgerOnly entries={view.data.ledgerOnly} />}
          <Movements state="in suspense" />
        </Tabs.Panel>
        <Tabs.Panel value="movements" pt="md">
          <Movements state={undefined} />
        </Tabs.Panel>
        <Tabs.Panel value="chargebacks" pt="md">
          <Chargebacks />
        </Tabs.Panel>
        <Tabs.Panel value="months" pt="md">
          <Months />
        </Tabs.Panel>
      </Tabs>
    </>
  );
}

/** Read the provider now, or take over a file of its movements. */
function Acts() {
  const client = useQueryClient();
  const refresh = () => void client.invalidateQueries({ queryKey: reconciliationQueries.all });
  const read = useMutation({
    mutationFn: () => call(routes.readMovements, {}),
    onSuccess: ({ imported, matched }) => {
      refresh();
      notifications.show({ message: `${imported} new movements, ${matched} matched.` });
    },
    onError: (error) => notifications.show({ message: sentenceOf(error), color: 'buoy' }),
  });
  const importing = useMutation({
    mutationFn: async (file: File) => call(routes.importMovements, { body: { text: await file.text() } }),
    onSuccess: ({ imported, known }) => {
      refresh();
      notifications.show({ message: `${imported} movements imported, ${known} were known already.` });
    },
    onError: (error) => notifications.show({ message: sentenceOf(error), color: 'buoy', autoClose: false }),
  });
  return (
    <Group gap="sm">
      <FileButton accept="text/csv,.csv" onChange={(file) => file && importing.mutate(file)}>
        {(props) => (
          <Button {...props} variant="default" loading={importing.isPending}>
            Import a CSV
          </Button>
        )}
      </FileButton>
      <Button loading={read.isPending} onClick={() => read.mutate()}>
        Read the provider now
      </Button>
    </Group>
  );
}
