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
  suspense: { side: 'liability', holds: 'at the provider, not explained yet' },
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
  readonly currency: string | undefined;
  readonly organisationId: string | undefined;
  readonly bookingNumber: number | undefined;
  readonly fromMonth: string | undefined;
  readonly toMonth: string | undefined;
}

const LONGEST_ACCOUNT = 60;
const FORMS = {
  currency: /^[A-Z]{3}$/,
  organisationId: /^[0-9a-f-]{36}$/,
  fromMonth: /^\d{4}-(0[1-9]|1[0-2])$/,
  toMonth: /^\d{4}-(0[1-9]|1[0-2])$/,
} as const;

/** The filter in the address; what cannot be read is left out. */
export function readFilter(search: URLSearchParams): LedgerFilter {
  const read = (name: keyof typeof FORMS) => {
    const text = search.get(name);
    return text !== null && FORMS[name].test(text) ? text : undefined;
  };
  const berth = Number(search.get('berth'));
  return {
    account: search.get('account')?.slice(0, LONGEST_ACCOUNT) || undefined,
    currency: read('currency'),
    organisationId: read('organisationId'),
    bookingNumber: Number.isInteger(berth) && berth >= 1 ? berth : undefined,
    fromMonth: read('fromMonth'),
    toMonth: read('toMonth'),
  };
}

export function writeFilter({ bookingNumber, ...texts }: LedgerFilter): Record<string, string> {
  const given = Object.entries(texts).filter((entry): entry is [string, string] => entry[1] !== undefined);
  return { ...Object.fromEntries(given), ...(bookingNumber === undefined ? {} : { berth: String(bookingNumber) }) };
}

export const accountNames = (): string[] => Object.keys(ACCOUNTS);

/** Accounts that are kept for each organisation. */
const PARTY_ACCOUNTS = ['operator receivable', 'owner payable', 'refunds', 'dispute reserve', 'payout clearing'];
export const isPartyAccount = (account: string): boolean => PARTY_ACCOUNTS.includes(account);

/** The running month and so many before it, newest first, UTC. */
export function monthsBack(count: number, nowMs: number = Date.now()): string[] {
  const now = new Date(nowMs);
  return Array.from({ length: count }, (_, back) =>
    new Date(Date.UTC(now.getUTCFullYear(), now.getUTCMonth() - back)).toISOString().slice(0, 7),
  );
}

export interface ChartMonth {
  readonly month: string;
  /** What operators were charged, VAT included. */
  readonly soldMinor: number;
  readonly feeMinor: number;
  /** At the end of the month. */
  readonly owedMinor: number;
}

const MONTHS_DRAWN = 12;

/** The last twelve months that have entries. An account without a line in a month keeps what it had. */
export function chartMonths(items: ResponseOf<typeof routes.ledgerMonths>['items']): ChartMonth[] {
  const months = [...new Set(items.map((item) => item.month))].sort();
  let owedMinor = 0;
  const rows = months.map((month) => {
    const of = (account: string) => items.find((item) => item.month === month && item.account === account);
    const payable = of('owner payable');
    owedMinor = payable ? -payable.balanceMinor : owedMinor;
    const receivable = of('operator receivable');
    const fee = of('marketplace fee');
    return {
      month,
      soldMinor: receivable?.debitMinor ?? 0,
      feeMinor: (fee?.creditMinor ?? 0) - (fee?.debitMinor ?? 0),
      owedMinor,
    };
  });
  return rows.slice(-MONTHS_DRAWN);
}
