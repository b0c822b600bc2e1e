/** The decision: a note that the owner reads, and what each answer does. */
import { Button, Paper, Textarea } from '@mantine/core';
import { notifications } from '@mantine/notifications';
import { routes, type Station } from '@skyberth/shared';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { call } from '../../lib/api-client.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { useCan } from '../../lib/session.js';
import { stationQueries } from '../../lib/station-queries.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import classes from './approvals.module.css';
import { DECISION_WORDS, type Decision, decisionsFor } from './decisions.js';

interface DecisionDeskProps {
  readonly station: Station;
  readonly transmits: boolean;
}

export function DecisionDesk({ station, transmits }: DecisionDeskProps) {
  const client = useQueryClient();
  const mayDecide = useCan()('stations.approve');
  const [note, setNote] = useState('');
  const decide = useMutation({
    mutationFn: (decision: Decision) =>
      call(routes.decideStation, { params: { id: station.id }, body: { decision, note: note.trim() } }),
    onSuccess: (next, decision) => {
      client.setQueryData(stationQueries.one(station.id).queryKey, next);
      void client.invalidateQueries({ queryKey: stationQueries.all });
      void client.invalidateQueries({ queryKey: ['home'] });
      setNote('');
      notifications.show({ message: DECISION_WORDS[decision].done });
    },
  });
  const open = decisionsFor(station.state);
  if (!mayDecide || open.length === 0)
    return (
      <Paper component="section" withBorder className={classes.desk}>
        <h2>Nothing to decide</h2>
        <p className={classes.quiet}>
          {station.state === 'draft' ? 'The owner has not asked yet.' : 'The owner may mend it and ask again.'}
        </p>
      </Paper>
    );
  const hasNote = note.trim() !== '';
  return (
    <Paper component="section" withBorder className={classes.desk} aria-labelledby="desk-title">
      <h2 id="desk-title">Your decision</h2>
      {transmits && <p>It describes transmit bands: check the licence papers before you approve.</p>}
      {decide.error && <ProblemNotice title="Nothing was decided">{sentenceOf(decide.error)}</ProblemNotice>}
      <Textarea
        label="Reason, read by the owner"
        required
        autosize
        minRows={3}
        maxLength={2_000}
        value={note}
        onChange={(event) => setNote(event.currentTarget.value)}
      />
      {open.map((decision) => (
        <div key={decision} className={classes.decision}>
          <Button
            size={decision === 'approve' ? 'md' : 'sm'}
            {...(decision === 'approve' ? {} : { variant: 'outline', color: 'buoy' })}
            disabled={!hasNote}
            loading={decide.isPending && decide.variables === decision}
            onClick={() => decide.mutate(decision)}
          >
            {DECISION_WORDS[decision].button}
          </Button>
          <p className={classes.quiet}>{DECISION_WORDS[decision].consequence}</p>
        </div>
      ))}
      {!hasNote && <p className={classes.quiet}>Each decision waits for its reason.</p>}
    </Paper>
  );
}
