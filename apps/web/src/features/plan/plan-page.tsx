/** Plans: the form for a new one, and those made before. */
import { Anchor, Paper, Skeleton, Table } from '@mantine/core';
import { routes } from '@skyberth/shared';
import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { Link, useNavigate } from 'react-router-dom';
import { call } from '../../lib/api-client.js';
import { paths } from '../../lib/paths.js';
import { fieldErrors, sentenceOf } from '../../lib/problem-fields.js';
import { spacecraftQueries } from '../../lib/spacecraft-queries.js';
import { useNow } from '../../lib/use-now.js';
import { usePageNumber } from '../../lib/use-page-number.js';
import { useTitle } from '../../lib/use-title.js';
import { EmptyState } from '../../ui/empty-state.js';
import { formatMoney } from '../../ui/format.js';
import { PageTitle } from '../../ui/page-title.js';
import { Pager } from '../../ui/pager.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { NeedForm } from './need-form.js';
import { freshNeed, type NeedValues, needOf } from './need-values.js';
import classes from './plan.module.css';
import { PlanBadge } from './plan-badge.js';
import { planQueries } from './plan-queries.js';

export function PlanPage() {
  useTitle('Plan');
  const navigate = useNavigate();
  const client = useQueryClient();
  const nowMs = useNow();
  const fleet = useQuery(spacecraftQueries.list());
  const create = useMutation({
    mutationFn: (values: NeedValues) => call(routes.createPlan, { body: needOf(values) }),
    onSuccess: (plan) => {
      void client.invalidateQueries({ queryKey: planQueries.all });
      navigate(paths.plan(plan.id));
    },
  });
  const items = fleet.data?.items ?? [];
  return (
    <>
      <PageTitle title="Plan">
        Say what each spacecraft needs. The cheapest set of contacts that gives it is looked for, with what it costs,
        what holds the price up, and what cannot be had. Nothing is bought before you hold the plan and pay.
      </PageTitle>
      {fleet.error && (
        <ProblemNotice title="Your spacecraft could not be read" onRetry={() => void fleet.refetch()}>
          {sentenceOf(fleet.error)}
        </ProblemNotice>
      )}
      {fleet.isPending && <Skeleton height={260} />}
      {fleet.data && items.length === 0 && (
        <EmptyState
          title="No spacecraft to plan for"
          action={
            <Anchor component={Link} to={paths.newSpacecraft}>
              Add a spacecraft
            </Anchor>
          }
        >
          A plan needs a spacecraft with elements and a radio.
        </EmptyState>
      )}
      {items.length > 0 && (
        <Paper component="section" withBorder className={classes.card} aria-label="A new plan">
          <h2>A new plan</h2>
          {create.error && <ProblemNotice title="No plan was begun">{sentenceOf(create.error)}</ProblemNotice>}
          <NeedForm
            initial={freshNeed(
              nowMs,
              items.slice(0, 20).map((each) => each.id),
            )}
            fleet={items}
            isBusy={create.isPending}
            action="Look for the cheapest plan"
            errors={fieldErrors(create.error)}
            onSubmit={(values) => create.mutate(values)}
          />
        </Paper>
      )}
      <EarlierPlans />
    </>
  );
}

function EarlierPlans() {
  const [page, setPage] = usePageNumber();
  const plans = useQuery(planQueries.list(page));
  if (plans.error)
    return (
      <ProblemNotice title="Your plans could not be read" onRetry={() => void plans.refetch()}>
        {sentenceOf(plans.error)}
      </ProblemNotice>
    );
  if (!plans.data) return <Skeleton height={120} mt="md" />;
  const { items, total, pageSize } = plans.data;
  if (items.length === 0) return null;
  return (
    <Paper component="section" withBorder mt="md" className={classes.card} aria-label="Plans made before">
      <h2>Plans made before</h2>
      <div className={classes.scroll}>
        <Table>
          <Table.Thead>
            <Table.Tr>
              <Table.Th>Plan</Table.Th>
              <Table.Th>State</Table.Th>
              <Table.Th>Days</Table.Th>
              <Table.Th ta="right">Spacecraft</Table.Th>
              <Table.Th ta="right">Contacts</Table.Th>
              <Table.Th ta="right">With VAT</Table.Th>
            </Table.Tr>
          </Table.Thead>
          <Table.Tbody>
            {items.map((plan) => (
              <Table.Tr key={plan.id}>
                <Table.Td>
                  <Anchor component={Link} to={paths.plan(plan.id)}>
                    {plan.name}
                  </Anchor>
                </Table.Td>
                <Table.Td>
                  <PlanBadge state={plan.state} work={plan.work} status={plan.status} />
                </Table.Td>
                <Table.Td>
                  {plan.days} from {plan.firstDay}
                </Table.Td>
                <Table.Td ta="right">{plan.spacecraft}</Table.Td>
                <Table.Td ta="right">{plan.contacts}</Table.Td>
                <Table.Td ta="right">{plan.sums.map((sum) => formatMoney(sum)).join(' and ') || 'nothing'}</Table.Td>
              </Table.Tr>
            ))}
          </Table.Tbody>
        </Table>
      </div>
      <Pager page={page} pages={Math.ceil(total / pageSize)} onChange={setPage} />
    </Paper>
  );
}
