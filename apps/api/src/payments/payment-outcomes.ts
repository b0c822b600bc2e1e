/**
 * What the provider's word about an intent means for a payment and its booking. Called with verified events and with what the
 * sweep reads; safe to call again, and in any order, because each step looks at the state that it finds.
 */
import { Inject, Injectable } from '@nestjs/common';
import { BookingEnding } from '../bookings/booking-ending.service.js';
import { BookingMoney } from '../bookings/booking-money.js';
import { BookingSale } from '../bookings/booking-sale.service.js';
import { BookingTransitions, BY_PAYMENT } from '../bookings/booking-transitions.js';
import { moneyText } from '../bookings/booking-words.js';
import { BookingRepository, type BookingRow } from '../bookings/bookings.repository.js';
import { AuditService } from '../platform/audit.service.js';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import type { Db } from '../platform/transaction.js';
import type { IntentFacts } from './payment.port.js';
import { PaymentOrders } from './payment-orders.js';
import { type PaymentChange, PaymentRepository, type PaymentRow } from './payments.repository.js';

/** The bank may take so long while the hold runs out; nobody else has the time as long as the hold has not lapsed. */
export const LATE_GRACE_MS = 120_000;

export type BillHandler = (tx: Db, billId: string, facts: IntentFacts) => string;

@Injectable()
export class PaymentOutcomes {
  private billHandler: BillHandler | undefined;

  constructor(
    private readonly bookings: BookingRepository,
    private readonly payments: PaymentRepository,
    private readonly transitions: BookingTransitions,
    private readonly sale: BookingSale,
    private readonly ending: BookingEnding,
    private readonly money: BookingMoney,
    private readonly orders: PaymentOrders,
    private readonly audit: AuditService,
    @Inject(CLOCK) private readonly clock: ClockPort,
  ) {}

  /** Says who follows the payments of monthly bills; called once, when modules start. */
  whenBill(handler: BillHandler): void {
    this.billHandler = handler;
  }

  /** Answers in a few words what it did, for the record of the event. */
  apply(tx: Db, facts: IntentFacts): string {
    if (facts.billId !== null) return this.billHandler?.(tx, facts.billId, facts) ?? 'no bills are kept here';
    const booking = facts.bookingId === null ? undefined : this.bookings.byId(tx, facts.bookingId);
    if (!booking) return 'no booking of ours';
    const payment = this.payments.ofBooking(booking.id, tx);
    if (!payment) {
      // Only our checkout makes intents for bookings, and it writes its row first.
      this.flag(tx, booking, 'payment.unexpected', facts);
      if (facts.status === 'authorised') this.orders.releaseIntent(tx, facts.intentId);
      return 'no payment was asked for';
    }
    switch (facts.status) {
      case 'authorised':
        return this.authorised(tx, booking, payment, facts);
      case 'captured':
        return this.captured(tx, booking, payment, facts);
      case 'released':
        return this.released(tx, booking, payment, facts);
      default:
        return this.failed(tx, booking, payment, facts);
    }
  }

  /** The provider closed the page unpaid. */
  pageClosed(tx: Db, checkoutId: string): string {
    const payment = this.payments.ofPage(tx, checkoutId);
    if (!payment) return 'no page of ours, or another was opened since';
    const gone = payment.state === 'releasing' && payment.intentId === null;
    this.change(tx, payment, { checkoutUrl: null, ...(gone ? { state: 'released' as const } : {}) });
    return gone ? 'released' : 'page closed';
  }

  private authorised(tx: Db, booking: BookingRow, payment: PaymentRow, facts: IntentFacts): string {
    const mine = payment.intentId === facts.intentId;
    if (payment.state !== 'waiting for the buyer') return this.authorisedAgain(tx, booking, payment, facts);
    if (facts.capturableMinor !== payment.amountMinor || facts.currency !== payment.currency) {
      return this.wrongAmount(tx, booking, payment, facts);
    }
    if (payment.intentId !== null && !mine) this.orders.releaseIntent(tx, payment.intentId);
    if (!this.stillHeld(booking)) {
      this.change(tx, payment, { state: 'releasing', intentId: facts.intentId });
      if (booking.state === 'held') this.sale.lapseHold(tx, booking);
      this.sale.tooLate(tx, booking, facts.intentId);
      return 'too late, let go';
    }
    this.secure(tx, payment, facts);
    return this.sale.fundsSecured(tx, booking).state;
  }

  /** A reservation when none is waited for: known already, a second one, or one for a booking that is over. */
  private authorisedAgain(tx: Db, booking: BookingRow, payment: PaymentRow, facts: IntentFacts): string {
    const mine = payment.intentId === facts.intentId;
    if (payment.state === 'authorised' && facts.renews === payment.intentId && facts.renews !== null) {
      this.orders.releaseIntent(tx, facts.renews);
      this.secure(tx, payment, facts);
      return 'reservation renewed';
    }
    const over = payment.state === 'releasing' || payment.state === 'released';
    if (mine && !over) return 'known';
    const neverSecured = payment.card === null && payment.captureBeforeMs === null;
    if (!over || !neverSecured) {
      if (!mine) this.orders.releaseIntent(tx, facts.intentId);
      return mine ? 'known' : 'second reservation, let go';
    }
    if (payment.state === 'releasing') this.change(tx, payment, { intentId: facts.intentId });
    this.sale.tooLate(tx, booking, facts.intentId);
    return 'too late, let go';
  }

  private captured(tx: Db, booking: BookingRow, payment: PaymentRow, facts: IntentFacts): string {
    if (['captured', 'refunding', 'refunded'].includes(payment.state) && payment.intentId === facts.intentId)
      return 'known';
    if (payment.intentId !== facts.intentId || !['authorised', 'capturing'].includes(payment.state)) {
      // Money was taken that nobody ordered: a person of finance must look, nothing is done in silence.
      this.flag(tx, booking, 'payment.taken-unexpectedly', facts);
      return 'taken unexpectedly, to be looked at';
    }
    this.change(tx, payment, {
      state: 'captured',
      capturedMinor: Math.min(facts.receivedMinor, payment.amountMinor),
      failure: null,
    });
    this.money.captured(tx, booking, { intentId: facts.intentId, amountMinor: facts.receivedMinor });
    const sentence = `${moneyText(facts.receivedMinor, booking.currency)} were charged to the card.`;
    this.transitions.note(tx, booking, { kind: 'charged', sentence, mover: BY_PAYMENT });
    return 'captured';
  }

  private released(tx: Db, booking: BookingRow, payment: PaymentRow, facts: IntentFacts): string {
    if (payment.state === 'releasing' && [null, facts.intentId].includes(payment.intentId)) {
      this.change(tx, payment, { state: 'released', intentId: facts.intentId });
      return 'released';
    }
    if (payment.intentId !== facts.intentId) return 'another intent of this booking';
    if (!['authorised', 'capturing'].includes(payment.state)) return 'known';
    const failure = 'The reservation ended before the contact was charged.';
    if (booking.state === 'awaiting owner' || booking.state === 'confirmed') {
      this.change(tx, payment, { state: 'released', failure });
      return this.ending.authorisationRanOut(tx, booking).state;
    }
    this.change(tx, payment, { state: 'failed', failure });
    this.flag(tx, booking, 'payment.lost', facts);
    this.transitions.note(tx, booking, { kind: 'charge failed', sentence: failure, mover: BY_PAYMENT });
    return 'the charge failed, to be looked at';
  }

  private failed(tx: Db, booking: BookingRow, payment: PaymentRow, facts: IntentFacts): string {
    if (payment.state !== 'waiting for the buyer' || facts.failure === null) return 'nothing to do';
    if (payment.failure === facts.failure) return 'known';
    this.change(tx, payment, { failure: facts.failure });
    const sentence = `The payment did not go through: ${facts.failure}`;
    this.transitions.note(tx, booking, { kind: 'payment refused', sentence, mover: BY_PAYMENT });
    return 'refusal noted';
  }

  /** The bank does not reserve again; the contact stands until the present reservation ends. */
  renewalRefused(tx: Db, bookingId: string, refusal: string): void {
    const booking = this.bookings.byId(tx, bookingId);
    if (booking) this.ending.renewalRefused(tx, booking, refusal);
  }

  private wrongAmount(tx: Db, booking: BookingRow, payment: PaymentRow, facts: IntentFacts): string {
    const failure = `${moneyText(facts.capturableMinor, facts.currency)} were reserved instead of the price.`;
    this.change(tx, payment, { state: 'failed', failure });
    this.flag(tx, booking, 'payment.wrong-amount', facts);
    this.orders.releaseIntent(tx, facts.intentId);
    this.transitions.note(tx, booking, {
      kind: 'payment refused',
      sentence: `${failure} It is let go.`,
      mover: BY_PAYMENT,
    });
    return 'wrong amount, let go';
  }

  private secure(tx: Db, payment: PaymentRow, facts: IntentFacts): void {
    this.change(tx, payment, {
      state: 'authorised',
      intentId: facts.intentId,
      checkoutUrl: null,
      failure: null,
      ...(facts.card === null ? {} : { card: facts.card }),
      captureBeforeMs: facts.captureBeforeMs,
    });
    if (facts.card === null) this.orders.read(tx, facts.intentId);
  }

  private stillHeld(booking: BookingRow): boolean {
    const nowMs = this.clock.nowMs();
    return booking.state === 'held' && nowMs < booking.aosMs && nowMs < (booking.holdEndsMs ?? 0) + LATE_GRACE_MS;
  }

  private change(tx: Db, payment: PaymentRow, change: PaymentChange): void {
    this.payments.update(tx, payment.id, { ...change, changedMs: this.clock.nowMs() });
  }

  private flag(tx: Db, booking: BookingRow, action: string, facts: IntentFacts): void {
    this.audit.record(tx, { caller: null, action, subject: `booking:${booking.id}`, data: { ...facts } });
  }
}
