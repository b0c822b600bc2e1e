/** The ledger, invoices, and the outbox through which everything leaves. */
import type { Invoice } from '@skyberth/shared';
import { sql } from 'drizzle-orm';
import { check, index, primaryKey, sqliteTable, text, uniqueIndex } from 'drizzle-orm/sqlite-core';
import { organisations } from './accounts.js';
import { bookings } from './bookings.js';
import { id, json, minor, ms } from './columns.js';

/** One balanced journal entry; its postings sum to zero in its currency (trigger on sealing). */
export const journalEntries = sqliteTable(
  'journal_entries',
  {
    id: id(),
    atMs: ms('at_ms').notNull(),
    /** What made it, once: such as `capture:<booking>`; a second posting of the same cause is refused. */
    causeKey: text('cause_key').notNull().unique(),
    cause: text('cause').notNull(),
    bookingId: text('booking_id').references(() => bookings.id),
    currency: text('currency').notNull(),
    sealed: ms('sealed').notNull().default(0),
  },
  (t) => [
    index('journal_entries_at').on(t.atMs, t.id),
    index('journal_entries_booking').on(t.bookingId),
    check('journal_entries_sealed', sql`${t.sealed} IN (0,1)`),
  ],
);

export const journalPostings = sqliteTable(
  'journal_postings',
  {
    entryId: text('entry_id')
      .notNull()
      .references(() => journalEntries.id),
    line: ms('line').notNull(),
    account: text('account').notNull(),
    /** Whose sub-account; the empty text for the marketplace's own. */
    organisationId: text('organisation_id').references(() => organisations.id),
    /** Debit positive, credit negative. */
    amountMinor: minor('amount_minor').notNull(),
    /** Time and currency of the entry again (trigger), so that a page of an account is one walk along an index. */
    atMs: ms('at_ms'),
    currency: text('currency'),
  },
  (t) => [
    primaryKey({ columns: [t.entryId, t.line] }),
    index('journal_postings_walk').on(t.account, t.currency, t.atMs, t.entryId, t.line, t.amountMinor),
    index('journal_postings_party').on(
      t.organisationId,
      t.account,
      t.currency,
      t.atMs,
      t.entryId,
      t.line,
      t.amountMinor,
    ),
    index('journal_postings_at').on(t.atMs, t.entryId, t.line),
    check('journal_postings_amount', sql`${t.amountMinor} <> 0`),
  ],
);

export const invoices = sqliteTable(
  'invoices',
  {
    id: id(),
    series: text('series').notNull(),
    /** 1, 2, 3 ... within the series without a gap (trigger). */
    seq: ms('seq').notNull(),
    number: text('number').notNull().unique(),
    kind: text('kind').$type<'invoice' | 'credit note'>().notNull(),
    bookingId: text('booking_id')
      .notNull()
      .references(() => bookings.id),
    operatorId: text('operator_id')
      .notNull()
      .references(() => organisations.id),
    ownerId: text('owner_id')
      .notNull()
      .references(() => organisations.id),
    issuedMs: ms('issued_ms').notNull(),
    currency: text('currency').notNull(),
    netMinor: minor('net_minor').notNull(),
    vatMinor: minor('vat_minor').notNull(),
    grossMinor: minor('gross_minor').notNull(),
    /** All that is printed, as it was on the day. */
    document: json<Invoice>('document').notNull(),
  },
  (t) => [
    uniqueIndex('invoices_series').on(t.series, t.seq),
    index('invoices_operator').on(t.operatorId, t.issuedMs),
    index('invoices_booking').on(t.bookingId),
    // Credit notes may follow in steps; a trigger holds their sum to the invoice.
    uniqueIndex('invoices_one_each').on(t.bookingId).where(sql`kind = 'invoice'`),
    check('invoices_sum', sql`${t.grossMinor} = ${t.netMinor} + ${t.vatMinor}`),
  ],
);

/** What must leave the process: written with the change that causes it, carried out by the job runner. */
export const outbox = sqliteTable(
  'outbox',
  {
    id: id(),
    kind: text('kind').notNull(),
    /** The same cause makes the same key, so a repeat adds nothing. */
    dedupeKey: text('dedupe_key').notNull().unique(),
    payload: text('payload').notNull(),
    state: text('state').$type<'pending' | 'done' | 'failed'>().notNull(),
    attempts: ms('attempts').notNull(),
    nextAttemptMs: ms('next_attempt_ms').notNull(),
    claimedUntilMs: ms('claimed_until_ms'),
    lastError: text('last_error'),
    createdMs: ms('created_ms').notNull(),
    doneMs: ms('done_ms'),
  },
  (t) => [
    index('outbox_due').on(t.state, t.nextAttemptMs),
    check('outbox_state', sql`${t.state} IN ('pending','done','failed')`),
  ],
);
