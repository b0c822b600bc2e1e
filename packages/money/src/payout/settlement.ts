/** What postings of an owner's account are, in a payout: each is in one column, and the columns add up to the account. */
import { sumMinor } from '../amount.js';

/** One posting of `owner payable`; `amountMinor` is debit positive, so earnings are negative. */
export interface OwnerPosting {
  /** The cause key of its entry, such as `sale:<booking>`. */
  readonly causeKey: string;
  readonly amountMinor: number;
  readonly bookingId: string | null;
}

export interface PayoutSums {
  readonly contactCount: number;
  readonly settledMinor: number;
  readonly feeMinor: number;
  /** Refunds less the fee given back with them. */
  readonly refundMinor: number;
  /** Set aside, less what was given free again; negative where more was given free. */
  readonly reserveMinor: number;
  readonly adjustedMinor: number;
  /** settled - fee - refunds - reserve + adjusted: the credit balance of these postings, to the cent. */
  readonly toPayMinor: number;
}

type Column = 'settled' | 'fee' | 'refund' | 'reserve' | 'adjusted';

/** The column of a posting, by the cause of its entry; what has no column of its own is an adjustment. */
function columnOf({ causeKey }: OwnerPosting): Column {
  const kind = causeKey.slice(0, causeKey.indexOf(':'));
  if (kind === 'sale') return 'settled';
  if (kind === 'fee') return 'fee';
  if (kind === 'refund' || kind === 'dispute-refund') return 'refund';
  if (kind.endsWith('-reserve') || kind.endsWith('-release')) return 'reserve';
  return 'adjusted';
}

/** The sums of a line of a payout run over the postings that it settles. */
export function payoutSums(postings: readonly OwnerPosting[]): PayoutSums {
  /** Credit positive. */
  const column = (name: Column): number => {
    const debitMinor = sumMinor(postings.filter((one) => columnOf(one) === name).map((one) => one.amountMinor));
    return debitMinor === 0 ? 0 : -debitMinor;
  };
  const negated = (minor: number): number => (minor === 0 ? 0 : -minor);
  const sales = postings.filter((one) => columnOf(one) === 'settled');
  return {
    contactCount: new Set(sales.map((one) => one.bookingId)).size,
    settledMinor: column('settled'),
    feeMinor: negated(column('fee')),
    refundMinor: negated(column('refund')),
    reserveMinor: negated(column('reserve')),
    adjustedMinor: column('adjusted'),
    toPayMinor: negated(sumMinor(postings.map((one) => one.amountMinor))),
  };
}
