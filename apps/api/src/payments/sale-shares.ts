/** Which part of a sale belongs to so much of what was taken for it: net, VAT and the marketplace's fee. */
import { Injectable } from '@nestjs/common';
import { divideHalfUp } from '@skyberth/money';
import { LedgerService } from '../ledger/ledger.service.js';
import type { Db } from '../platform/transaction.js';
import type { PaymentRow } from './payments.repository.js';

export interface SaleShare {
  readonly netMinor: number;
  readonly vatMinor: number;
  readonly feeMinor: number;
  readonly feeVatMinor: number;
}

@Injectable()
export class SaleShares {
  constructor(private readonly ledger: LedgerService) {}

  /**
   * The share between two sums given back, `beforeMinor` and `afterMinor` of what was captured. Shares are taken of all that
   * was given back before and after, so that parts in any number of steps add up to the sale, to the cent.
   */
  between(tx: Db, payment: PaymentRow, span: { beforeMinor: number; afterMinor: number }): SaleShare {
    const { beforeMinor, afterMinor } = span;
    const share = (totalMinor: number): number =>
      part(totalMinor, afterMinor, payment) - part(totalMinor, beforeMinor, payment);
    const sale = `sale:${payment.bookingId}`;
    const fee = `fee:${payment.bookingId}`;
    const vatMinor = share(this.ledger.creditedMinor(tx, sale, 'VAT'));
    return {
      netMinor: afterMinor - beforeMinor - vatMinor,
      vatMinor,
      feeMinor: share(this.ledger.creditedMinor(tx, fee, 'marketplace fee')),
      feeVatMinor: share(this.ledger.creditedMinor(tx, fee, 'VAT')),
    };
  }
}

const part = (totalMinor: number, ofMinor: number, payment: PaymentRow): number =>
  divideHalfUp(BigInt(totalMinor) * BigInt(ofMinor), BigInt(payment.capturedMinor));
