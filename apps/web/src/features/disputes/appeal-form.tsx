import { Button, Textarea } from '@mantine/core';
import { notifications } from '@mantine/notifications';
import { type Dispute, routes } from '@skyberth/shared';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { call } from '../../lib/api-client.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { DayTime } from '../../ui/day-time.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { disputeQueries } from './dispute-queries.js';
import classes from './disputes.module.css';

/** One appeal, by either side. */
export function AppealForm({ dispute }: { readonly dispute: Dispute }) {
  const client = useQueryClient();
  const [text, setText] = useState('');
  const appeal = useMutation({
    mutationFn: () => call(routes.appealDecision, { params: { id: dispute.id }, body: { text: text.trim() } }),
    onSuccess: (next) => {
      client.setQueryData(disputeQueries.one(dispute.id).queryKey, next);
      notifications.show({ message: 'The appeal is made; another admin decides.' });
    },
  });
  return (
    <section className={classes.card} aria-labelledby="appeal">
      <h2 id="appeal">Appeal</h2>
      {appeal.error && <ProblemNotice title="The appeal was not taken">{sentenceOf(appeal.error)}</ProblemNotice>}
      <p className={classes.by}>
        {dispute.appealByUtc && (
          <>
            Until <DayTime atMs={Date.parse(dispute.appealByUtc)} />.{' '}
          </>
        )}
        Either side may appeal once; another person decides, and that is final.
      </p>
      <Textarea
        label="Why the decision is wrong"
        required
        autosize
        minRows={3}
        maxLength={4_000}
        value={text}
        onChange={(event) => setText(event.currentTarget.value)}
      />
      <div>
        <Button
          variant="outline"
          disabled={text.trim() === ''}
          loading={appeal.isPending}
          onClick={() => appeal.mutate()}
        >
          Appeal against the decision
        </Button>
      </div>
    </section>
  );
}
