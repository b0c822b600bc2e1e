/** The ledger: written with the changes that cause its entries, and checked against itself. */
import { Inject, Injectable } from '@nestjs/common';
import { type AccountName, type JournalEntry, type LedgerFault, monthOf, monthSpan } from '@skyberth/money';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import type { Db } from '../platform/transaction.js';
import { type AccountSums, LedgerRepository } from './ledger.repository.js';
import { LedgerCheckRepository } from './ledger-check.repository.js';

/** Accounts that can only stand on one side: the other means that something was paid, refunded or released twice. */
const NEVER_DEBIT: readonly string[] = ['refunds', 'dispute reserve', 'payout clearing'] satisfies AccountName[];

@Injectable()
export class LedgerService {
  constructor(
    private readonly repository: LedgerRepository,
    private readonly checks: LedgerCheckRepository,
    @Inject(CLOCK) private readonly clock: ClockPort,
  ) {}

  /** Writes an entry in the transaction of its cause. The same cause is written once, however often it is reported. */
  post(tx: Db, entry: JournalEntry, bookingId: string | null): void {
    if (this.repository.has(tx, entry.causeKey)) return;
    this.repository.add(tx, entry, { atMs: this.clock.nowMs(), bookingId });
  }

  has(tx: Db, causeKey: string): boolean {
    return this.repository.has(tx, causeKey);
  }

  /** What the entry of this cause credited to an account; zero where there is none. */
  creditedMinor(tx: Db, causeKey: string, account: AccountName): number {
    const amountMinor = this.repository.amountsOf(tx, causeKey).get(account) ?? 0;
    return amountMinor === 0 ? 0 : -amountMinor;
  }

  /** What has been promised back to the buyer of a booking and not been returned yet. */
  promisedBackMinor(tx: Db, bookingId: string): number {
    const minor = this.repository.ofBookingMinor(tx, bookingId, 'refunds' satisfies AccountName);
    return minor === 0 ? 0 : -minor;
  }

  /** Everything that was booked about one booking, oldest first. */
  storyOf(bookingId: string): { atMs: number; words: string; amountMinor: number }[] {
    return this.repository.storyOf(bookingId);
  }

  /** What an account holds, all organisations together; debit positive. */
  balanceMinor(account: AccountName, currency: string, organisationId?: string): number {
    return this.repository
      .sums({ account, currency, organisationId })
      .reduce((total, one) => total + one.debitMinor - one.creditMinor, 0);
  }

  /** Everything that does not hold in the journal; empty when it is sound. */
  selfCheck(): LedgerFault[] {
    return [...this.checkByParts()].flat();
  }

  /** The same in parts of a month each, so that a large journal can be checked between other work. */
  *checkByParts(): Generator<LedgerFault[]> {
    yield this.checkOpen();
    for (const month of this.checks.monthsWithEntries()) yield this.checkMonth(month);
    yield this.checkBalances();
  }

  private checkOpen(): LedgerFault[] {
    const open = this.checks.openEntries();
    if (open === 0) return [];
    return [{ kind: 'unbalanced entry', sentence: `${open} entries were begun and never sealed.` }];
  }

  private checkMonth(month: string): LedgerFault[] {
    const span = monthSpan(month);
    const faults: LedgerFault[] = this.checks.unbalanced(span).map(({ entryId, minor }) => ({
      kind: 'unbalanced entry',
      sentence: `The entry ${entryId} is out of balance by ${minor} minor units.`,
    }));
    const kept = new Map(this.repository.sums({ fromMonth: month, toMonth: month }).map((one) => [keyOf(one), one]));
    const anew = this.checks.summedAnew(span);
    const differs = anew.filter((one) => !sameSums(one, kept.get(keyOf(one))));
    if (differs.length > 0 || kept.size !== anew.length) {
      const accounts = differs.map(keyOf).join(', ') || 'an account without postings';
      faults.push({
        kind: 'unbalanced currency',
        sentence: `The sums kept for ${month} are not those of the journal: ${accounts}.`,
      });
    }
    return faults;
  }

  private checkBalances(): LedgerFault[] {
    const faults: LedgerFault[] = [];
    const perCurrency = new Map<string, number>();
    for (const sums of this.repository.sums({})) {
      const minor = sums.debitMinor - sums.creditMinor;
      perCurrency.set(sums.currency, (perCurrency.get(sums.currency) ?? 0) + minor);
      if (minor > 0) faults.push(...this.sideFaults(sums, minor));
    }
    for (const [currency, minor] of perCurrency) {
      if (minor === 0) continue;
      const sentence = `All accounts in ${currency} together are out of balance by ${minor} minor units.`;
      faults.push({ kind: 'unbalanced currency', sentence });
    }
    return faults;
  }

  private sideFaults({ account, organisationId, currency }: AccountSums, minor: number): LedgerFault[] {
    if (NEVER_DEBIT.includes(account)) {
      const sentence = `“${account}” of ${organisationId} stands ${minor} minor units of ${currency} beyond what was set aside.`;
      return [{ kind: 'wrong side', sentence }];
    }
    if (account !== 'owner payable' || this.checks.causedDebtMinor(organisationId, currency) >= minor) return [];
    const sentence = `The owner ${organisationId} owes ${minor} minor units of ${currency} and no cause is known.`;
    return [{ kind: 'owner owes', sentence }];
  }

  /** The month that is running. */
  currentMonth(): string {
    return monthOf(this.clock.nowMs());
  }
}

const keyOf = (sums: AccountSums): string => `${sums.account} ${sums.organisationId} ${sums.currency}`;

const sameSums = (a: AccountSums, b: AccountSums | undefined): boolean =>
  b !== undefined && a.debitMinor === b.debitMinor && a.creditMinor === b.creditMinor && a.postings === b.postings;
