/**
 * The entries that the life of a contact makes. An authorisation makes none: reserved funds are still the buyer's.
 *
 *   sale         receivable +gross          owner payable -net, VAT -vat
 *   capture      provider clearing +gross   receivable -gross
 *   fee          owner payable +fee+vat     marketplace fee -fee, VAT -vat
 *   refund       owner payable +net, VAT +vat   refunds -gross      (and the fee on it goes back to the owner)
 *   returned     refunds +gross             provider clearing -gross
 *   reserve      owner payable +x           dispute reserve -x
 *   payout       owner payable +x           payout clearing -x, then payout clearing +x, provider clearing -x
 */
import { MoneyError } from '../money-error.js';
import { checkedWhole } from '../rounding.js';
import { credit, debit, type EntryHead, type JournalEntry, journalEntry } from './entry.js';

function requirePositive(amounts: Readonly<Record<string, number>>): void {
  for (const [name, amount] of Object.entries(amounts)) {
    if (checkedWhole(amount, name) < 0)
      throw new MoneyError(
        'bad posting',
        `${name} is ${amount}; amounts of a posting are never below zero, the direction is in its kind.`,
        { name, amount },
      );
  }
}

/** The contact is delivered and owed: the operator owes gross, the owner has earned net, VAT is owed to the tax office. */
export function saleEntry(
  head: EntryHead,
  sale: { operatorId: string; ownerId: string; netMinor: number; vatMinor: number },
): JournalEntry {
  requirePositive({ netMinor: sale.netMinor, vatMinor: sale.vatMinor });
  return journalEntry(head, [
    debit('operator receivable', sale.netMinor + sale.vatMinor, sale.operatorId),
    credit('owner payable', sale.netMinor, sale.ownerId),
    credit('VAT', sale.vatMinor),
  ]);
}

/** The provider has collected what was owed, in full or in part. */
export function captureEntry(head: EntryHead, capture: { operatorId: string; amountMinor: number }): JournalEntry {
  requirePositive({ amountMinor: capture.amountMinor });
  return journalEntry(head, [
    debit('provider clearing', capture.amountMinor),
    credit('operator receivable', capture.amountMinor, capture.operatorId),
  ]);
}

/** The marketplace's share of a sale, with VAT on it where it is charged, taken from what the owner has earned. */
export function feeEntry(head: EntryHead, fee: { ownerId: string; feeMinor: number; vatMinor: number }): JournalEntry {
  requirePositive({ feeMinor: fee.feeMinor, vatMinor: fee.vatMinor });
  return journalEntry(head, [
    debit('owner payable', fee.feeMinor + fee.vatMinor, fee.ownerId),
    credit('marketplace fee', fee.feeMinor),
    credit('VAT', fee.vatMinor),
  ]);
}

/** What the provider keeps for its work. */
export function providerCostEntry(head: EntryHead, cost: { amountMinor: number }): JournalEntry {
  requirePositive({ amountMinor: cost.amountMinor });
  return journalEntry(head, [debit('provider costs', cost.amountMinor), credit('provider clearing', cost.amountMinor)]);
}

export interface RefundPosting {
  readonly operatorId: string;
  readonly ownerId: string;
  /** Net part, borne by the owner (from the reserve where it was set aside). */
  readonly netMinor: number;
  readonly vatMinor: number;
  /** Part of `netMinor` that is taken from the dispute reserve. */
  readonly fromReserveMinor: number;
  /** Marketplace fee, and VAT on it, given back to the owner because the sale is undone to that extent. */
  readonly feeMinor: number;
  readonly feeVatMinor: number;
}

/** A refund is decided, in full or in part: it is owed to the operator until the provider has returned it. */
export function refundEntry(head: EntryHead, refund: RefundPosting): JournalEntry {
  const { operatorId, ownerId, netMinor, vatMinor, fromReserveMinor, feeMinor, feeVatMinor } = refund;
  requirePositive({ netMinor, vatMinor, fromReserveMinor, feeMinor, feeVatMinor });
  if (fromReserveMinor > netMinor)
    throw new MoneyError(
      'bad posting',
      `${fromReserveMinor} cannot come out of the reserve for a refund of ${netMinor}.`,
      { fromReserveMinor, netMinor },
    );
  return journalEntry(head, [
    debit('dispute reserve', fromReserveMinor, ownerId),
    debit('owner payable', netMinor - fromReserveMinor, ownerId),
    debit('VAT', vatMinor + feeVatMinor),
    debit('marketplace fee', feeMinor),
    credit('owner payable', feeMinor + feeVatMinor, ownerId),
    credit('refunds', netMinor + vatMinor, operatorId),
  ]);
}

/** A refund that the marketplace bears: the owner keeps what was earned, and the fee stands. */
export function goodwillRefundEntry(
  head: EntryHead,
  refund: { operatorId: string; netMinor: number; vatMinor: number },
): JournalEntry {
  requirePositive({ netMinor: refund.netMinor, vatMinor: refund.vatMinor });
  return journalEntry(head, [
    debit('adjustments', refund.netMinor),
    debit('VAT', refund.vatMinor),
    credit('refunds', refund.netMinor + refund.vatMinor, refund.operatorId),
  ]);
}

/** The provider has returned the refund to the operator's card. */
export function refundReturnedEntry(
  head: EntryHead,
  refund: { operatorId: string; amountMinor: number },
): JournalEntry {
  requirePositive({ amountMinor: refund.amountMinor });
  return journalEntry(head, [
    debit('refunds', refund.amountMinor, refund.operatorId),
    credit('provider clearing', refund.amountMinor),
  ]);
}

/** The refund is set against what the operator still owes (monthly account). */
export function refundCreditedEntry(
  head: EntryHead,
  refund: { operatorId: string; amountMinor: number },
): JournalEntry {
  requirePositive({ amountMinor: refund.amountMinor });
  return journalEntry(head, [
    debit('refunds', refund.amountMinor, refund.operatorId),
    credit('operator receivable', refund.amountMinor, refund.operatorId),
  ]);
}

/** Earnings are set aside while a dispute is open. */
export function reserveEntry(head: EntryHead, reserve: { ownerId: string; amountMinor: number }): JournalEntry {
  requirePositive({ amountMinor: reserve.amountMinor });
  return journalEntry(head, [
    debit('owner payable', reserve.amountMinor, reserve.ownerId),
    credit('dispute reserve', reserve.amountMinor, reserve.ownerId),
  ]);
}

/** What was set aside goes back to the owner's earnings. */
export function releaseEntry(head: EntryHead, release: { ownerId: string; amountMinor: number }): JournalEntry {
  requirePositive({ amountMinor: release.amountMinor });
  return journalEntry(head, [
    debit('dispute reserve', release.amountMinor, release.ownerId),
    credit('owner payable', release.amountMinor, release.ownerId),
  ]);
}

/** A payout was approved by the second person and is on its way. */
export function payoutEntry(head: EntryHead, payout: { ownerId: string; amountMinor: number }): JournalEntry {
  requirePositive({ amountMinor: payout.amountMinor });
  return journalEntry(head, [
    debit('owner payable', payout.amountMinor, payout.ownerId),
    credit('payout clearing', payout.amountMinor, payout.ownerId),
  ]);
}

/** The transfer has left the provider's balance. A failed one is taken back with `reverseEntry` of the payout. */
export function payoutArrivedEntry(head: EntryHead, payout: { ownerId: string; amountMinor: number }): JournalEntry {
  requirePositive({ amountMinor: payout.amountMinor });
  return journalEntry(head, [
    debit('payout clearing', payout.amountMinor, payout.ownerId),
    credit('provider clearing', payout.amountMinor),
  ]);
}

/** Finance corrects an owner's earnings: positive is given to the owner, negative taken. The head's cause is the reason. */
export function adjustmentEntry(head: EntryHead, adjustment: { ownerId: string; amountMinor: number }): JournalEntry {
  return journalEntry(head, [
    debit('adjustments', adjustment.amountMinor),
    credit('owner payable', adjustment.amountMinor, adjustment.ownerId),
  ]);
}

/** The operator's bank took a payment back; the operator owes it again. Winning it back is the reverse of this entry. */
export function chargebackEntry(
  head: EntryHead,
  chargeback: { operatorId: string; amountMinor: number },
): JournalEntry {
  requirePositive({ amountMinor: chargeback.amountMinor });
  return journalEntry(head, [
    debit('operator receivable', chargeback.amountMinor, chargeback.operatorId),
    credit('provider clearing', chargeback.amountMinor),
  ]);
}

/** A debt of an operator that will not be paid. */
export function writeOffEntry(head: EntryHead, loss: { operatorId: string; amountMinor: number }): JournalEntry {
  requirePositive({ amountMinor: loss.amountMinor });
  return journalEntry(head, [
    debit('losses', loss.amountMinor),
    credit('operator receivable', loss.amountMinor, loss.operatorId),
  ]);
}

/** Money moved from the provider's balance to the marketplace's own bank account. */
export function withdrawalEntry(head: EntryHead, withdrawal: { amountMinor: number }): JournalEntry {
  requirePositive({ amountMinor: withdrawal.amountMinor });
  return journalEntry(head, [
    debit('bank', withdrawal.amountMinor),
    credit('provider clearing', withdrawal.amountMinor),
  ]);
}

/** An explained difference between the provider's figure and the ledger's: positive when the provider holds more. */
export function roundingEntry(head: EntryHead, rounding: { differenceMinor: number }): JournalEntry {
  return journalEntry(head, [
    debit('provider clearing', rounding.differenceMinor),
    credit('rounding', rounding.differenceMinor),
  ]);
}
