/** Every element set ever given. Rows are never changed and never deleted. */
import { Inject, Injectable } from '@nestjs/common';
import { elementSets, people, type SkyberthDatabase } from '@skyberth/drizzle';
import { and, asc, count, desc, eq, gt, inArray, lte, max, type SQL } from 'drizzle-orm';
import { DATABASE } from '../platform/database.module.js';
import type { Db } from '../platform/transaction.js';

export type ElementsRow = typeof elementSets.$inferSelect;
/** With the name of whoever added it; null for the feed. */
export type AddedElements = ElementsRow & { readonly addedByName: string | null };

const CHUNK = 1_000;

@Injectable()
export class ElementsRepository {
  constructor(@Inject(DATABASE) private readonly db: SkyberthDatabase) {}

  find(id: string): ElementsRow | undefined {
    return this.db.select().from(elementSets).where(eq(elementSets.id, id)).get();
  }

  /** The newest epoch up to `atMs`; of two with one epoch, the one that was added later. */
  newestUpTo(spacecraftId: string, atMs: number): AddedElements | undefined {
    return this.first(
      and(eq(elementSets.spacecraftId, spacecraftId), lte(elementSets.epochMs, atMs)),
      desc(elementSets.epochMs),
    );
  }

  /** The earliest epoch after `afterMs` and up to `untilMs`. */
  earliestAfter(spacecraftId: string, afterMs: number, untilMs: number): AddedElements | undefined {
    const between = and(gt(elementSets.epochMs, afterMs), lte(elementSets.epochMs, untilMs));
    return this.first(and(eq(elementSets.spacecraftId, spacecraftId), between), asc(elementSets.epochMs));
  }

  private first(where: SQL | undefined, order: SQL): AddedElements | undefined {
    const row = this.added()
      .where(where)
      .orderBy(order, desc(elementSets.addedMs), desc(elementSets.id))
      .limit(1)
      .get();
    return row && { ...row.elements, addedByName: row.addedByName };
  }

  /** Epochs in the period, each once, earliest first. */
  epochsIn(spacecraftId: string, fromMs: number, toMs: number): number[] {
    const within = and(gt(elementSets.epochMs, fromMs), lte(elementSets.epochMs, toMs));
    return this.db
      .selectDistinct({ epochMs: elementSets.epochMs })
      .from(elementSets)
      .where(and(eq(elementSets.spacecraftId, spacecraftId), within))
      .orderBy(asc(elementSets.epochMs))
      .all()
      .map((row) => row.epochMs);
  }

  history(spacecraftId: string, limit: number, offset: number): { rows: AddedElements[]; total: number } {
    const mine = eq(elementSets.spacecraftId, spacecraftId);
    const total = this.db.select({ rows: count() }).from(elementSets).where(mine).get()?.rows ?? 0;
    const rows = this.added()
      .where(mine)
      .orderBy(desc(elementSets.epochMs), desc(elementSets.addedMs), desc(elementSets.id))
      .limit(limit)
      .offset(offset)
      .all();
    return { rows: rows.map((row) => ({ ...row.elements, addedByName: row.addedByName })), total };
  }

  private added() {
    return this.db
      .select({ elements: elementSets, addedByName: people.name })
      .from(elementSets)
      .leftJoin(people, eq(people.id, elementSets.addedBy))
      .$dynamic();
  }

  /** What is known of these spacecraft: the digests of their sets, and their newest epochs. */
  known(db: Db, spacecraftIds: readonly string[]): { digests: Set<string>; newestMs: Map<string, number> } {
    const digests = new Set<string>();
    const newestMs = new Map<string, number>();
    for (let i = 0; i < spacecraftIds.length; i += CHUNK) {
      const some = inArray(elementSets.spacecraftId, spacecraftIds.slice(i, i + CHUNK));
      const { spacecraftId, digest, epochMs } = elementSets;
      for (const row of db.select({ spacecraftId, digest }).from(elementSets).where(some).all()) {
        digests.add(digestKey(row.spacecraftId, row.digest));
      }
      const newest = db
        .select({ spacecraftId, epochMs: max(epochMs) })
        .from(elementSets)
        .where(some);
      for (const row of newest.groupBy(spacecraftId).all()) newestMs.set(row.spacecraftId, row.epochMs ?? 0);
    }
    return { digests, newestMs };
  }

  add(tx: Db, rows: readonly ElementsRow[]): void {
    for (let i = 0; i < rows.length; i += CHUNK) {
      tx.insert(elementSets)
        .values(rows.slice(i, i + CHUNK))
        .run();
    }
  }
}

/** Names one content at one spacecraft, for `known().digests`. */
export const digestKey = (spacecraftId: string, digest: string): string => `${spacecraftId} ${digest}`;
