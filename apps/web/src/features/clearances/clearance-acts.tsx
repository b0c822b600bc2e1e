/** The acts that the table of moves leaves to this person; what ends something asks for a reason first. */
import { Button, Paper, Textarea } from '@mantine/core';
import { notifications } from '@mantine/notifications';
import { type Clearance, type ClearanceAct, routes } from '@skyberth/shared';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { call } from '../../lib/api-client.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { useSession } from '../../lib/session.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { clearanceMoved } from './clearance-queries.js';
import classes from './clearances.module.css';

export function ClearanceActs({ clearance }: { readonly clearance: Clearance }) {
  const client = useQueryClient();
  const { active } = useSession();
  const [text, setText] = useState('');
  const words = text.trim();
  const act = useMutation({
    mutationFn: (what: ClearanceAct) =>
      send(clearance.id, what, { words, isStaff: active.organisationKind === 'staff' }),
    onSuccess: (moved) => {
      setText('');
      clearanceMoved(client, moved);
      notifications.show({ message: `Clearance ${moved.number} is now ${moved.state}. Both sides are told.` });
    },
  });
  if (clearance.acts.length === 0) return null;
  const grants = clearance.acts.includes('grant');
  return (
    <Paper component="section" withBorder className={classes.card} aria-labelledby="clearance-acts">
      <h2 id="clearance-acts">Your word</h2>
      {clearance.acts.includes('withdraw') && clearance.contactsToCome > 0 && (
        <p>
          Withdrawing it cancels the uplink contacts to come that no other clearance covers: up to{' '}
          {clearance.contactsToCome}, each with all of its price back to the buyer.
        </p>
      )}
      <Textarea
        label={grants ? 'Conditions when you grant it, or the reason when you refuse' : 'Reason'}
        description="The other side reads it."
        autosize
        minRows={2}
        maxLength={2_000}
        value={text}
        onChange={(event) => setText(event.currentTarget.value)}
      />
      {act.error && <ProblemNotice title="Nothing was changed">{sentenceOf(act.error)}</ProblemNotice>}
      {clearance.acts.map((what) => (
        <ActButton key={what} what={what} busy={act.isPending} ready={words !== ''} onAct={() => act.mutate(what)} />
      ))}
    </Paper>
  );
}

const LABELS: Partial<Record<ClearanceAct, string>> = {
  grant: 'Grant it',
  check: 'The papers are right: put it in force',
  refuse: 'Refuse it',
  withdraw: 'Withdraw it',
};

interface ActButtonProps {
  readonly what: ClearanceAct;
  readonly busy: boolean;
  readonly ready: boolean;
  readonly onAct: () => void;
}

function ActButton({ what, busy, ready, onAct }: ActButtonProps) {
  const ends = what === 'refuse' || what === 'withdraw';
  const label = LABELS[what];
  if (!ends)
    return (
      <Button size="md" loading={busy} onClick={onAct}>
        {label}
      </Button>
    );
  return (
    <Button variant="outline" color="buoy" loading={busy} disabled={!ready} onClick={onAct}>
      {ready ? label : `${label}: waits for a reason`}
    </Button>
  );
}

function send(
  id: string,
  act: ClearanceAct,
  { words, isStaff }: { words: string; isStaff: boolean },
): Promise<Clearance> {
  const params = { id };
  if (act === 'grant') return call(routes.answerClearance, { params, body: { answer: 'grant', conditions: words } });
  if (act === 'check') return call(routes.checkClearance, { params, body: { answer: 'put in force' } });
  if (act === 'withdraw') return call(routes.withdrawClearance, { params, body: { reason: words } });
  const body = { answer: 'refuse', reason: words } as const;
  return isStaff ? call(routes.checkClearance, { params, body }) : call(routes.answerClearance, { params, body });
}
