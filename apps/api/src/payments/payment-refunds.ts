/** Money that the provider gave back after it was taken: followed in the payment and the ledger; the owner bears its net. */
import { Inject, Injectable } from '@nestjs/common';
import { divideHalfUp, refundEntry, refundReturnedEntry } from '@skyberth/money';
import { BookingTransitions, BY_PAYMENT } from '../bookings/booking-transitions.js';
import { moneyText } from '../bookings/booking-words.js';
import { BookingRepository } from '../bookings/bookings.repository.js';
import { LedgerService } from '../ledger/ledger.service.js';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import type { Db } from '../platform/transaction.js';
import type { ProviderEvent } from './payment.port.js';
import { PaymentRepository } from './payments.repository.js';

type Refunded = Extract<ProviderEvent['about'], { kind: 'refunded' }>;

@Injectable()
export class PaymentRefunds {
  constructor(
    private readonly payments: PaymentRepository,
    private readonly bookings: BookingRepository,
    private readonly transitions: BookingTransitions,
    private readonly ledger: LedgerService,
    @Inject(CLOCK) private readonly clock: ClockPort,
  ) {}

  /** Works on the difference to what is known, so that repeats and events out of order change nothing. */
  apply(tx: Db, refunded: Refunded): string {
    const payment = refunded.intentId === null ? undefined : this.payments.ofIntent(tx, refunded.intentId);
    const booking = payment && this.bookings.byId(tx, payment.bookingId);
    if (!payment || !booking) return 'no payment of ours';
    const amountMinor = refunded.refundedMinor - payment.refundedMinor;
    if (amountMinor <= 0) return 'known';
    if (refunded.refundedMinor > payment.capturedMinor)
      throw new Error('A refund came before the news of its payment.');
    const whole = refunded.refundedMinor === payment.capturedMinor;
    this.payments.update(tx, payment.id, {
      refundedMinor: refunded.refundedMinor,
      state: whole ? 'refunded' : 'captured',
      changedMs: this.clock.nowMs(),
    });
    const { operatorId, ownerId, currency } = booking;
    const netMinor = divideHalfUp(BigInt(amountMinor) * BigInt(booking.netMinor), BigInt(booking.toPayMinor));
    const key = `${refunded.chargeId}:${refunded.refundedMinor}`;
    const cause = `Refund of berth ${booking.number}`;
    this.ledger.post(
      tx,
      refundEntry(
        { causeKey: `refund:${key}`, cause, currency },
        {
          operatorId,
          ownerId,
          netMinor,
          vatMinor: amountMinor - netMinor,
          fromReserveMinor: 0,
          feeMinor: 0,
          feeVatMinor: 0,
        },
      ),
      booking.id,
    );
    this.ledger.post(
      tx,
      refundReturnedEntry({ causeKey: `returned:${key}`, cause, currency }, { operatorId, amountMinor }),
      booking.id,
    );
    const sentence = `${moneyText(amountMinor, currency)} were given back to the card.`;
    this.transitions.note(tx, booking, { kind: 'refunded', sentence, mover: BY_PAYMENT });
    return 'refund followed';
  }
}
