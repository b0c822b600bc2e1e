/** Monthly accounts of operators: the limit, what was bought on them, the bills, and the reminders about bills. */
import { sql } from 'drizzle-orm';
import { check, index, primaryKey, sqliteTable, text, uniqueIndex } from 'drizzle-orm/sqlite-core';
import { organisations, people } from './accounts.js';
import { bookings } from './bookings.js';
import { id, minor, ms } from './columns.js';
import { journalEntries } from './money.js';

export type CreditState = 'asked' | 'open' | 'refused' | 'closed';

/** One account an operator and currency; nothing is converted. */
export const creditAccounts = sqliteTable(
  'credit_accounts',
  {
    id: id(),
    operatorId: text('operator_id')
      .notNull()
      .references(() => organisations.id),
    currency: text('currency').notNull(),
    state: text('state').$type<CreditState>().notNull(),
    wishedMinor: minor('wished_minor').notNull(),
    /** What may be owed at most; zero until it is opened. */
    limitMinor: minor('limit_minor').notNull(),
    /** Days from a bill to its due date. */
    termsDays: ms('terms_days').notNull(),
    note: text('note').notNull(),
    askedBy: text('asked_by')
      .notNull()
      .references(() => people.id),
    askedMs: ms('asked_ms').notNull(),
    decidedBy: text('decided_by').references(() => people.id),
    decidedMs: ms('decided_ms'),
    reason: text('reason').notNull(),
  },
  (t) => [
    uniqueIndex('credit_accounts_one').on(t.operatorId, t.currency),
    check('credit_accounts_state', sql`${t.state} IN ('asked','open','refused','closed')`),
    check('credit_accounts_limit', sql`${t.limitMinor} >= 0 AND ${t.wishedMinor} > 0`),
    check('credit_accounts_terms', sql`${t.termsDays} BETWEEN 1 AND 90`),
  ],
);

/** A contact that was bought on account instead of by card. */
export const creditPurchases = sqliteTable(
  'credit_purchases',
  {
    bookingId: text('booking_id')
      .primaryKey()
      .references(() => bookings.id),
    accountId: text('account_id')
      .notNull()
      .references(() => creditAccounts.id),
    amountMinor: minor('amount_minor').notNull(),
    boughtMs: ms('bought_ms').notNull(),
  },
  (t) => [index('credit_purchases_account').on(t.accountId)],
);

/** What an operator is asked to pay for a month; its sums never change (trigger). */
export const creditBills = sqliteTable(
  'credit_bills',
  {
    id: id(),
    accountId: text('account_id')
      .notNull()
      .references(() => creditAccounts.id),
    series: text('series').notNull(),
    /** 1, 2, 3 ... within the series without a gap (trigger). */
    seq: ms('seq').notNull(),
    number: text('number').notNull().unique(),
    month: text('month').notNull(),
    issuedMs: ms('issued_ms').notNull(),
    dueMs: ms('due_ms').notNull(),
    currency: text('currency').notNull(),
    totalMinor: minor('total_minor').notNull(),
    checkoutId: text('checkout_id').unique(),
    intentId: text('intent_id').unique(),
    paidMs: ms('paid_ms'),
  },
  (t) => [
    uniqueIndex('credit_bills_series').on(t.series, t.seq),
    uniqueIndex('credit_bills_month').on(t.accountId, t.month),
    index('credit_bills_due').on(t.paidMs, t.dueMs),
    check('credit_bills_total', sql`${t.totalMinor} > 0`),
  ],
);

/** The entries of the ledger that a bill collects; each is billed once. */
export const creditBillLines = sqliteTable(
  'credit_bill_lines',
  {
    entryId: text('entry_id')
      .primaryKey()
      .references(() => journalEntries.id),
    billId: text('bill_id')
      .notNull()
      .references(() => creditBills.id),
    amountMinor: minor('amount_minor').notNull(),
  },
  (t) => [index('credit_bill_lines_bill').on(t.billId)],
);

/** Reminders of an overdue bill, one a step. */
export const creditReminders = sqliteTable(
  'credit_reminders',
  {
    billId: text('bill_id')
      .notNull()
      .references(() => creditBills.id),
    step: ms('step').notNull(),
    sentMs: ms('sent_ms').notNull(),
  },
  (t) => [primaryKey({ columns: [t.billId, t.step] })],
);
