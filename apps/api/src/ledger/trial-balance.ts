/** Opening, debits, credits and closing of every account in a month. */
import type { TrialBalanceLine } from '@skyberth/drizzle';
import type { LedgerRepository } from './ledger.repository.js';

/** One line an account and currency that was ever used up to the month's end, by currency and account. */
export function trialBalance(repository: Pick<LedgerRepository, 'sums'>, month: string): TrialBalanceLine[] {
  const lines = new Map<
    string,
    { account: string; currency: string; openingMinor: number; debitMinor: number; creditMinor: number }
  >();
  const lineOf = (account: string, currency: string) => {
    const key = `${currency} ${account}`;
    const found = lines.get(key) ?? { account, currency, openingMinor: 0, debitMinor: 0, creditMinor: 0 };
    lines.set(key, found);
    return found;
  };
  for (const sums of repository.sums({ before: month })) {
    lineOf(sums.account, sums.currency).openingMinor += sums.debitMinor - sums.creditMinor;
  }
  for (const sums of repository.sums({ fromMonth: month, toMonth: month })) {
    const line = lineOf(sums.account, sums.currency);
    line.debitMinor += sums.debitMinor;
    line.creditMinor += sums.creditMinor;
  }
  return [...lines.entries()]
    .sort(([a], [b]) => (a < b ? -1 : 1))
    .map(([, line]) => ({ ...line, closingMinor: line.openingMinor + line.debitMinor - line.creditMinor }));
}
