/** Asks the provider about the cause of one movement, and follows its answer as if the news had come by itself. */
import { Inject, Injectable } from '@nestjs/common';
import type { SkyberthDatabase } from '@skyberth/drizzle';
import { PAYMENT_PORT, type PaymentPort } from '../payments/payment.port.js';
import { PaymentChargebacks } from '../payments/payment-chargebacks.js';
import { PaymentOutcomes } from '../payments/payment-outcomes.js';
import { PaymentRefunds } from '../payments/payment-refunds.js';
import { PROVIDER_BOOKS, type ProviderBooks } from '../payments/provider-books.port.js';
import { DATABASE } from '../platform/database.module.js';
import { write } from '../platform/transaction.js';
import { kindOf } from './matching.js';
import type { MovementRow } from './reconciliation.repository.js';

@Injectable()
export class MissedNews {
  constructor(
    @Inject(DATABASE) private readonly db: SkyberthDatabase,
    @Inject(PAYMENT_PORT) private readonly port: PaymentPort,
    @Inject(PROVIDER_BOOKS) private readonly books: ProviderBooks,
    private readonly outcomes: PaymentOutcomes,
    private readonly refunds: PaymentRefunds,
    private readonly chargebacks: PaymentChargebacks,
  ) {}

  async fetch(movement: MovementRow): Promise<void> {
    const { intentId, sourceId } = movement;
    // What happened to a payment later makes sense only after the payment itself.
    if (intentId !== null) {
      const facts = await this.port.readIntent(intentId);
      write(this.db, (tx) => void this.outcomes.apply(tx, facts));
    }
    if (sourceId === null) return;
    const kind = kindOf(movement);
    if (kind === 'refund') {
      const refunded = await this.books.refunded(sourceId);
      write(this.db, (tx) => void this.refunds.apply(tx, refunded));
    }
    if (kind === 'chargeback' || kind === 'chargeback back') {
      const facts = await this.books.chargeback(sourceId);
      write(this.db, (tx) => void this.chargebacks.apply(tx, facts));
    }
  }
}
