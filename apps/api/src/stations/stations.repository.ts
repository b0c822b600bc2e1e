/** Stations in the database. */
import { Inject, Injectable } from '@nestjs/common';
import { antennas, bookings, organisations, priceCards, type SkyberthDatabase, stations } from '@skyberth/drizzle';
import { BOOKING_STATE_FACTS, BOOKING_STATES, type StationState } from '@skyberth/shared';
import { and, asc, count, eq, gt, inArray, type SQL, sql } from 'drizzle-orm';
import { DATABASE } from '../platform/database.module.js';
import type { Db } from '../platform/transaction.js';

export type StationRow = typeof stations.$inferSelect;
/** A station with the name of its owner. */
export type OwnedStation = StationRow & { readonly ownerName: string };
/** Whose stations are meant: an owner's, or null for all, which only staff may ask for. */
export type Scope = string | null;

/** States in which the owner still has something to fly. */
const TO_COME = BOOKING_STATES.filter(
  (state) => BOOKING_STATE_FACTS[state].occupiesAntenna && BOOKING_STATE_FACTS[state].open && state !== 'in dispute',
);

@Injectable()
export class StationsRepository {
  constructor(@Inject(DATABASE) private readonly db: SkyberthDatabase) {}

  list(
    scope: Scope,
    filter: { state?: StationState | undefined; limit: number; offset: number },
  ): { rows: OwnedStation[]; total: number } {
    const wanted = and(within(scope), filter.state ? eq(stations.state, filter.state) : undefined);
    const total = this.db.select({ rows: count() }).from(stations).where(wanted).get()?.rows ?? 0;
    const rows = this.owned(this.db)
      .where(wanted)
      .orderBy(asc(sql`lower(${stations.name})`), asc(stations.id))
      .limit(filter.limit)
      .offset(filter.offset)
      .all();
    return { rows: rows.map(flat), total };
  }

  find(db: Db, scope: Scope, id: string): OwnedStation | undefined {
    const row = this.owned(db)
      .where(and(eq(stations.id, id), within(scope)))
      .get();
    return row && flat(row);
  }

  private owned(db: Db) {
    return db
      .select({ station: stations, ownerName: organisations.name })
      .from(stations)
      .innerJoin(organisations, eq(organisations.id, stations.organisationId))
      .$dynamic();
  }

  add(tx: Db, station: StationRow): void {
    tx.insert(stations).values(station).run();
  }

  change(tx: Db, id: string, values: Partial<StationRow>): void {
    tx.update(stations).set(values).where(eq(stations.id, id)).run();
  }

  /** Every pass over the station may have moved: whoever remembers some must compute them again. */
  raiseVersions(tx: Db, stationId: string): void {
    tx.update(antennas)
      .set({ version: sql`${antennas.version} + 1` })
      .where(eq(antennas.stationId, stationId))
      .run();
  }

  /** Contacts sold over the station that have not ended yet. */
  contactsToCome(db: Db, stationId: string, nowMs: number): number {
    const row = db
      .select({ contacts: count() })
      .from(bookings)
      .innerJoin(antennas, eq(antennas.id, bookings.antennaId))
      .where(and(eq(antennas.stationId, stationId), inArray(bookings.state, TO_COME), gt(bookings.losMs, nowMs)))
      .get();
    return row?.contacts ?? 0;
  }

  hasPrices(db: Db, stationId: string): boolean {
    const card = db
      .select({ id: priceCards.id })
      .from(priceCards)
      .innerJoin(antennas, eq(antennas.id, priceCards.antennaId))
      .where(eq(antennas.stationId, stationId))
      .limit(1)
      .get();
    return card !== undefined;
  }
}

const within = (scope: Scope): SQL | undefined => (scope === null ? undefined : eq(stations.organisationId, scope));
const flat = (row: { station: StationRow; ownerName: string }): OwnedStation => ({
  ...row.station,
  ownerName: row.ownerName,
});
