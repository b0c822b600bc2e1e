/** What the market reads of bookings and organisations. The only place of this feature with SQL. */
import { Inject, Injectable } from '@nestjs/common';
import { antennas, bookings, organisations, type SkyberthDatabase } from '@skyberth/drizzle';
import type { BookingState } from '@skyberth/shared';
import { and, eq, gte, inArray, lt } from 'drizzle-orm';
import { DATABASE } from '../platform/database.module.js';

export interface TaxedOrganisation {
  readonly name: string;
  readonly country: string;
  readonly vatNumber: string | null;
}

/** Bought: the funds are secured or taken. A hold may still be let go, a failed contact counts for nobody. */
const BOUGHT: BookingState[] = ['awaiting owner', 'confirmed', 'under way', 'reporting', 'settled', 'in dispute'];
/** Identifiers in one statement; SQLite takes at most 32,766 variables. */
const CHUNK = 500;

@Injectable()
export class MarketRepository {
  constructor(@Inject(DATABASE) private readonly db: SkyberthDatabase) {}

  /** Changes with every write to the database, by whichever connection. */
  writeStamp(): string {
    const others = this.db.$client.pragma('data_version', { simple: true });
    const own = this.db.$client.prepare('SELECT total_changes()').pluck().get();
    return `${others} ${own}`;
  }

  /** Names of antennas, also of those no longer on sale, by id. */
  antennaNames(ids: readonly string[]): Map<string, string> {
    const rows = chunks(ids).flatMap((some) =>
      this.db.select({ id: antennas.id, name: antennas.name }).from(antennas).where(inArray(antennas.id, some)).all(),
    );
    return new Map(rows.map((row) => [row.id, row.name]));
  }

  /** What an operator has bought, by station, with contacts beginning in the period. For volume tiers. */
  boughtAt(
    operatorId: string,
    fromMs: number,
    toMs: number,
  ): { readonly stationId: string; readonly fromMs: number; readonly toMs: number }[] {
    return this.db
      .select({ stationId: antennas.stationId, fromMs: bookings.aosMs, toMs: bookings.losMs })
      .from(bookings)
      .innerJoin(antennas, eq(antennas.id, bookings.antennaId))
      .where(
        and(
          eq(bookings.operatorId, operatorId),
          inArray(bookings.state, BOUGHT),
          gte(bookings.aosMs, fromMs),
          lt(bookings.aosMs, toMs),
        ),
      )
      .all();
  }

  /** Where and under which number an organisation is taxed; undefined where there is none of that id. */
  taxedOrganisation(id: string): TaxedOrganisation | undefined {
    const row = this.db
      .select({ name: organisations.name, address: organisations.address, vatNumber: organisations.vatNumber })
      .from(organisations)
      .where(eq(organisations.id, id))
      .get();
    return row && { name: row.name, country: row.address.country, vatNumber: row.vatNumber };
  }
}

function chunks(ids: readonly string[]): string[][] {
  const parts: string[][] = [];
  for (let i = 0; i < ids.length; i += CHUNK) parts.push(ids.slice(i, i + CHUNK));
  return parts;
}
