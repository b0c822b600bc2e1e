/** Journal entries: balanced, in one currency, tied to a cause. Building one that is not balanced is impossible. */
import { sumMinor } from '../amount.js';
import { currencyExponent } from '../currencies.js';
import { MoneyError } from '../money-error.js';
import { type AccountName, isPartyAccount } from './accounts.js';

export interface Posting {
  readonly account: AccountName;
  /** Whose sub-account; `null` for the marketplace's own accounts. */
  readonly organisationId: string | null;
  /** Debit positive, credit negative, never zero. */
  readonly amountMinor: number;
}

export interface JournalEntry {
  /** Unique: the same cause can be written once only, such as `capture:<booking>`. */
  readonly causeKey: string;
  /** The cause in words. */
  readonly cause: string;
  readonly currency: string;
  readonly postings: readonly Posting[];
}

/** What every builder needs besides its amounts. */
export interface EntryHead {
  readonly causeKey: string;
  readonly cause: string;
  readonly currency: string;
}

/** Positive amounts become debits. */
export const debit = (account: AccountName, amountMinor: number, organisationId: string | null = null): Posting => ({
  account,
  organisationId,
  amountMinor,
});
/** Positive amounts become credits. */
export const credit = (account: AccountName, amountMinor: number, organisationId: string | null = null): Posting => ({
  account,
  organisationId,
  amountMinor: amountMinor === 0 ? 0 : -amountMinor,
});

/**
 * The entry made of these postings. Postings of zero are left out. Throws `bad posting` for an empty cause, a party account
 * without its organisation or an own account with one, or when nothing is left; `unbalanced` when the sum is not zero.
 */
export function journalEntry(head: EntryHead, postings: readonly Posting[]): JournalEntry {
  currencyExponent(head.currency);
  if (head.causeKey.trim() === '' || head.cause.trim() === '')
    throw new MoneyError('bad posting', 'A journal entry needs its cause.');
  const kept = postings.filter((posting) => posting.amountMinor !== 0);
  for (const posting of kept) {
    if (isPartyAccount(posting.account) !== (posting.organisationId !== null)) {
      const what =
        posting.organisationId === null ? 'needs the organisation it belongs to' : 'belongs to the marketplace alone';
      throw new MoneyError('bad posting', `The account “${posting.account}” ${what}.`, { posting });
    }
  }
  const sum = sumMinor(kept.map((posting) => posting.amountMinor));
  if (sum !== 0)
    throw new MoneyError(
      'unbalanced',
      `The entry “${head.cause}” is out of balance by ${sum} minor units of ${head.currency}.`,
      { sum },
    );
  if (kept.length === 0) throw new MoneyError('bad posting', `The entry “${head.cause}” moves nothing.`);
  return { causeKey: head.causeKey, cause: head.cause, currency: head.currency, postings: kept };
}

/** The opposite entry: how a mistake is taken back, since rows never change. */
export function reverseEntry(
  entry: JournalEntry,
  head: { readonly causeKey: string; readonly cause: string },
): JournalEntry {
  return journalEntry(
    { ...head, currency: entry.currency },
    entry.postings.map((posting) => ({ ...posting, amountMinor: -posting.amountMinor })),
  );
}
