/** What a dispute does to money: set aside when it opens, and booked exactly as shown when it is decided. */
import { Injectable } from '@nestjs/common';
import {
  adjustmentEntry,
  goodwillRefundEntry,
  percentOf,
  refundCreditedEntry,
  refundEntry,
  releaseEntry,
  reserveEntry,
} from '@skyberth/money';
import type { BorneBy, DecisionEffect, DecisionTerms } from '@skyberth/shared';
import { BookingMoney } from '../bookings/booking-money.js';
import type { BookingRow } from '../bookings/bookings.repository.js';
import { PartiesRepository } from '../bookings/parties.repository.js';
import { InvoiceService } from '../invoices/invoices.service.js';
import { LedgerService } from '../ledger/ledger.service.js';
import { PaymentOrders } from '../payments/payment-orders.js';
import { PaymentRepository } from '../payments/payments.repository.js';
import { DomainError } from '../platform/domain-error.js';
import type { Db } from '../platform/transaction.js';

/** How much of the price goes back, and who bears it. */
export type Ruling = Pick<DecisionTerms, 'refundBasisPoints' | 'borneBy'>;
const NOTHING: Ruling = { refundBasisPoints: 0, borneBy: 'owner' };

interface Share {
  readonly netMinor: number;
  readonly vatMinor: number;
  readonly feeMinor: number;
  readonly feeVatMinor: number;
}

/** The sums of a ruling beyond those of the one before. */
interface Sums {
  readonly extra: Share;
  readonly borneBy: BorneBy;
  /** Positive is given to the owner by the marketplace, negative is taken. */
  readonly adjustMinor: number;
  readonly fromReserveMinor: number;
  readonly releasedMinor: number;
}

@Injectable()
export class DisputeMoney {
  constructor(
    private readonly bookingMoney: BookingMoney,
    private readonly invoices: InvoiceService,
    private readonly ledger: LedgerService,
    private readonly orders: PaymentOrders,
    private readonly payments: PaymentRepository,
    private readonly parties: PartiesRepository,
  ) {}

  /** Throws `wrong-state` where nothing was or will be charged, or all of it is given back, so that there is nothing to dispute. */
  checkCharged(tx: Db, booking: BookingRow): void {
    if (booking.state !== 'reporting' && !this.ledger.has(tx, `sale:${booking.id}`)) {
      throw new DomainError(
        'wrong-state',
        `Nothing was charged for berth ${booking.number}, so there is nothing to give back.`,
      );
    }
    // Such as after a lost chargeback. Where there is no invoice yet, nothing can have been credited.
    const leftMinor = this.invoices.leftMinor(tx, booking.id);
    if (leftMinor === null || leftMinor > 0) return;
    throw new DomainError('wrong-state', `All that was charged for berth ${booking.number} is given back already.`);
  }

  /**
   * Charges what is not charged yet, since a reservation on a card would not outlast the dispute, and sets the owner's
   * earnings of it aside.
   */
  hold(tx: Db, booking: BookingRow, disputeId: string): void {
    const sale = `sale:${booking.id}`;
    if (!this.ledger.has(tx, sale)) {
      this.bookingMoney.settle(tx, booking, { refundPercent: 0, reason: 'charged and set aside for a dispute' });
    }
    const earned = lossOf(this.share(tx, booking, 10_000));
    if (earned > 0) {
      const head = this.head(booking, `dispute-reserve:${disputeId}`, 'earnings set aside for a dispute');
      this.ledger.post(tx, reserveEntry(head, { ownerId: booking.ownerId, amountMinor: earned }), booking.id);
    }
  }

  /** What the ruling would book, in words, beyond the one before it. */
  effect(
    tx: Db,
    booking: BookingRow,
    what: { disputeId: string; ruling: Ruling; before: Ruling | null },
  ): DecisionEffect {
    const sums = this.sums(tx, booking, what);
    const { extra, borneBy } = sums;
    const operator = this.parties.organisation(booking.operatorId, tx).name;
    const owner = this.parties.organisation(booking.ownerId, tx).name;
    const refundMinor = extra.netMinor + extra.vatMinor;
    const where = this.payments.ofBooking(booking.id, tx)?.intentId ? 'to the card' : 'to its account';
    const lines: DecisionEffect['lines'] = [{ words: `Refund to ${operator}, ${where}`, amountMinor: refundMinor }];
    const add = (words: string, amountMinor: number) => {
      if (amountMinor !== 0) lines.push({ words, amountMinor });
    };
    const feeBack = extra.feeMinor + extra.feeVatMinor;
    if (borneBy === 'owner') {
      add(`Less for ${owner}`, feeBack - extra.netMinor);
      add('Fee given back by the marketplace', -feeBack);
    } else add('Borne by the marketplace', -extra.netMinor);
    add('VAT given back', -extra.vatMinor);
    add(sums.adjustMinor > 0 ? `Given back to ${owner} by the marketplace` : `Taken from ${owner}`, sums.adjustMinor);
    add(`Set-aside released to ${owner}`, sums.releasedMinor);
    return { currency: booking.currency, refundMinor, lines };
  }

  /** Books the ruling, orders the refund, and credits the invoice. Answers the credit note's id, or null. */
  book(
    tx: Db,
    booking: BookingRow,
    what: { disputeId: string; round: number; ruling: Ruling; before: Ruling | null; reason: string },
  ): string | null {
    const { disputeId, round } = what;
    const { extra, borneBy, adjustMinor, fromReserveMinor, releasedMinor } = this.sums(tx, booking, what);
    const { operatorId, ownerId } = booking;
    const key = (kind: string) => `dispute-${kind}:${disputeId}:${round}`;
    const amountMinor = extra.netMinor + extra.vatMinor;
    if (amountMinor > 0) {
      const head = this.head(booking, key('refund'), what.reason);
      const entry =
        borneBy === 'owner'
          ? refundEntry(head, { operatorId, ownerId, ...extra, fromReserveMinor })
          : goodwillRefundEntry(head, { operatorId, netMinor: extra.netMinor, vatMinor: extra.vatMinor });
      this.ledger.post(tx, entry, booking.id);
      const payment = this.payments.ofBooking(booking.id, tx);
      if (payment?.intentId) this.orders.refund(tx, payment, { amountMinor, key: `${disputeId}:${round}` });
      else {
        const credited = this.head(booking, key('credited'), what.reason);
        this.ledger.post(tx, refundCreditedEntry(credited, { operatorId, amountMinor }), booking.id);
      }
    }
    if (releasedMinor > 0) {
      const head = this.head(booking, key('release'), 'set-aside released after a dispute');
      this.ledger.post(tx, releaseEntry(head, { ownerId, amountMinor: releasedMinor }), booking.id);
    }
    if (adjustMinor !== 0) {
      const head = this.head(booking, key('adjustment'), what.reason);
      this.ledger.post(tx, adjustmentEntry(head, { ownerId, amountMinor: adjustMinor }), booking.id);
    }
    const fromBasisPoints = what.before?.refundBasisPoints ?? 0;
    const toBasisPoints = what.ruling.refundBasisPoints;
    if (toBasisPoints <= fromBasisPoints) return null;
    return this.invoices.creditStep(tx, booking, { fromBasisPoints, toBasisPoints, subject: what.reason })?.id ?? null;
  }

  private sums(
    tx: Db,
    booking: BookingRow,
    { disputeId, ruling, before }: { disputeId: string; ruling: Ruling; before: Ruling | null },
  ): Sums {
    const prior = before ?? NOTHING;
    const paidBack = this.share(tx, booking, prior.refundBasisPoints);
    // What was given back is not asked back: a milder second ruling moves the loss, not the operator's money.
    const total = this.share(tx, booking, Math.max(prior.refundBasisPoints, ruling.refundBasisPoints));
    const extra: Share = {
      netMinor: total.netMinor - paidBack.netMinor,
      vatMinor: total.vatMinor - paidBack.vatMinor,
      feeMinor: total.feeMinor - paidBack.feeMinor,
      feeVatMinor: total.feeVatMinor - paidBack.feeVatMinor,
    };
    const { borneBy } = ruling;
    const lostBefore = prior.borneBy === 'owner' ? lossOf(paidBack) : 0;
    const lostNow = lostBefore + (borneBy === 'owner' ? lossOf(extra) : 0);
    const target = borneBy === 'owner' ? lossOf(this.share(tx, booking, ruling.refundBasisPoints)) : 0;
    const held = before === null ? this.heldMinor(tx, disputeId) : 0;
    const fromReserveMinor = borneBy === 'owner' ? Math.min(held, extra.netMinor) : 0;
    return { extra, borneBy, adjustMinor: lostNow - target, fromReserveMinor, releasedMinor: held - fromReserveMinor };
  }

  /** What was set aside when it opened. */
  heldMinor(tx: Db, disputeId: string): number {
    return this.ledger.creditedMinor(tx, `dispute-reserve:${disputeId}`, 'dispute reserve');
  }

  /** So much of the sale and of the fee on it; sums of shares add up to the whole. */
  private share(tx: Db, booking: BookingRow, basisPoints: number): Share {
    const { netMinor, vatMinor } = this.invoices.creditAmounts(booking, basisPoints);
    return {
      netMinor,
      vatMinor,
      feeMinor: percentOf(this.ledger.creditedMinor(tx, `fee:${booking.id}`, 'marketplace fee'), basisPoints),
      feeVatMinor: percentOf(this.ledger.creditedMinor(tx, `fee:${booking.id}`, 'VAT'), basisPoints),
    };
  }

  private head(booking: BookingRow, causeKey: string, reason: string) {
    return { causeKey, cause: `Berth ${booking.number}: ${reason}`, currency: booking.currency };
  }
}

const lossOf = ({ netMinor, feeMinor, feeVatMinor }: Share): number => netMinor - feeMinor - feeVatMinor;
