/** What happens to clearances because a time has come. */
import { Inject, Injectable, type OnModuleInit } from '@nestjs/common';
import type { SkyberthDatabase } from '@skyberth/drizzle';
import { JobsService } from '../jobs/jobs.service.js';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import { DATABASE } from '../platform/database.module.js';
import { write } from '../platform/transaction.js';
import { ClearanceNotices } from './clearance-notices.js';
import { ClearanceTransitions } from './clearance-transitions.js';
import { ClearancesRepository } from './clearances.repository.js';

const EVERY_MS = 60_000;
const DAY_MS = 86_400_000;
/** The operator is warned when so many days are left; each of the three once. */
const WARN_DAYS = [1, 7, 30] as const;

@Injectable()
export class ClearanceClock implements OnModuleInit {
  constructor(
    @Inject(DATABASE) private readonly db: SkyberthDatabase,
    @Inject(CLOCK) private readonly clock: ClockPort,
    private readonly repository: ClearancesRepository,
    private readonly transitions: ClearanceTransitions,
    private readonly notices: ClearanceNotices,
    private readonly jobs: JobsService,
  ) {}

  onModuleInit(): void {
    this.jobs.every('clearances', EVERY_MS, () => this.turn());
  }

  turn(): void {
    const nowMs = this.clock.nowMs();
    for (const id of this.repository.due(nowMs)) {
      write(this.db, (tx) => {
        const clearance = this.repository.byId(tx, id);
        if (!clearance || !['requested', 'granted', 'in force'].includes(clearance.state)) return;
        this.transitions.apply(tx, clearance, {
          act: 'expire',
          actor: 'clock',
          caller: null,
          sentence: 'Its last day has passed.',
        });
      });
    }
    for (const id of this.repository.ending(nowMs + 30 * DAY_MS)) {
      write(this.db, (tx) => {
        const clearance = this.repository.byId(tx, id);
        if (clearance?.state !== 'in force') return;
        // Told late, only the nearest warning is still true; the outbox keeps each from being told twice.
        const within = WARN_DAYS.find((days) => clearance.validToMs - nowMs <= days * DAY_MS);
        if (within !== undefined) this.notices.ends(tx, clearance, within);
      });
    }
  }
}
