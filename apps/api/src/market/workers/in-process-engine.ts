/** The engine in the calling thread: for tests, and for a machine where one core is all there is. */
import { PassDesk } from '../compute/pass-desk.js';
import type { EngineJob, OutcomeOf } from './job-types.js';
import type { PassEngine } from './pass-engine.js';

export class InProcessEngine implements PassEngine {
  readonly lanes = 1;
  private readonly desk = new PassDesk();

  async run<J extends EngineJob>(job: J): Promise<OutcomeOf<J>> {
    return this.desk.carryOut(job);
  }

  laneOf(): number {
    return 0;
  }

  async close(): Promise<void> {}
}
