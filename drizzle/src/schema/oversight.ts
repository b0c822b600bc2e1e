/** Organisations that the marketplace has suspended. No row: in good standing. What was done when stands in the audit trail. */
import { sql } from 'drizzle-orm';
import { check, sqliteTable, text } from 'drizzle-orm/sqlite-core';
import { organisations, people } from './accounts.js';
import { ms } from './columns.js';

export const suspensions = sqliteTable(
  'suspensions',
  {
    organisationId: text('organisation_id')
      .primaryKey()
      .references(() => organisations.id),
    reason: text('reason').notNull(),
    suspendedBy: text('suspended_by')
      .notNull()
      .references(() => people.id),
    suspendedMs: ms('suspended_ms').notNull(),
  },
  (t) => [check('suspensions_reason', sql`length(${t.reason}) > 0`)],
);
