/**
 * The provider's events: verified, stored once, and carried out in the transaction that stores them. Those of which no
 * delivery came are read from the provider from time to time and carried out in the order in which they were made.
 */
import { Inject, Injectable, Logger, type OnModuleInit } from '@nestjs/common';
import type { SkyberthDatabase } from '@skyberth/drizzle';
import { JobsService } from '../jobs/jobs.service.js';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import { DATABASE } from '../platform/database.module.js';
import { DomainError } from '../platform/domain-error.js';
import { type Db, write } from '../platform/transaction.js';
import { PAYMENT_PORT, type PaymentPort, type ProviderEvent } from './payment.port.js';
import { PaymentChargebacks } from './payment-chargebacks.js';
import { PaymentOutcomes } from './payment-outcomes.js';
import { PaymentRefunds } from './payment-refunds.js';
import { PaymentRepository } from './payments.repository.js';
import { PROVIDER_BOOKS, type ProviderBooks, type ReadEvent } from './provider-books.port.js';
import { ReadingRepository } from './reading.repository.js';

const READ_EVERY_MS = 300_000;
/** Events of the last minutes are left to their delivery, so that the two don't race for nothing. */
const FRESH_MS = 60_000;
/** Read again each time, since an event may become visible after a later one. */
const OVERLAP_MS = 3_600_000;
/** The provider keeps events for thirty days (from memory of its documentation); older ones cannot be read. */
const KEPT_MS = 29 * 24 * 3_600_000;
const READING = 'events';

@Injectable()
export class PaymentEvents implements OnModuleInit {
  private readonly log = new Logger('PaymentEvents');

  constructor(
    @Inject(DATABASE) private readonly db: SkyberthDatabase,
    @Inject(CLOCK) private readonly clock: ClockPort,
    @Inject(PAYMENT_PORT) private readonly port: PaymentPort,
    @Inject(PROVIDER_BOOKS) private readonly books: ProviderBooks,
    private readonly payments: PaymentRepository,
    private readonly readings: ReadingRepository,
    private readonly outcomes: PaymentOutcomes,
    private readonly refunds: PaymentRefunds,
    private readonly chargebacks: PaymentChargebacks,
    private readonly jobs: JobsService,
  ) {}

  onModuleInit(): void {
    this.jobs.every('payment events that never came', READ_EVERY_MS, () => this.readWhenDue());
  }

  /**
   * Takes one delivery. An event that was carried out before changes nothing; one that fails leaves nothing behind, is
   * answered with an error and comes again. Throws `bad-signature`.
   */
  receive(rawBody: Buffer | undefined, signature: string | undefined): void {
    if (!rawBody || !signature) throw new DomainError('bad-signature', 'The event carries no signature.');
    const event = this.port.verifyEvent(rawBody, signature, this.clock.nowMs());
    this.take(event, rawBody.toString('utf8'));
  }

  private async readWhenDue(): Promise<void> {
    const nowMs = this.clock.nowMs();
    const last = this.readings.find(READING);
    if (last && nowMs - last.ranMs < READ_EVERY_MS) return;
    await this.readMissed().catch((error: unknown) => {
      this.log.warn(`events: ${error instanceof Error ? error.message : String(error)}`);
      this.readings.save(READING, {
        readUntilMs: last?.readUntilMs ?? 0,
        ranMs: nowMs,
        note: 'The provider could not be read.',
      });
    });
  }

  /** Reads events since the last time and carries out those that never came, oldest first; answers how many. */
  async readMissed(): Promise<number> {
    const nowMs = this.clock.nowMs();
    const readUntilMs = this.readings.find(READING)?.readUntilMs ?? 0;
    const sinceMs = Math.max(readUntilMs - OVERLAP_MS, nowMs - KEPT_MS);
    const missed: ReadEvent[] = [];
    for await (const page of this.books.events(sinceMs)) {
      const known = this.payments.knownEvents(page.map((event) => event.id));
      missed.push(...page.filter((event) => !known.has(event.id) && event.createdMs <= nowMs - FRESH_MS));
    }
    let failedMs = Number.POSITIVE_INFINITY;
    let taken = 0;
    for (const event of missed.reverse()) {
      try {
        this.take(event, event.payload);
        taken += 1;
      } catch (error) {
        failedMs = Math.min(failedMs, event.createdMs);
        this.log.warn(`event ${event.id}: ${error instanceof Error ? error.message : String(error)}`);
      }
    }
    const note = `${taken} of ${missed.length} missed events carried out`;
    // An event that failed is read again the next time.
    this.readings.save(READING, { readUntilMs: Math.min(nowMs, failedMs), ranMs: nowMs, note });
    return taken;
  }

  private take(event: ProviderEvent, payload: string): void {
    write(this.db, (tx) => {
      const receivedMs = this.clock.nowMs();
      const { id, type } = event;
      const first = this.payments.addEvent(tx, { id, type, payload, receivedMs });
      if (first) this.payments.closeEvent(tx, id, receivedMs, this.carryOut(tx, event));
    });
  }

  private carryOut(tx: Db, event: ProviderEvent): string {
    switch (event.about.kind) {
      case 'intent':
        return this.outcomes.apply(tx, event.about.intent);
      case 'page closed':
        return this.outcomes.pageClosed(tx, event.about.checkoutId);
      case 'refunded':
        return this.refunds.apply(tx, event.about);
      case 'chargeback':
        return this.chargebacks.apply(tx, event.about.chargeback);
      case 'other':
        return 'not used';
    }
  }
}
