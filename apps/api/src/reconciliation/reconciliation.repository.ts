/** The provider's movements in the database, and the ledger's lines that should be the same. */
import { Inject, Injectable } from '@nestjs/common';
import {
  bookings,
  journalEntries,
  journalPostings,
  payments,
  providerMovements,
  type SkyberthDatabase,
} from '@skyberth/drizzle';
import { and, asc, count, desc, eq, gte, inArray, like, lt, notLike, type SQL, sql, sum } from 'drizzle-orm';
import { DATABASE } from '../platform/database.module.js';
import type { Db } from '../platform/transaction.js';

export type MovementRow = typeof providerMovements.$inferSelect;
export interface ListedMovement extends MovementRow {
  readonly bookingId: string | null;
  readonly bookingNumber: number | null;
}
/** An entry that moved provider clearing, and how much. */
export interface ClearingEntry {
  readonly entryId: string;
  readonly causeKey: string;
  readonly cause: string;
  readonly atMs: number;
  readonly currency: string;
  readonly amountMinor: number;
  readonly bookingId: string | null;
  readonly bookingNumber: number | null;
}

const clearingMinor = sql<number>`(SELECT coalesce(sum(p.amount_minor), 0) FROM journal_postings p WHERE p.entry_id = ${journalEntries.id} AND p.account = 'provider clearing')`;

@Injectable()
export class ReconciliationRepository {
  constructor(@Inject(DATABASE) private readonly db: SkyberthDatabase) {}

  /** False where it was imported before. */
  add(tx: Db, row: MovementRow): boolean {
    return tx.insert(providerMovements).values(row).onConflictDoNothing().run().changes === 1;
  }

  byId(id: string, tx: Db = this.db): MovementRow | undefined {
    return tx.select().from(providerMovements).where(eq(providerMovements.id, id)).get();
  }

  listed(id: string): ListedMovement | undefined {
    return this.listing().where(eq(providerMovements.id, id)).get();
  }

  update(tx: Db, id: string, change: Pick<MovementRow, 'state' | 'entryCause' | 'changedMs'>): void {
    tx.update(providerMovements).set(change).where(eq(providerMovements.id, id)).run();
  }

  page(query: {
    state?: MovementRow['state'] | undefined;
    currency?: string | undefined;
    page: number;
    pageSize: number;
  }) {
    const where = and(
      query.state === undefined ? undefined : eq(providerMovements.state, query.state),
      query.currency === undefined ? undefined : eq(providerMovements.currency, query.currency),
    );
    const total = this.db.select({ rows: count() }).from(providerMovements).where(where).get()?.rows ?? 0;
    const rows = this.listing()
      .where(where)
      .orderBy(desc(providerMovements.atMs), desc(providerMovements.id))
      .limit(query.pageSize)
      .offset((query.page - 1) * query.pageSize)
      .all();
    return { rows, total };
  }

  /** Movements that may still find their entry, oldest first. */
  unmatched(limit: number): MovementRow[] {
    return this.db
      .select()
      .from(providerMovements)
      .where(
        sql`${providerMovements.state} = 'open' OR ${providerMovements.entryCause} = 'suspense:' || ${providerMovements.id}`,
      )
      .orderBy(asc(providerMovements.atMs), asc(providerMovements.id))
      .limit(limit)
      .all();
  }

  /** Refunds of a payment that have no entry yet, oldest first. */
  openRefunds(tx: Db, intentId: string): MovementRow[] {
    return tx
      .select()
      .from(providerMovements)
      .where(
        and(
          eq(providerMovements.intentId, intentId),
          eq(providerMovements.state, 'open'),
          inArray(providerMovements.type, ['refund', 'payment_refund']),
        ),
      )
      .orderBy(asc(providerMovements.atMs), asc(providerMovements.id))
      .all();
  }

  open(beforeMs = Number.MAX_SAFE_INTEGER): MovementRow[] {
    return this.db
      .select()
      .from(providerMovements)
      .where(and(eq(providerMovements.state, 'open'), lt(providerMovements.atMs, beforeMs)))
      .all();
  }

  netByCurrency(): Map<string, number> {
    const rows = this.db
      .select({ currency: providerMovements.currency, minor: sum(providerMovements.netMinor).mapWith(Number) })
      .from(providerMovements)
      .groupBy(providerMovements.currency)
      .all();
    return new Map(rows.map((row) => [row.currency, row.minor]));
  }

  /** The entry of this cause that no movement has yet. */
  freeEntry(tx: Db, causeKey: string): ClearingEntry | undefined {
    return this.freeEntries(tx, eq(journalEntries.causeKey, causeKey)).at(0);
  }

  /** Entries of a payment's booking whose cause begins so, that no movement has yet, oldest first. */
  freeEntriesOfIntent(tx: Db, intentId: string, causePrefix: string): ClearingEntry[] {
    const bookingId = this.bookingOfIntent(tx, intentId);
    if (bookingId === null) return [];
    return this.freeEntries(
      tx,
      and(eq(journalEntries.bookingId, bookingId), like(journalEntries.causeKey, `${causePrefix}%`)),
    );
  }

  bookingOfIntent(tx: Db, intentId: string): string | null {
    const row = tx.select({ id: payments.bookingId }).from(payments).where(eq(payments.intentId, intentId)).get();
    return row?.id ?? null;
  }

  /** Entries since `sinceMs` that moved provider clearing and that no movement of the provider stands behind. */
  ledgerOnly(sinceMs: number, beforeMs = Number.MAX_SAFE_INTEGER): ClearingEntry[] {
    const ids = this.db
      .selectDistinct({ id: journalPostings.entryId })
      .from(journalPostings)
      .where(
        and(
          eq(journalPostings.account, 'provider clearing'),
          gte(journalPostings.atMs, sinceMs),
          lt(journalPostings.atMs, beforeMs),
        ),
      );
    return this.freeEntries(
      this.db,
      and(
        inArray(journalEntries.id, ids),
        notLike(journalEntries.causeKey, 'provider-fee:%'),
        notLike(journalEntries.causeKey, 'suspense%'),
      ),
    );
  }

  private freeEntries(db: Db, where: SQL | undefined): ClearingEntry[] {
    return db
      .select({
        entryId: journalEntries.id,
        causeKey: journalEntries.causeKey,
        cause: journalEntries.cause,
        atMs: journalEntries.atMs,
        currency: journalEntries.currency,
        amountMinor: clearingMinor,
        bookingId: journalEntries.bookingId,
        bookingNumber: bookings.number,
      })
      .from(journalEntries)
      .leftJoin(bookings, eq(bookings.id, journalEntries.bookingId))
      .where(
        and(
          where,
          sql`NOT EXISTS (SELECT 1 FROM provider_movements m WHERE m.entry_cause = ${journalEntries.causeKey})`,
        ),
      )
      .orderBy(asc(journalEntries.atMs), asc(journalEntries.id))
      .all()
      .filter((entry) => entry.amountMinor !== 0);
  }

  private listing() {
    return this.db
      .select({
        id: providerMovements.id,
        type: providerMovements.type,
        category: providerMovements.category,
        sourceId: providerMovements.sourceId,
        intentId: providerMovements.intentId,
        amountMinor: providerMovements.amountMinor,
        feeMinor: providerMovements.feeMinor,
        netMinor: providerMovements.netMinor,
        currency: providerMovements.currency,
        atMs: providerMovements.atMs,
        availableMs: providerMovements.availableMs,
        description: providerMovements.description,
        importedMs: providerMovements.importedMs,
        importedFrom: providerMovements.importedFrom,
        state: providerMovements.state,
        entryCause: providerMovements.entryCause,
        changedMs: providerMovements.changedMs,
        bookingId: bookings.id,
        bookingNumber: bookings.number,
      })
      .from(providerMovements)
      .leftJoin(journalEntries, eq(journalEntries.causeKey, providerMovements.entryCause))
      .leftJoin(payments, eq(payments.intentId, providerMovements.intentId))
      .leftJoin(bookings, sql`${bookings.id} = coalesce(${journalEntries.bookingId}, ${payments.bookingId})`);
  }
}
