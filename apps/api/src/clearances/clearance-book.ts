/** Which clearances bear on time for sale and on bookings: read by the market, by holds and by the clock. */
import { Inject, Injectable } from '@nestjs/common';
import {
  antennas,
  bookingClearances,
  bookings,
  clearances,
  type SkyberthDatabase,
  spacecraft,
  stations,
} from '@skyberth/drizzle';
import type { Band, ClearanceState } from '@skyberth/shared';
import { and, asc, eq, gt, gte, inArray, lt, lte } from 'drizzle-orm';
import { DATABASE } from '../platform/database.module.js';
import type { Db } from '../platform/transaction.js';

/** A clearance as the market weighs it; only those in force let anything be sold. */
export interface CraftClearance {
  readonly number: number;
  readonly spacecraftId: string;
  readonly stationId: string;
  readonly band: Band;
  readonly state: ClearanceState;
  readonly fromMs: number;
  readonly toMs: number;
}

/** What a booking, or one to be, needs leave for. */
export interface Transmission {
  readonly spacecraftId: string;
  readonly antennaId: string;
  readonly aosMs: number;
  readonly losMs: number;
}

export interface WaitingClearance {
  readonly id: string;
  readonly number: number;
  readonly spacecraftName: string;
  readonly stationName: string;
  readonly purpose: string;
  readonly endMs: number;
}

/** More than a person reads at once. */
const MOST_WAITING = 50;
type BookingRow = typeof bookings.$inferSelect;
/** These still say something about why time is not sold; the others are over. */
const OPEN: ClearanceState[] = ['requested', 'granted', 'in force'];
/** Not yet begun, and lost with the clearance. */
const TO_COME: BookingRow['state'][] = ['held', 'awaiting owner', 'confirmed'];

@Injectable()
export class ClearanceBook {
  constructor(@Inject(DATABASE) private readonly db: SkyberthDatabase) {}

  /** Open clearances of these spacecraft that touch the period, wherever, the one ending first in front. */
  ofCraft(spacecraftIds: readonly string[], fromMs: number, toMs: number): CraftClearance[] {
    if (spacecraftIds.length === 0) return [];
    return this.db
      .select({
        number: clearances.number,
        spacecraftId: clearances.spacecraftId,
        stationId: clearances.stationId,
        band: clearances.band,
        state: clearances.state,
        fromMs: clearances.validFromMs,
        toMs: clearances.validToMs,
      })
      .from(clearances)
      .where(
        and(
          inArray(clearances.spacecraftId, [...spacecraftIds]),
          inArray(clearances.state, OPEN),
          lt(clearances.validFromMs, toMs),
          gt(clearances.validToMs, fromMs),
        ),
      )
      .orderBy(asc(clearances.validToMs), asc(clearances.number))
      .all();
  }

  /** Clearances in force, each of which alone covers all of the transmission in one of the bands. */
  covering(tx: Db, wish: Transmission & { readonly bands: readonly string[] }): string[] {
    if (wish.bands.length === 0) return [];
    return tx
      .select({ id: clearances.id })
      .from(clearances)
      .innerJoin(antennas, eq(antennas.stationId, clearances.stationId))
      .where(
        and(
          eq(clearances.spacecraftId, wish.spacecraftId),
          eq(antennas.id, wish.antennaId),
          inArray(clearances.band, [...wish.bands] as Band[]),
          coversAndInForce(wish),
        ),
      )
      .all()
      .map((row) => row.id);
  }

  note(tx: Db, bookingId: string, clearanceIds: readonly string[]): void {
    for (const clearanceId of clearanceIds) tx.insert(bookingClearances).values({ bookingId, clearanceId }).run();
  }

  /** Whether the booking transmits nothing, or under a clearance that is in force from its AOS to its LOS. */
  permits(tx: Db, booking: Pick<BookingRow, 'id' | 'need' | 'aosMs' | 'losMs'>): boolean {
    if (booking.need === 'downlink') return true;
    const row = tx
      .select({ id: clearances.id })
      .from(bookingClearances)
      .innerJoin(clearances, eq(clearances.id, bookingClearances.clearanceId))
      .where(and(eq(bookingClearances.bookingId, booking.id), coversAndInForce(booking)))
      .limit(1)
      .get();
    return row !== undefined;
  }

  /** Bookings held or sold under this clearance that have not begun, the next first. */
  bookingsToCome(tx: Db, clearanceId: string): BookingRow[] {
    return this.bookingsUnder(tx, clearanceId, TO_COME);
  }

  /** Contacts that transmit under it at this moment. */
  bookingsUnderWay(tx: Db, clearanceId: string): BookingRow[] {
    return this.bookingsUnder(tx, clearanceId, ['under way']);
  }

  /** What may be transmitted in a contact, and what the station asks for. */
  ofBooking(tx: Db, bookingId: string): { number: number; band: Band; conditions: string }[] {
    return tx
      .select({
        number: clearances.number,
        band: clearances.band,
        conditions: clearances.conditions,
      })
      .from(bookingClearances)
      .innerJoin(clearances, eq(clearances.id, bookingClearances.clearanceId))
      .where(eq(bookingClearances.bookingId, bookingId))
      .orderBy(asc(clearances.number))
      .all();
  }

  /** What waits for the station to answer, for staff to check, or for the operator to renew before `endMs`. */
  waitingFor(side: 'operator' | 'owner' | 'admin', organisationId: string, endMs: number): WaitingClearance[] {
    const which = {
      operator: and(
        eq(clearances.operatorId, organisationId),
        eq(clearances.state, 'in force'),
        lte(clearances.validToMs, endMs),
      ),
      owner: and(eq(clearances.ownerId, organisationId), eq(clearances.state, 'requested')),
      admin: eq(clearances.state, 'granted'),
    }[side];
    return this.db
      .select({
        id: clearances.id,
        number: clearances.number,
        spacecraftName: spacecraft.name,
        stationName: stations.name,
        purpose: clearances.purpose,
        endMs: clearances.validToMs,
      })
      .from(clearances)
      .innerJoin(spacecraft, eq(spacecraft.id, clearances.spacecraftId))
      .innerJoin(stations, eq(stations.id, clearances.stationId))
      .where(which)
      .orderBy(asc(clearances.validToMs), asc(clearances.number))
      .limit(MOST_WAITING)
      .all();
  }

  private bookingsUnder(tx: Db, clearanceId: string, states: BookingRow['state'][]): BookingRow[] {
    return tx
      .select({ booking: bookings })
      .from(bookingClearances)
      .innerJoin(bookings, eq(bookings.id, bookingClearances.bookingId))
      .where(and(eq(bookingClearances.clearanceId, clearanceId), inArray(bookings.state, states)))
      .orderBy(asc(bookings.aosMs))
      .all()
      .map((row) => row.booking);
  }
}

const coversAndInForce = ({ aosMs, losMs }: Pick<Transmission, 'aosMs' | 'losMs'>) =>
  and(eq(clearances.state, 'in force'), lte(clearances.validFromMs, aosMs), gte(clearances.validToMs, losMs));
