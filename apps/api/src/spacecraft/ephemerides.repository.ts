/** Ephemerides in the database. Rows are never changed but to withdraw them. */
import { Inject, Injectable } from '@nestjs/common';
import { ephemerides, people, type SkyberthDatabase } from '@skyberth/drizzle';
import { and, asc, desc, eq, getTableColumns, gt, isNull, lt } from 'drizzle-orm';
import { alias } from 'drizzle-orm/sqlite-core';
import { DATABASE } from '../platform/database.module.js';
import type { Db } from '../platform/transaction.js';

export type EphemerisRow = typeof ephemerides.$inferSelect;
/** Without the megabytes. */
export type EphemerisHead = Omit<EphemerisRow, 'text' | 'states'>;
export type NamedEphemeris = EphemerisHead & {
  readonly addedByName: string;
  readonly withdrawnByName: string | null;
};

const { text: _text, states: _states, ...HEAD } = getTableColumns(ephemerides);
const adders = alias(people, 'adders');
const withdrawers = alias(people, 'withdrawers');
const MOST_LISTED = 100;

@Injectable()
export class EphemeridesRepository {
  constructor(@Inject(DATABASE) private readonly db: SkyberthDatabase) {}

  list(spacecraftId: string): NamedEphemeris[] {
    return this.named(this.db)
      .where(eq(ephemerides.spacecraftId, spacecraftId))
      .orderBy(desc(ephemerides.addedMs), desc(ephemerides.id))
      .limit(MOST_LISTED)
      .all();
  }

  find(db: Db, spacecraftId: string, id: string): NamedEphemeris | undefined {
    return this.named(db)
      .where(and(eq(ephemerides.spacecraftId, spacecraftId), eq(ephemerides.id, id)))
      .get();
  }

  private named(db: Db) {
    return db
      .select({ ...HEAD, addedByName: adders.name, withdrawnByName: withdrawers.name })
      .from(ephemerides)
      .innerJoin(adders, eq(adders.id, ephemerides.addedBy))
      .leftJoin(withdrawers, eq(withdrawers.id, ephemerides.withdrawnBy))
      .$dynamic();
  }

  /** Those in use that touch the period, the one added last at the end. */
  inUse(spacecraftId: string, fromMs: number, toMs: number): EphemerisHead[] {
    const touching = and(gt(ephemerides.stopMs, fromMs), lt(ephemerides.startMs, toMs));
    return this.db
      .select(HEAD)
      .from(ephemerides)
      .where(and(eq(ephemerides.spacecraftId, spacecraftId), isNull(ephemerides.withdrawnMs), touching))
      .orderBy(asc(ephemerides.addedMs), asc(ephemerides.id))
      .all();
  }

  states(id: string): Buffer | undefined {
    return this.db.select({ states: ephemerides.states }).from(ephemerides).where(eq(ephemerides.id, id)).get()?.states;
  }

  add(tx: Db, row: EphemerisRow): void {
    tx.insert(ephemerides).values(row).run();
  }

  withdraw(tx: Db, id: string, personId: string, nowMs: number): void {
    tx.update(ephemerides).set({ withdrawnBy: personId, withdrawnMs: nowMs }).where(eq(ephemerides.id, id)).run();
  }
}
