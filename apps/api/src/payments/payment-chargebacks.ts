/**
 * A buyer's bank takes a payment back. The money leaves at once; what the owner earned with the contact is set aside until the
 * bank decides. Won: both come back. Lost: the sale is undone to that extent, and the owner bears its part.
 */
import { Inject, Injectable } from '@nestjs/common';
import { chargebackEntry, chargebackLostEntry, chargebackWonEntry, releaseEntry, reserveEntry } from '@skyberth/money';
import { BookingNotices } from '../bookings/booking-notices.js';
import { BookingTransitions, BY_PAYMENT } from '../bookings/booking-transitions.js';
import { moneyText } from '../bookings/booking-words.js';
import { BookingRepository, type BookingRow } from '../bookings/bookings.repository.js';
import { InvoiceService } from '../invoices/invoices.service.js';
import { LedgerService } from '../ledger/ledger.service.js';
import { AuditService } from '../platform/audit.service.js';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import type { Db } from '../platform/transaction.js';
import { ChargebackRepository, type ChargebackRow } from './chargebacks.repository.js';
import { PaymentRepository, type PaymentRow } from './payments.repository.js';
import type { ChargebackFacts } from './provider-books.port.js';
import { type SaleShare, SaleShares } from './sale-shares.js';

interface Case {
  readonly booking: BookingRow;
  readonly payment: PaymentRow;
  readonly row: ChargebackRow;
  readonly facts: ChargebackFacts;
}

@Injectable()
export class PaymentChargebacks {
  constructor(
    private readonly repository: ChargebackRepository,
    private readonly payments: PaymentRepository,
    private readonly bookings: BookingRepository,
    private readonly transitions: BookingTransitions,
    private readonly notices: BookingNotices,
    private readonly ledger: LedgerService,
    private readonly invoices: InvoiceService,
    private readonly shares: SaleShares,
    private readonly audit: AuditService,
    @Inject(CLOCK) private readonly clock: ClockPort,
  ) {}

  /** Brings what is known to what the provider says; repeats and events out of order change nothing. */
  apply(tx: Db, facts: ChargebackFacts): string {
    const payment = facts.intentId === null ? undefined : this.payments.ofIntent(tx, facts.intentId);
    const booking = payment && this.bookings.byId(tx, payment.bookingId);
    if (!payment || !booking) return 'no payment of ours';
    if (payment.capturedMinor === 0) throw new Error('A chargeback came before the news of its payment.');
    const known = this.repository.byId(tx, facts.chargebackId);
    if (!known && !facts.withdrawn) return 'an inquiry, no money has moved';
    const row = known ?? this.open(tx, { booking, payment, facts });
    if (row.state !== 'open') return 'known';
    const one = { booking, payment, row, facts };
    if (facts.state === 'won' && facts.reinstated) return this.won(tx, one);
    if (facts.state === 'lost') return this.lost(tx, one);
    return known ? 'known' : 'money withdrawn, earnings set aside';
  }

  private open(tx: Db, { booking, payment, facts }: Omit<Case, 'row'>): ChargebackRow {
    const { chargebackId: id, amountMinor, currency, reason } = facts;
    const { operatorId, ownerId } = booking;
    const share = this.shareOf(tx, payment, amountMinor);
    const reservedMinor = Math.max(0, share.netMinor - share.feeMinor - share.feeVatMinor);
    const row: ChargebackRow = {
      id,
      bookingId: booking.id,
      operatorId,
      ownerId,
      chargeId: facts.chargeId,
      amountMinor,
      currency,
      reason,
      state: 'open',
      reservedMinor,
      openedMs: this.clock.nowMs(),
      closedMs: null,
    };
    this.repository.insert(tx, row);
    const cause = `Chargeback of berth ${booking.number}`;
    const money = chargebackEntry({ causeKey: `chargeback:${id}`, cause, currency }, { operatorId, amountMinor });
    this.ledger.post(tx, money, booking.id);
    if (reservedMinor > 0) {
      const head = { causeKey: `chargeback-reserve:${id}`, cause: `${cause}, earnings set aside`, currency };
      this.ledger.post(tx, reserveEntry(head, { ownerId, amountMinor: reservedMinor }), booking.id);
    }
    const taken = moneyText(amountMinor, currency);
    this.tell(tx, { booking, id, step: 'opened' }, [
      `The buyer’s bank took ${taken} back (${reason}).`,
      `${moneyText(reservedMinor, currency)} of the earnings are set aside until the bank decides.`,
    ]);
    return row;
  }

  private won(tx: Db, { booking, row }: Case): string {
    const { id, currency, amountMinor, operatorId, ownerId, reservedMinor } = row;
    const cause = `Chargeback of berth ${booking.number} won`;
    const back = chargebackWonEntry({ causeKey: `chargeback-won:${id}`, cause, currency }, { operatorId, amountMinor });
    this.ledger.post(tx, back, booking.id);
    if (reservedMinor > 0) {
      const head = { causeKey: `chargeback-release:${id}`, cause: `${cause}, earnings given free`, currency };
      this.ledger.post(tx, releaseEntry(head, { ownerId, amountMinor: reservedMinor }), booking.id);
    }
    this.repository.update(tx, id, { state: 'won', closedMs: this.clock.nowMs() });
    this.tell(tx, { booking, id, step: 'won' }, [
      `The bank gave ${moneyText(amountMinor, currency)} back.`,
      'The earnings that were set aside are free again.',
    ]);
    return 'won';
  }

  private lost(tx: Db, { booking, payment, row }: Case): string {
    const { id, currency, amountMinor, operatorId, ownerId, reservedMinor } = row;
    const share = this.shareOf(tx, payment, amountMinor);
    const head = { causeKey: `chargeback-lost:${id}`, cause: `Chargeback of berth ${booking.number} lost`, currency };
    this.ledger.post(tx, chargebackLostEntry(head, { operatorId, ownerId, ...share, reservedMinor }), booking.id);
    if (amountMinor === booking.toPayMinor) {
      this.invoices.credit(tx, booking, { refundPercent: 100, subject: head.cause });
    }
    this.repository.update(tx, id, { state: 'lost', closedMs: this.clock.nowMs() });
    this.tell(tx, { booking, id, step: 'lost' }, [
      `The bank keeps ${moneyText(amountMinor, currency)} for the buyer.`,
      'What was set aside of the earnings is used for it; the fee on it is given back.',
    ]);
    return 'lost';
  }

  /** The part of the sale that comes after what was refunded already; at most what is left. */
  private shareOf(tx: Db, payment: PaymentRow, amountMinor: number): SaleShare {
    const beforeMinor = Math.min(payment.refundedMinor, payment.capturedMinor - amountMinor);
    return this.shares.between(tx, payment, { beforeMinor, afterMinor: beforeMinor + amountMinor });
  }

  private tell(tx: Db, what: { booking: BookingRow; id: string; step: string }, sentences: readonly string[]): void {
    const { booking, id, step } = what;
    const kind = `chargeback ${step}`;
    this.transitions.note(tx, booking, { kind, sentence: sentences.join(' '), mover: BY_PAYMENT });
    this.audit.record(tx, {
      caller: null,
      action: `chargeback.${step}`,
      subject: `booking:${booking.id}`,
      data: { id },
    });
    const subject = `Chargeback ${step}: berth ${booking.number}`;
    this.notices.toStation(tx, booking, { kind: `${kind}:${id}`, subject, sentences });
  }
}
