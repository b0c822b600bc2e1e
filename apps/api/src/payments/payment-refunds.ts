/**
 * Money that the provider gave back after it was taken: followed in the payment and the ledger. The owner bears its part of
 * the net price, and the marketplace gives its part of the fee back.
 */
import { Inject, Injectable } from '@nestjs/common';
import { refundEntry, refundReturnedEntry } from '@skyberth/money';
import { BookingTransitions, BY_PAYMENT } from '../bookings/booking-transitions.js';
import { moneyText } from '../bookings/booking-words.js';
import { BookingRepository, type BookingRow } from '../bookings/bookings.repository.js';
import { LedgerService } from '../ledger/ledger.service.js';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import type { Db } from '../platform/transaction.js';
import type { ProviderEvent } from './payment.port.js';
import { PaymentRepository, type PaymentRow } from './payments.repository.js';
import { SaleShares } from './sale-shares.js';

type Refunded = Extract<ProviderEvent['about'], { kind: 'refunded' }>;

@Injectable()
export class PaymentRefunds {
  constructor(
    private readonly payments: PaymentRepository,
    private readonly bookings: BookingRepository,
    private readonly transitions: BookingTransitions,
    private readonly ledger: LedgerService,
    private readonly shares: SaleShares,
    @Inject(CLOCK) private readonly clock: ClockPort,
  ) {}

  /** Works on the difference to what is known, so that repeats and events out of order change nothing. */
  apply(tx: Db, refunded: Refunded): string {
    const payment = refunded.intentId === null ? undefined : this.payments.ofIntent(tx, refunded.intentId);
    const booking = payment && this.bookings.byId(tx, payment.bookingId);
    if (!payment || !booking) return 'no payment of ours';
    if (refunded.refundedMinor <= payment.refundedMinor) return 'known';
    if (refunded.refundedMinor > payment.capturedMinor)
      throw new Error('A refund came before the news of its payment.');
    this.payments.update(tx, payment.id, {
      refundedMinor: refunded.refundedMinor,
      state: refunded.refundedMinor === payment.capturedMinor ? 'refunded' : 'captured',
      changedMs: this.clock.nowMs(),
    });
    this.book(tx, { booking, payment, refunded });
    const amountMinor = refunded.refundedMinor - payment.refundedMinor;
    const sentence = `${moneyText(amountMinor, booking.currency)} were given back to the card.`;
    this.transitions.note(tx, booking, { kind: 'refunded', sentence, mover: BY_PAYMENT });
    return 'refund followed';
  }

  private book(tx: Db, what: { booking: BookingRow; payment: PaymentRow; refunded: Refunded }): void {
    const { booking, payment, refunded } = what;
    const { operatorId, ownerId, currency } = booking;
    const amountMinor = refunded.refundedMinor - payment.refundedMinor;
    const cause = `Refund of berth ${booking.number}`;
    const key = `${refunded.chargeId}:${refunded.refundedMinor}`;
    // A dispute books its refund when it is decided; what comes without one was made at the provider itself.
    const decidedMinor = Math.min(amountMinor, this.ledger.promisedBackMinor(tx, booking.id));
    if (decidedMinor < amountMinor) {
      const share = this.shares.between(tx, payment, {
        beforeMinor: payment.refundedMinor + decidedMinor,
        afterMinor: refunded.refundedMinor,
      });
      const refund = { operatorId, ownerId, ...share, fromReserveMinor: 0 };
      this.ledger.post(tx, refundEntry({ causeKey: `refund:${key}`, cause, currency }, refund), booking.id);
    }
    const returned = refundReturnedEntry({ causeKey: `returned:${key}`, cause, currency }, { operatorId, amountMinor });
    this.ledger.post(tx, returned, booking.id);
  }
}
