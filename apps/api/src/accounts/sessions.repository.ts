/** Session families and their refresh tokens. */
import { Inject, Injectable } from '@nestjs/common';
import { memberships, organisations, refreshTokens, type SkyberthDatabase, sessionFamilies } from '@skyberth/drizzle';
import type { Principal } from '@skyberth/shared';
import { and, eq, isNull, lt } from 'drizzle-orm';
import { DATABASE } from '../platform/database.module.js';
import type { Db } from '../platform/transaction.js';

export type Family = typeof sessionFamilies.$inferSelect;
export type RefreshToken = typeof refreshTokens.$inferSelect;

@Injectable()
export class SessionsRepository {
  constructor(@Inject(DATABASE) private readonly db: SkyberthDatabase) {}

  /** The caller behind a living session, with the role they have now; undefined where session or membership is gone. */
  principalOf(familyId: string, personId: string): (Principal & { readonly familyId: string }) | undefined {
    return this.db
      .select({
        personId: sessionFamilies.personId,
        organisationId: organisations.id,
        organisationKind: organisations.kind,
        role: memberships.role,
        familyId: sessionFamilies.id,
      })
      .from(sessionFamilies)
      .innerJoin(
        memberships,
        and(
          eq(memberships.personId, sessionFamilies.personId),
          eq(memberships.organisationId, sessionFamilies.organisationId),
        ),
      )
      .innerJoin(organisations, eq(organisations.id, memberships.organisationId))
      .where(
        and(
          eq(sessionFamilies.id, familyId),
          eq(sessionFamilies.personId, personId),
          isNull(sessionFamilies.revokedMs),
        ),
      )
      .get();
  }

  addFamily(tx: Db, family: Omit<Family, 'revokedMs' | 'revokedReason'>): void {
    tx.insert(sessionFamilies).values(family).run();
  }

  addToken(tx: Db, token: Omit<RefreshToken, 'usedMs'>): void {
    tx.insert(refreshTokens).values(token).run();
  }

  findToken(tx: Db, hash: string): { token: RefreshToken; family: Family } | undefined {
    return tx
      .select({ token: refreshTokens, family: sessionFamilies })
      .from(refreshTokens)
      .innerJoin(sessionFamilies, eq(sessionFamilies.id, refreshTokens.familyId))
      .where(eq(refreshTokens.hash, hash))
      .get();
  }

  markUsed(tx: Db, hash: string, usedMs: number): void {
    tx.update(refreshTokens).set({ usedMs }).where(eq(refreshTokens.hash, hash)).run();
  }

  touchFamily(tx: Db, familyId: string, values: { lastUsedMs: number; organisationId?: string }): void {
    tx.update(sessionFamilies).set(values).where(eq(sessionFamilies.id, familyId)).run();
  }

  revokeFamily(tx: Db, familyId: string, revokedMs: number, revokedReason: string): boolean {
    const living = and(eq(sessionFamilies.id, familyId), isNull(sessionFamilies.revokedMs));
    return tx.update(sessionFamilies).set({ revokedMs, revokedReason }).where(living).run().changes === 1;
  }

  /** Ends every session of a person, or only those that act for one organisation. */
  revokeOf(
    tx: Db,
    whose: { personId: string; organisationId?: string },
    revokedMs: number,
    revokedReason: string,
  ): void {
    tx.update(sessionFamilies)
      .set({ revokedMs, revokedReason })
      .where(
        and(
          eq(sessionFamilies.personId, whose.personId),
          isNull(sessionFamilies.revokedMs),
          ...(whose.organisationId ? [eq(sessionFamilies.organisationId, whose.organisationId)] : []),
        ),
      )
      .run();
  }

  /** Where this person was last, to bring them back there. */
  lastOrganisationOf(tx: Db, personId: string): string | undefined {
    const families = tx.select().from(sessionFamilies).where(eq(sessionFamilies.personId, personId)).all();
    return families.sort((a, b) => b.lastUsedMs - a.lastUsedMs)[0]?.organisationId;
  }

  /** Tokens that ended long ago tell nothing any more; the families stay as the record of sign-ins. */
  forgetTokens(beforeMs: number): void {
    this.db.delete(refreshTokens).where(lt(refreshTokens.expiresMs, beforeMs)).run();
  }
}
