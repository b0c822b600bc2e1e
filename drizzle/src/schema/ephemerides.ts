/** Operators' own ephemerides, and which contact was sold on one. */
import { sql } from 'drizzle-orm';
import { blob, check, index, sqliteTable, text, uniqueIndex } from 'drizzle-orm/sqlite-core';
import { people } from './accounts.js';
import { bookings } from './bookings.js';
import { id, json, ms } from './columns.js';
import { spacecraft } from './spacecraft.js';

/** One segment without its numbers; `count` states of it lie in the blob. */
export interface StoredSegment {
  readonly frame: 'EME2000' | 'ICRF' | 'GCRF' | 'ITRF' | 'TEME';
  readonly frameName: string;
  readonly startMs: number;
  readonly stopMs: number;
  readonly useableStartMs: number | null;
  readonly useableStopMs: number | null;
  readonly interpolation: 'LINEAR' | 'LAGRANGE' | 'HERMITE' | null;
  readonly interpolationDegree: number | null;
  readonly count: number;
}

export const ephemerides = sqliteTable(
  'ephemerides',
  {
    id: id(),
    spacecraftId: text('spacecraft_id')
      .notNull()
      .references(() => spacecraft.id),
    startMs: ms('start_ms').notNull(),
    stopMs: ms('stop_ms').notNull(),
    objectName: text('object_name').notNull(),
    objectId: text('object_id').notNull(),
    originator: text('originator').notNull(),
    segments: json<StoredSegment[]>('segments').notNull(),
    /** Segment by segment: all instants, UTC ms, then x y z km and vx vy vz km/s for each; 64-bit, little-endian. */
    states: blob('states', { mode: 'buffer' }).notNull(),
    stateCount: ms('state_count').notNull(),
    /** The file as it came. */
    text: text('text').notNull(),
    digest: text('digest').notNull(),
    source: text('source').notNull(),
    addedBy: text('added_by')
      .notNull()
      .references(() => people.id),
    addedMs: ms('added_ms').notNull(),
    withdrawnBy: text('withdrawn_by').references(() => people.id),
    withdrawnMs: ms('withdrawn_ms'),
  },
  (t) => [
    uniqueIndex('ephemerides_digest').on(t.spacecraftId, t.digest).where(sql`${t.withdrawnMs} IS NULL`),
    index('ephemerides_span').on(t.spacecraftId, t.stopMs),
    check('ephemerides_order', sql`${t.startMs} < ${t.stopMs}`),
    check('ephemerides_size', sql`${t.stateCount} BETWEEN 2 AND 200000 AND length(${t.states}) = 56 * ${t.stateCount}`),
    check('ephemerides_withdrawn', sql`(${t.withdrawnBy} IS NULL) = (${t.withdrawnMs} IS NULL)`),
  ],
);

/** Contacts whose pass, or some of it, came from an ephemeris when it was held. */
export const bookingEphemerides = sqliteTable('booking_ephemerides', {
  bookingId: text('booking_id')
    .primaryKey()
    .references(() => bookings.id),
  ephemerisId: text('ephemeris_id')
    .notNull()
    .references(() => ephemerides.id),
  /** Whether an element set served for the rest of the pass. */
  passSource: text('pass_source').$type<'ephemeris' | 'both'>().notNull(),
});
