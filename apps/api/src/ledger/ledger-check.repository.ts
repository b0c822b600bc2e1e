/** What the checks of the ledger ask the database, and where they keep what they found. */
import { Inject, Injectable } from '@nestjs/common';
import {
  closedMonths,
  journalEntries,
  journalPostings,
  ledgerChecks,
  ledgerTotals,
  type SkyberthDatabase,
} from '@skyberth/drizzle';
import { and, asc, count, desc, eq, gt, gte, like, lt, ne, or, sql, sum } from 'drizzle-orm';
import { DATABASE } from '../platform/database.module.js';
import { newId } from '../platform/ids.js';
import type { Db } from '../platform/transaction.js';
import type { AccountSums } from './ledger.repository.js';

export type LedgerCheckRow = typeof ledgerChecks.$inferSelect;

/** Beginnings of the cause keys of entries that may take more from an owner than there is. */
const DEBT_CAUSES = ['refund:', 'chargeback', 'dispute', 'adjust'] as const;

@Injectable()
export class LedgerCheckRepository {
  constructor(@Inject(DATABASE) private readonly db: SkyberthDatabase) {}

  /** Every month that has entries, oldest first. */
  monthsWithEntries(): string[] {
    return this.db
      .selectDistinct({ month: ledgerTotals.month })
      .from(ledgerTotals)
      .orderBy(asc(ledgerTotals.month))
      .all()
      .map((row) => row.month);
  }

  /** Entries of a span whose postings do not sum to zero. */
  unbalanced(span: { fromMs: number; toMs: number }): { entryId: string; minor: number }[] {
    const minor = sql<number>`sum(${journalPostings.amountMinor})`;
    return this.db
      .select({ entryId: journalPostings.entryId, minor })
      .from(journalPostings)
      .where(and(gte(journalPostings.atMs, span.fromMs), lt(journalPostings.atMs, span.toMs)))
      .groupBy(journalPostings.entryId)
      .having(ne(minor, 0))
      .all();
  }

  /** The postings of a span summed anew, to hold against the sums that are kept. */
  summedAnew(span: { fromMs: number; toMs: number }): AccountSums[] {
    return this.db
      .select({
        account: journalPostings.account,
        organisationId: sql<string>`coalesce(${journalPostings.organisationId}, '')`,
        currency: sql<string>`${journalPostings.currency}`,
        debitMinor: sql<number>`sum(max(${journalPostings.amountMinor}, 0))`,
        creditMinor: sql<number>`sum(max(-${journalPostings.amountMinor}, 0))`,
        postings: sql<number>`count(*)`,
      })
      .from(journalPostings)
      .where(and(gte(journalPostings.atMs, span.fromMs), lt(journalPostings.atMs, span.toMs)))
      .groupBy(journalPostings.account, journalPostings.organisationId, journalPostings.currency)
      .all();
  }

  openEntries(): number {
    const row = this.db.select({ rows: count() }).from(journalEntries).where(eq(journalEntries.sealed, 0)).get();
    return row?.rows ?? 0;
  }

  /** How much of an owner's debits have a cause that can leave a debt: refunds, chargebacks, disputes, adjustments. */
  causedDebtMinor(ownerId: string, currency: string): number {
    const row = this.db
      .select({ minor: sum(journalPostings.amountMinor).mapWith(Number) })
      .from(journalPostings)
      .innerJoin(journalEntries, eq(journalEntries.id, journalPostings.entryId))
      .where(
        and(
          eq(journalPostings.organisationId, ownerId),
          eq(journalPostings.account, 'owner payable'),
          eq(journalPostings.currency, currency),
          gt(journalPostings.amountMinor, 0),
          or(...DEBT_CAUSES.map((cause) => like(journalEntries.causeKey, `${cause}%`))),
        ),
      )
      .get();
    return row?.minor ?? 0;
  }

  addCheck(tx: Db, check: Omit<LedgerCheckRow, 'id'>): void {
    tx.insert(ledgerChecks)
      .values({ id: newId(), ...check })
      .run();
  }

  lastCheck(): LedgerCheckRow | undefined {
    return this.db.select().from(ledgerChecks).orderBy(desc(ledgerChecks.atMs), desc(ledgerChecks.id)).limit(1).get();
  }

  closedMonths(): (typeof closedMonths.$inferSelect)[] {
    return this.db.select().from(closedMonths).orderBy(desc(closedMonths.month)).all();
  }
}
