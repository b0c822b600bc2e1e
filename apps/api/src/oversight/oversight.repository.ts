/** Organisations as the marketplace's admins see them, and the audit trail. */
import { Inject, Injectable } from '@nestjs/common';
import {
  auditLog,
  bookings,
  memberships,
  organisations,
  people,
  type SkyberthDatabase,
  suspensions,
} from '@skyberth/drizzle';
import {
  BOOKING_STATE_FACTS,
  BOOKING_STATES,
  type OrganisationKind,
  type QueryOf,
  type routes,
} from '@skyberth/shared';
import { and, asc, count, desc, eq, gt, gte, inArray, isNotNull, isNull, lt, or, type SQL, sql } from 'drizzle-orm';
import { DATABASE } from '../platform/database.module.js';
import type { Db } from '../platform/transaction.js';

type AccountQuery = QueryOf<typeof routes.listAccounts>;
type AuditQuery = QueryOf<typeof routes.listAudit>;
export type AuditLogRow = typeof auditLog.$inferSelect;

const OPEN = BOOKING_STATES.filter((state) => BOOKING_STATE_FACTS[state].open);

export interface AccountRow {
  readonly id: string;
  readonly kind: OrganisationKind;
  readonly name: string;
  readonly country: string;
  readonly billingEmail: string;
  readonly vatNumber: string | null;
  readonly createdMs: number;
  readonly members: number;
  readonly openBookings: number;
  readonly lastSeenMs: number | null;
  readonly suspendedMs: number | null;
  readonly reason: string | null;
  readonly suspendedByName: string | null;
}

@Injectable()
export class OversightRepository {
  constructor(@Inject(DATABASE) private readonly db: SkyberthDatabase) {}

  accounts(query: AccountQuery): { readonly rows: AccountRow[]; readonly total: number } {
    const wanted = this.wanted(query);
    const rows = this.select(this.db)
      .where(wanted)
      .orderBy(asc(sql`lower(${organisations.name})`))
      .limit(query.pageSize)
      .offset((query.page - 1) * query.pageSize)
      .all();
    const total = this.db
      .select({ rows: count() })
      .from(organisations)
      .leftJoin(suspensions, eq(suspensions.organisationId, organisations.id))
      .where(wanted)
      .get();
    return { rows, total: total?.rows ?? 0 };
  }

  account(id: string, db: Db = this.db): AccountRow | undefined {
    return this.select(db).where(eq(organisations.id, id)).get();
  }

  peopleOf(organisationId: string) {
    return this.db
      .select({
        id: people.id,
        name: people.name,
        email: people.email,
        role: memberships.role,
        lastSeenMs: people.lastSeenMs,
      })
      .from(memberships)
      .innerJoin(people, eq(people.id, memberships.personId))
      .where(eq(memberships.organisationId, organisationId))
      .orderBy(asc(people.name))
      .all();
  }

  suspend(tx: Db, row: typeof suspensions.$inferInsert): void {
    tx.insert(suspensions).values(row).run();
  }

  reinstate(tx: Db, organisationId: string): void {
    tx.delete(suspensions).where(eq(suspensions.organisationId, organisationId)).run();
  }

  audit(query: AuditQuery) {
    const { subject, action, organisationId, fromUtc, toUtc, beforeSeq, pageSize } = query;
    return this.db
      .select({ row: auditLog, personName: people.name, organisationName: organisations.name })
      .from(auditLog)
      .leftJoin(people, eq(people.id, auditLog.personId))
      .leftJoin(organisations, eq(organisations.id, auditLog.organisationId))
      .where(
        and(
          subject ? beginsWith(auditLog.subject, subject) : undefined,
          action ? beginsWith(auditLog.action, action) : undefined,
          organisationId ? eq(auditLog.organisationId, organisationId) : undefined,
          fromUtc ? gte(auditLog.atMs, Date.parse(fromUtc)) : undefined,
          toUtc ? lt(auditLog.atMs, Date.parse(toUtc)) : undefined,
          beforeSeq ? lt(auditLog.seq, beforeSeq) : undefined,
        ),
      )
      .orderBy(desc(auditLog.seq))
      .limit(pageSize)
      .all();
  }

  /** Up to `most` rows after `seq`, in order. */
  auditAfter(seq: number, most: number): AuditLogRow[] {
    return this.db.select().from(auditLog).where(gt(auditLog.seq, seq)).orderBy(asc(auditLog.seq)).limit(most).all();
  }

  private select(db: Db) {
    const ofIt = or(eq(bookings.operatorId, organisations.id), eq(bookings.ownerId, organisations.id));
    return db
      .select({
        id: organisations.id,
        kind: organisations.kind,
        name: organisations.name,
        country: sql<string>`json_extract(${organisations.address}, '$.country')`,
        billingEmail: organisations.billingEmail,
        vatNumber: organisations.vatNumber,
        createdMs: organisations.createdMs,
        members: sql<number>`(select count(*) from ${memberships} where ${eq(memberships.organisationId, organisations.id)})`,
        openBookings: sql<number>`(select count(*) from ${bookings} where ${and(ofIt, inArray(bookings.state, OPEN))})`,
        lastSeenMs: sql<number | null>`(select max(seen.last_seen_ms) from ${memberships} inner join ${people} as seen
          on seen.id = ${memberships.personId} where ${eq(memberships.organisationId, organisations.id)})`,
        suspendedMs: suspensions.suspendedMs,
        reason: suspensions.reason,
        suspendedByName: people.name,
      })
      .from(organisations)
      .leftJoin(suspensions, eq(suspensions.organisationId, organisations.id))
      .leftJoin(people, eq(people.id, suspensions.suspendedBy));
  }

  private wanted({ kind, search, standing }: AccountQuery): SQL | undefined {
    const text = search?.trim().toLowerCase();
    const member = sql`exists (select 1 from ${memberships} inner join ${people} as who on who.id = ${memberships.personId}
      where ${eq(memberships.organisationId, organisations.id)} and instr(who.email, ${text ?? ''}) > 0)`;
    return and(
      kind ? eq(organisations.kind, kind) : undefined,
      standing === 'suspended' ? isNotNull(suspensions.organisationId) : undefined,
      standing === 'good' ? isNull(suspensions.organisationId) : undefined,
      text ? or(sql`instr(lower(${organisations.name}), ${text}) > 0`, member) : undefined,
    );
  }
}

/** Compares the head of a column byte by byte, so that no character of the text is a pattern. */
const beginsWith = (column: typeof auditLog.subject | typeof auditLog.action, head: string): SQL =>
  sql`substr(${column}, 1, ${head.length}) = ${head}`;
