/** Calendar addresses, and the contacts behind them: the only place with SQL about them. */
import { Inject, Injectable } from '@nestjs/common';
import {
  antennas,
  bookingEvents,
  bookings,
  calendarFeeds,
  memberships,
  organisations,
  type SkyberthDatabase,
  spacecraft,
  stations,
} from '@skyberth/drizzle';
import { and, asc, count, desc, eq, gt, inArray, isNull, notInArray, or, sql } from 'drizzle-orm';
import { type BookingRow, type Viewer, visibleTo } from '../bookings/bookings.repository.js';
import { DATABASE } from '../platform/database.module.js';
import type { Db } from '../platform/transaction.js';

export type FeedRow = typeof calendarFeeds.$inferSelect;

export interface NamedFeed {
  readonly feed: FeedRow;
  readonly antennaName: string | null;
}

export interface FeedContact {
  readonly booking: BookingRow;
  readonly spacecraftName: string;
  readonly antennaName: string;
  readonly stationName: string;
  readonly latitudeDeg: number;
  readonly longitudeDeg: number;
}

@Injectable()
export class CalendarFeedsRepository {
  constructor(@Inject(DATABASE) private readonly db: SkyberthDatabase) {}

  add(tx: Db, row: Omit<FeedRow, 'revokedMs'>): void {
    tx.insert(calendarFeeds).values(row).run();
  }

  /** Those in force of a person in an organisation, the newest first. */
  of(personId: string, organisationId: string): NamedFeed[] {
    return this.db
      .select({ feed: calendarFeeds, antennaName: antennas.name })
      .from(calendarFeeds)
      .leftJoin(antennas, eq(antennas.id, calendarFeeds.antennaId))
      .where(inForceOf(personId, organisationId))
      .orderBy(desc(calendarFeeds.createdMs), desc(calendarFeeds.id))
      .all();
  }

  living(tx: Db, personId: string, organisationId: string): number {
    const row = tx.select({ rows: count() }).from(calendarFeeds).where(inForceOf(personId, organisationId)).get();
    return row?.rows ?? 0;
  }

  /** Whether there was one of this person to revoke. */
  revoke(tx: Db, feed: { id: string; personId: string; organisationId: string }, revokedMs: number): boolean {
    const { changes } = tx
      .update(calendarFeeds)
      .set({ revokedMs })
      .where(and(eq(calendarFeeds.id, feed.id), inForceOf(feed.personId, feed.organisationId)))
      .run();
    return changes > 0;
  }

  /** The feed in force whose maker still belongs to the organisation, and for whom it reads. */
  byHash(hash: string): (NamedFeed & { viewer: Viewer; organisationName: string }) | undefined {
    const row = this.db
      .select({ feed: calendarFeeds, antennaName: antennas.name, name: organisations.name, kind: organisations.kind })
      .from(calendarFeeds)
      .innerJoin(organisations, eq(organisations.id, calendarFeeds.organisationId))
      .innerJoin(
        memberships,
        and(
          eq(memberships.personId, calendarFeeds.personId),
          eq(memberships.organisationId, calendarFeeds.organisationId),
        ),
      )
      .leftJoin(antennas, eq(antennas.id, calendarFeeds.antennaId))
      .where(and(eq(calendarFeeds.hash, hash), isNull(calendarFeeds.revokedMs)))
      .get();
    if (!row) return undefined;
    const { feed, antennaName, name, kind } = row;
    const viewer = { organisationId: feed.organisationId, organisationKind: kind };
    return { feed, antennaName, viewer, organisationName: name };
  }

  /** The name of an antenna of this owner; undefined for one of others. */
  ownAntenna(organisationId: string, antennaId: string): string | undefined {
    return this.db
      .select({ name: antennas.name })
      .from(antennas)
      .innerJoin(stations, eq(stations.id, antennas.stationId))
      .where(and(eq(antennas.id, antennaId), eq(stations.organisationId, organisationId)))
      .get()?.name;
  }

  /**
   * Contacts that were ever asked for or sold and end after `fromMs`, soonest first and at most `most`. A hold that came to
   * nothing is left out; what was sold and then cancelled stays, so that a calendar learns of it.
   */
  contacts(viewer: Viewer, wish: { antennaId: string | null; fromMs: number; most: number }): FeedContact[] {
    const sold = this.db
      .select({ one: sql`1` })
      .from(bookingEvents)
      .where(
        and(eq(bookingEvents.bookingId, bookings.id), inArray(bookingEvents.toState, ['awaiting owner', 'confirmed'])),
      );
    return this.db
      .select({
        booking: bookings,
        spacecraftName: spacecraft.name,
        antennaName: antennas.name,
        stationName: stations.name,
        latitudeDeg: stations.latitudeDeg,
        longitudeDeg: stations.longitudeDeg,
      })
      .from(bookings)
      .innerJoin(spacecraft, eq(spacecraft.id, bookings.spacecraftId))
      .innerJoin(antennas, eq(antennas.id, bookings.antennaId))
      .innerJoin(stations, eq(stations.id, antennas.stationId))
      .where(
        and(
          visibleTo(viewer),
          wish.antennaId === null ? undefined : eq(bookings.antennaId, wish.antennaId),
          gt(bookings.losMs, wish.fromMs),
          or(notInArray(bookings.state, ['held', 'lapsed', 'cancelled']), sql`exists ${sold}`),
        ),
      )
      .orderBy(asc(bookings.aosMs), asc(bookings.id))
      .limit(wish.most)
      .all();
  }
}

const inForceOf = (personId: string, organisationId: string) =>
  and(
    eq(calendarFeeds.personId, personId),
    eq(calendarFeeds.organisationId, organisationId),
    isNull(calendarFeeds.revokedMs),
  );
