/** For a pass that somebody else has: wait for it. */
import { Anchor, Button } from '@mantine/core';
import { routes } from '@skyberth/shared';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { Link } from 'react-router-dom';
import { call } from '../../lib/api-client.js';
import { paths } from '../../lib/paths.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { useCan } from '../../lib/session.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import classes from './find-time.module.css';
import type { PassRequest } from './find-time-queries.js';

export function JoinLine({ request }: { readonly request: PassRequest }) {
  const mayBuy = useCan()('bookings.buy');
  const client = useQueryClient();
  const join = useMutation({
    mutationFn: () => call(routes.joinStandby, { body: request }),
    onSuccess: () => client.invalidateQueries({ queryKey: ['standby'] }),
  });
  if (!mayBuy) return null;
  if (join.data) {
    return (
      <p role="status" className={classes.small}>
        You are number {join.data.place} in line.{' '}
        <Anchor component={Link} to={paths.standby}>
          Open standby
        </Anchor>
      </p>
    );
  }
  return (
    <div className={classes.act}>
      {join.error && <ProblemNotice title="You are not in line">{sentenceOf(join.error)}</ProblemNotice>}
      <Button variant="outline" fullWidth loading={join.isPending} onClick={() => join.mutate()}>
        Wait for this pass
      </Button>
      <p className={classes.small}>If it becomes free, it is held for you for half an hour. Waiting costs nothing.</p>
    </div>
  );
}
