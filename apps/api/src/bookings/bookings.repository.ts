/** Bookings in the database: the only place with SQL about them. */
import { Inject, Injectable } from '@nestjs/common';
import {
  antennas,
  bookingEphemerides,
  bookingEvents,
  bookings,
  type SkyberthDatabase,
  stations,
} from '@skyberth/drizzle';
import { type BookingState, OCCUPYING_STATES, type PassSource, type Principal } from '@skyberth/shared';
import { and, asc, eq, gt, inArray, isNotNull, lt, lte, max, ne, notInArray, or, type SQL, sql } from 'drizzle-orm';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import { DATABASE } from '../platform/database.module.js';
import { notFound } from '../platform/domain-error.js';
import { inGoodStanding } from '../platform/standing.js';
import type { Db } from '../platform/transaction.js';

export type BookingRow = typeof bookings.$inferSelect;
export type NewBooking = typeof bookings.$inferInsert;
export type BookingEventRow = typeof bookingEvents.$inferSelect;
/** For whom a booking is looked up: either side sees its own, staff see all. */
export type Viewer = Pick<Principal, 'organisationId' | 'organisationKind'>;

/** Time that an antenna is not free, as the market needs it. */
export interface BusyInterval {
  readonly bookingId: string;
  readonly antennaId: string;
  readonly beam: number;
  readonly operatorId: string;
  readonly spacecraftId: string;
  readonly state: BookingState;
  readonly aosMs: number;
  readonly losMs: number;
  /** With set-up. */
  readonly guardFromMs: number;
  /** With teardown. */
  readonly guardToMs: number;
  /** Where the dish points at AOS and at LOS. */
  readonly startAzimuthDeg: number | null;
  readonly endAzimuthDeg: number | null;
}

/** No guarded interval is longer (`bookings_order`), so nothing that began earlier than this can reach into a period. */
const LONGEST_GUARD_MS = 700_000_000;
/** The kind of diary row that says so. */
export const REPORT_REMINDER = 'report reminder';
/** The first number; lower ones look like a test to the people who read them. */
const FIRST_NUMBER = 1001;

@Injectable()
export class BookingRepository {
  constructor(
    @Inject(DATABASE) private readonly db: SkyberthDatabase,
    @Inject(CLOCK) private readonly clock: ClockPort,
  ) {}

  /**
   * What keeps these antennas busy in `[fromMs, toMs)`, guards included. A hold whose time is over is left out: the next
   * hold lapses it. Sorted by antenna and beginning.
   */
  busyIn(antennaIds: readonly string[], fromMs: number, toMs: number): BusyInterval[] {
    if (antennaIds.length === 0) return [];
    return this.busy(inArray(bookings.antennaId, [...antennaIds]), fromMs, toMs);
  }

  /** When these spacecraft already have contacts in `[fromMs, toMs)`, wherever. */
  spacecraftBusyIn(spacecraftIds: readonly string[], fromMs: number, toMs: number): BusyInterval[] {
    if (spacecraftIds.length === 0) return [];
    return this.busy(inArray(bookings.spacecraftId, [...spacecraftIds]), fromMs, toMs);
  }

  private busy(whose: SQL, fromMs: number, toMs: number): BusyInterval[] {
    return this.db
      .select({
        bookingId: bookings.id,
        antennaId: bookings.antennaId,
        beam: bookings.beam,
        operatorId: bookings.operatorId,
        spacecraftId: bookings.spacecraftId,
        state: bookings.state,
        aosMs: bookings.aosMs,
        losMs: bookings.losMs,
        guardFromMs: bookings.guardFromMs,
        guardToMs: bookings.guardToMs,
        startAzimuthDeg: sql<number | null>`json_extract(${bookings.pass}, '$.azimuthDeg[0]')`,
        endAzimuthDeg: sql<number | null>`json_extract(${bookings.pass}, '$.azimuthDeg[2]')`,
      })
      .from(bookings)
      .where(
        and(
          whose,
          inArray(bookings.state, [...OCCUPYING_STATES]),
          lt(bookings.guardFromMs, toMs),
          gt(bookings.guardFromMs, fromMs - LONGEST_GUARD_MS),
          gt(bookings.guardToMs, fromMs),
          or(ne(bookings.state, 'held'), gt(bookings.holdEndsMs, this.clock.nowMs())),
        ),
      )
      .orderBy(asc(bookings.antennaId), asc(bookings.guardFromMs))
      .all();
  }

  /** Throws `not-found` for somebody else's booking as for one that does not exist. */
  forViewer(viewer: Viewer, bookingId: string, tx: Db = this.db): BookingRow {
    const row = tx
      .select()
      .from(bookings)
      .where(and(eq(bookings.id, bookingId), visibleTo(viewer)))
      .get();
    if (!row) throw notFound('booking');
    return row;
  }

  /** For work that no person asked for: jobs, and events of the payment provider. */
  byId(tx: Db, bookingId: string): BookingRow | undefined {
    return tx.select().from(bookings).where(eq(bookings.id, bookingId)).get();
  }

  insert(tx: Db, booking: NewBooking): void {
    tx.insert(bookings).values(booking).run();
  }

  /** Notes that the pass was sold on an operator's own ephemeris. */
  noteEphemeris(tx: Db, bookingId: string, ephemerisId: string, passSource: 'ephemeris' | 'both'): void {
    tx.insert(bookingEphemerides).values({ bookingId, ephemerisId, passSource }).run();
  }

  /** What the pass was computed from when it was held. */
  soldOn(bookingId: string): PassSource {
    const row = this.db
      .select({ passSource: bookingEphemerides.passSource })
      .from(bookingEphemerides)
      .where(eq(bookingEphemerides.bookingId, bookingId))
      .get();
    return row?.passSource ?? 'element set';
  }

  /** The number of the next booking; only valid inside the write transaction that uses it. */
  nextNumber(tx: Db): number {
    const last = tx
      .select({ number: max(bookings.number) })
      .from(bookings)
      .get()?.number;
    return last === null || last === undefined ? FIRST_NUMBER : last + 1;
  }

  /** Called by the transition function alone. */
  setState(tx: Db, bookingId: string, change: { state: BookingState; changedMs: number }): void {
    tx.update(bookings).set(change).where(eq(bookings.id, bookingId)).run();
  }

  setReport(tx: Db, bookingId: string, report: BookingRow['report']): void {
    tx.update(bookings).set({ report }).where(eq(bookings.id, bookingId)).run();
  }

  addEvent(tx: Db, event: typeof bookingEvents.$inferInsert): void {
    tx.insert(bookingEvents).values(event).run();
  }

  events(bookingId: string): BookingEventRow[] {
    return this.db
      .select()
      .from(bookingEvents)
      .where(eq(bookingEvents.bookingId, bookingId))
      .orderBy(asc(bookingEvents.atMs), asc(bookingEvents.id))
      .all();
  }

  /** Holds whose time is over, of everyone or only those in the way of one antenna or spacecraft. */
  endedHolds(tx: Db, nowMs: number, inTheWayOf?: { antennaId: string; spacecraftId: string }): BookingRow[] {
    const place = inTheWayOf
      ? or(eq(bookings.antennaId, inTheWayOf.antennaId), eq(bookings.spacecraftId, inTheWayOf.spacecraftId))
      : undefined;
    return tx
      .select()
      .from(bookings)
      .where(and(eq(bookings.state, 'held'), lte(bookings.holdEndsMs, nowMs), place))
      .all();
  }

  openHolds(tx: Db, operatorId: string, nowMs: number): number {
    return tx
      .select({ id: bookings.id })
      .from(bookings)
      .where(and(eq(bookings.state, 'held'), eq(bookings.operatorId, operatorId), gt(bookings.holdEndsMs, nowMs)))
      .all().length;
  }

  /** Requests whose time to answer has passed. */
  overdueAnswers(tx: Db, nowMs: number): BookingRow[] {
    return tx
      .select()
      .from(bookings)
      .where(
        and(
          eq(bookings.state, 'awaiting owner'),
          isNotNull(bookings.answerByMs),
          or(lte(bookings.answerByMs, nowMs), lte(bookings.aosMs, nowMs)),
        ),
      )
      .all();
  }

  /** Bookings in `state` whose AOS (or LOS) has come. */
  reached(tx: Db, state: BookingState, instant: 'aosMs' | 'losMs', nowMs: number): BookingRow[] {
    return tx
      .select()
      .from(bookings)
      .where(and(eq(bookings.state, state), lte(bookings[instant], nowMs)))
      .orderBy(asc(bookings.aosMs))
      .all();
  }

  /** Contacts that ended before `losBeforeMs`, wait for their report, and were not reminded of it. */
  unreminded(tx: Db, losBeforeMs: number): BookingRow[] {
    const reminders = tx
      .select({ bookingId: bookingEvents.bookingId })
      .from(bookingEvents)
      .where(eq(bookingEvents.kind, REPORT_REMINDER));
    return tx
      .select()
      .from(bookings)
      .where(and(eq(bookings.state, 'reporting'), lte(bookings.losMs, losBeforeMs), notInArray(bookings.id, reminders)))
      .all();
  }

  /** Beams of the antenna that nobody has in this guarded interval, lowest first. */
  freeBeams(tx: Db, wish: { antennaId: string; beams: number; guardFromMs: number; guardToMs: number }): number[] {
    const { antennaId, beams, guardFromMs, guardToMs } = wish;
    const taken = new Set(
      tx
        .select({ beam: bookings.beam })
        .from(bookings)
        .where(
          and(
            eq(bookings.antennaId, antennaId),
            inArray(bookings.state, [...OCCUPYING_STATES]),
            lt(bookings.guardFromMs, guardToMs),
            gt(bookings.guardFromMs, guardFromMs - LONGEST_GUARD_MS),
            gt(bookings.guardToMs, guardFromMs),
          ),
        )
        .all()
        .map((row) => row.beam),
    );
    return Array.from({ length: beams }, (_none, index) => index + 1).filter((beam) => !taken.has(beam));
  }

  /** Whether the antenna is still on sale at an approved station: asked again inside the transaction that sells it. */
  stillOnSale(tx: Db, antennaId: string): boolean {
    const row = tx
      .select({ id: antennas.id })
      .from(antennas)
      .innerJoin(stations, eq(stations.id, antennas.stationId))
      .where(
        and(
          eq(antennas.id, antennaId),
          eq(antennas.state, 'on sale'),
          eq(stations.state, 'approved'),
          inGoodStanding(stations.organisationId),
        ),
      )
      .get();
    return row !== undefined;
  }
}

/** The rows that a viewer may see. */
export function visibleTo(viewer: Viewer): SQL | undefined {
  if (viewer.organisationKind === 'operator') return eq(bookings.operatorId, viewer.organisationId);
  if (viewer.organisationKind === 'owner') return eq(bookings.ownerId, viewer.organisationId);
  return undefined;
}
