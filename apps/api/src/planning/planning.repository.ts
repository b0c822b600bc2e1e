/** Plans, and the contacts that spacecraft have already. The only place of this feature with SQL. */
import { Inject, Injectable } from '@nestjs/common';
import { antennas, bookings, organisations, people, plans, type SkyberthDatabase, stations } from '@skyberth/drizzle';
import type { BookingState } from '@skyberth/shared';
import { and, count, desc, eq, gte, inArray, lt, lte } from 'drizzle-orm';
import { DATABASE } from '../platform/database.module.js';
import type { Db } from '../platform/transaction.js';
import type { TaxParty } from './tax-party.js';
import type { HadContact } from './workers/plan-job.js';

export type PlanRow = typeof plans.$inferSelect & { readonly createdByName: string };
type Change = Partial<Omit<typeof plans.$inferInsert, 'id' | 'operatorId' | 'createdBy' | 'createdMs'>>;

/** A hold may still be let go; it does not count before it is paid for. */
const HAD: BookingState[] = ['awaiting owner', 'confirmed', 'under way'];

@Injectable()
export class PlanningRepository {
  constructor(@Inject(DATABASE) private readonly db: SkyberthDatabase) {}

  find(operatorId: string, id: string, db: Db = this.db): PlanRow | undefined {
    return this.select(db)
      .where(and(eq(plans.operatorId, operatorId), eq(plans.id, id)))
      .all()
      .map(({ plan, createdByName }) => ({ ...plan, createdByName }))[0];
  }

  list(operatorId: string, { page, pageSize }: { page: number; pageSize: number }): { rows: PlanRow[]; total: number } {
    const rows = this.select(this.db)
      .where(eq(plans.operatorId, operatorId))
      .orderBy(desc(plans.changedMs))
      .limit(pageSize)
      .offset((page - 1) * pageSize)
      .all()
      .map(({ plan, createdByName }) => ({ ...plan, createdByName }));
    const total = this.db.select({ rows: count() }).from(plans).where(eq(plans.operatorId, operatorId)).get();
    return { rows, total: total?.rows ?? 0 };
  }

  insert(tx: Db, row: typeof plans.$inferInsert): void {
    tx.insert(plans).values(row).run();
  }

  change(tx: Db, id: string, change: Change): void {
    tx.update(plans).set(change).where(eq(plans.id, id)).run();
  }

  /** Contacts bought before that begin in the period, of these spacecraft. */
  had(spacecraftIds: readonly string[], fromMs: number, toMs: number): HadContact[] {
    return this.db
      .select({
        bookingId: bookings.id,
        spacecraftId: bookings.spacecraftId,
        antennaId: bookings.antennaId,
        antennaName: antennas.name,
        stationId: stations.id,
        stationName: stations.name,
        stationTimeZone: stations.timeZone,
        need: bookings.need,
        aosMs: bookings.aosMs,
        tcaMs: bookings.tcaMs,
        losMs: bookings.losMs,
        pass: bookings.pass,
        currency: bookings.currency,
      })
      .from(bookings)
      .innerJoin(antennas, eq(antennas.id, bookings.antennaId))
      .innerJoin(stations, eq(stations.id, antennas.stationId))
      .where(
        and(
          inArray(bookings.spacecraftId, [...spacecraftIds]),
          inArray(bookings.state, HAD),
          gte(bookings.aosMs, fromMs),
          lt(bookings.aosMs, toMs),
          lte(bookings.losMs, toMs),
        ),
      )
      .all()
      .map(({ pass, ...row }) => ({ ...row, maxElevationDeg: pass.maxElevationDeg }));
  }

  taxParty(organisationId: string): TaxParty {
    const row = this.db
      .select({ address: organisations.address, vatNumber: organisations.vatNumber })
      .from(organisations)
      .where(eq(organisations.id, organisationId))
      .get();
    if (row === undefined) throw new Error(`There is no organisation ${organisationId}.`);
    return { country: row.address.country, vatNumber: row.vatNumber };
  }

  private select(db: Db) {
    return db
      .select({ plan: plans, createdByName: people.name })
      .from(plans)
      .innerJoin(people, eq(people.id, plans.createdBy));
  }
}
