/** What the run sheet reads of stations and contacts, and the notes of the watches. The only place of this feature with SQL. */
import { Inject, Injectable } from '@nestjs/common';
import {
  antennas,
  blackouts,
  bookings,
  handOverNotes,
  organisations,
  people,
  type SkyberthDatabase,
  spacecraft,
  stations,
} from '@skyberth/drizzle';
import type { BookingState } from '@skyberth/shared';
import { and, asc, desc, eq, gt, inArray, lt } from 'drizzle-orm';
import type { BookingRow } from '../bookings/bookings.repository.js';
import { DATABASE } from '../platform/database.module.js';
import type { Db } from '../platform/transaction.js';

export type StationRow = typeof stations.$inferSelect;
export type AntennaRow = typeof antennas.$inferSelect;
export interface SheetRow {
  readonly booking: BookingRow;
  readonly spacecraftName: string;
  readonly operatorName: string;
}

/** A hold is nobody's contact yet, and what was called off is nobody's any more. */
const ON_THE_SHEET: BookingState[] = ['awaiting owner', 'confirmed', 'under way', 'reporting', 'settled', 'failed'];
const NOTES_SHOWN = 5;

@Injectable()
export class RunSheetRepository {
  constructor(@Inject(DATABASE) private readonly db: SkyberthDatabase) {}

  stations(ownerId: string): StationRow[] {
    return this.db
      .select()
      .from(stations)
      .where(eq(stations.organisationId, ownerId))
      .orderBy(asc(stations.name))
      .all();
  }

  station(tx: Db, ownerId: string, stationId: string): StationRow | undefined {
    return tx
      .select()
      .from(stations)
      .where(and(eq(stations.id, stationId), eq(stations.organisationId, ownerId)))
      .get();
  }

  antennas(stationId: string): AntennaRow[] {
    return this.db.select().from(antennas).where(eq(antennas.stationId, stationId)).orderBy(asc(antennas.name)).all();
  }

  /** Contacts whose guarded time touches the period, by AOS. */
  contacts(antennaIds: readonly string[], fromMs: number, toMs: number): SheetRow[] {
    if (antennaIds.length === 0) return [];
    return this.db
      .select({ booking: bookings, spacecraftName: spacecraft.name, operatorName: organisations.name })
      .from(bookings)
      .innerJoin(spacecraft, eq(spacecraft.id, bookings.spacecraftId))
      .innerJoin(organisations, eq(organisations.id, bookings.operatorId))
      .where(
        and(
          inArray(bookings.antennaId, [...antennaIds]),
          inArray(bookings.state, ON_THE_SHEET),
          lt(bookings.guardFromMs, toMs),
          gt(bookings.guardToMs, fromMs),
        ),
      )
      .orderBy(asc(bookings.aosMs), asc(bookings.id))
      .all();
  }

  blackouts(antennaIds: readonly string[], fromMs: number, toMs: number): (typeof blackouts.$inferSelect)[] {
    if (antennaIds.length === 0) return [];
    return this.db
      .select()
      .from(blackouts)
      .where(and(inArray(blackouts.antennaId, [...antennaIds]), lt(blackouts.fromMs, toMs), gt(blackouts.toMs, fromMs)))
      .all();
  }

  /** The newest notes, newest first. */
  notes(stationId: string): { id: string; text: string; writtenMs: number; byName: string }[] {
    const { id, text, writtenMs } = handOverNotes;
    return this.db
      .select({ id, text, writtenMs, byName: people.name })
      .from(handOverNotes)
      .innerJoin(people, eq(people.id, handOverNotes.writtenBy))
      .where(eq(handOverNotes.stationId, stationId))
      .orderBy(desc(writtenMs), desc(id))
      .limit(NOTES_SHOWN)
      .all();
  }

  addNote(tx: Db, note: typeof handOverNotes.$inferInsert): void {
    tx.insert(handOverNotes).values(note).run();
  }

  /** Sold contacts that should have ended before `nowMs` but never began. */
  neverBegun(nowMs: number): BookingRow[] {
    return this.db
      .select()
      .from(bookings)
      .where(and(eq(bookings.state, 'confirmed'), lt(bookings.losMs, nowMs)))
      .all();
  }

  personName(personId: string): string {
    return this.db.select({ name: people.name }).from(people).where(eq(people.id, personId)).get()?.name ?? '';
  }
}
