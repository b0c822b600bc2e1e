/** What accounting software takes over: journal, trial balance and VAT summary of a month as CSV (RFC 4180). */
import { Inject, Injectable } from '@nestjs/common';
import { invoices, journalEntries, journalPostings, organisations, type SkyberthDatabase } from '@skyberth/drizzle';
import { monthSpan } from '@skyberth/money';
import { and, asc, count, eq, gte, lt, sql, sum } from 'drizzle-orm';
import { type Cell, decimals, line } from '../platform/csv.js';
import { DATABASE } from '../platform/database.module.js';
import { LedgerRepository } from './ledger.repository.js';
import { trialBalance } from './trial-balance.js';

const JOURNAL_CHUNK = 2_000;

@Injectable()
export class LedgerFiles {
  constructor(
    @Inject(DATABASE) private readonly db: SkyberthDatabase,
    private readonly repository: LedgerRepository,
  ) {}

  /** Lines of a file, the first with the names of the columns; a journal comes in pieces, however long the month was. */
  *lines(file: 'journal.csv' | 'trial-balance.csv' | 'vat-summary.csv', month: string): Generator<string> {
    if (file === 'journal.csv') yield* this.journal(month);
    else if (file === 'trial-balance.csv') yield* this.trialBalance(month);
    else yield* this.vatSummary(month);
  }

  private *journal(month: string): Generator<string> {
    const { fromMs, toMs } = monthSpan(month);
    yield line(['entry', 'at', 'cause', 'reference', 'account', 'organisation', 'currency', 'debit', 'credit']);
    for (let from = { atMs: fromMs, entryId: '', line: 0 }; ; ) {
      const rows = this.db
        .select({
          posting: journalPostings,
          cause: journalEntries.cause,
          key: journalEntries.causeKey,
          name: organisations.name,
        })
        .from(journalPostings)
        .innerJoin(journalEntries, eq(journalEntries.id, journalPostings.entryId))
        .leftJoin(organisations, eq(organisations.id, journalPostings.organisationId))
        .where(
          and(
            sql`(${journalPostings.atMs}, ${journalPostings.entryId}, ${journalPostings.line}) > (${from.atMs}, ${from.entryId}, ${from.line})`,
            lt(journalPostings.atMs, toMs),
          ),
        )
        .orderBy(asc(journalPostings.atMs), asc(journalPostings.entryId), asc(journalPostings.line))
        .limit(JOURNAL_CHUNK)
        .all();
      for (const { posting, cause, key, name } of rows) {
        const { entryId, atMs, account, amountMinor } = posting;
        const currency = posting.currency ?? '';
        const at = new Date(atMs ?? 0).toISOString();
        yield line([entryId, at, cause, key, account, name, currency, ...sides(amountMinor, currency)]);
      }
      const last = rows.at(-1)?.posting;
      if (rows.length < JOURNAL_CHUNK || !last) return;
      from = { atMs: last.atMs ?? 0, entryId: last.entryId, line: last.line };
    }
  }

  private *trialBalance(month: string): Generator<string> {
    yield line(['month', 'account', 'currency', 'opening', 'debit', 'credit', 'closing']);
    for (const row of trialBalance(this.repository, month)) {
      const { account, currency, openingMinor, debitMinor, creditMinor, closingMinor } = row;
      const amounts = [openingMinor, debitMinor, creditMinor, closingMinor].map((minor) => decimals(minor, currency));
      yield line([month, account, currency, ...amounts]);
    }
  }

  /** What the invoices and credit notes of the month say, by customer country, treatment and rate. */
  private *vatSummary(month: string): Generator<string> {
    const { fromMs, toMs } = monthSpan(month);
    const country = sql<string>`${invoices.document} ->> '$.customer.address.country'`;
    const rate = sql<number>`${invoices.document} ->> '$.vatRatePercent'`;
    const note = sql<string>`${invoices.document} ->> '$.vatNote'`;
    const rows = this.db
      .select({
        kind: invoices.kind,
        country,
        rate,
        note,
        currency: invoices.currency,
        documents: count(),
        netMinor: sum(invoices.netMinor).mapWith(Number),
        vatMinor: sum(invoices.vatMinor).mapWith(Number),
        grossMinor: sum(invoices.grossMinor).mapWith(Number),
      })
      .from(invoices)
      .where(and(gte(invoices.issuedMs, fromMs), lt(invoices.issuedMs, toMs)))
      .groupBy(invoices.kind, country, rate, note, invoices.currency)
      .orderBy(asc(invoices.currency), asc(country), asc(rate), asc(invoices.kind))
      .all();
    yield line([
      'month',
      'kind',
      'customer country',
      'rate percent',
      'treatment',
      'currency',
      'documents',
      'net',
      'vat',
      'gross',
    ]);
    for (const row of rows) {
      const amounts = [row.netMinor, row.vatMinor, row.grossMinor].map((minor) => decimals(minor, row.currency));
      yield line([month, row.kind, row.country, row.rate, row.note, row.currency, row.documents, ...amounts]);
    }
  }
}

const sides = (minor: number, currency: string): Cell[] =>
  minor > 0 ? [decimals(minor, currency), ''] : ['', decimals(-minor, currency)];
