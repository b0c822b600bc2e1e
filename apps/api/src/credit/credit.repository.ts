/** Monthly accounts in the database. */
import { Inject, Injectable } from '@nestjs/common';
import {
  bookings,
  creditAccounts,
  creditBillLines,
  creditBills,
  creditPurchases,
  creditReminders,
  invoices,
  journalEntries,
  journalPostings,
  ledgerTotals,
  organisations,
  type SkyberthDatabase,
} from '@skyberth/drizzle';
import { and, asc, count, desc, eq, inArray, isNull, lt, max, notLike, sql, sum } from 'drizzle-orm';
import { DATABASE } from '../platform/database.module.js';
import type { Db } from '../platform/transaction.js';

export type AccountRow = typeof creditAccounts.$inferSelect;
export type BillRow = typeof creditBills.$inferSelect;

export interface UnbilledEntry {
  readonly entryId: string;
  readonly atMs: number;
  readonly amountMinor: number;
}
export interface BillLine {
  readonly atMs: number;
  readonly cause: string;
  readonly bookingId: string;
  readonly bookingNumber: number;
  readonly invoiceNumber: string | null;
  readonly amountMinor: number;
}

const RECEIVABLE = 'operator receivable';

@Injectable()
export class CreditRepository {
  constructor(@Inject(DATABASE) private readonly db: SkyberthDatabase) {}

  byId(id: string, tx: Db = this.db): AccountRow | undefined {
    return tx.select().from(creditAccounts).where(eq(creditAccounts.id, id)).get();
  }

  of(operatorId: string, currency: string, tx: Db = this.db): AccountRow | undefined {
    return tx
      .select()
      .from(creditAccounts)
      .where(and(eq(creditAccounts.operatorId, operatorId), eq(creditAccounts.currency, currency)))
      .get();
  }

  /** Of one operator, or all, those that wait for a decision first. */
  list(operatorId?: string): AccountRow[] {
    return this.db
      .select()
      .from(creditAccounts)
      .where(operatorId === undefined ? undefined : eq(creditAccounts.operatorId, operatorId))
      .orderBy(sql`${creditAccounts.state} <> 'asked'`, desc(creditAccounts.askedMs))
      .all();
  }

  insert(tx: Db, row: AccountRow): void {
    tx.insert(creditAccounts).values(row).run();
  }

  update(tx: Db, id: string, change: Partial<Omit<AccountRow, 'id' | 'operatorId' | 'currency'>>): void {
    tx.update(creditAccounts).set(change).where(eq(creditAccounts.id, id)).run();
  }

  operator(id: string): { name: string; billingEmail: string } {
    const row = this.db
      .select({ name: organisations.name, billingEmail: organisations.billingEmail })
      .from(organisations)
      .where(eq(organisations.id, id))
      .get();
    if (!row) throw new Error(`There is no organisation ${id}.`);
    return row;
  }

  /** What the operator owes for delivered contacts, in this currency. */
  owedMinor(tx: Db, account: AccountRow): number {
    const row = tx
      .select({ minor: sql<number>`coalesce(sum(${ledgerTotals.debitMinor} - ${ledgerTotals.creditMinor}), 0)` })
      .from(ledgerTotals)
      .where(
        and(
          eq(ledgerTotals.account, RECEIVABLE),
          eq(ledgerTotals.organisationId, account.operatorId),
          eq(ledgerTotals.currency, account.currency),
        ),
      )
      .get();
    return row?.minor ?? 0;
  }

  /** What was bought on account and is neither delivered nor over. */
  bookedMinor(tx: Db, accountId: string): number {
    const row = tx
      .select({ minor: sum(creditPurchases.amountMinor).mapWith(Number) })
      .from(creditPurchases)
      .innerJoin(bookings, eq(bookings.id, creditPurchases.bookingId))
      .where(
        and(
          eq(creditPurchases.accountId, accountId),
          inArray(bookings.state, ['held', 'awaiting owner', 'confirmed', 'under way', 'reporting', 'in dispute']),
          sql`NOT EXISTS (SELECT 1 FROM journal_entries e WHERE e.cause_key = 'sale:' || ${bookings.id})`,
        ),
      )
      .get();
    return row?.minor ?? 0;
  }

  isPurchase(tx: Db, bookingId: string): boolean {
    const row = tx.select().from(creditPurchases).where(eq(creditPurchases.bookingId, bookingId)).get();
    return row !== undefined;
  }

  addPurchase(tx: Db, row: typeof creditPurchases.$inferInsert): void {
    tx.insert(creditPurchases).values(row).run();
  }

  /** Whether a bill of this account was due before now and is not paid. */
  hasOverdue(tx: Db, accountId: string, nowMs: number): boolean {
    const row = tx
      .select({ rows: count() })
      .from(creditBills)
      .where(and(eq(creditBills.accountId, accountId), isNull(creditBills.paidMs), lt(creditBills.dueMs, nowMs)))
      .get();
    return (row?.rows ?? 0) > 0;
  }

  bills(accountId: string): BillRow[] {
    return this.db
      .select()
      .from(creditBills)
      .where(eq(creditBills.accountId, accountId))
      .orderBy(desc(creditBills.month))
      .all();
  }

  bill(id: string, tx: Db = this.db): BillRow | undefined {
    return tx.select().from(creditBills).where(eq(creditBills.id, id)).get();
  }

  hasBillOf(tx: Db, accountId: string, month: string): boolean {
    const row = tx
      .select({ id: creditBills.id })
      .from(creditBills)
      .where(and(eq(creditBills.accountId, accountId), eq(creditBills.month, month)))
      .get();
    return row !== undefined;
  }

  /** What purchases on this account put on the receivable before `toMs` and no bill has collected; payments are left out. */
  unbilled(tx: Db, account: AccountRow, toMs: number): UnbilledEntry[] {
    return tx
      .select({
        entryId: journalEntries.id,
        atMs: journalEntries.atMs,
        amountMinor: sum(journalPostings.amountMinor).mapWith(Number),
      })
      .from(creditPurchases)
      .innerJoin(journalEntries, eq(journalEntries.bookingId, creditPurchases.bookingId))
      .innerJoin(journalPostings, eq(journalPostings.entryId, journalEntries.id))
      .where(
        and(
          eq(creditPurchases.accountId, account.id),
          eq(journalPostings.account, RECEIVABLE),
          lt(journalEntries.atMs, toMs),
          notLike(journalEntries.causeKey, 'capture:%'),
          sql`NOT EXISTS (SELECT 1 FROM credit_bill_lines l WHERE l.entry_id = ${journalEntries.id})`,
        ),
      )
      .groupBy(journalEntries.id)
      .orderBy(asc(journalEntries.atMs), asc(journalEntries.id))
      .all();
  }

  nextSeq(tx: Db, series: string): number {
    const last = tx
      .select({ seq: max(creditBills.seq) })
      .from(creditBills)
      .where(eq(creditBills.series, series))
      .get()?.seq;
    return (last ?? 0) + 1;
  }

  addBill(tx: Db, bill: BillRow, entries: readonly UnbilledEntry[]): void {
    tx.insert(creditBills).values(bill).run();
    const lines = entries.map(({ entryId, amountMinor }) => ({ entryId, amountMinor, billId: bill.id }));
    for (let from = 0; from < lines.length; from += 500) {
      tx.insert(creditBillLines)
        .values(lines.slice(from, from + 500))
        .run();
    }
  }

  updateBill(tx: Db, id: string, change: Partial<Pick<BillRow, 'checkoutId' | 'intentId' | 'paidMs'>>): void {
    tx.update(creditBills).set(change).where(eq(creditBills.id, id)).run();
  }

  lines(billId: string): BillLine[] {
    return this.db
      .select({
        atMs: journalEntries.atMs,
        cause: journalEntries.cause,
        bookingId: bookings.id,
        bookingNumber: bookings.number,
        invoiceNumber: sql<
          string | null
        >`(SELECT i.number FROM ${invoices} i WHERE i.booking_id = ${bookings.id} AND i.kind = 'invoice' LIMIT 1)`,
        amountMinor: creditBillLines.amountMinor,
      })
      .from(creditBillLines)
      .innerJoin(journalEntries, eq(journalEntries.id, creditBillLines.entryId))
      .innerJoin(bookings, eq(bookings.id, journalEntries.bookingId))
      .where(eq(creditBillLines.billId, billId))
      .orderBy(asc(journalEntries.atMs), asc(journalEntries.id))
      .all();
  }

  reminders(billId: string, tx: Db = this.db): number {
    const row = tx.select({ rows: count() }).from(creditReminders).where(eq(creditReminders.billId, billId)).get();
    return row?.rows ?? 0;
  }

  addReminder(tx: Db, row: typeof creditReminders.$inferInsert): void {
    tx.insert(creditReminders).values(row).run();
  }

  overdueBills(nowMs: number): BillRow[] {
    return this.db
      .select()
      .from(creditBills)
      .where(and(isNull(creditBills.paidMs), lt(creditBills.dueMs, nowMs)))
      .all();
  }
}
