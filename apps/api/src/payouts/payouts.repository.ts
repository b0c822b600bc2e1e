/** Payout runs in the database. */
import { Inject, Injectable } from '@nestjs/common';
import {
  journalEntries,
  journalPostings,
  organisations,
  payments,
  payoutItems,
  payoutLines,
  payoutRuns,
  people,
  type SkyberthDatabase,
} from '@skyberth/drizzle';
import type { OwnerPosting } from '@skyberth/money';
import { and, asc, count, desc, eq, inArray, isNull, max, notInArray, or, sql } from 'drizzle-orm';
import { DATABASE } from '../platform/database.module.js';
import { notFound } from '../platform/domain-error.js';
import type { Db } from '../platform/transaction.js';

export type RunRow = typeof payoutRuns.$inferSelect;
export type LineRow = typeof payoutLines.$inferSelect;
export interface OpenPosting extends OwnerPosting {
  readonly ownerId: string;
  readonly entryId: string;
  readonly line: number;
}

/** Money that the provider has not taken yet is not paid out. */
const NOT_TAKEN = ['waiting for the buyer', 'authorised', 'capturing', 'failed'] as const;

@Injectable()
export class PayoutRepository {
  constructor(@Inject(DATABASE) private readonly db: SkyberthDatabase) {}

  /** Postings of owners' accounts that no live line settles, oldest first; the payouts' own are no earnings. */
  openPostings(db: Db, currency: string): OpenPosting[] {
    return db
      .select({
        ownerId: sql<string>`${journalPostings.organisationId}`,
        entryId: journalPostings.entryId,
        line: journalPostings.line,
        amountMinor: journalPostings.amountMinor,
        causeKey: journalEntries.causeKey,
        bookingId: journalEntries.bookingId,
      })
      .from(journalPostings)
      .innerJoin(journalEntries, eq(journalEntries.id, journalPostings.entryId))
      .leftJoin(
        payoutItems,
        and(
          eq(payoutItems.entryId, journalPostings.entryId),
          eq(payoutItems.postingLine, journalPostings.line),
          eq(payoutItems.live, true),
        ),
      )
      .leftJoin(payments, eq(payments.bookingId, journalEntries.bookingId))
      .where(
        and(
          eq(journalPostings.account, 'owner payable'),
          eq(journalPostings.currency, currency),
          eq(journalEntries.sealed, 1),
          isNull(payoutItems.id),
          sql`${journalEntries.causeKey} NOT LIKE 'payout:%' AND ${journalEntries.causeKey} NOT LIKE 'payout-failed:%'`,
          or(isNull(payments.state), notInArray(payments.state, [...NOT_TAKEN])),
        ),
      )
      .orderBy(asc(journalPostings.atMs), asc(journalPostings.entryId), asc(journalPostings.line))
      .all();
  }

  itemsOf(db: Db, lineId: string): OwnerPosting[] {
    return db
      .select({
        amountMinor: journalPostings.amountMinor,
        causeKey: journalEntries.causeKey,
        bookingId: journalEntries.bookingId,
      })
      .from(payoutItems)
      .innerJoin(
        journalPostings,
        and(eq(journalPostings.entryId, payoutItems.entryId), eq(journalPostings.line, payoutItems.postingLine)),
      )
      .innerJoin(journalEntries, eq(journalEntries.id, payoutItems.entryId))
      .where(eq(payoutItems.lineId, lineId))
      .all();
  }

  /** The posting of an entry on an owner's account. */
  postingOf(tx: Db, causeKey: string): { entryId: string; line: number } | undefined {
    return tx
      .select({ entryId: journalPostings.entryId, line: journalPostings.line })
      .from(journalPostings)
      .innerJoin(journalEntries, eq(journalEntries.id, journalPostings.entryId))
      .where(and(eq(journalEntries.causeKey, causeKey), eq(journalPostings.account, 'owner payable')))
      .get();
  }

  addItems(tx: Db, items: readonly (typeof payoutItems.$inferInsert)[]): void {
    for (const item of items) tx.insert(payoutItems).values(item).run();
  }

  /** What a line would have settled comes in the next run. */
  giveFree(tx: Db, lineId: string): void {
    const live = and(eq(payoutItems.lineId, lineId), eq(payoutItems.live, true));
    tx.update(payoutItems).set({ live: false }).where(live).run();
  }

  nextNumber(tx: Db): number {
    return (
      (tx
        .select({ last: max(payoutRuns.number) })
        .from(payoutRuns)
        .get()?.last ?? 0) + 1
    );
  }

  openRun(tx: Db, currency: string): RunRow | undefined {
    const open = and(eq(payoutRuns.currency, currency), inArray(payoutRuns.state, ['draft', 'reviewed']));
    return tx.select().from(payoutRuns).where(open).get();
  }

  addRun(tx: Db, run: typeof payoutRuns.$inferInsert): void {
    tx.insert(payoutRuns).values(run).run();
  }

  changeRun(tx: Db, id: string, change: Partial<RunRow>): void {
    tx.update(payoutRuns).set(change).where(eq(payoutRuns.id, id)).run();
  }

  run(db: Db, id: string): RunRow {
    const row = db.select().from(payoutRuns).where(eq(payoutRuns.id, id)).get();
    if (!row) throw notFound('payout run');
    return row;
  }

  runs(page: number, pageSize: number): { rows: RunRow[]; total: number } {
    const total = this.db.select({ total: count() }).from(payoutRuns).get()?.total ?? 0;
    const rows = this.db
      .select()
      .from(payoutRuns)
      .orderBy(desc(payoutRuns.number))
      .limit(pageSize)
      .offset((page - 1) * pageSize)
      .all();
    return { rows, total };
  }

  addLine(tx: Db, line: typeof payoutLines.$inferInsert): void {
    tx.insert(payoutLines).values(line).run();
  }

  changeLine(tx: Db, id: string, change: Partial<LineRow>): void {
    tx.update(payoutLines).set(change).where(eq(payoutLines.id, id)).run();
  }

  line(db: Db, id: string): LineRow {
    const row = db.select().from(payoutLines).where(eq(payoutLines.id, id)).get();
    if (!row) throw notFound('payout line');
    return row;
  }

  lines(db: Db, runId: string): LineRow[] {
    return db.select().from(payoutLines).where(eq(payoutLines.runId, runId)).orderBy(asc(payoutLines.id)).all();
  }

  linesOfOwner(ownerId: string): { line: LineRow; run: RunRow }[] {
    return this.db
      .select({ line: payoutLines, run: payoutRuns })
      .from(payoutLines)
      .innerJoin(payoutRuns, eq(payoutRuns.id, payoutLines.runId))
      .where(and(eq(payoutLines.ownerId, ownerId), eq(payoutRuns.state, 'approved')))
      .orderBy(desc(payoutRuns.number))
      .limit(200)
      .all();
  }

  /** What an owner's account holds in each currency it ever had, credit positive. */
  dueByCurrency(ownerId: string): { currency: string; dueMinor: number }[] {
    return this.db
      .select({
        currency: sql<string>`${journalPostings.currency}`,
        dueMinor: sql<number>`-sum(${journalPostings.amountMinor})`,
      })
      .from(journalPostings)
      .where(and(eq(journalPostings.organisationId, ownerId), eq(journalPostings.account, 'owner payable')))
      .groupBy(journalPostings.currency)
      .all();
  }

  organisation(db: Db, id: string): typeof organisations.$inferSelect {
    const row = db.select().from(organisations).where(eq(organisations.id, id)).get();
    if (!row) throw notFound('organisation');
    return row;
  }

  giveAccount(tx: Db, organisationId: string, providerAccountId: string): void {
    tx.update(organisations).set({ providerAccountId }).where(eq(organisations.id, organisationId)).run();
  }

  personName(id: string | null): string | null {
    if (id === null) return null;
    return this.db.select({ name: people.name }).from(people).where(eq(people.id, id)).get()?.name ?? null;
  }
}
