/**
 * The engine in worker threads. Each lane is a pool of one thread, so that whatever was computed for an antenna is
 * found again in the cache of the thread that computed it. Threads run the built files, hence none of the flags by which the
 * process itself may have been told to load sources.
 */
import { existsSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { Piscina } from 'piscina';
import { DomainError } from '../../platform/domain-error.js';
import type { EngineJob, OutcomeOf } from './job-types.js';
import { laneOf, type PassEngine } from './pass-engine.js';

/** Jobs that may wait for a thread before new ones are refused. */
const MAX_WAITING = 200;

/** The built worker, whether this file runs from `dist` or, under a test runner, from its source. */
function workerFile(): string {
  const here = import.meta.url;
  const built = here.endsWith('.ts')
    ? new URL('../../../dist/market/workers/pass-worker.js', here)
    : new URL('./pass-worker.js', here);
  const file = fileURLToPath(built);
  if (!existsSync(file)) {
    throw new Error(
      `The pass worker ${file} is not built. Run npm run build, or set PASS_WORKERS=0 to compute in this process.`,
    );
  }
  return file;
}

export class PiscinaEngine implements PassEngine {
  private readonly pools: readonly Piscina[];

  constructor(readonly lanes: number) {
    const filename = workerFile();
    this.pools = Array.from(
      { length: lanes },
      () => new Piscina({ filename, minThreads: 1, maxThreads: 1, execArgv: [] }),
    );
  }

  async run<J extends EngineJob>(job: J, lane: string): Promise<OutcomeOf<J>> {
    const pool = this.pools[this.laneOf(lane)];
    if (pool === undefined) throw new Error(`There is no lane for ${lane}.`);
    if (pool.queueSize >= MAX_WAITING) {
      throw new DomainError('unavailable', 'Too many searches are waiting. Try again in a minute.');
    }
    const outcome: OutcomeOf<J> = await pool.run(job);
    return outcome;
  }

  laneOf(name: string): number {
    return laneOf(name, this.lanes);
  }

  async close(): Promise<void> {
    await Promise.all(this.pools.map((pool) => pool.destroy()));
  }
}
