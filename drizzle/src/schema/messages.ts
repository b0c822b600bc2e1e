/** What the two sides of a contact write to each other, and how far each person has read. */
import { sql } from 'drizzle-orm';
import { check, index, integer, primaryKey, sqliteTable, text } from 'drizzle-orm/sqlite-core';
import { people } from './accounts.js';
import { bookings } from './bookings.js';
import { ms } from './columns.js';

/** In the order of `seq`; rows can't be changed (triggers). */
export const messages = sqliteTable(
  'messages',
  {
    seq: integer('seq', { mode: 'number' }).primaryKey({ autoIncrement: true }),
    id: text('id').notNull().unique(),
    bookingId: text('booking_id')
      .notNull()
      .references(() => bookings.id),
    side: text('side').$type<'operator' | 'owner' | 'admin'>().notNull(),
    personId: text('person_id')
      .notNull()
      .references(() => people.id),
    atMs: ms('at_ms').notNull(),
    text: text('text').notNull(),
  },
  (t) => [
    index('messages_booking').on(t.bookingId, t.seq),
    check('messages_side', sql`${t.side} IN ('operator','owner','admin')`),
    check('messages_text', sql`length(${t.text}) > 0`),
  ],
);

/** The last message that a person has read of a contact. */
export const messageReads = sqliteTable(
  'message_reads',
  {
    personId: text('person_id')
      .notNull()
      .references(() => people.id),
    bookingId: text('booking_id')
      .notNull()
      .references(() => bookings.id),
    seq: ms('seq').notNull(),
  },
  (t) => [primaryKey({ columns: [t.personId, t.bookingId] })],
);
