/** What can be done with a plan: hold all of it, pay for it, let it go, or give it up. */
import { Button, Checkbox } from '@mantine/core';
import { type Plan, type PlanOutcome, routes } from '@skyberth/shared';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { useNavigate } from 'react-router-dom';
import { call, ProblemError } from '../../lib/api-client.js';
import { bookingQueries } from '../../lib/booking-queries.js';
import { paths } from '../../lib/paths.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { Caution } from '../../ui/caution.js';
import { formatMoney } from '../../ui/format.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import classes from './plan.module.css';
import { planQueries } from './plan-queries.js';

interface PlanActsProps {
  readonly plan: Plan;
  readonly outcome: PlanOutcome;
  /** Edits that wait for a new plan: what is held must be what is seen. */
  readonly isEdited: boolean;
}

export function PlanActs({ plan, outcome, isEdited }: PlanActsProps) {
  const navigate = useNavigate();
  const client = useQueryClient();
  const [knowsAge, setKnowsAge] = useState(false);
  const settled = (next: Plan) => {
    client.setQueryData(planQueries.one(plan.id).queryKey, next);
    void client.invalidateQueries({ queryKey: planQueries.list(1).queryKey.slice(0, 2) });
    void client.invalidateQueries({ queryKey: bookingQueries.all });
  };
  const params = { id: plan.id };
  const hold = useMutation({
    mutationFn: () => call(routes.holdPlan, { params, body: { oldElementsAcknowledged: knowsAge } }),
    onSuccess: settled,
  });
  const giveUp = useMutation({
    mutationFn: () => call(routes.giveUpPlan, { params }),
    onSuccess: (next) => {
      settled(next);
      navigate(paths.plans);
    },
  });
  const fresh = outcome.passes.filter((pass) => pass.bookedBefore === null);
  const commands = fresh.some((pass) => pass.need !== 'downlink');
  const sum = outcome.sums.map((each) => formatMoney(each)).join(' and ');
  const problem = hold.error ?? giveUp.error;
  const items = problem instanceof ProblemError ? (problem.problem?.errors ?? []) : [];
  const nameOf = (pointer: string): string => {
    const pass = fresh[Number(pointer.split('/')[2])];
    return pass ? `${pass.spacecraftName}, ${pass.antennaName}, ${pass.aosUtc}` : '';
  };
  return (
    <>
      {problem && (
        <ProblemNotice
          title="Nothing was changed"
          items={items.map((each) => ({ where: nameOf(each.pointer), message: each.detail }))}
        >
          {sentenceOf(problem)}
        </ProblemNotice>
      )}
      {commands && (
        <Caution title="Some of these contacts transmit">
          Skyberth books time; it grants no right to a spectrum. Transmit only within your licence and the clearance in
          force, as local rules and the station's licensed staff say.
        </Caution>
      )}
      {plan.state === 'draft' && fresh.length > 0 && (
        <>
          {(hold.isError || knowsAge) && (
            <Checkbox
              mt="sm"
              label="Hold passes of old elements too; I know that their times are not sure"
              checked={knowsAge}
              onChange={(event) => setKnowsAge(event.currentTarget.checked)}
            />
          )}
          <div className={classes.acts}>
            <Button size="md" loading={hold.isPending} disabled={isEdited} onClick={() => hold.mutate()}>
              Hold all {fresh.length} for ten minutes, {sum}
            </Button>
            <Button variant="outline" color="buoy" loading={giveUp.isPending} onClick={() => giveUp.mutate()}>
              Give the plan up
            </Button>
          </div>
          <p className={classes.small}>
            {isEdited
              ? 'You changed what is kept in or struck out. Plan again before you hold.'
              : 'All of them or none. Nothing is paid yet.'}
          </p>
        </>
      )}
      {plan.state === 'held' && plan.groupId && <HeldPlan groupId={plan.groupId} planId={plan.id} sum={sum} />}
    </>
  );
}

function HeldPlan({
  groupId,
  planId,
  sum,
}: {
  readonly groupId: string;
  readonly planId: string;
  readonly sum: string;
}) {
  const client = useQueryClient();
  const params = { id: groupId };
  const again = () => {
    void client.invalidateQueries({ queryKey: planQueries.one(planId).queryKey });
    void client.invalidateQueries({ queryKey: bookingQueries.all });
  };
  const pay = useMutation({
    mutationFn: async () => {
      const cards = await call(routes.savedCards, {});
      return call(routes.checkoutGroup, { params, body: { savedCardId: cards.items[0]?.id ?? null } });
    },
    onSuccess: (result) => (result.kind === 'redirect' ? window.location.assign(result.url) : again()),
  });
  const letGo = useMutation({ mutationFn: () => call(routes.letGroupGo, { params }), onSuccess: again });
  const problem = pay.error ?? letGo.error;
  return (
    <>
      {problem && <ProblemNotice title="That did not work">{sentenceOf(problem)}</ProblemNotice>}
      <p className={classes.small}>
        All contacts are held together. Pay for all of them here; the tray below counts down, and its buttons are for
        one contact.
      </p>
      <div className={classes.acts}>
        <Button size="md" loading={pay.isPending} onClick={() => pay.mutate()}>
          Pay {sum} for all
        </Button>
        <Button variant="outline" color="buoy" loading={letGo.isPending} onClick={() => letGo.mutate()}>
          Let all go
        </Button>
      </div>
    </>
  );
}
