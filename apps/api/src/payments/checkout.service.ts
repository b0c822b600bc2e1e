/**
 * Paying for a hold. What is known is written down before and after each call to the provider, and every call has a key made
 * from the booking, so that a crash between two lines finds the same intent or page again. Nothing is confirmed here: that
 * takes the provider's own word.
 */
import { Inject, Injectable } from '@nestjs/common';
import type { SkyberthDatabase } from '@skyberth/drizzle';
import type { BodyOf, Principal, ResponseOf, routes } from '@skyberth/shared';
import { BookingGroupRepository } from '../bookings/booking-groups.repository.js';
import { contactName } from '../bookings/booking-notices.js';
import { BookingSale } from '../bookings/booking-sale.service.js';
import { utcText } from '../bookings/booking-words.js';
import { BookingRepository, type BookingRow } from '../bookings/bookings.repository.js';
import { PartiesRepository } from '../bookings/parties.repository.js';
import { CLOSE_AFTER_MS } from '../bookings/report-terms.js';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import { CONFIG, type Config } from '../platform/config.js';
import { DATABASE } from '../platform/database.module.js';
import { DomainError, notFound } from '../platform/domain-error.js';
import { newId } from '../platform/ids.js';
import { type Db, write } from '../platform/transaction.js';
import { PAYMENT_PORT, type PaymentOrder, type PaymentPort } from './payment.port.js';
import { PaymentOrders } from './payment-orders.js';
import { type PaymentChange, PaymentRepository, type PaymentRow } from './payments.repository.js';

type Wish = BodyOf<typeof routes.checkout>;
type Result = ResponseOf<typeof routes.checkout>;

/** Reservations last seven days where the buyer was present (published-values, section j); a day is kept in hand. */
const SURELY_RESERVED_MS = 6 * 24 * 3_600_000;

const PROCESSING: Result = { kind: 'processing' };

@Injectable()
export class CheckoutService {
  constructor(
    @Inject(DATABASE) private readonly db: SkyberthDatabase,
    @Inject(CLOCK) private readonly clock: ClockPort,
    @Inject(CONFIG) private readonly config: Config,
    @Inject(PAYMENT_PORT) private readonly port: PaymentPort,
    private readonly bookings: BookingRepository,
    private readonly payments: PaymentRepository,
    private readonly orders: PaymentOrders,
    private readonly parties: PartiesRepository,
    private readonly sale: BookingSale,
    private readonly groups: BookingGroupRepository,
  ) {}

  /** Throws `hold-ended`, `wrong-state`, `card-declined`, `payment-unavailable`, and `not-found` for another's hold or card. */
  async pay(caller: Principal, bookingId: string, wish: Wish): Promise<Result> {
    if (this.groups.groupIdOf(bookingId) !== null && this.bookings.forViewer(caller, bookingId).state === 'held')
      throw new DomainError('wrong-state', 'It is held together with others: pay for the whole group, or let it go.');
    return this.payInGroup(caller, bookingId, wish);
  }

  /** Pays for one booking of a group, or for one that stands alone. */
  async payInGroup(caller: Principal, bookingId: string, wish: Wish): Promise<Result> {
    const payment = write(this.db, (tx) => this.begin(tx, caller, bookingId));
    if (payment === null || payment.state !== 'waiting for the buyer') return PROCESSING;
    const booking = this.bookings.forViewer(caller, bookingId);
    const order = await this.orderFor(booking);
    return wish.savedCardId === null
      ? this.onPage(booking, payment, { ...order, saveCard: wish.saveCard || this.outlivesReservation(booking) })
      : this.withCard(booking, payment, order, wish.savedCardId);
  }

  async savedCards(caller: Principal): Promise<ResponseOf<typeof routes.savedCards>> {
    const customerId = this.payments.buyer(caller.organisationId).providerCustomerId;
    return { items: customerId === null ? [] : await this.port.cards(customerId) };
  }

  /** Checks the hold and makes the payment's row. Null where there is nothing to pay, and the booking is sold at once. */
  private begin(tx: Db, caller: Principal, bookingId: string): PaymentRow | null {
    const booking = this.bookings.forViewer(caller, bookingId, tx);
    const earlier = this.payments.ofBooking(booking.id, tx);
    if (earlier && ['authorised', 'capturing', 'captured'].includes(earlier.state)) return earlier;
    this.requireHold(booking);
    if (earlier) {
      if (earlier.state === 'waiting for the buyer') return earlier;
      throw new DomainError(
        'wrong-state',
        `The payment of berth ${booking.number} is ${earlier.state}. Let the hold go and start again.`,
      );
    }
    if (booking.toPayMinor === 0) {
      this.sale.fundsSecured(tx, booking);
      return null;
    }
    const nowMs = this.clock.nowMs();
    this.payments.insert(tx, {
      id: newId(),
      bookingId: booking.id,
      state: 'waiting for the buyer',
      currency: booking.currency,
      amountMinor: booking.toPayMinor,
      capturedMinor: 0,
      refundedMinor: 0,
      createdMs: nowMs,
      changedMs: nowMs,
    });
    return this.payments.ofBooking(booking.id, tx) ?? null;
  }

  /** Whether the contact is reported only after a reservation of today has ended, so that the card is needed again. */
  private outlivesReservation(booking: BookingRow): boolean {
    return booking.losMs + CLOSE_AFTER_MS > this.clock.nowMs() + SURELY_RESERVED_MS;
  }

  private requireHold(booking: BookingRow): void {
    const ended =
      booking.state === 'lapsed' || (booking.state === 'held' && this.clock.nowMs() >= (booking.holdEndsMs ?? 0));
    if (ended)
      throw new DomainError(
        'hold-ended',
        `The hold of berth ${booking.number} has ended. Hold the pass again if it is still for sale.`,
      );
    if (booking.state !== 'held') {
      throw new DomainError('wrong-state', `Berth ${booking.number} is ${booking.state}; there is nothing to pay.`);
    }
  }

  private async withCard(
    booking: BookingRow,
    payment: PaymentRow,
    order: Omit<PaymentOrder, 'idempotencyKey'>,
    cardId: string,
  ): Promise<Result> {
    const cards = await this.port.cards(order.customerId);
    if (!cards.some((card) => card.id === cardId)) throw notFound('saved card');
    if (payment.checkoutId !== null && payment.checkoutUrl !== null) {
      const page = await this.port.closePage(payment.checkoutId);
      if (page.status === 'complete') return PROCESSING;
      this.keep(booking, payment, { checkoutUrl: null });
    }
    let intentId = payment.intentId;
    if (intentId === null) {
      const key = `skyberth:intent:${booking.id}`;
      intentId = (await this.port.createIntent({ ...order, saveCard: false, idempotencyKey: key })).intentId;
      this.keep(booking, payment, { intentId });
    }
    const facts = await this.port.confirmIntent(intentId, { cardId, returnUrl: this.returnUrl(booking) });
    if (facts.status === 'waiting for the bank' && facts.redirectUrl !== null)
      return { kind: 'redirect', url: facts.redirectUrl };
    if (facts.status === 'authorised') return PROCESSING;
    if (facts.status === 'released')
      throw new DomainError('hold-ended', 'The hold has ended meanwhile; nothing is charged.');
    throw new DomainError('card-declined', facts.failure ?? 'The bank did not agree to the payment.');
  }

  private async onPage(
    booking: BookingRow,
    payment: PaymentRow,
    order: Omit<PaymentOrder, 'idempotencyKey'> & { saveCard: boolean },
  ): Promise<Result> {
    if (payment.checkoutId !== null) {
      const page = await this.port.readPage(payment.checkoutId);
      if (page.status === 'complete') return PROCESSING;
      if (page.status === 'open' && page.url !== null && page.savesCard === order.saveCard) {
        return { kind: 'redirect', url: page.url };
      }
      if (page.status === 'open' && (await this.port.closePage(page.checkoutId)).status === 'complete')
        return PROCESSING;
    }
    const page = await this.port.openPage({
      ...order,
      returnUrl: this.returnUrl(booking),
      cancelUrl: `${this.config.publicUrl}/bookings/${booking.id}`,
      idempotencyKey: `skyberth:page:${booking.id}:${order.saveCard}:${payment.checkoutId ?? 'first'}`,
    });
    this.keep(booking, payment, { checkoutId: page.checkoutId, checkoutUrl: page.url });
    if (page.url === null) throw new Error(`The payment page ${page.checkoutId} has no address.`);
    return { kind: 'redirect', url: page.url };
  }

  /** Writes down what the provider made. Where the hold has ended meanwhile it is let go again, and nothing can be paid. */
  private keep(booking: BookingRow, payment: PaymentRow, change: PaymentChange): void {
    const open = write(this.db, (tx) => {
      const now = this.payments.ofBooking(booking.id, tx);
      if (!now) throw new Error(`The payment of booking ${booking.id} is gone.`);
      this.payments.update(tx, payment.id, { ...change, changedMs: this.clock.nowMs() });
      if (now.state === 'waiting for the buyer') return true;
      if (change.intentId) this.orders.releaseIntent(tx, change.intentId);
      if (change.checkoutId) this.orders.closePage(tx, change.checkoutId);
      return false;
    });
    if (!open) throw new DomainError('hold-ended', 'The hold has ended meanwhile; nothing is charged.');
  }

  private async orderFor(booking: BookingRow): Promise<Omit<PaymentOrder, 'idempotencyKey'>> {
    const names = this.parties.names(booking.id);
    return {
      bookingId: booking.id,
      customerId: await this.customerOf(booking.operatorId),
      amountMinor: booking.toPayMinor,
      currency: booking.currency,
      description: `Berth ${booking.number}: ${contactName(names)}, ${utcText(booking.aosMs)}`,
    };
  }

  private async customerOf(organisationId: string): Promise<string> {
    const buyer = this.payments.buyer(organisationId);
    if (buyer.providerCustomerId !== null) return buyer.providerCustomerId;
    const customerId = await this.port.createCustomer({ organisationId, name: buyer.name, email: buyer.billingEmail });
    write(this.db, (tx) => this.payments.setCustomer(tx, organisationId, customerId));
    return customerId;
  }

  private returnUrl(booking: BookingRow): string {
    return `${this.config.publicUrl}/bookings/${booking.id}?paid=1`;
  }
}
