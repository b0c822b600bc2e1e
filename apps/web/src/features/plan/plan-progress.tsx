/** How far a plan in the making is, with a way to stop it. */
import { Button, Progress } from '@mantine/core';
import type { PlanProgress } from '@skyberth/shared';
import { formatNumber } from '../../ui/format.js';
import classes from './plan.module.css';

const STAGES: Readonly<Record<PlanProgress['stage'], string>> = {
  waiting: 'Waiting for its turn',
  searching: 'Computing passes and prices',
  spacecraft: 'Looking at each spacecraft alone',
  fleet: 'Fitting the plans together',
  'giving way': 'Looking for what would have to give way',
  explaining: 'Working out what holds the price up',
};
/** The share of the whole at which each stage begins, from a usual plan. */
const BEGINS: Readonly<Record<PlanProgress['stage'], number>> = {
  waiting: 0,
  searching: 5,
  spacecraft: 35,
  fleet: 50,
  'giving way': 75,
  explaining: 95,
};
const STAGE_WIDTH = 15;

interface PlanProgressCardProps {
  readonly progress: PlanProgress | null;
  readonly isStopping: boolean;
  readonly onStop: () => void;
}

export function PlanProgressCard({ progress, isStopping, onStop }: PlanProgressCardProps) {
  const stage = progress?.stage ?? 'waiting';
  const part = progress ? progress.done / Math.max(1, progress.of) : 0;
  return (
    <div className={classes.progress}>
      <span role="status">
        {STAGES[stage]}
        <span aria-hidden="true">
          {progress && progress.of > 1 && `, ${progress.done} of ${progress.of} done`}
          {progress?.gapPercent != null && `, at most ${formatNumber(progress.gapPercent, 1)} % could still be saved`}
        </span>
      </span>
      <Progress value={BEGINS[stage] + part * STAGE_WIDTH} aria-label="Making the plan" />
      <div>
        <Button variant="default" loading={isStopping} onClick={onStop}>
          Stop looking
        </Button>
      </div>
    </div>
  );
}
