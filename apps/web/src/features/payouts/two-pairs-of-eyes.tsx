/** What must be looked at before a run goes, and the acts of the two people. */
import { Anchor, Button, Paper, Stack, Text, TextInput } from '@mantine/core';
import { type PayoutRun, routes } from '@skyberth/shared';
import { useState } from 'react';
import { Link } from 'react-router-dom';
import { call } from '../../lib/api-client.js';
import { paths } from '../../lib/paths.js';
import { formatMoney } from '../../ui/format.js';
import { Sign } from '../../ui/signs.js';
import classes from './payouts.module.css';
import { useRunAct } from './use-run-act.js';

export function BeforeItGoes({ run }: { readonly run: PayoutRun }) {
  const money = (amountMinor: number) => formatMoney({ amountMinor, currency: run.currency });
  const look = [
    ...run.lines.flatMap((line) =>
      line.state === 'held back' ? [{ key: `${line.id} held`, words: `${line.ownerName}: ${line.note}` }] : [],
    ),
    ...run.lines.flatMap((line) =>
      line.adjustedMinor === 0
        ? []
        : [{ key: `${line.id} adjusted`, words: `${line.ownerName} is adjusted by ${money(line.adjustedMinor)}` }],
    ),
    ...run.lines.flatMap((line) =>
      line.reserveMinor === 0
        ? []
        : [{ key: `${line.id} aside`, words: `${line.ownerName}: ${money(line.reserveMinor)} set aside for disputes` }],
    ),
  ];
  return (
    <Paper withBorder p="md" component="section" aria-label="Before it goes">
      <h2 className={classes.cardTitle}>Before it goes</h2>
      <ul className={classes.checks}>
        {look.map(({ key, words }) => (
          <li key={key} data-look>
            <Sign shape="diamond" />
            {words}
          </li>
        ))}
        {look.length === 0 && (
          <li>
            <Sign shape="check" />
            No line is held back, adjusted or in part set aside.
          </li>
        )}
      </ul>
    </Paper>
  );
}

export function TwoPairsOfEyes({ run }: { readonly run: PayoutRun }) {
  const [code, setCode] = useState('');
  const params = { id: run.id };
  const done = (next: PayoutRun): PayoutRun => {
    setCode('');
    return next;
  };
  const review = useRunAct(async () => done(await call(routes.reviewPayoutRun, { params, body: { code } })));
  const approve = useRunAct(async () => {
    const body = { code, expectedMinor: run.sendsMinor };
    return done(await call(routes.approvePayoutRun, { params, body }));
  });
  const drop = useRunAct(() => call(routes.dropPayoutRun, { params }));
  const sum = formatMoney({ amountMinor: run.sendsMinor, currency: run.currency });
  const waits = run.state === 'reviewed' && !run.mayApprove;
  return (
    <Paper p="md" component="section" aria-label="Two pairs of eyes" className={classes.eyes}>
      <h2 className={classes.cardTitle}>Two pairs of eyes</h2>
      <Stack gap="sm">
        <Text size="sm">
          {waits
            ? 'You prepared or reviewed this run, so someone else of finance must approve it.'
            : 'Who lets money go gives a code of their authenticator. '}
          {!waits && (
            <Anchor component={Link} to={paths.security} size="sm">
              Set one up
            </Anchor>
          )}
        </Text>
        {!waits && (
          <TextInput
            label="Six digits"
            inputMode="numeric"
            autoComplete="one-time-code"
            value={code}
            onChange={(event) => setCode(event.currentTarget.value)}
          />
        )}
        {run.state === 'draft' && (
          <>
            <Text size="sm">I have looked at every line.</Text>
            <Button loading={review.isPending} onClick={() => review.mutate(undefined)}>
              Ask for approval of {sum}
            </Button>
          </>
        )}
        {run.state === 'reviewed' && run.mayApprove && (
          <Button loading={approve.isPending} onClick={() => approve.mutate(undefined)}>
            Send {sum} in {run.transfers} {run.transfers === 1 ? 'transfer' : 'transfers'}
          </Button>
        )}
        <Button variant="outline" color="buoy" loading={drop.isPending} onClick={() => drop.mutate(undefined)}>
          Drop this run
        </Button>
      </Stack>
    </Paper>
  );
}
