/** Plans of contacts: what was asked, what was found, and what became of it. */
import {
  PLAN_STATES,
  PLAN_WORK,
  type PlanInput,
  type PlanOutcome,
  type PlanState,
  type PlanWork,
} from '@skyberth/shared';
import { sql } from 'drizzle-orm';
import { check, index, sqliteTable, text } from 'drizzle-orm/sqlite-core';
import { organisations, people } from './accounts.js';
import { id, json, ms } from './columns.js';

const oneOf = (values: readonly string[]) => sql.raw(values.map((value) => `'${value}'`).join(', '));

export const plans = sqliteTable(
  'plans',
  {
    id: id(),
    operatorId: text('operator_id')
      .notNull()
      .references(() => organisations.id),
    state: text('state').$type<PlanState>().notNull(),
    /** Whether somebody is computing it; `working` without a running computation means that the server stopped meanwhile. */
    work: text('work').$type<PlanWork>().notNull(),
    need: json<PlanInput>('need').notNull(),
    pinnedKeys: json<string[]>('pinned_keys').notNull(),
    struckKeys: json<string[]>('struck_keys').notNull(),
    failure: text('failure'),
    /** The bookings that were held together from it, by the id of their group. */
    groupId: text('group_id'),
    outcome: json<PlanOutcome>('outcome'),
    createdBy: text('created_by')
      .notNull()
      .references(() => people.id),
    createdMs: ms('created_ms').notNull(),
    changedMs: ms('changed_ms').notNull(),
  },
  (t) => [
    index('plans_operator').on(t.operatorId, t.changedMs),
    check('plans_state', sql`${t.state} IN (${oneOf(PLAN_STATES)})`),
    check('plans_work', sql`${t.work} IN (${oneOf(PLAN_WORK)})`),
    check('plans_failure', sql`(${t.failure} IS NOT NULL) = (${t.work} = 'failed')`),
  ],
);
