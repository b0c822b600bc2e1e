/** The lines of a run with their sums; a line of an open run can be held back or adjusted where it stands. */
import { Button, Table } from '@mantine/core';
import type { PayoutLine, PayoutRun } from '@skyberth/shared';
import { useState } from 'react';
import { formatMoney } from '../../ui/format.js';
import { type BadgeTone, StateBadge } from '../../ui/state-badge.js';
import { MoneyText } from '../../ui/values.js';
import { LineActs } from './line-acts.js';
import classes from './payouts.module.css';
import { isOpen } from './use-run-act.js';

const STATES: Readonly<Record<PayoutLine['state'], { readonly tone: BadgeTone; readonly text: string }>> = {
  ready: { tone: 'good', text: 'Ready' },
  'held back': { tone: 'look', text: 'Held back' },
  'below minimum': { tone: 'quiet', text: 'Below minimum' },
  'nothing due': { tone: 'quiet', text: 'Nothing due' },
  paying: { tone: 'active', text: 'On its way' },
  paid: { tone: 'good', text: 'Paid' },
  failed: { tone: 'bad', text: 'Failed' },
};
const HEADS = ['Owner', 'Contacts', 'Settled', 'Fee', 'Refunds', 'Set aside', 'Adjusted', 'To pay', 'State'];

/** What of a line stands in each column of money. */
const columnsOf = (line: PayoutLine): number[] => [
  line.settledMinor,
  -line.feeMinor,
  -line.refundMinor,
  -line.reserveMinor,
  line.adjustedMinor,
];
const sumOf = (lines: readonly PayoutLine[], part: (line: PayoutLine) => number): number =>
  lines.reduce((sum, line) => sum + part(line), 0);

export function RunLines({ run }: { readonly run: PayoutRun }) {
  return (
    <Table.ScrollContainer minWidth={880} className={classes.sheet}>
      <Table>
        <Table.Thead>
          <Table.Tr>
            {HEADS.map((head, index) => (
              <Table.Th key={head} ta={index > 0 && index < 8 ? 'right' : 'left'}>
                {index > 1 && index < 8 ? `${head}, ${run.currency}` : head}
              </Table.Th>
            ))}
          </Table.Tr>
        </Table.Thead>
        <Table.Tbody>
          {run.lines.map((line) => (
            <Line key={line.id} run={run} line={line} />
          ))}
        </Table.Tbody>
        <Sums run={run} />
      </Table>
    </Table.ScrollContainer>
  );
}

function Line({ run, line }: { readonly run: PayoutRun; readonly line: PayoutLine }) {
  const [acting, setActing] = useState(false);
  const { currency } = run;
  const look = line.state === 'held back' || line.state === 'failed' || undefined;
  const { tone, text } = STATES[line.state];
  return (
    <>
      <Table.Tr data-look={look} data-more={line.note !== '' || acting || undefined}>
        <Table.Td fw={700}>{line.ownerName}</Table.Td>
        <Table.Td ta="right">{line.contactCount}</Table.Td>
        {columnsOf(line).map((amountMinor, index) => (
          <Table.Td key={HEADS[index + 2]} ta="right">
            <MoneyText amountMinor={amountMinor} currency={currency} quietZero />
          </Table.Td>
        ))}
        <Table.Td ta="right" fw={700}>
          <MoneyText amountMinor={line.toPayMinor} currency={currency} />
        </Table.Td>
        <Table.Td>
          <StateBadge tone={tone}>{text}</StateBadge>
          {isOpen(run) && (
            <Button
              variant="subtle"
              size="compact-sm"
              aria-expanded={acting}
              aria-label={`Hold or adjust the line of ${line.ownerName}`}
              onClick={() => setActing(!acting)}
            >
              {acting ? 'Close' : 'Hold or adjust'}
            </Button>
          )}
        </Table.Td>
      </Table.Tr>
      {(line.note !== '' || acting) && (
        <Table.Tr data-look={look}>
          <Table.Td colSpan={HEADS.length} className={classes.more}>
            {line.note}
            {acting && isOpen(run) && <LineActs run={run} line={line} onDone={() => setActing(false)} />}
          </Table.Td>
        </Table.Tr>
      )}
    </>
  );
}

function Sums({ run }: { readonly run: PayoutRun }) {
  const { lines, currency, transfers, sendsMinor } = run;
  const toPayMinor = sumOf(lines, (line) => line.toPayMinor);
  const money = (amountMinor: number) => formatMoney({ amountMinor, currency });
  const word = run.state === 'paying' || run.state === 'done' ? 'This run sends' : 'This run would send';
  return (
    <Table.Tfoot>
      <Table.Tr>
        <Table.Th>All {lines.length}</Table.Th>
        <Table.Td ta="right">{sumOf(lines, (line) => line.contactCount)}</Table.Td>
        {[0, 1, 2, 3, 4].map((column) => (
          <Table.Td key={HEADS[column + 2]} ta="right">
            {money(sumOf(lines, (line) => columnsOf(line)[column] ?? 0))}
          </Table.Td>
        ))}
        <Table.Td ta="right">{money(toPayMinor)}</Table.Td>
        <Table.Td />
      </Table.Tr>
      <Table.Tr>
        <Table.Th colSpan={7}>
          {word}, in {transfers} {transfers === 1 ? 'transfer' : 'transfers'}
        </Table.Th>
        <Table.Td ta="right">{money(sendsMinor)}</Table.Td>
        <Table.Td />
      </Table.Tr>
    </Table.Tfoot>
  );
}
