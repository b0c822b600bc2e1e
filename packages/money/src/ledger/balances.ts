/** Balances are sums over the journal and nothing else; the self-check proves what must hold between them. */
import { checkedWhole } from '../rounding.js';
import type { AccountName } from './accounts.js';
import type { JournalEntry } from './entry.js';

export interface Balance {
  readonly account: AccountName;
  readonly organisationId: string | null;
  readonly currency: string;
  /** Debit positive, credit negative. */
  readonly amountMinor: number;
}

const keyOf = (account: AccountName, organisationId: string | null, currency: string): string =>
  `${currency}|${account}|${organisationId ?? ''}`;

/** One balance for each account, organisation and currency that was ever posted to, zero ones included, sorted. */
export function balancesOf(entries: Iterable<JournalEntry>): Balance[] {
  const sums = new Map<string, Balance>();
  for (const entry of entries) {
    for (const { account, organisationId, amountMinor } of entry.postings) {
      const key = keyOf(account, organisationId, entry.currency);
      const before = sums.get(key)?.amountMinor ?? 0;
      sums.set(key, {
        account,
        organisationId,
        currency: entry.currency,
        amountMinor: checkedWhole(before + amountMinor, 'A balance'),
      });
    }
  }
  return [...sums.entries()].sort(([a], [b]) => (a < b ? -1 : 1)).map(([, balance]) => balance);
}

export interface LedgerFault {
  readonly kind:
    | 'unbalanced entry'
    | 'repeated cause'
    | 'unbalanced currency'
    | 'owner owes'
    | 'wrong side'
    | 'provider differs';
  readonly sentence: string;
}

/** Accounts that can only stand on one side: the other means that something was paid, refunded or released twice. */
const NEVER_DEBIT: readonly AccountName[] = ['refunds', 'dispute reserve', 'payout clearing'];

/**
 * Everything that must hold, as a list of what does not: each entry and each currency sums to zero, no cause is written
 * twice, nothing is returned, released or paid out beyond what was set aside, no owner owes the marketplace without
 * standing in `ownersInDebtWithCause`, and provider clearing equals the provider's own figure where it is given.
 */
export function checkLedger(
  entries: readonly JournalEntry[],
  known: {
    readonly providerBalanceMinor?: Readonly<Record<string, number>>;
    readonly ownersInDebtWithCause?: ReadonlySet<string>;
  } = {},
): LedgerFault[] {
  const faults: LedgerFault[] = [];
  const causes = new Set<string>();
  for (const entry of entries) {
    const sum = entry.postings.reduce((total, posting) => total + posting.amountMinor, 0);
    if (sum !== 0)
      faults.push({
        kind: 'unbalanced entry',
        sentence: `The entry “${entry.causeKey}” is out of balance by ${sum} minor units of ${entry.currency}.`,
      });
    if (causes.has(entry.causeKey))
      faults.push({ kind: 'repeated cause', sentence: `The cause “${entry.causeKey}” was written more than once.` });
    causes.add(entry.causeKey);
  }
  const balances = balancesOf(entries);
  const perCurrency = new Map<string, number>();
  for (const balance of balances) {
    perCurrency.set(balance.currency, (perCurrency.get(balance.currency) ?? 0) + balance.amountMinor);
    faults.push(...sideFaults(balance, known.ownersInDebtWithCause));
  }
  for (const [currency, sum] of perCurrency) {
    if (sum !== 0)
      faults.push({
        kind: 'unbalanced currency',
        sentence: `All accounts in ${currency} together are out of balance by ${sum} minor units.`,
      });
  }
  for (const [currency, providerMinor] of Object.entries(known.providerBalanceMinor ?? {})) {
    const ours =
      balances.find((balance) => balance.account === 'provider clearing' && balance.currency === currency)
        ?.amountMinor ?? 0;
    if (ours !== providerMinor)
      faults.push({
        kind: 'provider differs',
        sentence: `The provider holds ${providerMinor} minor units of ${currency}, the ledger says ${ours}; the difference is ${providerMinor - ours}.`,
      });
  }
  return faults;
}

function sideFaults(balance: Balance, ownersInDebtWithCause: ReadonlySet<string> = new Set()): LedgerFault[] {
  if (balance.amountMinor <= 0) return [];
  const whose = balance.organisationId ?? '';
  if (NEVER_DEBIT.includes(balance.account)) {
    return [
      {
        kind: 'wrong side',
        sentence: `“${balance.account}” of ${whose} stands ${balance.amountMinor} minor units of ${balance.currency} beyond what was set aside.`,
      },
    ];
  }
  if (balance.account === 'owner payable' && !ownersInDebtWithCause.has(whose)) {
    return [
      {
        kind: 'owner owes',
        sentence: `The owner ${whose} owes ${balance.amountMinor} minor units of ${balance.currency} and no cause is known.`,
      },
    ];
  }
  return [];
}
