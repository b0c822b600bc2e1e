/** What the end of a booking does to money: orders to the provider, ledger entries, credit notes, all in its transaction. */
import { Inject, Injectable } from '@nestjs/common';
import { captureEntry, contactFeeMinor, feeEntry, percentOf, saleEntry, vatTreatment } from '@skyberth/money';
import { amountsOf, refundOf } from '../invoices/invoice-amounts.js';
import { InvoiceService } from '../invoices/invoices.service.js';
import { LedgerService } from '../ledger/ledger.service.js';
import { PaymentOrders } from '../payments/payment-orders.js';
import { PaymentRepository } from '../payments/payments.repository.js';
import { CONFIG, type Config } from '../platform/config.js';
import type { Db } from '../platform/transaction.js';
import type { BookingRow } from './bookings.repository.js';
import { PartiesRepository } from './parties.repository.js';

export interface Settlement {
  /** Of the price, given back; 0 to 100. */
  readonly refundPercent: number;
  /** For the credit note and the ledger. */
  readonly reason: string;
}

@Injectable()
export class BookingMoney {
  constructor(
    private readonly invoices: InvoiceService,
    private readonly ledger: LedgerService,
    private readonly orders: PaymentOrders,
    private readonly payments: PaymentRepository,
    private readonly parties: PartiesRepository,
    @Inject(CONFIG) private readonly config: Config,
  ) {}

  /**
   * Settles a booking: what is kept is taken from the reservation and becomes the owner's, less the marketplace's fee; the
   * rest is let go and credited. Answers the credit note's id where one was issued.
   */
  settle(tx: Db, booking: BookingRow, { refundPercent, reason }: Settlement): string | null {
    const back = refundOf(booking.quote, refundPercent);
    const netMinor = booking.netMinor - back.netMinor;
    const vatMinor = booking.vatMinor - back.vatMinor;
    const credit = this.invoices.credit(tx, booking, { refundPercent, subject: reason });
    if (netMinor + vatMinor === 0) {
      this.orders.release(tx, booking.id);
      return credit?.id ?? null;
    }
    const payment = this.payments.ofBooking(booking.id, tx);
    if (payment?.state === 'authorised') this.orders.capture(tx, payment, netMinor + vatMinor);
    this.bookSale(tx, booking, { netMinor, vatMinor, reason });
    return credit?.id ?? null;
  }

  /** The provider has taken the money. */
  captured(tx: Db, booking: BookingRow, capture: { intentId: string; amountMinor: number }): void {
    if (capture.amountMinor === 0) return;
    this.ledger.post(
      tx,
      captureEntry(
        {
          causeKey: `capture:${capture.intentId}`,
          cause: `Card payment of berth ${booking.number}`,
          currency: booking.currency,
        },
        { operatorId: booking.operatorId, amountMinor: capture.amountMinor },
      ),
      booking.id,
    );
  }

  private bookSale(tx: Db, booking: BookingRow, sale: { netMinor: number; vatMinor: number; reason: string }): void {
    const { operatorId, ownerId, currency } = booking;
    const { netMinor, vatMinor } = sale;
    this.ledger.post(
      tx,
      saleEntry(
        { causeKey: `sale:${booking.id}`, cause: `Berth ${booking.number}: ${sale.reason}`, currency },
        { operatorId, ownerId, netMinor, vatMinor },
      ),
      booking.id,
    );
    const feeMinor = contactFeeMinor(netMinor, this.config.marketplace.feeBasisPoints);
    if (feeMinor === 0) return;
    this.ledger.post(
      tx,
      feeEntry(
        { causeKey: `fee:${booking.id}`, cause: `Marketplace fee on berth ${booking.number}`, currency },
        { ownerId, feeMinor, vatMinor: percentOf(feeMinor, this.feeVatBasisPoints(tx, booking)) },
      ),
      booking.id,
    );
  }

  /** The fee is a service of the marketplace to the owner and bears VAT of its own. */
  private feeVatBasisPoints(tx: Db, booking: BookingRow): number {
    const owner = this.parties.organisation(booking.ownerId, tx);
    const { address, vatNumber } = this.config.marketplace;
    return vatTreatment({
      supplier: { country: address.country, vatNumber },
      customer: { country: owner.address.country, vatNumber: owner.vatNumber },
      dateMs: booking.losMs,
    }).rateBasisPoints;
  }
}

/** Refuses to sell what could not be invoiced as shown; throws an internal error, since no person can do anything about it. */
export const checkInvoiceable = (quote: BookingRow['quote']): void => void amountsOf(quote);
