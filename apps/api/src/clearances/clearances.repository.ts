/** Clearances in the database, for those who ask for, grant and check them. */
import { Inject, Injectable } from '@nestjs/common';
import {
  antennaBands,
  antennas,
  clearanceEvents,
  clearances,
  organisations,
  people,
  radios,
  type SkyberthDatabase,
  spacecraft,
  stations,
} from '@skyberth/drizzle';
import type { Band, ClearanceState, Principal } from '@skyberth/shared';
import { and, asc, count, desc, eq, inArray, lte, max, type SQL, sql } from 'drizzle-orm';
import { alias } from 'drizzle-orm/sqlite-core';
import { DATABASE } from '../platform/database.module.js';
import { inGoodStanding } from '../platform/standing.js';
import type { Db } from '../platform/transaction.js';

export type ClearanceRow = typeof clearances.$inferSelect;
export type EventRow = typeof clearanceEvents.$inferSelect & { readonly byName: string | null };
export interface NamedClearance extends ClearanceRow {
  readonly spacecraftName: string;
  readonly operatorName: string;
  readonly stationName: string;
  readonly ownerName: string;
}

interface TransmittingStation {
  readonly id: string;
  readonly name: string;
  readonly ownerId: string;
  readonly bands: Band[];
  readonly antennaIds: string[];
}

const operators = alias(organisations, 'clearance_operators');
const owners = alias(organisations, 'clearance_owners');
/** Those that somebody must act on stand first, then those that matter, then what is over. */
const ORDER = sql`CASE ${clearances.state} WHEN 'requested' THEN 0 WHEN 'granted' THEN 1 WHEN 'in force' THEN 2 ELSE 3 END`;

@Injectable()
export class ClearancesRepository {
  constructor(@Inject(DATABASE) private readonly db: SkyberthDatabase) {}

  list(caller: Principal, filter: { state: ClearanceState | undefined; limit: number; offset: number }) {
    const which = and(visibleTo(caller), filter.state === undefined ? undefined : eq(clearances.state, filter.state));
    const rows = this.named(this.db)
      .where(which)
      .orderBy(ORDER, asc(clearances.validToMs), desc(clearances.number))
      .limit(filter.limit)
      .offset(filter.offset)
      .all();
    const total = this.db.select({ total: count() }).from(clearances).where(which).get()?.total ?? 0;
    return { rows: rows.map(flat), total };
  }

  find(db: Db, caller: Principal, id: string): NamedClearance | undefined {
    const row = this.named(db)
      .where(and(eq(clearances.id, id), visibleTo(caller)))
      .get();
    return row && flat(row);
  }

  /** For rules that no person asked for. */
  byId(db: Db, id: string): NamedClearance | undefined {
    const row = this.named(db).where(eq(clearances.id, id)).get();
    return row && flat(row);
  }

  private named(db: Db) {
    return db
      .select({
        clearance: clearances,
        spacecraftName: spacecraft.name,
        operatorName: operators.name,
        stationName: stations.name,
        ownerName: owners.name,
      })
      .from(clearances)
      .innerJoin(spacecraft, eq(spacecraft.id, clearances.spacecraftId))
      .innerJoin(operators, eq(operators.id, clearances.operatorId))
      .innerJoin(stations, eq(stations.id, clearances.stationId))
      .innerJoin(owners, eq(owners.id, clearances.ownerId))
      .$dynamic();
  }

  events(db: Db, clearanceIds: readonly string[]): EventRow[] {
    if (clearanceIds.length === 0) return [];
    return db
      .select({ event: clearanceEvents, byName: people.name })
      .from(clearanceEvents)
      .leftJoin(people, eq(people.id, clearanceEvents.personId))
      .where(inArray(clearanceEvents.clearanceId, [...clearanceIds]))
      .orderBy(asc(clearanceEvents.atMs), asc(clearanceEvents.id))
      .all()
      .map(({ event, byName }) => ({ ...event, byName }));
  }

  nextNumber(tx: Db): number {
    const last = tx
      .select({ number: max(clearances.number) })
      .from(clearances)
      .get()?.number;
    return (last ?? 0) + 1;
  }

  add(tx: Db, row: ClearanceRow): void {
    tx.insert(clearances).values(row).run();
  }

  change(tx: Db, id: string, change: Pick<ClearanceRow, 'state' | 'changedMs'> & { conditions?: string }): void {
    tx.update(clearances).set(change).where(eq(clearances.id, id)).run();
  }

  addEvent(tx: Db, event: typeof clearanceEvents.$inferInsert): void {
    tx.insert(clearanceEvents).values(event).run();
  }

  /** Ids of open clearances whose time is over. */
  due(nowMs: number): string[] {
    return this.ids(
      and(inArray(clearances.state, ['requested', 'granted', 'in force']), lte(clearances.validToMs, nowMs)),
    );
  }

  /** Ids of those in force that end by `untilMs`. */
  ending(untilMs: number): string[] {
    return this.ids(and(eq(clearances.state, 'in force'), lte(clearances.validToMs, untilMs)));
  }

  private ids(which: SQL | undefined): string[] {
    return this.db
      .select({ id: clearances.id })
      .from(clearances)
      .where(which)
      .all()
      .map((row) => row.id);
  }

  ownSpacecraft(tx: Db, operatorId: string, id: string): { name: string; uplinkBands: string[] } | undefined {
    const mine = and(eq(spacecraft.id, id), eq(spacecraft.organisationId, operatorId));
    const craft = tx.select({ name: spacecraft.name }).from(spacecraft).where(mine).get();
    if (!craft) return undefined;
    const uplinks = and(eq(radios.spacecraftId, id), eq(radios.direction, 'uplink'));
    const rows = tx.selectDistinct({ band: radios.band }).from(radios).where(uplinks).all();
    return { ...craft, uplinkBands: rows.map((row) => row.band) };
  }

  /** Approved stations whose antennas on sale transmit, with their bands. */
  transmitting(db: Db = this.db): TransmittingStation[] {
    const rows = db
      .selectDistinct({
        id: stations.id,
        name: stations.name,
        ownerId: stations.organisationId,
        band: antennaBands.band,
        antennaId: antennas.id,
      })
      .from(stations)
      .innerJoin(antennas, eq(antennas.stationId, stations.id))
      .innerJoin(antennaBands, eq(antennaBands.antennaId, antennas.id))
      .where(
        and(
          eq(stations.state, 'approved'),
          eq(antennas.state, 'on sale'),
          eq(antennaBands.direction, 'transmit'),
          inGoodStanding(stations.organisationId),
        ),
      )
      .orderBy(asc(stations.name), asc(stations.id), asc(antennaBands.band))
      .all();
    const found = new Map<string, TransmittingStation>();
    for (const { band, antennaId, ...station } of rows) {
      const known = found.get(station.id) ?? { ...station, bands: [], antennaIds: [] };
      if (!known.bands.includes(band as Band)) known.bands.push(band as Band);
      if (!known.antennaIds.includes(antennaId)) known.antennaIds.push(antennaId);
      found.set(station.id, known);
    }
    return [...found.values()];
  }
}

const flat = ({ clearance, ...names }: { clearance: ClearanceRow } & Omit<NamedClearance, keyof ClearanceRow>) => ({
  ...clearance,
  ...names,
});

function visibleTo(caller: Principal): SQL | undefined {
  if (caller.organisationKind === 'operator') return eq(clearances.operatorId, caller.organisationId);
  if (caller.organisationKind === 'owner') return eq(clearances.ownerId, caller.organisationId);
  return undefined;
}
