/** Invoices in the database; written once, numbered without a gap. */
import { Inject, Injectable } from '@nestjs/common';
import { bookings, invoices, organisations, type SkyberthDatabase } from '@skyberth/drizzle';
import type { Principal } from '@skyberth/shared';
import { and, count, desc, eq, max, type SQL, sql } from 'drizzle-orm';
import { DATABASE } from '../platform/database.module.js';
import { notFound } from '../platform/domain-error.js';
import type { Db } from '../platform/transaction.js';

export type InvoiceRow = typeof invoices.$inferSelect;
type Reader = Pick<Principal, 'organisationId' | 'organisationKind'>;

@Injectable()
export class InvoiceRepository {
  constructor(@Inject(DATABASE) private readonly db: SkyberthDatabase) {}

  /** The next number of a series; only valid inside the write transaction that uses it. */
  nextSeq(tx: Db, series: string): number {
    const last = tx
      .select({ seq: max(invoices.seq) })
      .from(invoices)
      .where(eq(invoices.series, series))
      .get()?.seq;
    return (last ?? 0) + 1;
  }

  insert(tx: Db, invoice: typeof invoices.$inferInsert): void {
    tx.insert(invoices).values(invoice).run();
  }

  ofBooking(bookingId: string, kind: InvoiceRow['kind'], tx: Db = this.db): InvoiceRow | undefined {
    return tx
      .select()
      .from(invoices)
      .where(and(eq(invoices.bookingId, bookingId), eq(invoices.kind, kind)))
      .get();
  }

  /** Invoice and credit notes of a booking together, VAT included. */
  sumOf(tx: Db, bookingId: string): number {
    const row = tx
      .select({ minor: sql<number>`coalesce(sum(${invoices.grossMinor}), 0)` })
      .from(invoices)
      .where(eq(invoices.bookingId, bookingId))
      .get();
    return row?.minor ?? 0;
  }

  /** For the mail that carries it; who may read it was decided when the mail was queued. */
  byId(invoiceId: string): InvoiceRow {
    const row = this.db.select().from(invoices).where(eq(invoices.id, invoiceId)).get();
    if (!row) throw notFound('invoice');
    return row;
  }

  forReader(reader: Reader, invoiceId: string): InvoiceRow {
    const row = this.db
      .select()
      .from(invoices)
      .where(and(eq(invoices.id, invoiceId), readableBy(reader)))
      .get();
    if (!row) throw notFound('invoice');
    return row;
  }

  page(reader: Reader, query: { page: number; pageSize: number }): { rows: InvoiceRow[]; total: number } {
    const where = readableBy(reader);
    const total = this.db.select({ total: count() }).from(invoices).where(where).get()?.total ?? 0;
    const rows = this.db
      .select()
      .from(invoices)
      .where(where)
      .orderBy(desc(invoices.issuedMs), desc(invoices.series), desc(invoices.seq))
      .limit(query.pageSize)
      .offset((query.page - 1) * query.pageSize)
      .all();
    return { rows, total };
  }

  customer(tx: Db, organisationId: string): typeof organisations.$inferSelect {
    const row = tx.select().from(organisations).where(eq(organisations.id, organisationId)).get();
    if (!row) throw new Error(`There is no organisation ${organisationId}.`);
    return row;
  }

  bookingNumber(tx: Db, bookingId: string): number {
    const row = tx.select({ number: bookings.number }).from(bookings).where(eq(bookings.id, bookingId)).get();
    if (!row) throw new Error(`There is no booking ${bookingId}.`);
    return row.number;
  }
}

/**
 * Invoices are between the marketplace and the operator: an owner reads none of them, and learns what it earns from its
 * statement. The route lets owners ask, so that their list is empty instead of refused.
 */
function readableBy(reader: Reader): SQL | undefined {
  if (reader.organisationKind === 'staff') return undefined;
  return eq(invoices.operatorId, reader.organisationId);
}
