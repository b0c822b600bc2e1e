/** API keys: the only place with SQL about them. */
import { Inject, Injectable } from '@nestjs/common';
import { apiKeys, memberships, organisations, people, type SkyberthDatabase } from '@skyberth/drizzle';
import type { OrganisationKind, Role } from '@skyberth/shared';
import { and, desc, eq, gt, isNull, or, sql } from 'drizzle-orm';
import { DATABASE } from '../platform/database.module.js';
import type { Db } from '../platform/transaction.js';

export type ApiKeyRow = typeof apiKeys.$inferSelect;

/** A key with who made it; `makerRole` is null once they have left the organisation. */
export interface KnownKey {
  readonly key: ApiKeyRow;
  readonly makerName: string;
  readonly makerRole: Role | null;
  readonly organisationKind: OrganisationKind;
}

@Injectable()
export class ApiKeysRepository {
  constructor(@Inject(DATABASE) private readonly db: SkyberthDatabase) {}

  add(tx: Db, row: Omit<ApiKeyRow, 'lastUsedMs' | 'revokedMs' | 'revokedBy'>): void {
    tx.insert(apiKeys).values(row).run();
  }

  byHash(hash: string): KnownKey | undefined {
    return this.known(this.db).where(eq(apiKeys.hash, hash)).get();
  }

  ofOrganisation(organisationId: string, db: Db = this.db): KnownKey[] {
    return this.known(db)
      .where(eq(apiKeys.organisationId, organisationId))
      .orderBy(desc(apiKeys.createdMs), desc(apiKeys.id))
      .all();
  }

  one(tx: Db, organisationId: string, id: string): KnownKey | undefined {
    return this.known(tx)
      .where(and(eq(apiKeys.organisationId, organisationId), eq(apiKeys.id, id)))
      .get();
  }

  /** Keys that are neither revoked nor ended. */
  living(tx: Db, organisationId: string, nowMs: number): number {
    const row = tx
      .select({ rows: sql<number>`count(*)` })
      .from(apiKeys)
      .where(
        and(
          eq(apiKeys.organisationId, organisationId),
          isNull(apiKeys.revokedMs),
          or(isNull(apiKeys.endsMs), gt(apiKeys.endsMs, nowMs)),
        ),
      )
      .get();
    return row?.rows ?? 0;
  }

  markUsed(id: string, lastUsedMs: number): void {
    this.db
      .update(apiKeys)
      .set({ lastUsedMs })
      .where(and(eq(apiKeys.id, id), isNull(apiKeys.revokedMs)))
      .run();
  }

  revoke(tx: Db, id: string, by: { revokedMs: number; revokedBy: string }): void {
    tx.update(apiKeys).set(by).where(eq(apiKeys.id, id)).run();
  }

  private known(db: Db) {
    return db
      .select({
        key: apiKeys,
        makerName: people.name,
        makerRole: memberships.role,
        organisationKind: organisations.kind,
      })
      .from(apiKeys)
      .innerJoin(people, eq(people.id, apiKeys.personId))
      .innerJoin(organisations, eq(organisations.id, apiKeys.organisationId))
      .leftJoin(
        memberships,
        and(eq(memberships.personId, apiKeys.personId), eq(memberships.organisationId, apiKeys.organisationId)),
      )
      .$dynamic();
  }
}
