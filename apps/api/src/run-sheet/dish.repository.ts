/** Who is at a dish, and which dishes are to stay still: the only place with SQL about them. */
import { Inject, Injectable } from '@nestjs/common';
import { antennas, dishStops, dishVisits, people, type SkyberthDatabase, stations } from '@skyberth/drizzle';
import { and, asc, eq, inArray, isNull } from 'drizzle-orm';
import { DATABASE } from '../platform/database.module.js';
import type { Db } from '../platform/transaction.js';

type VisitRow = typeof dishVisits.$inferSelect;
type StopRow = typeof dishStops.$inferSelect & { readonly byName: string };

/** Why nothing may begin on a dish: people inside the fence, or somebody's word. */
export interface DishStop {
  readonly people: readonly string[];
  readonly reason: string | null;
}

@Injectable()
export class DishRepository {
  constructor(@Inject(DATABASE) private readonly db: SkyberthDatabase) {}

  /** Null where the dish may move. */
  stopOf(tx: Db, antennaId: string): DishStop | null {
    const visits = tx
      .select({ name: dishVisits.name })
      .from(dishVisits)
      .where(and(eq(dishVisits.antennaId, antennaId), isNull(dishVisits.leftMs)))
      .orderBy(asc(dishVisits.cameMs))
      .all();
    const stop = tx
      .select({ reason: dishStops.reason })
      .from(dishStops)
      .where(eq(dishStops.antennaId, antennaId))
      .get();
    if (visits.length === 0 && !stop) return null;
    return { people: visits.map((visit) => visit.name), reason: stop?.reason ?? null };
  }

  /** Everybody inside the fences of these dishes now. */
  visits(antennaIds: readonly string[]): VisitRow[] {
    if (antennaIds.length === 0) return [];
    return this.db
      .select()
      .from(dishVisits)
      .where(and(inArray(dishVisits.antennaId, [...antennaIds]), isNull(dishVisits.leftMs)))
      .orderBy(asc(dishVisits.cameMs))
      .all();
  }

  stops(antennaIds: readonly string[]): StopRow[] {
    if (antennaIds.length === 0) return [];
    return this.db
      .select({ stop: dishStops, byName: people.name })
      .from(dishStops)
      .innerJoin(people, eq(people.id, dishStops.stoppedBy))
      .where(inArray(dishStops.antennaId, [...antennaIds]))
      .all()
      .map(({ stop, byName }) => ({ ...stop, byName }));
  }

  /** Whether the antenna stands at a station of this owner. */
  owns(tx: Db, ownerId: string, antennaId: string): boolean {
    const row = tx
      .select({ id: antennas.id })
      .from(antennas)
      .innerJoin(stations, eq(stations.id, antennas.stationId))
      .where(and(eq(antennas.id, antennaId), eq(stations.organisationId, ownerId)))
      .get();
    return row !== undefined;
  }

  visit(tx: Db, visitId: string): VisitRow | undefined {
    return tx.select().from(dishVisits).where(eq(dishVisits.id, visitId)).get();
  }

  enter(tx: Db, visit: typeof dishVisits.$inferInsert): void {
    tx.insert(dishVisits).values(visit).run();
  }

  leave(tx: Db, visitId: string, left: { leftMs: number; signedOutBy: string }): void {
    tx.update(dishVisits).set(left).where(eq(dishVisits.id, visitId)).run();
  }

  stop(tx: Db, stop: typeof dishStops.$inferInsert): void {
    tx.insert(dishStops).values(stop).run();
  }

  /** Whether there was anything to release. */
  release(tx: Db, antennaId: string): boolean {
    return tx.delete(dishStops).where(eq(dishStops.antennaId, antennaId)).run().changes > 0;
  }
}

/** What stands in the way, and that this list stops no motor. */
export function stopWords({ people: names, reason }: DishStop): string {
  const inside =
    names.length > 0
      ? `Signed in at the dish: ${names.join(', ')}. Sign them out once they have left the fence.`
      : `The dish is to stay still: ${reason ?? ''}`;
  return `${inside} Local rules, the interlock and the emergency stop come first; this list replaces none of them.`;
}
