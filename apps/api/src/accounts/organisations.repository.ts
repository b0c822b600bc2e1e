/** Organisations and who belongs to them. */
import { Injectable } from '@nestjs/common';
import { memberships, organisations, people } from '@skyberth/drizzle';
import type { Role } from '@skyberth/shared';
import { and, asc, count, eq, isNotNull, ne, sql } from 'drizzle-orm';
import type { Db } from '../platform/transaction.js';

export type OrganisationRow = typeof organisations.$inferSelect;
export interface MemberRow {
  readonly personId: string;
  readonly name: string;
  readonly email: string;
  readonly role: Role;
  readonly hasPassword: boolean;
  readonly lastSeenMs: number | null;
}

@Injectable()
export class OrganisationsRepository {
  byId(db: Db, id: string): OrganisationRow | undefined {
    return db.select().from(organisations).where(eq(organisations.id, id)).get();
  }

  byName(db: Db, name: string): OrganisationRow | undefined {
    return db
      .select()
      .from(organisations)
      .where(eq(sql`lower(${organisations.name})`, sql`lower(${name})`))
      .get();
  }

  /** The organisation that runs the marketplace. */
  staff(db: Db): OrganisationRow | undefined {
    return db.select().from(organisations).where(eq(organisations.kind, 'staff')).get();
  }

  add(tx: Db, organisation: typeof organisations.$inferInsert): void {
    tx.insert(organisations).values(organisation).run();
  }

  change(
    tx: Db,
    id: string,
    values: Partial<Pick<OrganisationRow, 'name' | 'address' | 'vatNumber' | 'billingEmail'>>,
  ): void {
    tx.update(organisations).set(values).where(eq(organisations.id, id)).run();
  }

  members(db: Db, organisationId: string): MemberRow[] {
    return this.memberRows(db).where(eq(memberships.organisationId, organisationId)).orderBy(asc(people.name)).all();
  }

  member(db: Db, organisationId: string, personId: string): MemberRow | undefined {
    const one = and(eq(memberships.organisationId, organisationId), eq(memberships.personId, personId));
    return this.memberRows(db).where(one).get();
  }

  private memberRows(db: Db) {
    return db
      .select({
        personId: people.id,
        name: people.name,
        email: people.email,
        role: memberships.role,
        hasPassword: sql<number>`${people.passwordHash} IS NOT NULL`.mapWith(Boolean),
        lastSeenMs: people.lastSeenMs,
      })
      .from(memberships)
      .innerJoin(people, eq(people.id, memberships.personId))
      .$dynamic();
  }

  addMember(tx: Db, member: typeof memberships.$inferInsert): void {
    tx.insert(memberships).values(member).run();
  }

  changeRole(tx: Db, organisationId: string, personId: string, role: Role): void {
    tx.update(memberships)
      .set({ role })
      .where(and(eq(memberships.organisationId, organisationId), eq(memberships.personId, personId)))
      .run();
  }

  removeMember(tx: Db, organisationId: string, personId: string): void {
    tx.delete(memberships)
      .where(and(eq(memberships.organisationId, organisationId), eq(memberships.personId, personId)))
      .run();
  }

  /** Who must hear what happens to the organisation and to what it owns. */
  managerEmails(db: Db, organisationId: string): string[] {
    return db
      .select({ email: people.email })
      .from(memberships)
      .innerJoin(people, eq(people.id, memberships.personId))
      .where(and(eq(memberships.organisationId, organisationId), eq(memberships.role, 'manager')))
      .all()
      .map((row) => row.email);
  }

  /** Managers who can sign in, this person not counted: an invited one may never come. */
  othersWithRole(tx: Db, organisationId: string, { personId, role }: { personId: string; role: Role }): number {
    const row = tx
      .select({ rows: count() })
      .from(memberships)
      .innerJoin(people, eq(people.id, memberships.personId))
      .where(
        and(
          eq(memberships.organisationId, organisationId),
          eq(memberships.role, role),
          ne(memberships.personId, personId),
          isNotNull(people.passwordHash),
        ),
      )
      .get();
    return row?.rows ?? 0;
  }
}
