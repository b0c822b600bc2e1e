/** What a preview reads of bookings: who buys here, what is sold for the time to come, and what was served. */
import { Inject, Injectable } from '@nestjs/common';
import { antennas, bookings, organisations, type SkyberthDatabase, spacecraft } from '@skyberth/drizzle';
import type { BookingState, Need } from '@skyberth/shared';
import { and, asc, desc, eq, gte, inArray, lt, max } from 'drizzle-orm';
import { DATABASE } from '../platform/database.module.js';

/** Bought and not yet flown. */
const AHEAD: BookingState[] = ['awaiting owner', 'confirmed', 'under way'];
/** Bought and flown, or on the way to it; what was cancelled, lapsed or failed earns nothing. */
const SERVED: BookingState[] = ['confirmed', 'under way', 'reporting', 'settled', 'in dispute'];

export interface Buyer {
  readonly operatorId: string;
  readonly spacecraftId: string;
}

export interface SoldContact extends Buyer {
  readonly bookingId: string;
  readonly number: number;
  readonly spacecraftName: string;
  readonly operatorName: string;
  readonly need: Need;
  readonly aosMs: number;
  readonly losMs: number;
  readonly guardFromMs: number;
  readonly guardToMs: number;
  readonly currency: string;
  readonly netMinor: number;
  readonly toPayMinor: number;
}

export interface ServedContact {
  readonly antennaId: string;
  readonly operatorId: string;
  readonly aosMs: number;
  readonly losMs: number;
  readonly boughtMs: number;
  readonly netMinor: number;
}

@Injectable()
export class AvailabilityRepository {
  constructor(@Inject(DATABASE) private readonly db: SkyberthDatabase) {}

  /** Spacecraft that have booked the antenna since, those with the latest contacts first. */
  buyers(antennaId: string, sinceMs: number, most: number): Buyer[] {
    return this.db
      .select({ operatorId: bookings.operatorId, spacecraftId: bookings.spacecraftId })
      .from(bookings)
      .where(
        and(
          eq(bookings.antennaId, antennaId),
          inArray(bookings.state, [...SERVED, 'awaiting owner']),
          gte(bookings.aosMs, sinceMs),
        ),
      )
      .groupBy(bookings.operatorId, bookings.spacecraftId)
      .orderBy(desc(max(bookings.aosMs)))
      .limit(most)
      .all();
  }

  /** Contacts sold on the antenna from an instant on, the next first. */
  sold(antennaId: string, fromMs: number, most: number): SoldContact[] {
    return this.db
      .select({
        bookingId: bookings.id,
        number: bookings.number,
        operatorId: bookings.operatorId,
        operatorName: organisations.name,
        spacecraftId: bookings.spacecraftId,
        spacecraftName: spacecraft.name,
        need: bookings.need,
        aosMs: bookings.aosMs,
        losMs: bookings.losMs,
        guardFromMs: bookings.guardFromMs,
        guardToMs: bookings.guardToMs,
        currency: bookings.currency,
        netMinor: bookings.netMinor,
        toPayMinor: bookings.toPayMinor,
      })
      .from(bookings)
      .innerJoin(spacecraft, eq(spacecraft.id, bookings.spacecraftId))
      .innerJoin(organisations, eq(organisations.id, bookings.operatorId))
      .where(and(eq(bookings.antennaId, antennaId), inArray(bookings.state, AHEAD), gte(bookings.aosMs, fromMs)))
      .orderBy(asc(bookings.aosMs))
      .limit(most)
      .all();
  }

  /** Contacts of a station that began in the period and earned, or will, in the order they were bought. */
  served(stationId: string, fromMs: number, toMs: number): ServedContact[] {
    return this.db
      .select({
        antennaId: bookings.antennaId,
        operatorId: bookings.operatorId,
        aosMs: bookings.aosMs,
        losMs: bookings.losMs,
        boughtMs: bookings.createdMs,
        netMinor: bookings.netMinor,
      })
      .from(bookings)
      .innerJoin(antennas, eq(antennas.id, bookings.antennaId))
      .where(
        and(
          eq(antennas.stationId, stationId),
          inArray(bookings.state, SERVED),
          gte(bookings.aosMs, fromMs),
          lt(bookings.aosMs, toMs),
        ),
      )
      .orderBy(asc(bookings.createdMs), asc(bookings.id))
      .all();
  }
}
