/** Whether everything is fine, and what staff watch. */
import { Inject, Injectable } from '@nestjs/common';
import type { SystemView } from '@skyberth/shared';
import { type JobStatus, JobsService } from '../jobs/jobs.service.js';
import { OutboxRepository } from '../outbox/outbox.repository.js';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import { DomainError } from '../platform/domain-error.js';
import { type ServiceState, ServicesWatch } from './services-watch.js';
import { SystemRepository } from './system.repository.js';
import { VERSION } from './version.js';

const RECENT = 50;
/** The check reads the whole database, so its answer is kept for a while. */
const INTEGRITY_KEPT_MS = 600_000;

const utc = (timeMs: number): string => new Date(timeMs).toISOString();

@Injectable()
export class SystemService {
  private readonly startedMs: number;
  private checked: { readonly atMs: number; readonly integrity: string } | undefined;

  constructor(
    private readonly repository: SystemRepository,
    private readonly outbox: OutboxRepository,
    private readonly jobs: JobsService,
    private readonly services: ServicesWatch,
    @Inject(CLOCK) private readonly clock: ClockPort,
  ) {
    this.startedMs = clock.nowMs();
  }

  /** Throws `unavailable` with what is not fine. */
  async health(): Promise<{ status: 'ok' }> {
    const faults = [...this.databaseFaults(), ...(await this.services.states()).filter((each) => !each.ok).map(named)];
    if (faults.length > 0) throw new DomainError('unavailable', faults.join(' '));
    return { status: 'ok' };
  }

  private databaseFaults(): string[] {
    try {
      const { applied, known } = this.repository.migrations();
      return applied === known ? [] : [`The database has had ${applied} migrations, this version knows ${known}.`];
    } catch {
      return ['The database does not answer.'];
    }
  }

  async view(): Promise<SystemView> {
    const { pending, failed, oldestPendingMs } = this.outbox.summary();
    return {
      version: VERSION,
      startedUtc: utc(this.startedMs),
      database: {
        sizeBytes: this.repository.sizeBytes(),
        migrations: this.repository.migrations().applied,
        integrity: this.integrity(),
      },
      outbox: {
        pending,
        failed,
        oldestPendingUtc: oldestPendingMs === null ? null : utc(oldestPendingMs),
        recent: this.outbox.recent(RECENT).map((row) => ({
          id: row.id,
          kind: row.kind,
          state: row.state,
          attempts: row.attempts,
          createdUtc: utc(row.createdMs),
          nextAttemptUtc: row.state === 'pending' ? utc(row.nextAttemptMs) : null,
          lastError: row.lastError,
        })),
      },
      providerEvents: this.repository.providerEvents(),
      services: [...(await this.services.states()), ...this.jobs.status().map(jobState)],
    };
  }

  private integrity(): string {
    const nowMs = this.clock.nowMs();
    if (!this.checked || nowMs - this.checked.atMs > INTEGRITY_KEPT_MS) {
      this.checked = { atMs: nowMs, integrity: this.repository.integrity() };
    }
    return this.checked.integrity;
  }
}

const named = ({ name, detail }: ServiceState): string => `The service at ${name} is not fine: ${detail}.`;

const jobState = ({ name, lastSuccessMs, lastError }: JobStatus): ServiceState => ({
  name: `job: ${name}`,
  ok: lastError === null,
  detail: lastError ?? (lastSuccessMs === null ? 'has not run yet' : `last done ${utc(lastSuccessMs)}`),
});
