/** What the payment provider says it did, held against the ledger; sums of the ledger by month; months that are closed. */
import { sql } from 'drizzle-orm';
import { check, index, primaryKey, sqliteTable, text } from 'drizzle-orm/sqlite-core';
import { organisations, people } from './accounts.js';
import { bookings } from './bookings.js';
import { flag, id, json, minor, ms } from './columns.js';

/** Debits and credits of each account and month, kept by a trigger on every posting; a balance is a sum of few rows. */
export const ledgerTotals = sqliteTable(
  'ledger_totals',
  {
    account: text('account').notNull(),
    /** The empty text for the marketplace's own accounts. */
    organisationId: text('organisation_id').notNull(),
    currency: text('currency').notNull(),
    /** `2026-12`, UTC. */
    month: text('month').notNull(),
    debitMinor: minor('debit_minor').notNull(),
    creditMinor: minor('credit_minor').notNull(),
    postings: ms('postings').notNull(),
  },
  (t) => [primaryKey({ columns: [t.account, t.organisationId, t.currency, t.month] })],
);

/** The state of a movement: whether the ledger has what the provider has. */
export type MovementState = 'open' | 'matched' | 'in suspense';

/** One movement of the provider's balance, imported once; its facts never change (trigger). */
export const providerMovements = sqliteTable(
  'provider_movements',
  {
    /** The provider's own id of the balance transaction. */
    id: text('id').primaryKey(),
    type: text('type').notNull(),
    category: text('category').notNull(),
    sourceId: text('source_id'),
    /** The payment that the source belongs to, where the provider tells it. */
    intentId: text('intent_id'),
    amountMinor: minor('amount_minor').notNull(),
    feeMinor: minor('fee_minor').notNull(),
    netMinor: minor('net_minor').notNull(),
    currency: text('currency').notNull(),
    atMs: ms('at_ms').notNull(),
    availableMs: ms('available_ms').notNull(),
    description: text('description').notNull(),
    importedMs: ms('imported_ms').notNull(),
    importedFrom: text('imported_from').$type<'provider' | 'file'>().notNull(),
    state: text('state').$type<MovementState>().notNull(),
    /** The journal entry that says the same; one entry stands for one movement only. */
    entryCause: text('entry_cause').unique(),
    changedMs: ms('changed_ms').notNull(),
  },
  (t) => [
    index('provider_movements_state').on(t.state, t.atMs),
    index('provider_movements_at').on(t.atMs),
    check('provider_movements_net', sql`${t.netMinor} = ${t.amountMinor} - ${t.feeMinor}`),
    check('provider_movements_state', sql`${t.state} IN ('open','matched','in suspense')`),
    check('provider_movements_matched', sql`(${t.state} = 'open') = (${t.entryCause} IS NULL)`),
  ],
);

/** How far a repeated reading of the provider has come. */
export const providerReadings = sqliteTable('provider_readings', {
  name: text('name').primaryKey(),
  readUntilMs: ms('read_until_ms').notNull(),
  ranMs: ms('ran_ms').notNull(),
  note: text('note').notNull(),
});

/** A payment that the buyer's bank took back, or tried to. */
export const chargebacks = sqliteTable(
  'chargebacks',
  {
    /** The provider's own id. */
    id: text('id').primaryKey(),
    bookingId: text('booking_id')
      .notNull()
      .references(() => bookings.id),
    operatorId: text('operator_id')
      .notNull()
      .references(() => organisations.id),
    ownerId: text('owner_id')
      .notNull()
      .references(() => organisations.id),
    chargeId: text('charge_id').notNull(),
    amountMinor: minor('amount_minor').notNull(),
    currency: text('currency').notNull(),
    reason: text('reason').notNull(),
    state: text('state').$type<'open' | 'won' | 'lost'>().notNull(),
    /** Of the owner's earnings, set aside while it is open. */
    reservedMinor: minor('reserved_minor').notNull(),
    openedMs: ms('opened_ms').notNull(),
    closedMs: ms('closed_ms'),
  },
  (t) => [
    index('chargebacks_booking').on(t.bookingId),
    index('chargebacks_owner').on(t.ownerId, t.state),
    check('chargebacks_state', sql`${t.state} IN ('open','won','lost')`),
  ],
);

/** A month of the ledger that takes no more entries, with the trial balance as it stood. Rows are kept (triggers). */
export const closedMonths = sqliteTable('closed_months', {
  month: text('month').primaryKey(),
  fromMs: ms('from_ms').notNull(),
  toMs: ms('to_ms').notNull(),
  closedMs: ms('closed_ms').notNull(),
  closedBy: text('closed_by')
    .notNull()
    .references(() => people.id),
  trialBalance: json<TrialBalanceLine[]>('trial_balance').notNull(),
});

export interface TrialBalanceLine {
  readonly account: string;
  readonly currency: string;
  readonly openingMinor: number;
  readonly debitMinor: number;
  readonly creditMinor: number;
  readonly closingMinor: number;
}

/** What each self-check of the ledger found. */
export const ledgerChecks = sqliteTable(
  'ledger_checks',
  {
    id: id(),
    atMs: ms('at_ms').notNull(),
    postings: ms('postings').notNull(),
    /** Whether the provider could be asked for its balance. */
    providerAsked: flag('provider_asked').notNull(),
    faults: json<{ kind: string; sentence: string }[]>('faults').notNull(),
  },
  (t) => [index('ledger_checks_at').on(t.atMs)],
);
