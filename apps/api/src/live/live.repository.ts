/** Live events of contacts in the database: the only place with SQL about them. */
import { Inject, Injectable } from '@nestjs/common';
import { antennas, bookings, contactEvents, people, type SkyberthDatabase } from '@skyberth/drizzle';
import { and, asc, count, eq, gt, inArray, max, ne, type SQL } from 'drizzle-orm';
import { type Viewer, visibleTo } from '../bookings/bookings.repository.js';
import { DATABASE } from '../platform/database.module.js';
import type { Db } from '../platform/transaction.js';

type EventRow = typeof contactEvents.$inferSelect;
/** An event with the name of whoever caused it, and with whose contact it is. */
export interface HeardEvent extends EventRow {
  readonly actorName: string | null;
  readonly operatorId: string;
  readonly ownerId: string;
  readonly stationId: string;
}

/** What a listener wants to hear. */
export interface Listening {
  readonly viewer: Viewer;
  readonly bookingId: string | null;
  readonly stationId: string | null;
}

@Injectable()
export class LiveRepository {
  constructor(@Inject(DATABASE) private readonly db: SkyberthDatabase) {}

  /** Adds one and answers it with its number. */
  add(tx: Db, event: typeof contactEvents.$inferInsert): number {
    return Number(tx.insert(contactEvents).values(event).run().lastInsertRowid);
  }

  lastSeq(): number {
    const row = this.db
      .select({ last: max(contactEvents.seq) })
      .from(contactEvents)
      .get();
    return row?.last ?? 0;
  }

  /** Everybody's events after `seq`, oldest first. */
  after(seq: number, limit: number): HeardEvent[] {
    return this.read(gt(contactEvents.seq, seq), limit);
  }

  /** What one listener missed after `seq`, oldest first. */
  missed({ viewer, bookingId, stationId }: Listening, seq: number, limit: number): HeardEvent[] {
    return this.read(
      and(
        gt(contactEvents.seq, seq),
        visibleTo(viewer),
        bookingId === null ? undefined : eq(contactEvents.bookingId, bookingId),
        stationId === null ? undefined : eq(antennas.stationId, stationId),
      ),
      limit,
    );
  }

  bySeq(seq: number): HeardEvent | undefined {
    return this.read(eq(contactEvents.seq, seq), 1)[0];
  }

  /** How much the station has reported of one contact. */
  reports(tx: Db, bookingId: string): number {
    const mine = and(eq(contactEvents.bookingId, bookingId), ne(contactEvents.kind, 'diary'));
    return tx.select({ rows: count() }).from(contactEvents).where(mine).get()?.rows ?? 0;
  }

  /** The station's reports of several contacts, oldest first. */
  reportsOf(bookingIds: readonly string[]): EventRow[] {
    if (bookingIds.length === 0) return [];
    return this.db
      .select()
      .from(contactEvents)
      .where(and(inArray(contactEvents.bookingId, [...bookingIds]), ne(contactEvents.kind, 'diary')))
      .orderBy(asc(contactEvents.seq))
      .all();
  }

  private read(where: SQL | undefined, limit: number): HeardEvent[] {
    return this.db
      .select({
        event: contactEvents,
        actorName: people.name,
        operatorId: bookings.operatorId,
        ownerId: bookings.ownerId,
        stationId: antennas.stationId,
      })
      .from(contactEvents)
      .innerJoin(bookings, eq(bookings.id, contactEvents.bookingId))
      .innerJoin(antennas, eq(antennas.id, bookings.antennaId))
      .leftJoin(people, eq(people.id, contactEvents.actorId))
      .where(where)
      .orderBy(asc(contactEvents.seq))
      .limit(limit)
      .all()
      .map(({ event, ...names }) => ({ ...event, ...names }));
  }
}
