/** Leave to transmit to a spacecraft from a station in a band, its history, and the contacts that were sold under it. */
import { sql } from 'drizzle-orm';
import { check, index, integer, primaryKey, sqliteTable, text, uniqueIndex } from 'drizzle-orm/sqlite-core';
import { organisations, people } from './accounts.js';
import { bookings } from './bookings.js';
import { id, ms } from './columns.js';
import { spacecraft } from './spacecraft.js';
import { stations } from './stations.js';

type State = 'requested' | 'granted' | 'in force' | 'refused' | 'withdrawn' | 'expired';

export const clearances = sqliteTable(
  'clearances',
  {
    id: id(),
    number: integer('number').notNull().unique(),
    spacecraftId: text('spacecraft_id')
      .notNull()
      .references(() => spacecraft.id),
    operatorId: text('operator_id')
      .notNull()
      .references(() => organisations.id),
    stationId: text('station_id')
      .notNull()
      .references(() => stations.id),
    ownerId: text('owner_id')
      .notNull()
      .references(() => organisations.id),
    band: text('band').$type<'VHF' | 'UHF' | 'L' | 'S' | 'C' | 'X' | 'Ku' | 'Ka'>().notNull(),
    state: text('state').$type<State>().notNull(),
    validFromMs: ms('valid_from_ms').notNull(),
    validToMs: ms('valid_to_ms').notNull(),
    purpose: text('purpose').notNull(),
    conditions: text('conditions').notNull(),
    requestedBy: text('requested_by')
      .notNull()
      .references(() => people.id),
    requestedMs: ms('requested_ms').notNull(),
    changedMs: ms('changed_ms').notNull(),
  },
  (t) => [
    index('clearances_operator').on(t.operatorId, t.state),
    index('clearances_owner').on(t.ownerId, t.state),
    index('clearances_state').on(t.state, t.validToMs),
    uniqueIndex('clearances_once')
      .on(t.spacecraftId, t.stationId, t.band, t.validFromMs)
      .where(sql`${t.state} IN ('requested','granted','in force')`),
    check('clearances_order', sql`${t.validFromMs} < ${t.validToMs}`),
  ],
);

export const clearanceEvents = sqliteTable(
  'clearance_events',
  {
    id: id(),
    clearanceId: text('clearance_id')
      .notNull()
      .references(() => clearances.id),
    atMs: ms('at_ms').notNull(),
    toState: text('to_state').$type<State>().notNull(),
    sentence: text('sentence').notNull(),
    personId: text('person_id').references(() => people.id),
  },
  (t) => [index('clearance_events_clearance').on(t.clearanceId, t.atMs)],
);

/** Under which clearances a contact that transmits was held; one of them must be in force when it is sold and begins. */
export const bookingClearances = sqliteTable(
  'booking_clearances',
  {
    bookingId: text('booking_id')
      .notNull()
      .references(() => bookings.id),
    clearanceId: text('clearance_id')
      .notNull()
      .references(() => clearances.id),
  },
  (t) => [
    primaryKey({ columns: [t.bookingId, t.clearanceId] }),
    index('booking_clearances_clearance').on(t.clearanceId),
  ],
);
