/** What both sides say in their own words, and the forms to say more. Nothing said can be changed. */
import { Button, Select, Textarea } from '@mantine/core';
import { notifications } from '@mantine/notifications';
import { type AttachedFile, type Dispute, type Observation, routes } from '@skyberth/shared';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { call } from '../../lib/api-client.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { AttachedFiles } from '../../ui/attached-files.js';
import { DayTime } from '../../ui/day-time.js';
import { FileDrop } from '../../ui/file-drop.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { disputeQueries } from './dispute-queries.js';
import classes from './disputes.module.css';
import { ObservationRows } from './observation-rows.js';

const SIDE_WORDS = { operator: 'The operator', owner: 'The station', admin: 'The marketplace' } as const;

export function Statements({ dispute }: { readonly dispute: Dispute }) {
  return (
    <section className={classes.card} aria-labelledby="statements">
      <h2 id="statements">In their own words</h2>
      <ol className={classes.statements}>
        {dispute.statements.map((said) => (
          <li key={said.id} data-side={said.side}>
            <strong>{SIDE_WORDS[said.side]}</strong>
            <span className={classes.by}>
              {' '}
              {said.byName}, <DayTime atMs={Date.parse(said.atUtc)} />
            </span>
            <p>{said.text}</p>
            <AttachedFiles files={said.files} label={`Files of ${said.byName}`} />
          </li>
        ))}
      </ol>
      {dispute.actions.includes('state') && <StatementForm dispute={dispute} />}
      {dispute.actions.includes('ask') && <QuestionForm dispute={dispute} />}
    </section>
  );
}

function useChanged(dispute: Dispute) {
  const client = useQueryClient();
  return (next: Dispute) => client.setQueryData(disputeQueries.one(dispute.id).queryKey, next);
}

function StatementForm({ dispute }: { readonly dispute: Dispute }) {
  const changed = useChanged(dispute);
  const [text, setText] = useState('');
  const [observations, setObservations] = useState<readonly Observation[]>([]);
  const [files, setFiles] = useState<readonly AttachedFile[]>([]);
  const say = useMutation({
    mutationFn: () =>
      call(routes.stateInDispute, {
        params: { id: dispute.id },
        body: { text: text.trim(), observations: [...observations], fileIds: files.map(({ id }) => id) },
      }),
    onSuccess: (next) => {
      changed(next);
      setText('');
      setObservations([]);
      setFiles([]);
      notifications.show({ message: 'Your statement is on the record.' });
    },
  });
  return (
    <form
      className={classes.stack}
      aria-label="Your statement"
      onSubmit={(event) => {
        event.preventDefault();
        say.mutate();
      }}
    >
      {say.error && <ProblemNotice title="The statement was not taken">{sentenceOf(say.error)}</ProblemNotice>}
      <Textarea
        label="What your side says; it can't be changed later"
        required
        autosize
        minRows={3}
        maxLength={4_000}
        value={text}
        onChange={(event) => setText(event.currentTarget.value)}
      />
      <ObservationRows aosUtc={dispute.aosUtc} value={observations} onChange={setObservations} />
      <FileDrop label="Files: logs, plots" files={files} onChange={setFiles} />
      <div>
        <Button type="submit" disabled={text.trim() === ''} loading={say.isPending}>
          Put it on the record
        </Button>
      </div>
    </form>
  );
}

function QuestionForm({ dispute }: { readonly dispute: Dispute }) {
  const changed = useChanged(dispute);
  const client = useQueryClient();
  const [side, setSide] = useState<'operator' | 'owner'>('owner');
  const [text, setText] = useState('');
  const ask = useMutation({
    mutationFn: () => call(routes.askInDispute, { params: { id: dispute.id }, body: { side, text: text.trim() } }),
    onSuccess: (next) => {
      changed(next);
      setText('');
      notifications.show({ message: 'They are asked by mail.' });
    },
  });
  const again = useMutation({
    mutationFn: () => call(routes.assembleEvidence, { params: { id: dispute.id } }),
    onSuccess: (next) => {
      changed(next);
      void client.invalidateQueries({ queryKey: disputeQueries.one(dispute.id).queryKey });
      notifications.show({ message: 'The evidence was assembled again.' });
    },
  });
  const error = ask.error ?? again.error;
  return (
    <div className={classes.stack}>
      {error && <ProblemNotice title="It was not done">{sentenceOf(error)}</ProblemNotice>}
      <Select
        label="Ask a side for more"
        data={[
          { value: 'owner', label: `the station, ${dispute.ownerName}` },
          { value: 'operator', label: `the operator, ${dispute.operatorName}` },
        ]}
        value={side}
        allowDeselect={false}
        onChange={(value) => setSide(value === 'operator' ? 'operator' : 'owner')}
      />
      <Textarea
        label="The question"
        autosize
        minRows={2}
        maxLength={4_000}
        value={text}
        onChange={(event) => setText(event.currentTarget.value)}
      />
      <div>
        <Button
          variant="default"
          disabled={text.trim() === ''}
          loading={ask.isPending}
          onClick={() => ask.mutate()}
          mr={8}
        >
          Ask
        </Button>
        <Button variant="default" loading={again.isPending} onClick={() => again.mutate()}>
          Assemble the evidence again
        </Button>
      </div>
    </div>
  );
}
