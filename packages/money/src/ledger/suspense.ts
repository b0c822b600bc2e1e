/** Money at the provider that nobody can explain yet stands on an account of its own until somebody can. */
import { credit, debit, type EntryHead, type JournalEntry, journalEntry } from './entry.js';

/** Positive: the provider holds more than the ledger knows why; negative: less. Explained later by `reverseEntry`. */
export function suspenseEntry(head: EntryHead, movement: { amountMinor: number }): JournalEntry {
  return journalEntry(head, [
    debit('provider clearing', movement.amountMinor),
    credit('suspense', movement.amountMinor),
  ]);
}
