/** The journal in the database: written open, filled and sealed in one transaction; balances come from the sums by month. */
import { Inject, Injectable } from '@nestjs/common';
import {
  bookings,
  journalEntries,
  journalPostings,
  ledgerTotals,
  organisations,
  type SkyberthDatabase,
} from '@skyberth/drizzle';
import type { JournalEntry } from '@skyberth/money';
import { and, asc, desc, eq, gte, inArray, lt, lte, or, type SQL, sql, sum } from 'drizzle-orm';
import { DATABASE } from '../platform/database.module.js';
import { newId } from '../platform/ids.js';
import type { Db } from '../platform/transaction.js';

type PostingRow = typeof journalPostings.$inferSelect;

export interface StoredEntry {
  readonly id: string;
  readonly atMs: number;
  readonly causeKey: string;
  readonly cause: string;
  readonly currency: string;
  readonly bookingId: string | null;
  readonly bookingNumber: number | null;
  readonly postings: readonly PostingRow[];
}

export interface StoredLine extends Omit<StoredEntry, 'id' | 'postings' | 'causeKey'> {
  readonly entryId: string;
  readonly line: number;
  readonly organisationId: string | null;
  readonly amountMinor: number;
}

/** A place in a list that goes back in time. */
export interface Place {
  readonly atMs: number;
  readonly entryId: string;
  readonly line: number;
}

/** Half-open in time; either end may be open. */
export interface Span {
  readonly fromMs: number | null;
  readonly toMs: number | null;
}

export interface AccountSums {
  readonly account: string;
  readonly organisationId: string;
  readonly currency: string;
  readonly debitMinor: number;
  readonly creditMinor: number;
  readonly postings: number;
}

export interface LineFilter {
  readonly account: string;
  readonly currency: string;
  readonly organisationId: string | undefined;
}

@Injectable()
export class LedgerRepository {
  constructor(@Inject(DATABASE) private readonly db: SkyberthDatabase) {}

  has(tx: Db, causeKey: string): boolean {
    const row = tx
      .select({ id: journalEntries.id })
      .from(journalEntries)
      .where(eq(journalEntries.causeKey, causeKey))
      .get();
    return row !== undefined;
  }

  /** What an entry put on each account; empty where there is no such entry. */
  amountsOf(tx: Db, causeKey: string): Map<string, number> {
    const rows = tx
      .select({ account: journalPostings.account, amountMinor: journalPostings.amountMinor })
      .from(journalPostings)
      .innerJoin(journalEntries, eq(journalEntries.id, journalPostings.entryId))
      .where(eq(journalEntries.causeKey, causeKey))
      .all();
    const sums = new Map<string, number>();
    for (const { account, amountMinor } of rows) sums.set(account, (sums.get(account) ?? 0) + amountMinor);
    return sums;
  }

  /** What the entries of one booking together hold in an account; debit positive. */
  ofBookingMinor(tx: Db, bookingId: string, account: string): number {
    const row = tx
      .select({ minor: sql<number>`coalesce(sum(${journalPostings.amountMinor}), 0)` })
      .from(journalPostings)
      .innerJoin(journalEntries, eq(journalEntries.id, journalPostings.entryId))
      .where(and(eq(journalEntries.bookingId, bookingId), eq(journalPostings.account, account)))
      .get();
    return row?.minor ?? 0;
  }

  /** The entries of one booking, oldest first, each with what it moved. */
  storyOf(bookingId: string): { atMs: number; words: string; amountMinor: number }[] {
    return this.db
      .select({
        atMs: journalEntries.atMs,
        words: journalEntries.cause,
        amountMinor: sql<number>`sum(max(${journalPostings.amountMinor}, 0))`,
      })
      .from(journalEntries)
      .innerJoin(journalPostings, eq(journalPostings.entryId, journalEntries.id))
      .where(eq(journalEntries.bookingId, bookingId))
      .groupBy(journalEntries.id)
      .orderBy(asc(journalEntries.atMs), asc(journalEntries.id))
      .all();
  }

  /** Writes the entry open, fills it and seals it, which is when the database checks that it balances. */
  add(tx: Db, entry: JournalEntry, about: { atMs: number; bookingId: string | null }): void {
    const id = newId();
    const { causeKey, cause, currency } = entry;
    const { atMs, bookingId } = about;
    tx.insert(journalEntries).values({ id, atMs, causeKey, cause, bookingId, currency, sealed: 0 }).run();
    tx.insert(journalPostings)
      .values(entry.postings.map((posting, index) => ({ entryId: id, line: index + 1, atMs, currency, ...posting })))
      .run();
    tx.update(journalEntries).set({ sealed: 1 }).where(eq(journalEntries.id, id)).run();
  }

  /** Entries from the newest back, `limit` at a time. */
  entries(query: {
    span: Span;
    currency: string | undefined;
    bookingNumber: number | undefined;
    after: Place | null;
    limit: number;
  }): StoredEntry[] {
    const { span, after } = query;
    const heads = this.db
      .select({ entry: journalEntries, bookingNumber: bookings.number })
      .from(journalEntries)
      .leftJoin(bookings, eq(bookings.id, journalEntries.bookingId))
      .where(
        and(
          query.currency === undefined ? undefined : eq(journalEntries.currency, query.currency),
          query.bookingNumber === undefined ? undefined : eq(bookings.number, query.bookingNumber),
          span.fromMs === null ? undefined : gte(journalEntries.atMs, span.fromMs),
          span.toMs === null ? undefined : lt(journalEntries.atMs, span.toMs),
          after === null
            ? undefined
            : sql`(${journalEntries.atMs}, ${journalEntries.id}) < (${after.atMs}, ${after.entryId})`,
        ),
      )
      .orderBy(desc(journalEntries.atMs), desc(journalEntries.id))
      .limit(query.limit)
      .all();
    return this.filled(heads);
  }

  /** Postings of one account from the newest back. */
  lines(filter: LineFilter, query: { span: Span; after: Place | null; limit: number }): StoredLine[] {
    const { after } = query;
    return this.db
      .select({
        entryId: journalPostings.entryId,
        line: journalPostings.line,
        organisationId: journalPostings.organisationId,
        amountMinor: journalPostings.amountMinor,
        atMs: journalEntries.atMs,
        cause: journalEntries.cause,
        currency: journalEntries.currency,
        bookingId: journalEntries.bookingId,
        bookingNumber: bookings.number,
      })
      .from(journalPostings)
      .innerJoin(journalEntries, eq(journalEntries.id, journalPostings.entryId))
      .leftJoin(bookings, eq(bookings.id, journalEntries.bookingId))
      .where(and(lineCondition(filter, query.span), after === null ? undefined : before(after)))
      .orderBy(desc(journalPostings.atMs), desc(journalPostings.entryId), desc(journalPostings.line))
      .limit(query.limit)
      .all();
  }

  /** What an account moved from the beginning of a month up to a place in it, that line included. */
  movedUpTo(filter: LineFilter, span: Span, place: Place): number {
    const row = this.db
      .select({ minor: sum(journalPostings.amountMinor).mapWith(Number) })
      .from(journalPostings)
      .where(
        and(
          lineCondition(filter, { fromMs: span.fromMs, toMs: null }),
          lte(journalPostings.atMs, place.atMs),
          or(
            lt(journalPostings.atMs, place.atMs),
            sql`(${journalPostings.entryId}, ${journalPostings.line}) <= (${place.entryId}, ${place.line})`,
          ),
        ),
      )
      .get();
    return row?.minor ?? 0;
  }

  /** Sums of accounts over whole months, from the rows that the database keeps; `before` and the ends are months. */
  sums(where: {
    account?: string | undefined;
    currency?: string | undefined;
    organisationId?: string | undefined;
    fromMonth?: string | undefined;
    toMonth?: string | undefined;
    before?: string | undefined;
  }): AccountSums[] {
    return this.db
      .select({
        account: ledgerTotals.account,
        organisationId: ledgerTotals.organisationId,
        currency: ledgerTotals.currency,
        debitMinor: sum(ledgerTotals.debitMinor).mapWith(Number),
        creditMinor: sum(ledgerTotals.creditMinor).mapWith(Number),
        postings: sum(ledgerTotals.postings).mapWith(Number),
      })
      .from(ledgerTotals)
      .where(
        and(
          where.account === undefined ? undefined : eq(ledgerTotals.account, where.account),
          where.currency === undefined ? undefined : eq(ledgerTotals.currency, where.currency),
          where.organisationId === undefined ? undefined : eq(ledgerTotals.organisationId, where.organisationId),
          where.fromMonth === undefined ? undefined : gte(ledgerTotals.month, where.fromMonth),
          where.toMonth === undefined ? undefined : lte(ledgerTotals.month, where.toMonth),
          where.before === undefined ? undefined : lt(ledgerTotals.month, where.before),
        ),
      )
      .groupBy(ledgerTotals.account, ledgerTotals.organisationId, ledgerTotals.currency)
      .orderBy(asc(ledgerTotals.currency), asc(ledgerTotals.account), asc(ledgerTotals.organisationId))
      .all();
  }

  /** Sums of each account and month in one currency, oldest first. */
  months(currency: string): { month: string; account: string; debitMinor: number; creditMinor: number }[] {
    return this.db
      .select({
        month: ledgerTotals.month,
        account: ledgerTotals.account,
        debitMinor: sum(ledgerTotals.debitMinor).mapWith(Number),
        creditMinor: sum(ledgerTotals.creditMinor).mapWith(Number),
      })
      .from(ledgerTotals)
      .where(eq(ledgerTotals.currency, currency))
      .groupBy(ledgerTotals.month, ledgerTotals.account)
      .orderBy(asc(ledgerTotals.month), asc(ledgerTotals.account))
      .all();
  }

  names(organisationIds: readonly string[]): Map<string, string> {
    if (organisationIds.length === 0) return new Map();
    const rows = this.db
      .select({ id: organisations.id, name: organisations.name })
      .from(organisations)
      .where(inArray(organisations.id, [...organisationIds]))
      .all();
    return new Map(rows.map((row) => [row.id, row.name]));
  }

  private filled(heads: { entry: typeof journalEntries.$inferSelect; bookingNumber: number | null }[]): StoredEntry[] {
    const ids = heads.map((head) => head.entry.id);
    const byEntry = new Map<string, PostingRow[]>(ids.map((id) => [id, []]));
    const rows = this.db
      .select()
      .from(journalPostings)
      .where(inArray(journalPostings.entryId, ids))
      .orderBy(asc(journalPostings.entryId), asc(journalPostings.line))
      .all();
    for (const row of rows) byEntry.get(row.entryId)?.push(row);
    return heads.map(({ entry, bookingNumber }) => ({
      ...entry,
      bookingNumber,
      postings: byEntry.get(entry.id) ?? [],
    }));
  }
}

function lineCondition(filter: LineFilter, span: Span): SQL | undefined {
  return and(
    filter.organisationId === undefined ? undefined : eq(journalPostings.organisationId, filter.organisationId),
    eq(journalPostings.account, filter.account),
    eq(journalPostings.currency, filter.currency),
    span.fromMs === null ? undefined : gte(journalPostings.atMs, span.fromMs),
    span.toMs === null ? undefined : lt(journalPostings.atMs, span.toMs),
  );
}

const before = (place: Place): SQL =>
  sql`(${journalPostings.atMs}, ${journalPostings.entryId}, ${journalPostings.line}) < (${place.atMs}, ${place.entryId}, ${place.line})`;
