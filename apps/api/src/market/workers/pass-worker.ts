/** Runs in each worker thread: one desk with its cache, for as long as the thread lives. */
import { move } from 'piscina';
import { PassDesk } from '../compute/pass-desk.js';
import type { EngineJob, OutcomeOf } from './job-types.js';

const desk = new PassDesk();

/** Large answers are handed over, not copied. */
export default function carryOut<J extends EngineJob>(job: J): OutcomeOf<J> {
  const outcome = desk.carryOut(job);
  if ('json' in outcome && outcome.json.byteLength > 0) move(outcome.json.buffer as ArrayBuffer);
  return outcome;
}
