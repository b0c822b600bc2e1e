import { Button, Checkbox, Paper, Skeleton, Table } from '@mantine/core';
import { notifications } from '@mantine/notifications';
import { type ResponseOf, routes } from '@skyberth/shared';
import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { call } from '../../lib/api-client.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { DayTime } from '../../ui/day-time.js';
import { formatMoney } from '../../ui/format.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { Sign } from '../../ui/signs.js';
import { type BadgeTone, StateBadge } from '../../ui/state-badge.js';
import classes from './reconciliation.module.css';
import { reconciliationQueries } from './reconciliation-queries.js';

type Month = ResponseOf<typeof routes.listMonths>['items'][number];
const TONES: Record<Month['state'], BadgeTone> = {
  closed: 'quiet',
  'can be closed': 'good',
  'not ready': 'look',
  running: 'active',
};

/** The months of the ledger, the running one first, each with its trial balance. */
export function Months() {
  const months = useQuery(reconciliationQueries.months());
  if (months.error)
    return <ProblemNotice title="The months could not be read">{sentenceOf(months.error)}</ProblemNotice>;
  if (!months.data) return <Skeleton height={200} />;
  return (
    <div className={classes.months}>
      {months.data.items.map((month) => (
        <OneMonth key={month.month} month={month} />
      ))}
    </div>
  );
}

function OneMonth({ month }: { readonly month: Month }) {
  return (
    <Paper component="section" withBorder className={classes.month} aria-label={`Month ${month.month}`}>
      <h2>
        {month.month} <StateBadge tone={TONES[month.state]}>{month.state}</StateBadge>
      </h2>
      {month.closedUtc && (
        <p className={classes.small}>
          Closed by {month.closedBy}, <DayTime atMs={Date.parse(month.closedUtc)} />
        </p>
      )}
      {month.checklist.length > 0 && (
        <ul className={classes.checklist}>
          {month.checklist.map((item) => (
            <li key={item.name} data-ok={item.ok || undefined}>
              <Sign shape={item.ok ? 'check' : 'square'} />
              <span>
                <strong>{item.name}.</strong> {item.sentence}
              </span>
            </li>
          ))}
        </ul>
      )}
      {month.state === 'can be closed' && <CloseMonth month={month.month} />}
      <TrialBalance month={month} />
    </Paper>
  );
}

function CloseMonth({ month }: { readonly month: string }) {
  const client = useQueryClient();
  const [sure, setSure] = useState(false);
  const close = useMutation({
    mutationFn: () => call(routes.closeMonth, { params: { month } }),
    onSuccess: () => {
      void client.invalidateQueries({ queryKey: reconciliationQueries.all });
      notifications.show({ message: `${month} is closed.` });
    },
  });
  return (
    <>
      {close.error && <ProblemNotice title="The month was not closed">{sentenceOf(close.error)}</ProblemNotice>}
      <Checkbox
        mt="sm"
        checked={sure}
        onChange={(event) => setSure(event.currentTarget.checked)}
        label="I know that it cannot be opened again. Corrections are written in the next month."
      />
      <Button mt="sm" disabled={!sure} loading={close.isPending} onClick={() => close.mutate()}>
        Close {month}
      </Button>
    </>
  );
}

function TrialBalance({ month }: { readonly month: Month }) {
  if (month.trialBalance.length === 0) return <p className={classes.small}>No entry up to its end.</p>;
  return (
    <details>
      <summary>Trial balance</summary>
      <div className={classes.scroll}>
        <Table>
          <Table.Thead>
            <Table.Tr>
              <Table.Th>Account</Table.Th>
              <Table.Th ta="right">Before</Table.Th>
              <Table.Th ta="right">Debits</Table.Th>
              <Table.Th ta="right">Credits</Table.Th>
              <Table.Th ta="right">After</Table.Th>
            </Table.Tr>
          </Table.Thead>
          <Table.Tbody>
            {month.trialBalance.map((line) => (
              <Table.Tr key={`${line.account} ${line.currency}`}>
                <Table.Td>{line.account}</Table.Td>
                {[line.openingMinor, line.debitMinor, line.creditMinor, line.closingMinor].map((amountMinor, index) => (
                  // biome-ignore lint/suspicious/noArrayIndexKey: the four columns never change their place
                  <Table.Td key={index} ta="right">
                    {formatMoney({ amountMinor, currency: line.currency })}
                  </Table.Td>
                ))}
              </Table.Tr>
            ))}
          </Table.Tbody>
        </Table>
      </div>
    </details>
  );
}
