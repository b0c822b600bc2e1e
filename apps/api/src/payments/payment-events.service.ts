/** The provider's events: verified, stored once, and carried out in the transaction that stores them. */
import { Inject, Injectable } from '@nestjs/common';
import type { SkyberthDatabase } from '@skyberth/drizzle';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import { DATABASE } from '../platform/database.module.js';
import { DomainError } from '../platform/domain-error.js';
import { type Db, write } from '../platform/transaction.js';
import { PAYMENT_PORT, type PaymentPort, type ProviderEvent } from './payment.port.js';
import { PaymentOutcomes } from './payment-outcomes.js';
import { PaymentRefunds } from './payment-refunds.js';
import { PaymentRepository } from './payments.repository.js';

@Injectable()
export class PaymentEvents {
  constructor(
    @Inject(DATABASE) private readonly db: SkyberthDatabase,
    @Inject(CLOCK) private readonly clock: ClockPort,
    @Inject(PAYMENT_PORT) private readonly port: PaymentPort,
    private readonly payments: PaymentRepository,
    private readonly outcomes: PaymentOutcomes,
    private readonly refunds: PaymentRefunds,
  ) {}

  /**
   * Takes one delivery. An event that was carried out before changes nothing; one that fails leaves nothing behind, is
   * answered with an error and comes again. Throws `bad-signature`.
   */
  receive(rawBody: Buffer | undefined, signature: string | undefined): void {
    if (!rawBody || !signature) throw new DomainError('bad-signature', 'The event carries no signature.');
    const event = this.port.verifyEvent(rawBody, signature, this.clock.nowMs());
    write(this.db, (tx) => {
      const receivedMs = this.clock.nowMs();
      const { id, type } = event;
      const first = this.payments.addEvent(tx, { id, type, payload: rawBody.toString('utf8'), receivedMs });
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
      case 'other':
        return 'not used';
    }
  }
}
