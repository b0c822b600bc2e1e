/** What happens to bookings because a time has come. Each turn asks what is due, so it catches up after any downtime. */
import { Inject, Injectable, Logger, type OnModuleInit } from '@nestjs/common';
import type { SkyberthDatabase } from '@skyberth/drizzle';
import { ClearanceBook } from '../clearances/clearance-book.js';
import { JobsService } from '../jobs/jobs.service.js';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import { DATABASE } from '../platform/database.module.js';
import { DomainError } from '../platform/domain-error.js';
import { type Db, write } from '../platform/transaction.js';
import { DishRepository } from '../run-sheet/dish.repository.js';
import { BookingEnding } from './booking-ending.service.js';
import { BookingSale } from './booking-sale.service.js';
import { BookingRepository, type BookingRow } from './bookings.repository.js';
import { CLOSE_AFTER_MS, REMIND_AFTER_MS } from './report-terms.js';

const EVERY_MS = 5_000;

const NOT_CLEARED_AT_AOS = {
  sentence: 'At AOS no clearance to transmit was in force, so the contact did not begin; all of the price goes back.',
  advice: 'Ask for a new clearance, or book a pass for downlink only.',
};

@Injectable()
export class BookingClock implements OnModuleInit {
  private readonly log = new Logger('Bookings');

  constructor(
    @Inject(DATABASE) private readonly db: SkyberthDatabase,
    @Inject(CLOCK) private readonly clock: ClockPort,
    private readonly repository: BookingRepository,
    private readonly sale: BookingSale,
    private readonly ending: BookingEnding,
    private readonly dishes: DishRepository,
    private readonly clearances: ClearanceBook,
    private readonly jobs: JobsService,
  ) {}

  onModuleInit(): void {
    this.jobs.every('bookings', EVERY_MS, () => this.turn());
  }

  /** In the order of a booking's life, so that one turn takes a booking through all that has come meanwhile. */
  turn(): void {
    const nowMs = this.clock.nowMs();
    this.each(this.repository.endedHolds(this.db, nowMs), (tx, booking) => void this.sale.lapseHold(tx, booking));
    this.each(
      this.repository.overdueAnswers(this.db, nowMs),
      (tx, booking) => void this.sale.answerOverdue(tx, booking),
    );
    // Asked in the transaction: a contact on a dish that is not clear waits, and begins when it is.
    this.each(this.repository.reached(this.db, 'confirmed', 'aosMs', nowMs), (tx, booking) => {
      if (!this.clearances.permits(tx, booking)) {
        this.ending.passLost(tx, booking, NOT_CLEARED_AT_AOS);
        return;
      }
      if (this.dishes.stopOf(tx, booking.antennaId) === null) this.ending.begin(tx, booking);
    });
    this.each(this.repository.reached(this.db, 'under way', 'losMs', nowMs), (tx, booking) =>
      this.ending.end(tx, booking),
    );
    this.each(this.repository.reached(this.db, 'reporting', 'losMs', nowMs - CLOSE_AFTER_MS), (tx, booking) =>
      this.ending.reportOverdue(tx, booking),
    );
    this.each(this.repository.unreminded(this.db, nowMs - REMIND_AFTER_MS), (tx, booking) =>
      this.ending.remindOfReport(tx, booking, booking.losMs + CLOSE_AFTER_MS),
    );
  }

  /** One transaction each: a booking that cannot be moved holds up no other. */
  private each(due: readonly BookingRow[], act: (tx: Db, booking: BookingRow) => void): void {
    for (const booking of due) {
      try {
        write(this.db, (tx) => act(tx, booking));
      } catch (error) {
        // Someone was faster between the question and the transaction; the next turn sees what is left to do.
        if (error instanceof DomainError && error.code === 'wrong-state') continue;
        this.log.error(
          `berth ${booking.number}: ${error instanceof Error ? (error.stack ?? error.message) : String(error)}`,
        );
      }
    }
  }
}
