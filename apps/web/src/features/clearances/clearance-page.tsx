/** One clearance: what was asked for, its papers, what happened, and what this person may do. */
import { Anchor, Button, Paper, Skeleton } from '@mantine/core';
import { CLEARANCE_STATE_FACTS, type Clearance } from '@skyberth/shared';
import { useQuery } from '@tanstack/react-query';
import { Link, useParams } from 'react-router-dom';
import { paths } from '../../lib/paths.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { useCan } from '../../lib/session.js';
import { useTitle } from '../../lib/use-title.js';
import { AttachedFiles } from '../../ui/attached-files.js';
import { DayTime } from '../../ui/day-time.js';
import { PageTitle } from '../../ui/page-title.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { Figure, Figures } from '../../ui/values.js';
import { ClearanceActs } from './clearance-acts.js';
import { ClearanceBadge } from './clearance-badge.js';
import { clearanceQueries } from './clearance-queries.js';
import classes from './clearances.module.css';
import { nextText } from './clearances-page.js';
import { TransmitCaution } from './transmit-caution.js';

export function ClearancePage() {
  const { id = '' } = useParams();
  const clearance = useQuery(clearanceQueries.one(id));
  useTitle(clearance.data ? `Clearance ${clearance.data.number}` : 'Clearance');
  if (clearance.error)
    return (
      <ProblemNotice title="The clearance could not be read" onRetry={() => void clearance.refetch()}>
        {sentenceOf(clearance.error)}
      </ProblemNotice>
    );
  if (!clearance.data) return <Skeleton height={320} />;
  return <OneClearance clearance={clearance.data} />;
}

function OneClearance({ clearance }: { readonly clearance: Clearance }) {
  const mayRequest = useCan()('clearances.request');
  return (
    <>
      <PageTitle
        title={`${clearance.spacecraftName} at ${clearance.stationName}`}
        badge={<ClearanceBadge state={clearance.state} />}
        actions={
          <>
            {mayRequest && clearance.state !== 'requested' && (
              <Button variant="default" component={Link} to={paths.renewClearance(clearance.id)}>
                Renew it
              </Button>
            )}
            <Anchor component={Link} to={paths.clearances}>
              All clearances
            </Anchor>
          </>
        }
      >
        Clearance {clearance.number}. {CLEARANCE_STATE_FACTS[clearance.state].meaning}
      </PageTitle>
      <div className={classes.columns}>
        <div className={classes.stack}>
          <Facts clearance={clearance} />
          <History clearance={clearance} />
        </div>
        <div className={classes.stack}>
          <TransmitCaution />
          <ClearanceActs clearance={clearance} />
        </div>
      </div>
    </>
  );
}

function Facts({ clearance }: { readonly clearance: Clearance }) {
  return (
    <Paper component="section" withBorder className={classes.card} aria-label="What was asked for">
      <Figures columns={3}>
        <Figure label="Transmits in" value={`${clearance.band} band`} />
        <Figure label="From" value={<DayTime atMs={Date.parse(clearance.validFromUtc)} />} />
        <Figure label="To" value={<DayTime atMs={Date.parse(clearance.validToUtc)} />} />
        <Figure label="Operator" value={clearance.operatorName} />
        <Figure label="Station" value={clearance.stationName} note={clearance.ownerName} />
        <Figure label="Who is next" value={nextText(clearance)} />
        <Figure label="Uplink contacts to come" value={String(clearance.contactsToCome)} />
      </Figures>
      <h2>What for</h2>
      <p>{clearance.purpose}</p>
      {clearance.conditions && (
        <>
          <h2>What the station asks for</h2>
          <p>{clearance.conditions}</p>
        </>
      )}
      <h2>Papers</h2>
      <AttachedFiles files={clearance.papers} label={`Papers of clearance ${clearance.number}`} />
    </Paper>
  );
}

function History({ clearance }: { readonly clearance: Clearance }) {
  return (
    <Paper component="section" withBorder className={classes.card} aria-labelledby="clearance-history">
      <h2 id="clearance-history">In order</h2>
      <ol className={classes.history}>
        {clearance.history.map((event) => (
          <li key={`${event.atUtc} ${event.toState}`}>
            <DayTime atMs={Date.parse(event.atUtc)} />
            <span>
              <strong>{event.toState}</strong>, {event.byName ?? 'by rule'}: {event.sentence}
            </span>
          </li>
        ))}
      </ol>
    </Paper>
  );
}
