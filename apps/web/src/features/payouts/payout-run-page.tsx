/** One run, line by line, with the acts of the two people. */
import { Skeleton } from '@mantine/core';
import { useQuery } from '@tanstack/react-query';
import { useParams } from 'react-router-dom';
import { sentenceOf } from '../../lib/problem-fields.js';
import { useTitle } from '../../lib/use-title.js';
import { PageTitle } from '../../ui/page-title.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { payoutQueries } from './payout-queries.js';
import classes from './payouts.module.css';
import { RUN_STATE_WORDS } from './payouts-page.js';
import { RunLines } from './run-lines.js';
import { RunSteps } from './run-steps.js';
import { BeforeItGoes, TwoPairsOfEyes } from './two-pairs-of-eyes.js';
import { isOpen } from './use-run-act.js';
import { WhereItGoes } from './where-it-goes.js';

export function PayoutRunPage() {
  const { id = '' } = useParams();
  const query = useQuery(payoutQueries.run(id));
  const run = query.data;
  useTitle(run ? `Payout run ${run.number}` : 'Payout run');
  if (query.error)
    return (
      <ProblemNotice title="The run could not be read" onRetry={() => void query.refetch()}>
        {sentenceOf(query.error)}
      </ProblemNotice>
    );
  if (!run) return <Skeleton height={320} />;
  return (
    <>
      <PageTitle
        title={`Payout run ${run.number}, ${run.currency}`}
        badge={RUN_STATE_WORDS[run.state]}
        actions={<RunSteps state={run.state} />}
      >
        Prepared by {run.preparedBy}
        {run.reviewedBy && `, reviewed by ${run.reviewedBy}`}
        {run.approvedBy && `, approved by ${run.approvedBy}`}.
      </PageTitle>
      <div className={classes.run} data-open={isOpen(run) || undefined}>
        <div className={classes.main}>
          <RunLines run={run} />
          <WhereItGoes run={run} />
        </div>
        {isOpen(run) && (
          <aside className={classes.side}>
            <BeforeItGoes run={run} />
            <TwoPairsOfEyes run={run} />
          </aside>
        )}
      </div>
    </>
  );
}
