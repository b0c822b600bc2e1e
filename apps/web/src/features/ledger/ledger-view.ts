/** The ledger as finance reads it: accounts with what they hold, totals, and the filter in the address. */
import type { ResponseOf, routes } from '@skyberth/shared';

type Balance = ResponseOf<typeof routes.balances>['items'][number];

export type Side = 'asset' | 'liability' | 'income' | 'cost';

/** What each account holds, in words. An account that is not here is shown by its name alone. */
const ACCOUNTS: Readonly<Record<string, { readonly side: Side; readonly holds: string }>> = {
  'operator receivable': { side: 'asset', holds: 'what operators owe, VAT included' },
  'provider clearing': { side: 'asset', holds: 'money with the payment provider' },
  bank: { side: 'asset', holds: 'our own bank account' },
  'owner payable': { side: 'liability', holds: 'what owners have earned and not been paid' },
  refunds: { side: 'liability', holds: 'promised back and not yet returned' },
  'dispute reserve': { side: 'liability', holds: 'set aside until a dispute is decided' },
  'payout clearing': { side: 'liability', holds: 'payouts on their way to owners' },
  VAT: { side: 'liability', holds: 'owed to the tax office' },
  'marketplace fee': { side: 'income', holds: 'our share of contacts' },
  'provider costs': { side: 'cost', holds: 'charges of the payment provider' },
  adjustments: { side: 'cost', holds: 'corrections, each with a reason' },
  losses: { side: 'cost', holds: 'money that will not come back' },
  rounding: { side: 'cost', holds: 'differences of a minor unit' },
};

const SIDES: readonly Side[] = ['asset', 'liability', 'income', 'cost'];
export const SIDE_WORDS: Readonly<Record<Side, string>> = {
  asset: 'What is there',
  liability: 'What is owed',
  income: 'Earned',
  cost: 'Spent',
};

export interface AccountRow {
  readonly account: string;
  readonly side: Side | null;
  readonly holds: string;
  readonly balanceMinor: number;
}

export interface CurrencyBalances {
  readonly currency: string;
  readonly rows: readonly AccountRow[];
  /** Debits are positive and credits negative, so this is zero when the ledger is right. */
  readonly sumMinor: number;
}

/** Balances by currency, in the order of the sides. */
export function byCurrency(balances: readonly Balance[]): CurrencyBalances[] {
  const currencies = [...new Set(balances.map((balance) => balance.currency))].sort();
  return currencies.map((currency) => {
    const rows = balances
      .filter((balance) => balance.currency === currency)
      .map(({ account, balanceMinor }): AccountRow => {
        const facts = ACCOUNTS[account];
        return { account, side: facts?.side ?? null, holds: facts?.holds ?? '', balanceMinor };
      })
      .sort((a, b) => orderOf(a.side) - orderOf(b.side) || a.account.localeCompare(b.account));
    return { currency, rows, sumMinor: rows.reduce((sum, row) => sum + row.balanceMinor, 0) };
  });
}

const orderOf = (side: Side | null): number => (side === null ? SIDES.length : SIDES.indexOf(side));

export interface LedgerFilter {
  readonly account: string | undefined;
  readonly page: number;
}

const LONGEST_ACCOUNT = 60;

/** The filter in the address; what cannot be read is left out. */
export function readFilter(search: URLSearchParams): LedgerFilter {
  const account = search.get('account')?.slice(0, LONGEST_ACCOUNT) || undefined;
  const page = Number(search.get('page'));
  return { account, page: Number.isInteger(page) && page >= 1 ? page : 1 };
}

export function writeFilter({ account, page }: LedgerFilter): Record<string, string> {
  return { ...(account ? { account } : {}), ...(page > 1 ? { page: String(page) } : {}) };
}

export const accountNames = (): string[] => Object.keys(ACCOUNTS);
