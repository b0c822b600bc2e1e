/** Payout runs, what each line of them consists of, and the second factor of the people who let money go. */
import { sql } from 'drizzle-orm';
import { check, index, sqliteTable, text, uniqueIndex } from 'drizzle-orm/sqlite-core';
import { organisations, people } from './accounts.js';
import { flag, id, minor, ms } from './columns.js';
import { journalEntries } from './money.js';

export type PayoutRunState = 'draft' | 'reviewed' | 'approved' | 'dropped';
export type PayoutLineState = 'ready' | 'held back' | 'below minimum' | 'nothing due' | 'paying' | 'paid' | 'failed';

/** A person's time-based codes (RFC 6238). */
export const secondFactors = sqliteTable('second_factors', {
  personId: text('person_id')
    .primaryKey()
    .references(() => people.id),
  /** Base32. */
  secret: text('secret').notNull(),
  /** Null until a first code has shown that the person holds the secret. */
  confirmedMs: ms('confirmed_ms'),
  /** The step of the last code that was taken; it only rises, so no code counts twice. */
  lastStep: ms('last_step').notNull(),
});

export const payoutRuns = sqliteTable(
  'payout_runs',
  {
    id: id(),
    number: ms('number').notNull().unique(),
    currency: text('currency').notNull(),
    state: text('state').$type<PayoutRunState>().notNull(),
    preparedBy: text('prepared_by')
      .notNull()
      .references(() => people.id),
    preparedMs: ms('prepared_ms').notNull(),
    reviewedBy: text('reviewed_by').references(() => people.id),
    reviewedMs: ms('reviewed_ms'),
    approvedBy: text('approved_by').references(() => people.id),
    approvedMs: ms('approved_ms'),
  },
  (t) => [
    // Started twice, there is still one run open in a currency.
    uniqueIndex('payout_runs_one_open').on(t.currency).where(sql`state IN ('draft','reviewed')`),
    check('payout_runs_state', sql`${t.state} IN ('draft','reviewed','approved','dropped')`),
    check('payout_runs_two_people', sql`${t.approvedBy} IS NULL OR ${t.approvedBy} <> ${t.reviewedBy}`),
    check('payout_runs_maker', sql`${t.approvedBy} IS NULL OR ${t.approvedBy} <> ${t.preparedBy}`),
    check('payout_runs_reviewed', sql`${t.state} NOT IN ('reviewed','approved') OR ${t.reviewedBy} IS NOT NULL`),
    check('payout_runs_approved', sql`(${t.state} = 'approved') = (${t.approvedBy} IS NOT NULL)`),
  ],
);

export const payoutLines = sqliteTable(
  'payout_lines',
  {
    id: id(),
    runId: text('run_id')
      .notNull()
      .references(() => payoutRuns.id),
    ownerId: text('owner_id')
      .notNull()
      .references(() => organisations.id),
    state: text('state').$type<PayoutLineState>().notNull(),
    /** Why it is held back, or why its transfer failed. */
    note: text('note').notNull(),
    contactCount: ms('contact_count').notNull(),
    settledMinor: minor('settled_minor').notNull(),
    feeMinor: minor('fee_minor').notNull(),
    refundMinor: minor('refund_minor').notNull(),
    reserveMinor: minor('reserve_minor').notNull(),
    adjustedMinor: minor('adjusted_minor').notNull(),
    toPayMinor: minor('to_pay_minor').notNull(),
    /** The provider's own id of the transfer. */
    transferId: text('transfer_id').unique(),
    paidMs: ms('paid_ms'),
  },
  (t) => [
    uniqueIndex('payout_lines_owner').on(t.runId, t.ownerId),
    index('payout_lines_of_owner').on(t.ownerId, t.state),
    check(
      'payout_lines_state',
      sql`${t.state} IN ('ready','held back','below minimum','nothing due','paying','paid','failed')`,
    ),
    check(
      'payout_lines_sum',
      sql`${t.toPayMinor} = ${t.settledMinor} - ${t.feeMinor} - ${t.refundMinor} - ${t.reserveMinor} + ${t.adjustedMinor}`,
    ),
    check('payout_lines_paying', sql`${t.state} NOT IN ('paying','paid') OR ${t.toPayMinor} > 0`),
    check('payout_lines_paid', sql`(${t.state} = 'paid') = (${t.transferId} IS NOT NULL)`),
  ],
);

/** The postings of an owner's account that a line settles; each posting stands in one live line at most. */
export const payoutItems = sqliteTable(
  'payout_items',
  {
    id: id(),
    lineId: text('line_id')
      .notNull()
      .references(() => payoutLines.id),
    entryId: text('entry_id')
      .notNull()
      .references(() => journalEntries.id),
    postingLine: ms('posting_line').notNull(),
    live: flag('live').notNull(),
  },
  (t) => [
    index('payout_items_line').on(t.lineId),
    uniqueIndex('payout_items_once').on(t.entryId, t.postingLine).where(sql`live = 1`),
  ],
);
