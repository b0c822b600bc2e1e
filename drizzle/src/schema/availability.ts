/** Beyond the weekly hours: openings and blackouts that come once or again. */
import { sql } from 'drizzle-orm';
import { check, index, sqliteTable, text } from 'drizzle-orm/sqlite-core';
import { people } from './accounts.js';
import { id, json, ms } from './columns.js';
import { antennas } from './stations.js';

/** An RFC 5545 recurrence on a clock of its own, added and removed but never changed; a blackout that comes once is a row of `blackouts`. */
export const calendarRules = sqliteTable(
  'calendar_rules',
  {
    id: id(),
    antennaId: text('antenna_id')
      .notNull()
      .references(() => antennas.id, { onDelete: 'cascade' }),
    kind: text('kind').$type<'opening' | 'blackout'>().notNull(),
    /** Null for an opening that comes once. */
    rrule: text('rrule'),
    startLocal: text('start_local').notNull(),
    /** Exactly one of the two says how long it lasts. */
    durationMin: ms('duration_min'),
    endLocal: text('end_local'),
    timeZone: text('time_zone').notNull(),
    exceptLocal: json<string[]>('except_local').notNull(),
    reason: text('reason').notNull(),
    note: text('note').notNull(),
    createdBy: text('created_by').references(() => people.id),
    createdMs: ms('created_ms').notNull(),
  },
  (t) => [
    index('calendar_rules_antenna').on(t.antennaId),
    check('calendar_rules_kind', sql`${t.kind} IN ('opening','blackout')`),
    check('calendar_rules_repeats', sql`${t.kind} = 'opening' OR ${t.rrule} IS NOT NULL`),
    check('calendar_rules_length', sql`(${t.durationMin} IS NULL) <> (${t.endLocal} IS NULL)`),
    check('calendar_rules_positive', sql`${t.durationMin} IS NULL OR ${t.durationMin} > 0`),
  ],
);
