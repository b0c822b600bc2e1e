/** Keys by which a program acts for an organisation. */
import type { ApiKeyScope } from '@skyberth/shared';
import { sql } from 'drizzle-orm';
import { check, index, sqliteTable, text } from 'drizzle-orm/sqlite-core';
import { organisations, people } from './accounts.js';
import { id, json, ms } from './columns.js';

/** Made by a manager, and never changed but for its last use and, once, its end (triggers). */
export const apiKeys = sqliteTable(
  'api_keys',
  {
    id: id(),
    organisationId: text('organisation_id')
      .notNull()
      .references(() => organisations.id),
    /** Who made it; it acts in their name. */
    personId: text('person_id')
      .notNull()
      .references(() => people.id),
    name: text('name').notNull(),
    /** SHA-256 of the whole key, hexadecimal. */
    hash: text('hash').notNull().unique(),
    /** Its last characters, to tell keys apart. */
    tail: text('tail').notNull(),
    scopes: json<ApiKeyScope[]>('scopes').notNull(),
    createdMs: ms('created_ms').notNull(),
    endsMs: ms('ends_ms'),
    lastUsedMs: ms('last_used_ms'),
    revokedMs: ms('revoked_ms'),
    revokedBy: text('revoked_by').references(() => people.id),
  },
  (t) => [
    index('api_keys_organisation').on(t.organisationId),
    check('api_keys_hash', sql`length(${t.hash}) = 64`),
    check('api_keys_tail', sql`length(${t.tail}) = 4`),
    check('api_keys_scopes', sql`json_array_length(${t.scopes}) > 0`),
    check('api_keys_end', sql`${t.endsMs} IS NULL OR ${t.endsMs} > ${t.createdMs}`),
    check('api_keys_revoked', sql`(${t.revokedMs} IS NULL) = (${t.revokedBy} IS NULL)`),
  ],
);
