/** Disputes over how a contact went: what was said, what the system found, what was decided. Only the state of one changes. */
import type {
  BorneBy,
  DecisionEffect,
  DisputeEvidence,
  DisputeOutcome,
  DisputeReason,
  DisputeSide,
  DisputeState,
  Observation,
} from '@skyberth/shared';
import { sql } from 'drizzle-orm';
import { check, index, primaryKey, sqliteTable, text } from 'drizzle-orm/sqlite-core';
import { organisations, people } from './accounts.js';
import { bookings } from './bookings.js';
import { id, json, minor, ms } from './columns.js';

export const disputes = sqliteTable(
  'disputes',
  {
    id: id(),
    number: ms('number').notNull().unique(),
    /** One dispute a contact; an appeal is its second round. */
    bookingId: text('booking_id')
      .notNull()
      .unique()
      .references(() => bookings.id),
    operatorId: text('operator_id')
      .notNull()
      .references(() => organisations.id),
    ownerId: text('owner_id')
      .notNull()
      .references(() => organisations.id),
    reason: text('reason').$type<DisputeReason>().notNull(),
    state: text('state').$type<DisputeState>().notNull(),
    openedMs: ms('opened_ms').notNull(),
    statementDueMs: ms('statement_due_ms').notNull(),
    decideByMs: ms('decide_by_ms').notNull(),
    gapFromMs: ms('gap_from_ms'),
    gapToMs: ms('gap_to_ms'),
    appealByMs: ms('appeal_by_ms'),
    appealedBy: text('appealed_by').$type<DisputeSide>(),
  },
  (t) => [
    index('disputes_operator').on(t.operatorId, t.openedMs),
    index('disputes_owner').on(t.ownerId, t.openedMs),
    index('disputes_state').on(t.state, t.decideByMs),
    check('disputes_state_known', sql`${t.state} IN ('open','decided','appealed','closed')`),
    check('disputes_gap', sql`(${t.gapFromMs} IS NULL AND ${t.gapToMs} IS NULL) OR ${t.gapFromMs} < ${t.gapToMs}`),
  ],
);

export const disputeStatements = sqliteTable(
  'dispute_statements',
  {
    id: id(),
    disputeId: text('dispute_id')
      .notNull()
      .references(() => disputes.id),
    side: text('side').$type<DisputeSide>().notNull(),
    personId: text('person_id')
      .notNull()
      .references(() => people.id),
    atMs: ms('at_ms').notNull(),
    text: text('text').notNull(),
    observations: json<Observation[]>('observations').notNull(),
  },
  (t) => [
    index('dispute_statements_dispute').on(t.disputeId, t.atMs),
    check('dispute_statements_side', sql`${t.side} IN ('operator','owner','admin')`),
  ],
);

/** What the system found, each time it looked. */
export const disputeEvidence = sqliteTable(
  'dispute_evidence',
  {
    disputeId: text('dispute_id')
      .notNull()
      .references(() => disputes.id),
    version: ms('version').notNull(),
    assembledMs: ms('assembled_ms').notNull(),
    evidence: json<DisputeEvidence>('evidence').notNull(),
  },
  (t) => [primaryKey({ columns: [t.disputeId, t.version] })],
);

export const disputeDecisions = sqliteTable(
  'dispute_decisions',
  {
    disputeId: text('dispute_id')
      .notNull()
      .references(() => disputes.id),
    round: ms('round').notNull(),
    outcome: text('outcome').$type<DisputeOutcome>().notNull(),
    refundBasisPoints: ms('refund_basis_points').notNull(),
    borneBy: text('borne_by').$type<BorneBy>().notNull(),
    text: text('text').notNull(),
    decidedBy: text('decided_by')
      .notNull()
      .references(() => people.id),
    decidedMs: ms('decided_ms').notNull(),
    /** What was booked, as it was shown before. */
    effect: json<DecisionEffect>('effect').notNull(),
    refundMinor: minor('refund_minor').notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.disputeId, t.round] }),
    check('dispute_decisions_round', sql`${t.round} IN (1, 2)`),
    check('dispute_decisions_refund', sql`${t.refundMinor} >= 0 AND ${t.refundBasisPoints} BETWEEN 0 AND 10000`),
  ],
);
