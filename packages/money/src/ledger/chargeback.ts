/**
 * What a chargeback does after the money has left (`chargebackEntry`): the owner's part of the contact is set aside with
 * `reserveEntry`; then the bank decides.
 *
 *   won    provider clearing +gross   receivable -gross, and the reserve goes back with `releaseEntry`
 *   lost   reserve, owner payable, VAT and fee bear it, and the operator owes nothing any more
 */
import { refundEntry } from './builders.js';
import { credit, debit, type EntryHead, type JournalEntry, journalEntry } from './entry.js';

/** The bank decided for the marketplace: the money is back with the provider. */
export function chargebackWonEntry(head: EntryHead, won: { operatorId: string; amountMinor: number }): JournalEntry {
  return journalEntry(head, [
    debit('provider clearing', won.amountMinor),
    credit('operator receivable', won.amountMinor, won.operatorId),
  ]);
}

export interface LostChargeback {
  readonly operatorId: string;
  readonly ownerId: string;
  readonly netMinor: number;
  readonly vatMinor: number;
  readonly feeMinor: number;
  readonly feeVatMinor: number;
  /** What was set aside of the owner's earnings; at most `netMinor`. */
  readonly reservedMinor: number;
}

/**
 * The bank decided for the payer: the sale is undone to that extent as by a refund, which is set against what the operator
 * owes again since the money left.
 */
export function chargebackLostEntry(head: EntryHead, lost: LostChargeback): JournalEntry {
  const { operatorId, ownerId, netMinor, vatMinor, feeMinor, feeVatMinor, reservedMinor } = lost;
  const refund = refundEntry(head, {
    operatorId,
    ownerId,
    netMinor,
    vatMinor,
    feeMinor,
    feeVatMinor,
    fromReserveMinor: reservedMinor,
  });
  const postings = refund.postings.map((posting) =>
    posting.account === 'refunds' ? { ...posting, account: 'operator receivable' as const } : posting,
  );
  return journalEntry(head, postings);
}
