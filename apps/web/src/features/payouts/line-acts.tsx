/** What finance can do with a line of an open run: hold it back or let it go, and give or take an amount, each with its reason. */
import { Button, Group, SegmentedControl, TextInput } from '@mantine/core';
import { type PayoutLine, type PayoutRun, routes } from '@skyberth/shared';
import { useState } from 'react';
import { call } from '../../lib/api-client.js';
import { MoneyInput } from '../../ui/money-input.js';
import classes from './payouts.module.css';
import { useRunAct } from './use-run-act.js';

interface Props {
  readonly run: PayoutRun;
  readonly line: PayoutLine;
  readonly onDone: () => void;
}

export function LineActs(props: Props) {
  return (
    <div className={classes.acts}>
      {props.line.toPayMinor > 0 && <Hold {...props} />}
      <Adjust {...props} />
    </div>
  );
}

function Hold({ run, line, onDone }: Props) {
  const [reason, setReason] = useState('');
  const held = line.state !== 'ready';
  const act = useRunAct((why: string | null) =>
    call(routes.holdPayoutLine, { params: { id: run.id, lineId: line.id }, body: { reason: why } }),
  );
  return (
    <form
      onSubmit={(event) => {
        event.preventDefault();
        act.mutate(held ? null : reason, { onSuccess: onDone });
      }}
    >
      <Group gap="xs" align="flex-end">
        {!held && (
          <TextInput
            label="Why the line waits"
            w={280}
            maxLength={300}
            value={reason}
            onChange={(event) => setReason(event.currentTarget.value)}
          />
        )}
        <Button type="submit" variant="outline" loading={act.isPending} disabled={!held && reason.trim().length < 3}>
          {held ? 'Let it go with this run' : 'Leave for the next run'}
        </Button>
      </Group>
    </form>
  );
}

function Adjust({ run, line, onDone }: Props) {
  const [way, setWay] = useState<string>('give');
  const [amountMinor, setAmountMinor] = useState<number | ''>('');
  const [reason, setReason] = useState('');
  const act = useRunAct((input: { amountMinor: number; reason: string }) =>
    call(routes.adjustPayoutLine, { params: { id: run.id, lineId: line.id }, body: input }),
  );
  return (
    <form
      onSubmit={(event) => {
        event.preventDefault();
        const signed = Number(amountMinor) * (way === 'give' ? 1 : -1);
        act.mutate({ amountMinor: signed, reason }, { onSuccess: onDone });
      }}
    >
      <Group gap="xs" align="flex-end">
        <SegmentedControl
          aria-label="Give or take"
          value={way}
          onChange={setWay}
          data={[
            { value: 'give', label: 'Give' },
            { value: 'take', label: 'Take' },
          ]}
        />
        <MoneyInput label="Amount" w={140} currency={run.currency} value={amountMinor} onChange={setAmountMinor} />
        <TextInput
          label="Reason, which the owner reads"
          w={280}
          maxLength={300}
          value={reason}
          onChange={(event) => setReason(event.currentTarget.value)}
        />
        <Button
          type="submit"
          variant="outline"
          loading={act.isPending}
          disabled={!Number(amountMinor) || reason.trim().length < 3}
        >
          Book the adjustment
        </Button>
      </Group>
    </form>
  );
}
