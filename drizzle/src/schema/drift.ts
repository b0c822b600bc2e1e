/** What newer elements do to booked contacts: what was looked at, what moved, and what the operator is asked. */
import type { PassGeometry } from '@skyberth/shared';
import { sql } from 'drizzle-orm';
import { check, index, integer, sqliteTable, text, uniqueIndex } from 'drizzle-orm/sqlite-core';
import { people } from './accounts.js';
import { bookings } from './bookings.js';
import { id, json, ms } from './columns.js';
import { elementSets } from './spacecraft.js';

/** When a booked contact was last held against the elements in force, and how far they had moved it. */
export const driftChecks = sqliteTable('drift_checks', {
  bookingId: text('booking_id')
    .primaryKey()
    .references(() => bookings.id),
  checkedMs: ms('checked_ms').notNull(),
  elementSetId: text('element_set_id')
    .notNull()
    .references(() => elementSets.id),
  /** Later is positive; null where the pass is lost or could not be computed. */
  aosShiftMs: ms('aos_shift_ms'),
  losShiftMs: ms('los_shift_ms'),
});

/**
 * Every change of a booked contact's times, with the geometry before and after. The times of a booking change only to what
 * its newest row here says (trigger); rows can't be changed.
 */
export const bookingRetimes = sqliteTable(
  'booking_retimes',
  {
    seq: integer('seq', { mode: 'number' }).primaryKey({ autoIncrement: true }),
    bookingId: text('booking_id')
      .notNull()
      .references(() => bookings.id),
    atMs: ms('at_ms').notNull(),
    cause: text('cause').$type<'inside the guard' | 'accepted'>().notNull(),
    fromElementSetId: text('from_element_set_id')
      .notNull()
      .references(() => elementSets.id),
    toElementSetId: text('to_element_set_id')
      .notNull()
      .references(() => elementSets.id),
    fromAosMs: ms('from_aos_ms').notNull(),
    fromLosMs: ms('from_los_ms').notNull(),
    toAosMs: ms('to_aos_ms').notNull(),
    toTcaMs: ms('to_tca_ms').notNull(),
    toLosMs: ms('to_los_ms').notNull(),
    toGuardFromMs: ms('to_guard_from_ms').notNull(),
    toGuardToMs: ms('to_guard_to_ms').notNull(),
    fromPass: json<PassGeometry>('from_pass').notNull(),
    toPass: json<PassGeometry>('to_pass').notNull(),
    /** Who accepted it; null where it was inside the guard. */
    acceptedBy: text('accepted_by').references(() => people.id),
  },
  (t) => [
    index('booking_retimes_booking').on(t.bookingId, t.seq),
    check('booking_retimes_order', sql`${t.toAosMs} < ${t.toLosMs}`),
    check('booking_retimes_accepted', sql`(${t.acceptedBy} IS NULL) = (${t.cause} = 'inside the guard')`),
  ],
);

/** A shift too large to be made without asking. One question is open for a booking at a time. */
export const driftQuestions = sqliteTable(
  'drift_questions',
  {
    id: id(),
    bookingId: text('booking_id')
      .notNull()
      .references(() => bookings.id),
    elementSetId: text('element_set_id')
      .notNull()
      .references(() => elementSets.id),
    state: text('state').$type<'open' | 'accepted' | 'cancelled' | 'overtaken'>().notNull(),
    toAosMs: ms('to_aos_ms').notNull(),
    toTcaMs: ms('to_tca_ms').notNull(),
    toLosMs: ms('to_los_ms').notNull(),
    toPass: json<PassGeometry>('to_pass').notNull(),
    sentence: text('sentence').notNull(),
    askedMs: ms('asked_ms').notNull(),
    answeredMs: ms('answered_ms'),
    answeredBy: text('answered_by').references(() => people.id),
  },
  (t) => [
    index('drift_questions_booking').on(t.bookingId, t.askedMs),
    uniqueIndex('drift_questions_open').on(t.bookingId).where(sql`state = 'open'`),
    check('drift_questions_state', sql`${t.state} IN ('open', 'accepted', 'cancelled', 'overtaken')`),
    check('drift_questions_answered', sql`(${t.answeredMs} IS NULL) = (${t.state} = 'open')`),
  ],
);
