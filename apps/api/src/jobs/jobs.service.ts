/**
 * Repeated work. A job never overlaps itself, a failing one is logged and tried again at its next turn, and closing the
 * application waits for the turn that is running. Jobs must catch up by themselves after downtime: they ask the database
 * what is due and never count their own turns.
 */
import {
  type BeforeApplicationShutdown,
  Inject,
  Injectable,
  Logger,
  type OnApplicationBootstrap,
} from '@nestjs/common';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import { CONFIG, type Config } from '../platform/config.js';

export type JobWork = () => void | Promise<void>;

/** How a job did last, for the system page. */
export interface JobStatus {
  readonly name: string;
  readonly lastSuccessMs: number | null;
  readonly lastError: string | null;
}

interface Job {
  readonly name: string;
  readonly intervalMs: number;
  readonly work: JobWork;
  timer?: NodeJS.Timeout;
  turn?: Promise<void> | undefined;
  lastSuccessMs: number | null;
  lastError: string | null;
}

@Injectable()
export class JobsService implements OnApplicationBootstrap, BeforeApplicationShutdown {
  private readonly log = new Logger('Jobs');
  private readonly jobs: Job[] = [];
  private stopping = false;

  constructor(
    @Inject(CONFIG) private readonly config: Config,
    @Inject(CLOCK) private readonly clock: ClockPort,
  ) {}

  /** Registers a job; called when modules start. The first turn comes at once, where jobs run at all. */
  every(name: string, intervalMs: number, work: JobWork): void {
    this.jobs.push({ name, intervalMs, work, lastSuccessMs: null, lastError: null });
  }

  onApplicationBootstrap(): void {
    if (this.config.jobs) for (const job of this.jobs) this.schedule(job, 0);
  }

  async beforeApplicationShutdown(): Promise<void> {
    this.stopping = true;
    for (const job of this.jobs) clearTimeout(job.timer);
    await Promise.all(this.jobs.map((job) => job.turn));
  }

  /** One turn of every job, in the order of registration; throws what the first failing one throws. */
  async runAll(): Promise<void> {
    for (const job of this.jobs) {
      await job.turn;
      await job.work();
    }
  }

  status(): JobStatus[] {
    return this.jobs.map(({ name, lastSuccessMs, lastError }) => ({ name, lastSuccessMs, lastError }));
  }

  private schedule(job: Job, waitMs: number): void {
    if (this.stopping) return;
    job.timer = setTimeout(() => {
      job.turn = this.takeTurn(job).finally(() => {
        job.turn = undefined;
        this.schedule(job, job.intervalMs);
      });
    }, waitMs);
  }

  private async takeTurn(job: Job): Promise<void> {
    try {
      await job.work();
      job.lastSuccessMs = this.clock.nowMs();
      job.lastError = null;
    } catch (error) {
      job.lastError = error instanceof Error ? error.message : String(error);
      this.log.error(`${job.name}: ${error instanceof Error ? (error.stack ?? error.message) : String(error)}`);
    }
  }
}
