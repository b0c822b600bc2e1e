/** The lines of those who wait, in the database. */
import { Inject, Injectable } from '@nestjs/common';
import {
  antennas,
  bookings,
  memberships,
  organisations,
  type SkyberthDatabase,
  spacecraft,
  standbyEntries,
  stations,
} from '@skyberth/drizzle';
import { and, asc, desc, eq, gt, inArray, lt, lte, max, ne } from 'drizzle-orm';
import { DATABASE } from '../platform/database.module.js';
import { notFound } from '../platform/domain-error.js';
import { inGoodStanding } from '../platform/standing.js';
import type { Db } from '../platform/transaction.js';

export type StandbyRow = typeof standbyEntries.$inferSelect;
type Change = Partial<Pick<StandbyRow, 'state' | 'bookingId' | 'note'>> & { changedMs: number };

export interface NamedEntry {
  readonly entry: StandbyRow;
  readonly spacecraftName: string;
  readonly antennaName: string;
  readonly stationName: string;
  readonly holdEndsMs: number | null;
}

/** What a hold would take, and for whom. */
export interface LineWish {
  readonly operatorId: string;
  readonly antennaId: string;
  readonly guardFromMs: number;
  readonly guardToMs: number;
}

@Injectable()
export class StandbyRepository {
  constructor(@Inject(DATABASE) private readonly db: SkyberthDatabase) {}

  insert(tx: Db, entry: Omit<StandbyRow, 'place'>): void {
    const last = tx
      .select({ place: max(standbyEntries.place) })
      .from(standbyEntries)
      .get()?.place;
    tx.insert(standbyEntries)
      .values({ ...entry, place: (last ?? 0) + 1 })
      .run();
  }

  change(tx: Db, id: string, change: Change): void {
    tx.update(standbyEntries).set(change).where(eq(standbyEntries.id, id)).run();
  }

  byId(tx: Db, id: string): StandbyRow | undefined {
    return tx.select().from(standbyEntries).where(eq(standbyEntries.id, id)).get();
  }

  /** Throws `not-found` for the entry of another organisation too. */
  ofOperator(operatorId: string, id: string, tx: Db = this.db): StandbyRow {
    const row = this.byId(tx, id);
    if (row?.operatorId !== operatorId) throw notFound('place in a line');
    return row;
  }

  /** Latest first; ended ones only since `sinceMs`. */
  list(operatorId: string, sinceMs: number): NamedEntry[] {
    return this.named()
      .where(and(eq(standbyEntries.operatorId, operatorId), gt(standbyEntries.losMs, sinceMs)))
      .orderBy(desc(standbyEntries.place))
      .limit(200)
      .all();
  }

  one(id: string): NamedEntry {
    const row = this.named().where(eq(standbyEntries.id, id)).get();
    if (!row) throw notFound('place in a line');
    return row;
  }

  /** All in that state, in the order of joining. */
  inState(state: 'waiting' | 'offered'): StandbyRow[] {
    return this.db
      .select()
      .from(standbyEntries)
      .where(eq(standbyEntries.state, state))
      .orderBy(asc(standbyEntries.place))
      .all();
  }

  /** Which place in the line this entry has: one is next. */
  placeOf(entry: StandbyRow): number {
    return this.db
      .select({ id: standbyEntries.id })
      .from(standbyEntries)
      .where(and(overlapping(entry), lte(standbyEntries.place, entry.place)))
      .all().length;
  }

  countOpen(tx: Db, operatorId: string): number {
    return tx
      .select({ id: standbyEntries.id })
      .from(standbyEntries)
      .where(and(eq(standbyEntries.operatorId, operatorId), inArray(standbyEntries.state, ['waiting', 'offered'])))
      .all().length;
  }

  isInLine(tx: Db, entry: Pick<StandbyRow, 'operatorId' | 'antennaId' | 'spacecraftId' | 'aosMs'>): boolean {
    const row = tx
      .select({ id: standbyEntries.id })
      .from(standbyEntries)
      .where(
        and(
          eq(standbyEntries.operatorId, entry.operatorId),
          eq(standbyEntries.antennaId, entry.antennaId),
          eq(standbyEntries.spacecraftId, entry.spacecraftId),
          eq(standbyEntries.aosMs, entry.aosMs),
          inArray(standbyEntries.state, ['waiting', 'offered']),
        ),
      )
      .get();
    return row !== undefined;
  }

  /** Whether somebody else waits for any of this time, so that it is not sold past them. */
  isAwaitedByOthers(tx: Db, wish: LineWish): boolean {
    const row = tx
      .select({ id: standbyEntries.id })
      .from(standbyEntries)
      .where(and(overlapping(wish), ne(standbyEntries.operatorId, wish.operatorId)))
      .get();
    return row !== undefined;
  }

  stateOfBooking(tx: Db, bookingId: string): (typeof bookings.$inferSelect)['state'] | undefined {
    return tx.select({ state: bookings.state }).from(bookings).where(eq(bookings.id, bookingId)).get()?.state;
  }

  beams(antennaId: string): number {
    return this.db.select({ beams: antennas.beams }).from(antennas).where(eq(antennas.id, antennaId)).get()?.beams ?? 0;
  }

  /** Whether the person who joined may still buy for the organisation, and it is in good standing. */
  mayStillBuy(tx: Db, entry: StandbyRow): boolean {
    const row = tx
      .select({ role: memberships.role })
      .from(memberships)
      .innerJoin(organisations, eq(organisations.id, memberships.organisationId))
      .where(
        and(
          eq(memberships.personId, entry.personId),
          eq(memberships.organisationId, entry.operatorId),
          inArray(memberships.role, ['manager', 'member']),
          inGoodStanding(organisations.id),
        ),
      )
      .get();
    return row !== undefined;
  }

  private named() {
    return this.db
      .select({
        entry: standbyEntries,
        spacecraftName: spacecraft.name,
        antennaName: antennas.name,
        stationName: stations.name,
        holdEndsMs: bookings.holdEndsMs,
      })
      .from(standbyEntries)
      .innerJoin(spacecraft, eq(spacecraft.id, standbyEntries.spacecraftId))
      .innerJoin(antennas, eq(antennas.id, standbyEntries.antennaId))
      .innerJoin(stations, eq(stations.id, antennas.stationId))
      .leftJoin(bookings, eq(bookings.id, standbyEntries.bookingId))
      .$dynamic();
  }
}

/** Those who wait for some of this time on this antenna. */
const overlapping = (wish: Pick<LineWish, 'antennaId' | 'guardFromMs' | 'guardToMs'>) =>
  and(
    eq(standbyEntries.antennaId, wish.antennaId),
    eq(standbyEntries.state, 'waiting'),
    lt(standbyEntries.guardFromMs, wish.guardToMs),
    gt(standbyEntries.guardToMs, wish.guardFromMs),
  );
