/** People, their memberships and the links mailed to them. */
import { Injectable } from '@nestjs/common';
import { mailedTokens, memberships, organisations, people } from '@skyberth/drizzle';
import type { Membership } from '@skyberth/shared';
import { and, asc, eq, isNull } from 'drizzle-orm';
import type { Db } from '../platform/transaction.js';

export type Person = typeof people.$inferSelect;
export type MailedToken = typeof mailedTokens.$inferSelect;

@Injectable()
export class PeopleRepository {
  byId(db: Db, id: string): Person | undefined {
    return db.select().from(people).where(eq(people.id, id)).get();
  }

  byEmail(db: Db, email: string): Person | undefined {
    return db.select().from(people).where(eq(people.email, email)).get();
  }

  add(tx: Db, person: typeof people.$inferInsert): void {
    tx.insert(people).values(person).run();
  }

  change(tx: Db, id: string, values: Partial<Pick<Person, 'passwordHash' | 'emailVerifiedMs'>>): void {
    tx.update(people).set(values).where(eq(people.id, id)).run();
  }

  touch(tx: Db, id: string, lastSeenMs: number): void {
    tx.update(people).set({ lastSeenMs }).where(eq(people.id, id)).run();
  }

  /** The oldest membership first. */
  membershipsOf(db: Db, personId: string): Membership[] {
    return db
      .select({
        organisationId: organisations.id,
        organisationName: organisations.name,
        organisationKind: organisations.kind,
        role: memberships.role,
      })
      .from(memberships)
      .innerJoin(organisations, eq(organisations.id, memberships.organisationId))
      .where(eq(memberships.personId, personId))
      .orderBy(asc(memberships.createdMs), asc(organisations.name))
      .all();
  }

  addMailedToken(tx: Db, token: Omit<MailedToken, 'usedMs'>): void {
    tx.insert(mailedTokens).values(token).run();
  }

  findMailedToken(tx: Db, hash: string): MailedToken | undefined {
    return tx.select().from(mailedTokens).where(eq(mailedTokens.hash, hash)).get();
  }

  useMailedToken(tx: Db, hash: string, usedMs: number): void {
    tx.update(mailedTokens).set({ usedMs }).where(eq(mailedTokens.hash, hash)).run();
  }

  /** Every link still open for this person stops working: one of them has been followed. */
  useAllMailedTokens(tx: Db, personId: string, usedMs: number): void {
    const open = and(eq(mailedTokens.personId, personId), isNull(mailedTokens.usedMs));
    tx.update(mailedTokens).set({ usedMs }).where(open).run();
  }
}
