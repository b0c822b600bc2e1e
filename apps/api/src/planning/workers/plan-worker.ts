/** One thread, one plan. The thread is ended from outside where somebody stops it. */
import { parentPort, workerData } from 'node:worker_threads';
import { PlannerError } from '@skyberth/planner';
import { highsSolver } from './highs-solver.js';
import type { PlanJob, PlanMessage } from './plan-job.js';
import { workOut } from './work-out.js';

const say = (message: PlanMessage): void => parentPort?.postMessage(message);

try {
  const solve = await highsSolver();
  const outcome = workOut(workerData as PlanJob, solve, (progress) => say({ kind: 'progress', progress }));
  say({ kind: 'done', outcome });
} catch (error) {
  if (!(error instanceof PlannerError)) throw error;
  say({ kind: 'refused', sentence: error.message });
}
