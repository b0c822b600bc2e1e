/** Disputes and what belongs to them: the only place with SQL about it. */
import { Inject, Injectable } from '@nestjs/common';
import {
  antennaMasks,
  contactEvents,
  disputeDecisions,
  disputeEvidence,
  disputeStatements,
  disputes,
  outbox,
  people,
  type SkyberthDatabase,
} from '@skyberth/drizzle';
import type { DisputeReason, DisputeState, Principal } from '@skyberth/shared';
import { and, asc, count, desc, eq, inArray, like, lte, max, ne, or, type SQL } from 'drizzle-orm';
import { DATABASE } from '../platform/database.module.js';
import { notFound } from '../platform/domain-error.js';
import type { Db } from '../platform/transaction.js';

export type DisputeRow = typeof disputes.$inferSelect;
export type StatementRow = typeof disputeStatements.$inferSelect;
export type DecisionRow = typeof disputeDecisions.$inferSelect;
type EvidenceRow = typeof disputeEvidence.$inferSelect;

const FIRST_NUMBER = 1;

@Injectable()
export class DisputeRepository {
  constructor(@Inject(DATABASE) private readonly db: SkyberthDatabase) {}

  /** Throws `not-found` where the viewer stands on no side of it and is no admin. */
  forViewer(viewer: Principal, id: string, tx: Db = this.db): DisputeRow {
    const row = tx
      .select()
      .from(disputes)
      .where(and(eq(disputes.id, id), visibleTo(viewer)))
      .get();
    if (!row) throw notFound('dispute');
    return row;
  }

  ofBooking(tx: Db, bookingId: string): DisputeRow | undefined {
    return tx.select().from(disputes).where(eq(disputes.bookingId, bookingId)).get();
  }

  page(
    viewer: Principal,
    query: { states: readonly DisputeState[] | null; bookingId: string | null; page: number; pageSize: number },
  ): { rows: DisputeRow[]; total: number } {
    const where = and(
      visibleTo(viewer),
      query.states === null ? undefined : inArray(disputes.state, [...query.states]),
      query.bookingId === null ? undefined : eq(disputes.bookingId, query.bookingId),
    );
    const rows = this.db
      .select()
      .from(disputes)
      .where(where)
      .orderBy(desc(disputes.openedMs))
      .limit(query.pageSize)
      .offset((query.page - 1) * query.pageSize)
      .all();
    const total = this.db.select({ rows: count() }).from(disputes).where(where).get();
    return { rows, total: total?.rows ?? 0 };
  }

  nextNumber(tx: Db): number {
    const row = tx
      .select({ last: max(disputes.number) })
      .from(disputes)
      .get();
    return (row?.last ?? FIRST_NUMBER - 1) + 1;
  }

  insert(tx: Db, row: DisputeRow): void {
    tx.insert(disputes).values(row).run();
  }

  change(tx: Db, id: string, change: Partial<DisputeRow>): void {
    tx.update(disputes).set(change).where(eq(disputes.id, id)).run();
  }

  addStatement(tx: Db, row: StatementRow): void {
    tx.insert(disputeStatements).values(row).run();
  }

  /** Whether the viewer may see the dispute that a statement belongs to. */
  seesStatement(viewer: Principal, statementId: string): boolean {
    const row = this.db
      .select({ id: disputes.id })
      .from(disputeStatements)
      .innerJoin(disputes, eq(disputes.id, disputeStatements.disputeId))
      .where(and(eq(disputeStatements.id, statementId), visibleTo(viewer)))
      .get();
    return row !== undefined;
  }

  statements(disputeId: string): { row: StatementRow; name: string }[] {
    return this.db
      .select({ row: disputeStatements, name: people.name })
      .from(disputeStatements)
      .innerJoin(people, eq(people.id, disputeStatements.personId))
      .where(eq(disputeStatements.disputeId, disputeId))
      .orderBy(asc(disputeStatements.atMs), asc(disputeStatements.id))
      .all();
  }

  addEvidence(tx: Db, disputeId: string, evidence: EvidenceRow['evidence'], assembledMs: number): void {
    const last = tx
      .select({ version: max(disputeEvidence.version) })
      .from(disputeEvidence)
      .where(eq(disputeEvidence.disputeId, disputeId))
      .get();
    const version = (last?.version ?? 0) + 1;
    tx.insert(disputeEvidence).values({ disputeId, version, assembledMs, evidence }).run();
  }

  /** The newest; the earlier ones stay in the database. */
  evidence(disputeId: string): EvidenceRow {
    const row = this.db
      .select()
      .from(disputeEvidence)
      .where(eq(disputeEvidence.disputeId, disputeId))
      .orderBy(desc(disputeEvidence.version))
      .limit(1)
      .get();
    if (!row) throw new Error(`The dispute ${disputeId} has no evidence.`);
    return row;
  }

  addDecision(tx: Db, row: DecisionRow): void {
    tx.insert(disputeDecisions).values(row).run();
  }

  decisions(disputeId: string, tx: Db = this.db): { row: DecisionRow; name: string }[] {
    return tx
      .select({ row: disputeDecisions, name: people.name })
      .from(disputeDecisions)
      .innerJoin(people, eq(people.id, disputeDecisions.decidedBy))
      .where(eq(disputeDecisions.disputeId, disputeId))
      .orderBy(asc(disputeDecisions.round))
      .all();
  }

  precedents(reason: DisputeReason | undefined, most: number) {
    return this.db
      .select({ dispute: disputes, decision: disputeDecisions })
      .from(disputeDecisions)
      .innerJoin(disputes, eq(disputes.id, disputeDecisions.disputeId))
      .where(reason ? eq(disputes.reason, reason) : undefined)
      .orderBy(desc(disputeDecisions.decidedMs))
      .limit(most)
      .all();
  }

  /** Decided, and the time for an appeal is over. */
  beyondAppeal(nowMs: number): DisputeRow[] {
    return this.db
      .select()
      .from(disputes)
      .where(and(eq(disputes.state, 'decided'), lte(disputes.appealByMs, nowMs)))
      .all();
  }

  /** The mask that was published when the contact took place; none where the antenna had none then. */
  maskAt(antennaId: string, atMs: number): [number, number][] | undefined {
    const row = this.db
      .select({ points: antennaMasks.points })
      .from(antennaMasks)
      .where(and(eq(antennaMasks.antennaId, antennaId), lte(antennaMasks.publishedMs, atMs)))
      .orderBy(desc(antennaMasks.version))
      .limit(1)
      .get();
    return row?.points;
  }

  /** What the station reported while it happened. */
  liveReports(bookingId: string) {
    return this.db
      .select()
      .from(contactEvents)
      .where(and(eq(contactEvents.bookingId, bookingId), ne(contactEvents.kind, 'diary')))
      .orderBy(asc(contactEvents.happenedMs), asc(contactEvents.seq))
      .all();
  }

  /** Subjects of the mails about a booking, whoever got them, each once. */
  mailsAbout(bookingId: string): { atMs: number; subject: string }[] {
    const rows = this.db
      .select({ atMs: outbox.createdMs, payload: outbox.payload })
      .from(outbox)
      .where(and(eq(outbox.kind, 'mail'), like(outbox.dedupeKey, `mail:booking:${bookingId}:%`)))
      .orderBy(asc(outbox.createdMs))
      .all();
    const seen = new Set<string>();
    return rows.flatMap(({ atMs, payload }) => {
      const { subject } = JSON.parse(payload) as { subject: string };
      const key = `${atMs} ${subject}`;
      if (seen.has(key)) return [];
      seen.add(key);
      return [{ atMs, subject }];
    });
  }
}

function visibleTo(viewer: Principal): SQL | undefined {
  if (viewer.organisationKind === 'staff') return undefined;
  return or(eq(disputes.operatorId, viewer.organisationId), eq(disputes.ownerId, viewer.organisationId));
}
