/** Bookings, their history, and payments. */
import type { BookingState, ContactReport, Need, PassGeometry, Quote } from '@skyberth/shared';
import { sql } from 'drizzle-orm';
import { check, index, sqliteTable, text } from 'drizzle-orm/sqlite-core';
import { organisations, people } from './accounts.js';
import { id, json, minor, ms } from './columns.js';
import { elementSets, spacecraft } from './spacecraft.js';
import { antennas } from './stations.js';

export const bookings = sqliteTable(
  'bookings',
  {
    id: id(),
    number: ms('number').notNull().unique(),
    operatorId: text('operator_id')
      .notNull()
      .references(() => organisations.id),
    ownerId: text('owner_id')
      .notNull()
      .references(() => organisations.id),
    spacecraftId: text('spacecraft_id')
      .notNull()
      .references(() => spacecraft.id),
    antennaId: text('antenna_id')
      .notNull()
      .references(() => antennas.id),
    beam: ms('beam').notNull(),
    elementSetId: text('element_set_id')
      .notNull()
      .references(() => elementSets.id),
    need: text('need').$type<Need>().notNull(),
    state: text('state').$type<BookingState>().notNull(),
    aosMs: ms('aos_ms').notNull(),
    tcaMs: ms('tca_ms').notNull(),
    losMs: ms('los_ms').notNull(),
    /** AOS less set-up and LOS plus teardown: what the antenna is really busy for. */
    guardFromMs: ms('guard_from_ms').notNull(),
    guardToMs: ms('guard_to_ms').notNull(),
    /** The pass as it was sold. */
    pass: json<PassGeometry>('pass').notNull(),
    /** The price as it was frozen. */
    quote: json<Quote>('quote').notNull(),
    currency: text('currency').notNull(),
    netMinor: minor('net_minor').notNull(),
    vatMinor: minor('vat_minor').notNull(),
    toPayMinor: minor('to_pay_minor').notNull(),
    holdEndsMs: ms('hold_ends_ms'),
    answerByMs: ms('answer_by_ms'),
    report: json<ContactReport>('report'),
    createdBy: text('created_by')
      .notNull()
      .references(() => people.id),
    createdMs: ms('created_ms').notNull(),
    changedMs: ms('changed_ms').notNull(),
  },
  (t) => [
    index('bookings_beam').on(t.antennaId, t.beam, t.guardFromMs),
    index('bookings_spacecraft').on(t.spacecraftId, t.aosMs),
    index('bookings_operator').on(t.operatorId, t.aosMs),
    index('bookings_owner').on(t.ownerId, t.aosMs),
    index('bookings_state').on(t.state, t.aosMs),
    check(
      'bookings_order',
      sql`${t.guardFromMs} <= ${t.aosMs} AND ${t.aosMs} < ${t.losMs} AND ${t.losMs} <= ${t.guardToMs} AND ${t.guardToMs} - ${t.guardFromMs} <= 700000000`,
    ),
    check(
      'bookings_money',
      sql`${t.netMinor} >= 0 AND ${t.vatMinor} >= 0 AND ${t.toPayMinor} = ${t.netMinor} + ${t.vatMinor}`,
    ),
    check('bookings_beam_range', sql`${t.beam} BETWEEN 1 AND 8`),
  ],
);

/** Everything that happened to a booking, in order; rows can't be changed (triggers). */
export const bookingEvents = sqliteTable(
  'booking_events',
  {
    id: id(),
    bookingId: text('booking_id')
      .notNull()
      .references(() => bookings.id),
    atMs: ms('at_ms').notNull(),
    kind: text('kind').notNull(),
    fromState: text('from_state'),
    toState: text('to_state'),
    sentence: text('sentence').notNull(),
    actorId: text('actor_id').references(() => people.id),
    actorOrganisationId: text('actor_organisation_id').references(() => organisations.id),
  },
  (t) => [index('booking_events_booking').on(t.bookingId, t.atMs)],
);

export type PaymentState =
  | 'waiting for the buyer'
  | 'authorised'
  | 'capturing'
  | 'captured'
  | 'releasing'
  | 'released'
  | 'refunding'
  | 'refunded'
  | 'failed';

export const payments = sqliteTable(
  'payments',
  {
    id: id(),
    bookingId: text('booking_id')
      .notNull()
      .unique()
      .references(() => bookings.id),
    /** The provider's PaymentIntent. */
    intentId: text('intent_id').unique(),
    /** The provider's hosted page for this payment, where one was opened. */
    checkoutId: text('checkout_id').unique(),
    checkoutUrl: text('checkout_url'),
    state: text('state').$type<PaymentState>().notNull(),
    currency: text('currency').notNull(),
    amountMinor: minor('amount_minor').notNull(),
    capturedMinor: minor('captured_minor').notNull(),
    refundedMinor: minor('refunded_minor').notNull(),
    card: text('card'),
    failure: text('failure'),
    captureBeforeMs: ms('capture_before_ms'),
    createdMs: ms('created_ms').notNull(),
    changedMs: ms('changed_ms').notNull(),
  },
  (t) => [
    check(
      'payments_amounts',
      sql`${t.amountMinor} >= 0 AND ${t.capturedMinor} BETWEEN 0 AND ${t.amountMinor} AND ${t.refundedMinor} BETWEEN 0 AND ${t.capturedMinor}`,
    ),
  ],
);

/** Every verified event of the provider, once; `processedMs` is set in the transaction that acts on it. */
export const providerEvents = sqliteTable(
  'provider_events',
  {
    /** The provider's own event id. */
    id: text('id').primaryKey(),
    type: text('type').notNull(),
    payload: text('payload').notNull(),
    receivedMs: ms('received_ms').notNull(),
    processedMs: ms('processed_ms'),
    outcome: text('outcome'),
  },
  (t) => [index('provider_events_open').on(t.processedMs, t.receivedMs)],
);
