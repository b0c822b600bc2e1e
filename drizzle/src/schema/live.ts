/** Contacts as they happen, who is at a dish, and what one watch leaves to the next. */
import { sql } from 'drizzle-orm';
import { check, index, integer, real, sqliteTable, text, uniqueIndex } from 'drizzle-orm/sqlite-core';
import { organisations, people } from './accounts.js';
import { bookings } from './bookings.js';
import { id, ms } from './columns.js';
import { antennas, stations } from './stations.js';

export type ContactEventKind = 'acquired' | 'lost' | 'bytes' | 'eb/n0' | 'note' | 'diary';

/**
 * What listeners are sent, in the order of `seq`. Writers queue, so a larger number is never visible before a smaller one:
 * whoever remembers the last number seen misses nothing and gets nothing twice. Every line of the diary is added by a
 * trigger; rows can't be changed.
 */
export const contactEvents = sqliteTable(
  'contact_events',
  {
    seq: integer('seq', { mode: 'number' }).primaryKey({ autoIncrement: true }),
    bookingId: text('booking_id')
      .notNull()
      .references(() => bookings.id),
    kind: text('kind').$type<ContactEventKind>().notNull(),
    /** When it was written down. */
    atMs: ms('at_ms').notNull(),
    /** When it happened, as the station says. */
    happenedMs: ms('happened_ms').notNull(),
    /** Bytes received so far, or Eb/N0 in dB; null for the other kinds. */
    value: real('value'),
    sentence: text('sentence').notNull(),
    actorId: text('actor_id').references(() => people.id),
    actorOrganisationId: text('actor_organisation_id').references(() => organisations.id),
  },
  (t) => [
    index('contact_events_booking').on(t.bookingId, t.seq),
    check('contact_events_value', sql`(${t.value} IS NULL) = (${t.kind} NOT IN ('bytes', 'eb/n0'))`),
    check('contact_events_bytes', sql`${t.kind} <> 'bytes' OR ${t.value} >= 0`),
  ],
);

/** People inside the fence of a dish. A row without a time of leaving is somebody who is there now. */
export const dishVisits = sqliteTable(
  'dish_visits',
  {
    id: id(),
    antennaId: text('antenna_id')
      .notNull()
      .references(() => antennas.id),
    name: text('name').notNull(),
    cameMs: ms('came_ms').notNull(),
    signedInBy: text('signed_in_by')
      .notNull()
      .references(() => people.id),
    leftMs: ms('left_ms'),
    signedOutBy: text('signed_out_by').references(() => people.id),
  },
  (t) => [
    index('dish_visits_antenna').on(t.antennaId, t.leftMs),
    uniqueIndex('dish_visits_once').on(t.antennaId, t.name).where(sql`left_ms IS NULL`),
    check('dish_visits_name', sql`length(${t.name}) > 0`),
    check('dish_visits_left', sql`(${t.leftMs} IS NULL) = (${t.signedOutBy} IS NULL)`),
  ],
);

/** A dish that is to stay still. No row: it may move. */
export const dishStops = sqliteTable('dish_stops', {
  antennaId: text('antenna_id')
    .primaryKey()
    .references(() => antennas.id),
  reason: text('reason').notNull(),
  stoppedMs: ms('stopped_ms').notNull(),
  stoppedBy: text('stopped_by')
    .notNull()
    .references(() => people.id),
});

/** What one watch writes for the next; buyers never see it. */
export const handOverNotes = sqliteTable(
  'hand_over_notes',
  {
    id: id(),
    stationId: text('station_id')
      .notNull()
      .references(() => stations.id),
    text: text('text').notNull(),
    writtenMs: ms('written_ms').notNull(),
    writtenBy: text('written_by')
      .notNull()
      .references(() => people.id),
  },
  (t) => [index('hand_over_notes_station').on(t.stationId, t.writtenMs)],
);
