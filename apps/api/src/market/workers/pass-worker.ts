/** Runs in each worker thread: one desk with its cache, for as long as the thread lives. */
import { PassDesk } from '../compute/pass-desk.js';
import type { EngineJob, OutcomeOf } from './job-types.js';

const desk = new PassDesk();

/** The text of found passes lies in shared memory, so only where it lies crosses to the asker. */
export default function carryOut<J extends EngineJob>(job: J): OutcomeOf<J> {
  return desk.carryOut(job);
}
