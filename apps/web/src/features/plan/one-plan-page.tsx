/** One plan: its making, its outcome on board and table, and planning again around what is kept and struck. */
import { Button, Paper, Skeleton } from '@mantine/core';
import { type Plan, type PlanOutcome, routes } from '@skyberth/shared';
import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { useParams } from 'react-router-dom';
import { call } from '../../lib/api-client.js';
import { fieldErrors, sentenceOf } from '../../lib/problem-fields.js';
import { spacecraftQueries } from '../../lib/spacecraft-queries.js';
import { useTitle } from '../../lib/use-title.js';
import { EmptyState } from '../../ui/empty-state.js';
import { PageTitle } from '../../ui/page-title.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { NeedForm } from './need-form.js';
import { needOf, valuesOf } from './need-values.js';
import classes from './plan.module.css';
import { PlanActs } from './plan-acts.js';
import { PlanBadge } from './plan-badge.js';
import { PlanBoard } from './plan-board.js';
import { PlanFigures, PlanFindings, PlanPrice } from './plan-outcome.js';
import { PlanProgressCard } from './plan-progress.js';
import { planQueries } from './plan-queries.js';
import { PlanTable } from './plan-table.js';

export function OnePlanPage() {
  const { id = '' } = useParams();
  const query = useQuery(planQueries.one(id));
  const plan = query.data;
  useTitle(plan?.need.name ?? 'Plan');
  if (query.error)
    return (
      <ProblemNotice title="The plan could not be read" onRetry={() => void query.refetch()}>
        {sentenceOf(query.error)}
      </ProblemNotice>
    );
  if (!plan) return <Skeleton height={400} />;
  return (
    <>
      <PageTitle
        title={plan.need.name}
        badge={<PlanBadge state={plan.state} work={plan.work} status={plan.outcome?.status ?? null} />}
      >
        {plan.need.days} {plan.need.days === 1 ? 'day' : 'days'} from {plan.need.firstDay}, {plan.need.craft.length}{' '}
        spacecraft, made by {plan.createdByName}.
      </PageTitle>
      <div className={classes.stack}>
        <Making plan={plan} />
        {/* A new outcome begins with the marks that it was made with. */}
        <Worked key={`${plan.id} ${plan.outcome?.computedUtc ?? ''}`} plan={plan} />
      </div>
    </>
  );
}

function Making({ plan }: { readonly plan: Plan }) {
  const client = useQueryClient();
  const stop = useMutation({
    mutationFn: () => call(routes.stopPlan, { params: { id: plan.id } }),
    onSettled: () => void client.invalidateQueries({ queryKey: planQueries.all }),
  });
  if (plan.work === 'working')
    return (
      <Paper withBorder className={classes.card}>
        <PlanProgressCard progress={plan.progress} isStopping={stop.isPending} onStop={() => stop.mutate()} />
      </Paper>
    );
  if (plan.work === 'failed')
    return <ProblemNotice title="This need cannot be planned">{plan.failure ?? ''}</ProblemNotice>;
  if (plan.work === 'stopped' && plan.state === 'draft')
    return (
      <EmptyState level={3} title="The looking was stopped">
        {plan.outcome ? 'Below stands what was found the time before.' : 'Plan again below; the need is kept.'}
      </EmptyState>
    );
  return null;
}

function Worked({ plan }: { readonly plan: Plan }) {
  const [kept, setKept] = useState<readonly string[]>(plan.pinnedKeys);
  const [struck, setStruck] = useState<readonly string[]>(plan.struckKeys);
  const canEdit = plan.state === 'draft' && plan.work !== 'working';
  const isEdited = !same(kept, plan.pinnedKeys) || !same(struck, plan.struckKeys);
  const keep = (key: string) => {
    setKept(toggled(kept, key));
    setStruck(struck.filter((each) => each !== key));
  };
  const strike = (key: string) => {
    setStruck(toggled(struck, key));
    setKept(kept.filter((each) => each !== key));
  };
  const marks = { kept, struck, canEdit, isEdited, keep, strike };
  return (
    <>
      {plan.outcome && <Outcome plan={plan} outcome={plan.outcome} marks={marks} />}
      {canEdit && <Again plan={plan} kept={kept} struck={struck} isEdited={isEdited} />}
    </>
  );
}

const toggled = (keys: readonly string[], key: string): string[] =>
  keys.includes(key) ? keys.filter((each) => each !== key) : [...keys, key];
const same = (a: readonly string[], b: readonly string[]): boolean =>
  a.length === b.length && a.every((each) => b.includes(each));

interface Marks {
  readonly kept: readonly string[];
  readonly struck: readonly string[];
  readonly canEdit: boolean;
  readonly isEdited: boolean;
  readonly keep: (key: string) => void;
  readonly strike: (key: string) => void;
}

function Outcome({ plan, outcome, marks }: { plan: Plan; outcome: PlanOutcome; marks: Marks }) {
  if (outcome.status === 'none')
    return (
      <EmptyState level={3} title="No plan was found in the time">
        Plan fewer days or fewer spacecraft, or ask for less.
      </EmptyState>
    );
  const { kept, struck, canEdit, isEdited, keep, strike } = marks;
  return (
    <>
      <Paper component="section" withBorder className={classes.card} aria-label="Price and proof">
        <PlanPrice outcome={outcome} />
        <PlanActs plan={plan} outcome={outcome} isEdited={isEdited} />
      </Paper>
      <PlanFindings outcome={outcome} />
      <Paper component="section" withBorder className={classes.card} aria-label="Contacts">
        <h2>What each spacecraft gets</h2>
        <PlanFigures plan={plan} outcome={outcome} />
      </Paper>
      <PlanBoard need={plan.need} passes={outcome.passes} keptKeys={kept} onToggle={canEdit ? keep : () => undefined} />
      <Paper component="section" withBorder className={classes.card} aria-label="The contacts as a table">
        <h2>The contacts</h2>
        <p className={classes.small}>
          Volume is what comes down in clear sky while the margin is above 0 dB; rain is not reckoned in.
        </p>
        <PlanTable
          passes={outcome.passes}
          keptKeys={kept}
          struckKeys={struck}
          canEdit={canEdit}
          onKeep={keep}
          onStrike={strike}
        />
      </Paper>
    </>
  );
}

interface AgainProps {
  readonly plan: Plan;
  readonly kept: readonly string[];
  readonly struck: readonly string[];
  readonly isEdited: boolean;
}

function Again({ plan, kept, struck, isEdited }: AgainProps) {
  const client = useQueryClient();
  const fleet = useQuery(spacecraftQueries.list());
  const again = useMutation({
    mutationFn: (need: Plan['need']) =>
      call(routes.replan, {
        params: { id: plan.id },
        body: { need, pinnedKeys: [...kept], struckKeys: [...struck] },
      }),
    onSuccess: (next) => client.setQueryData(planQueries.one(plan.id).queryKey, next),
  });
  return (
    <Paper component="section" withBorder className={classes.card} aria-label="Plan again">
      {again.error && <ProblemNotice title="The plan was not begun again">{sentenceOf(again.error)}</ProblemNotice>}
      {(kept.length > 0 || struck.length > 0) && (
        <div className={classes.acts}>
          <Button
            variant={isEdited ? 'filled' : 'default'}
            loading={again.isPending}
            onClick={() => again.mutate(plan.need)}
          >
            Plan again around {kept.length} kept in and {struck.length} struck out
          </Button>
        </div>
      )}
      <details open={plan.outcome === null}>
        <summary>Change the need and plan again</summary>
        {fleet.data && (
          <NeedForm
            initial={valuesOf(plan.need)}
            fleet={fleet.data.items}
            isBusy={again.isPending}
            action="Plan again"
            errors={fieldErrors(again.error)}
            onSubmit={(values) => again.mutate(needOf(values))}
          />
        )}
      </details>
    </Paper>
  );
}
