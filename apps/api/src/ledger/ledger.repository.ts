/** The journal in the database. */
import { Inject, Injectable } from '@nestjs/common';
import { bookings, journalEntries, journalPostings, organisations, type SkyberthDatabase } from '@skyberth/drizzle';
import { ACCOUNTS, type AccountName, type JournalEntry } from '@skyberth/money';
import { asc, count, desc, eq, exists, inArray, sql, sum } from 'drizzle-orm';
import { DATABASE } from '../platform/database.module.js';
import { newId } from '../platform/ids.js';
import type { Db } from '../platform/transaction.js';

export interface StoredEntry extends JournalEntry {
  readonly id: string;
  readonly atMs: number;
  readonly bookingId: string | null;
  readonly bookingNumber: number | null;
}

export interface AccountBalance {
  readonly account: string;
  readonly currency: string;
  readonly balanceMinor: number;
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

  /** Writes the entry open, fills it and seals it, which is when the database checks that it balances. */
  add(tx: Db, entry: JournalEntry, about: { atMs: number; bookingId: string | null }): void {
    const id = newId();
    const { causeKey, cause, currency } = entry;
    tx.insert(journalEntries)
      .values({ id, atMs: about.atMs, causeKey, cause, bookingId: about.bookingId, currency, sealed: 0 })
      .run();
    tx.insert(journalPostings)
      .values(entry.postings.map((posting, index) => ({ entryId: id, line: index + 1, ...posting })))
      .run();
    tx.update(journalEntries).set({ sealed: 1 }).where(eq(journalEntries.id, id)).run();
  }

  page(query: { account?: string | undefined; page: number; pageSize: number }): {
    entries: StoredEntry[];
    total: number;
  } {
    const { account } = query;
    const where = account
      ? exists(
          this.db
            .select({ one: sql`1` })
            .from(journalPostings)
            .where(sql`${journalPostings.entryId} = ${journalEntries.id} AND ${journalPostings.account} = ${account}`),
        )
      : undefined;
    const total = this.db.select({ total: count() }).from(journalEntries).where(where).get()?.total ?? 0;
    const heads = this.db
      .select({ entry: journalEntries, bookingNumber: bookings.number })
      .from(journalEntries)
      .leftJoin(bookings, eq(bookings.id, journalEntries.bookingId))
      .where(where)
      .orderBy(desc(journalEntries.atMs), desc(journalEntries.id))
      .limit(query.pageSize)
      .offset((query.page - 1) * query.pageSize)
      .all();
    return { entries: this.filled(heads), total };
  }

  /** The whole journal, oldest first, for the self-check. */
  all(): StoredEntry[] {
    const heads = this.db
      .select({ entry: journalEntries, bookingNumber: bookings.number })
      .from(journalEntries)
      .leftJoin(bookings, eq(bookings.id, journalEntries.bookingId))
      .orderBy(asc(journalEntries.atMs), asc(journalEntries.id))
      .all();
    return this.filled(heads);
  }

  balances(): AccountBalance[] {
    return this.db
      .select({
        account: journalPostings.account,
        currency: journalEntries.currency,
        balanceMinor: sum(journalPostings.amountMinor).mapWith(Number),
      })
      .from(journalPostings)
      .innerJoin(journalEntries, eq(journalEntries.id, journalPostings.entryId))
      .groupBy(journalPostings.account, journalEntries.currency)
      .orderBy(asc(journalEntries.currency), asc(journalPostings.account))
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
    const byEntry = new Map<string, JournalEntry['postings'][number][]>(ids.map((id) => [id, []]));
    for (let from = 0; from < ids.length; from += 500) {
      const rows = this.db
        .select()
        .from(journalPostings)
        .where(inArray(journalPostings.entryId, ids.slice(from, from + 500)))
        .orderBy(asc(journalPostings.entryId), asc(journalPostings.line))
        .all();
      for (const { entryId, account, organisationId, amountMinor } of rows) {
        byEntry.get(entryId)?.push({ account: accountName(account), organisationId, amountMinor });
      }
    }
    return heads.map(({ entry, bookingNumber }) => ({
      id: entry.id,
      atMs: entry.atMs,
      causeKey: entry.causeKey,
      cause: entry.cause,
      currency: entry.currency,
      bookingId: entry.bookingId,
      bookingNumber,
      postings: byEntry.get(entry.id) ?? [],
    }));
  }
}

function accountName(text: string): AccountName {
  const known = ACCOUNTS.find((account) => account === text);
  if (!known) throw new Error(`The ledger has an account “${text}” that nobody knows.`);
  return known;
}
