/** Bookings that are held and bought together, and the lines of those who wait for taken time. */
import type { Need, StandbyState } from '@skyberth/shared';
import { sql } from 'drizzle-orm';
import { check, index, sqliteTable, text, uniqueIndex } from 'drizzle-orm/sqlite-core';
import { organisations, people } from './accounts.js';
import { bookings } from './bookings.js';
import { id, json, ms } from './columns.js';
import { spacecraft } from './spacecraft.js';
import { antennas } from './stations.js';

export const bookingGroups = sqliteTable(
  'booking_groups',
  {
    id: id(),
    operatorId: text('operator_id')
      .notNull()
      .references(() => organisations.id),
    createdBy: text('created_by')
      .notNull()
      .references(() => people.id),
    createdMs: ms('created_ms').notNull(),
    holdEndsMs: ms('hold_ends_ms').notNull(),
  },
  (t) => [index('booking_groups_operator').on(t.operatorId, t.createdMs)],
);

export const bookingGroupMembers = sqliteTable(
  'booking_group_members',
  {
    bookingId: text('booking_id')
      .primaryKey()
      .references(() => bookings.id),
    groupId: text('group_id')
      .notNull()
      .references(() => bookingGroups.id),
    /** When its money was secured; it is sold once that is so for all of the group. */
    securedMs: ms('secured_ms'),
  },
  (t) => [index('booking_group_members_group').on(t.groupId)],
);

export const standbyEntries = sqliteTable(
  'standby_entries',
  {
    id: id(),
    /** The order of joining; two of the same millisecond still have one. */
    place: ms('place').notNull().unique(),
    operatorId: text('operator_id')
      .notNull()
      .references(() => organisations.id),
    personId: text('person_id')
      .notNull()
      .references(() => people.id),
    antennaId: text('antenna_id')
      .notNull()
      .references(() => antennas.id),
    spacecraftId: text('spacecraft_id')
      .notNull()
      .references(() => spacecraft.id),
    need: text('need').$type<Need>().notNull(),
    bands: json<string[]>('bands').notNull(),
    aosMs: ms('aos_ms').notNull(),
    losMs: ms('los_ms').notNull(),
    guardFromMs: ms('guard_from_ms').notNull(),
    guardToMs: ms('guard_to_ms').notNull(),
    state: text('state').$type<StandbyState>().notNull(),
    bookingId: text('booking_id').references(() => bookings.id),
    note: text('note').notNull(),
    joinedMs: ms('joined_ms').notNull(),
    changedMs: ms('changed_ms').notNull(),
  },
  (t) => [
    index('standby_entries_line').on(t.antennaId, t.state, t.guardFromMs),
    index('standby_entries_operator').on(t.operatorId, t.joinedMs),
    uniqueIndex('standby_entries_once')
      .on(t.operatorId, t.antennaId, t.spacecraftId, t.aosMs)
      .where(sql`state IN ('waiting','offered')`),
    check('standby_entries_state', sql`${t.state} IN ('waiting','offered','bought','passed','left','ended')`),
    check(
      'standby_entries_order',
      sql`${t.guardFromMs} <= ${t.aosMs} AND ${t.aosMs} < ${t.losMs} AND ${t.losMs} <= ${t.guardToMs}`,
    ),
    check('standby_entries_offer', sql`(${t.state} IN ('offered','bought')) <= (${t.bookingId} IS NOT NULL)`),
  ],
);
