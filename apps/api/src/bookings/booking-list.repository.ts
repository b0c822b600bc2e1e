/** Lists of bookings with the names that stand beside them. */
import { Inject, Injectable } from '@nestjs/common';
import { antennas, bookings, type SkyberthDatabase, spacecraft, stations } from '@skyberth/drizzle';
import type { BookingState } from '@skyberth/shared';
import { and, asc, count, desc, eq, gt, inArray, lt } from 'drizzle-orm';
import { DATABASE } from '../platform/database.module.js';
import { type BookingRow, type Viewer, visibleTo } from './bookings.repository.js';
import { type BookingNames, nameColumns, operators, owners } from './parties.repository.js';

export interface BookingQuery {
  readonly fromMs: number | null;
  readonly toMs: number | null;
  readonly states: readonly BookingState[];
  readonly spacecraftId: string | null;
  readonly antennaId: string | null;
  readonly number: number | null;
  readonly sort: 'aos' | '-aos' | 'number' | '-number';
  readonly page: number;
  readonly pageSize: number;
}

export interface NamedBooking {
  readonly booking: BookingRow;
  readonly names: BookingNames;
}

const ORDER = {
  aos: [asc(bookings.aosMs), asc(bookings.id)],
  '-aos': [desc(bookings.aosMs), desc(bookings.id)],
  number: [asc(bookings.number)],
  '-number': [desc(bookings.number)],
} as const;

@Injectable()
export class BookingListRepository {
  constructor(@Inject(DATABASE) private readonly db: SkyberthDatabase) {}

  /** Contacts that touch `[fromMs, toMs)`, of the viewer's side; staff see all. */
  page(viewer: Viewer, query: BookingQuery): { rows: NamedBooking[]; total: number } {
    const where = and(
      visibleTo(viewer),
      query.fromMs === null ? undefined : gt(bookings.losMs, query.fromMs),
      query.toMs === null ? undefined : lt(bookings.aosMs, query.toMs),
      query.states.length === 0 ? undefined : inArray(bookings.state, [...query.states]),
      query.spacecraftId === null ? undefined : eq(bookings.spacecraftId, query.spacecraftId),
      query.number === null ? undefined : eq(bookings.number, query.number),
      query.antennaId === null ? undefined : eq(bookings.antennaId, query.antennaId),
    );
    const total = this.db.select({ total: count() }).from(bookings).where(where).get()?.total ?? 0;
    const rows = this.db
      .select({ booking: bookings, names: nameColumns })
      .from(bookings)
      .innerJoin(spacecraft, eq(spacecraft.id, bookings.spacecraftId))
      .innerJoin(antennas, eq(antennas.id, bookings.antennaId))
      .innerJoin(stations, eq(stations.id, antennas.stationId))
      .innerJoin(operators, eq(operators.id, bookings.operatorId))
      .innerJoin(owners, eq(owners.id, bookings.ownerId))
      .where(where)
      .orderBy(...ORDER[query.sort])
      .limit(query.pageSize)
      .offset((query.page - 1) * query.pageSize)
      .all();
    return { rows, total };
  }
}
