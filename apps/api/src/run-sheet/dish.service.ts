/** People at a dish, and a dish that is to stay still: until both are over, no contact begins there. */
import { Inject, Injectable, Logger, type OnModuleInit } from '@nestjs/common';
import type { SkyberthDatabase } from '@skyberth/drizzle';
import type { Principal, ResponseOf, routes } from '@skyberth/shared';
import { BookingEnding } from '../bookings/booking-ending.service.js';
import { JobsService } from '../jobs/jobs.service.js';
import { AuditService } from '../platform/audit.service.js';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import { DATABASE } from '../platform/database.module.js';
import { DomainError, notFound } from '../platform/domain-error.js';
import { newId } from '../platform/ids.js';
import { type Db, refusalOf, write } from '../platform/transaction.js';
import { DishRepository } from './dish.repository.js';
import { RunSheetRepository } from './run-sheet.repository.js';

const EVERY_MS = 30_000;
const DONE = { ok: true } as const;

@Injectable()
export class DishService implements OnModuleInit {
  private readonly log = new Logger('Dishes');

  constructor(
    @Inject(DATABASE) private readonly db: SkyberthDatabase,
    @Inject(CLOCK) private readonly clock: ClockPort,
    private readonly dishes: DishRepository,
    private readonly sheet: RunSheetRepository,
    private readonly ending: BookingEnding,
    private readonly audit: AuditService,
    private readonly jobs: JobsService,
  ) {}

  onModuleInit(): void {
    this.jobs.every('dishes', EVERY_MS, () => this.closeNeverBegun());
  }

  /**
   * Throws `not-found` for a dish of others and `already-exists` for somebody who is inside. It is taken while a contact runs
   * too: where people are is a fact, and the red stop must show it.
   */
  enter(caller: Principal, antennaId: string, name: string): ResponseOf<typeof routes.enterDish> {
    const visit = { id: newId(), antennaId, name, cameMs: this.clock.nowMs(), signedInBy: caller.personId };
    this.change(caller, antennaId, { action: 'dish.enter', data: { name } }, (tx) => {
      try {
        this.dishes.enter(tx, visit);
      } catch (error) {
        if (refusalOf(error)) throw new DomainError('already-exists', `${name} is signed in at this dish already.`);
        throw error;
      }
    });
    return { id: visit.id, name, cameUtc: new Date(visit.cameMs).toISOString() };
  }

  /** Throws `not-found` for a visit to a dish of others and `wrong-state` for one that is over. */
  leave(caller: Principal, visitId: string): typeof DONE {
    const visit = this.dishes.visit(this.db, visitId);
    if (!visit) throw notFound('visit');
    return this.change(caller, visit.antennaId, { action: 'dish.leave', data: { name: visit.name } }, (tx) => {
      if (this.dishes.visit(tx, visitId)?.leftMs !== null)
        throw new DomainError('wrong-state', `${visit.name} was signed out already.`);
      this.dishes.leave(tx, visitId, { leftMs: this.clock.nowMs(), signedOutBy: caller.personId });
    });
  }

  /** Throws `not-found` for a dish of others and `already-exists` where it is to stay still already. */
  stop(caller: Principal, antennaId: string, reason: string): typeof DONE {
    return this.change(caller, antennaId, { action: 'dish.stop', data: { reason } }, (tx) => {
      const stop = this.dishes.stopOf(tx, antennaId);
      if (stop !== null && stop.reason !== null)
        throw new DomainError('already-exists', 'This dish is to stay still already.');
      this.dishes.stop(tx, { antennaId, reason, stoppedMs: this.clock.nowMs(), stoppedBy: caller.personId });
    });
  }

  /** Throws `not-found` for a dish of others and `wrong-state` where nothing keeps it. */
  release(caller: Principal, antennaId: string): typeof DONE {
    return this.change(caller, antennaId, { action: 'dish.release', data: {} }, (tx) => {
      if (!this.dishes.release(tx, antennaId)) throw new DomainError('wrong-state', 'This dish may move already.');
    });
  }

  /** A contact that a dish could not begin in its whole time is given back in full. */
  private closeNeverBegun(): void {
    for (const booking of this.sheet.neverBegun(this.clock.nowMs())) {
      if (!this.dishes.stopOf(this.db, booking.antennaId)) continue;
      try {
        const sentence = 'The dish was not clear for the whole pass, so the contact never began; nothing is charged.';
        write(this.db, (tx) => this.ending.passLost(tx, booking, { sentence, advice: 'Book another pass.' }));
      } catch (error) {
        if (error instanceof DomainError && error.code === 'wrong-state') continue;
        this.log.error(`berth ${booking.number}: ${error instanceof Error ? error.message : String(error)}`);
      }
    }
  }

  private change(
    caller: Principal,
    antennaId: string,
    what: { action: string; data: Record<string, unknown> },
    act: (tx: Db) => void,
  ): typeof DONE {
    write(this.db, (tx) => {
      if (!this.dishes.owns(tx, caller.organisationId, antennaId)) throw notFound('antenna');
      act(tx);
      this.audit.record(tx, { caller, action: what.action, subject: `antenna:${antennaId}`, data: what.data });
    });
    return DONE;
  }
}
