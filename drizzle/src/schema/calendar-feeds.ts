/** Secret addresses from which calendars read contacts. */
import { sql } from 'drizzle-orm';
import { check, index, sqliteTable, text } from 'drizzle-orm/sqlite-core';
import { organisations, people } from './accounts.js';
import { id, ms } from './columns.js';
import { antennas } from './stations.js';

/** Made by a person for themselves, and never changed but for its one end (triggers). */
export const calendarFeeds = sqliteTable(
  'calendar_feeds',
  {
    id: id(),
    personId: text('person_id')
      .notNull()
      .references(() => people.id),
    organisationId: text('organisation_id')
      .notNull()
      .references(() => organisations.id),
    /** The only antenna whose contacts it shows; null for all contacts of the organisation. */
    antennaId: text('antenna_id').references(() => antennas.id),
    /** SHA-256 of the secret part of the address, hexadecimal. */
    hash: text('hash').notNull().unique(),
    createdMs: ms('created_ms').notNull(),
    revokedMs: ms('revoked_ms'),
  },
  (t) => [
    index('calendar_feeds_person').on(t.personId, t.organisationId),
    check('calendar_feeds_hash', sql`length(${t.hash}) = 64`),
    check('calendar_feeds_end', sql`${t.revokedMs} IS NULL OR ${t.revokedMs} >= ${t.createdMs}`),
  ],
);
