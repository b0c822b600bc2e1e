import { Button, Paper } from '@mantine/core';
import { routes } from '@skyberth/shared';
import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { call } from '../../lib/api-client.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { DayTime } from '../../ui/day-time.js';
import { formatNumber } from '../../ui/format.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { Sign } from '../../ui/signs.js';
import classes from './ledger.module.css';
import { ledgerQueries } from './ledger-queries.js';

/** What the nightly check found, and the button that repeats it now. */
export function LedgerCheckCard() {
  const client = useQueryClient();
  const last = useQuery(ledgerQueries.check());
  const run = useMutation({
    mutationFn: () => call(routes.runLedgerCheck, {}),
    onSuccess: (answer) => client.setQueryData(ledgerQueries.check().queryKey, answer),
  });
  const check = last.data?.check;
  const faults = check?.faults ?? [];
  return (
    <Paper component="section" withBorder className={classes.card} aria-label="Check of the ledger">
      <h2>Check of the ledger</h2>
      {check === null && <p className={classes.quiet}>It has not been checked yet. It is every night.</p>}
      {check && (
        <>
          <p className={faults.length === 0 ? classes.level : classes.off}>
            <Sign shape={faults.length === 0 ? 'check' : 'square'} />
            {faults.length === 0 ? 'Everything holds.' : `${faults.length} things do not hold.`}
          </p>
          <p className={classes.quiet}>
            {formatNumber(check.postings)} lines, <DayTime atMs={Date.parse(check.atUtc)} />
            {check.providerAsked ? ', with the provider’s own balance.' : '. The provider did not answer.'}
          </p>
          {faults.length > 0 && (
            <ul>
              {faults.map((fault) => (
                <li key={fault.sentence}>{fault.sentence}</li>
              ))}
            </ul>
          )}
        </>
      )}
      {run.error && <ProblemNotice title="It could not be checked">{sentenceOf(run.error)}</ProblemNotice>}
      <Button variant="default" size="sm" mt="xs" loading={run.isPending} onClick={() => run.mutate()}>
        Check now
      </Button>
    </Paper>
  );
}
