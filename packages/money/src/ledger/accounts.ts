/**
 * The accounts of the ledger. A posting's amount is positive for a debit and negative for a credit, so assets and costs
 * stand positive, debts and income negative, and every entry sums to zero in its one currency.
 */

/** Accounts that are kept for each organisation. */
export const PARTY_ACCOUNTS = [
  'operator receivable',
  'owner payable',
  'refunds',
  'dispute reserve',
  'payout clearing',
] as const;
/** The marketplace's own accounts. */
export const OWN_ACCOUNTS = [
  'provider clearing',
  'provider costs',
  'marketplace fee',
  'VAT',
  'adjustments',
  'losses',
  'bank',
  'suspense',
  'rounding',
] as const;

export type PartyAccount = (typeof PARTY_ACCOUNTS)[number];
export type OwnAccount = (typeof OWN_ACCOUNTS)[number];
export type AccountName = PartyAccount | OwnAccount;
export const ACCOUNTS: readonly AccountName[] = [...PARTY_ACCOUNTS, ...OWN_ACCOUNTS];

export type AccountKind = 'asset' | 'liability' | 'income' | 'cost';

/** What each account holds, in words for the ledger page, and on which side it usually stands. */
export const ACCOUNT_FACTS: Readonly<Record<AccountName, { readonly kind: AccountKind; readonly holds: string }>> = {
  'operator receivable': { kind: 'asset', holds: 'what an operator owes for contacts, VAT included' },
  'owner payable': { kind: 'liability', holds: 'what a station owner has earned and not yet been paid' },
  refunds: { kind: 'liability', holds: 'what has been promised back to an operator and not yet returned' },
  'dispute reserve': { kind: 'liability', holds: "an owner's earnings set aside until a dispute is decided" },
  'payout clearing': { kind: 'liability', holds: 'payouts approved and on their way to an owner' },
  'provider clearing': { kind: 'asset', holds: 'money that lies with the payment provider' },
  'provider costs': { kind: 'cost', holds: "the payment provider's charges" },
  'marketplace fee': { kind: 'income', holds: "the marketplace's share of contacts" },
  VAT: { kind: 'liability', holds: 'VAT charged and owed to the tax office' },
  adjustments: { kind: 'cost', holds: 'corrections by finance, each with a reason' },
  losses: { kind: 'cost', holds: 'money that will not come back' },
  bank: { kind: 'asset', holds: "the marketplace's own bank account" },
  suspense: { kind: 'liability', holds: 'money at the provider that nobody can explain yet' },
  rounding: { kind: 'cost', holds: 'differences of a minor unit, explained one by one' },
};

export const isPartyAccount = (account: AccountName): account is PartyAccount =>
  (PARTY_ACCOUNTS as readonly string[]).includes(account);
