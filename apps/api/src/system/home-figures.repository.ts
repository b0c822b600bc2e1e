/** Sums and yes-or-no facts of one organisation for its home page: always by currency, nothing converted. */
import { Inject, Injectable } from '@nestjs/common';
import {
  antennas,
  bookings,
  elementSets,
  invoices,
  priceCards,
  radios,
  type SkyberthDatabase,
  spacecraft,
  stations,
} from '@skyberth/drizzle';
import type { BookingState } from '@skyberth/shared';
import { and, eq, gte, inArray, sql } from 'drizzle-orm';
import { DATABASE } from '../platform/database.module.js';

export interface CurrencySum {
  readonly currency: string;
  readonly amountMinor: number;
}

@Injectable()
export class HomeFiguresRepository {
  constructor(@Inject(DATABASE) private readonly db: SkyberthDatabase) {}

  /** What an operator pays in all for bookings in these states, VAT included. */
  operatorTotal(organisationId: string, states: readonly BookingState[]): CurrencySum[] {
    return this.db
      .select({ currency: bookings.currency, amountMinor: sql<number>`sum(${bookings.toPayMinor})` })
      .from(bookings)
      .where(and(eq(bookings.operatorId, organisationId), inArray(bookings.state, [...states])))
      .groupBy(bookings.currency)
      .all();
  }

  /** What an owner's bookings in these states cost their buyers without VAT; those with LOS since `sinceMs`. */
  ownerTotal(organisationId: string, states: readonly BookingState[], sinceMs: number): CurrencySum[] {
    const wanted = and(
      eq(bookings.ownerId, organisationId),
      inArray(bookings.state, [...states]),
      gte(bookings.losMs, sinceMs),
    );
    return this.db
      .select({ currency: bookings.currency, amountMinor: sql<number>`sum(${bookings.netMinor})` })
      .from(bookings)
      .where(wanted)
      .groupBy(bookings.currency)
      .all();
  }

  /** Invoices less credit notes since `sinceMs`, VAT included; of one operator, or of all with null. */
  invoiced(operatorId: string | null, sinceMs: number): CurrencySum[] {
    const wanted = and(
      gte(invoices.issuedMs, sinceMs),
      operatorId === null ? undefined : eq(invoices.operatorId, operatorId),
    );
    return this.db
      .select({ currency: invoices.currency, amountMinor: sql<number>`sum(${invoices.grossMinor})` })
      .from(invoices)
      .where(wanted)
      .groupBy(invoices.currency)
      .all();
  }

  hasElements(organisationId: string): boolean {
    return this.any(
      this.db
        .select({ one: sql`1` })
        .from(elementSets)
        .innerJoin(spacecraft, eq(spacecraft.id, elementSets.spacecraftId))
        .where(eq(spacecraft.organisationId, organisationId))
        .limit(1)
        .all(),
    );
  }

  hasRadio(organisationId: string): boolean {
    return this.any(
      this.db
        .select({ one: sql`1` })
        .from(radios)
        .innerJoin(spacecraft, eq(spacecraft.id, radios.spacecraftId))
        .where(eq(spacecraft.organisationId, organisationId))
        .limit(1)
        .all(),
    );
  }

  hasBought(organisationId: string): boolean {
    return this.any(
      this.db.select({ one: sql`1` }).from(bookings).where(eq(bookings.operatorId, organisationId)).limit(1).all(),
    );
  }

  hasStation(organisationId: string, state?: 'approved'): boolean {
    const wanted = and(
      eq(stations.organisationId, organisationId),
      state === undefined ? undefined : eq(stations.state, state),
    );
    return this.any(this.db.select({ one: sql`1` }).from(stations).where(wanted).limit(1).all());
  }

  hasAntenna(organisationId: string, state?: 'on sale'): boolean {
    const wanted = and(
      eq(stations.organisationId, organisationId),
      state === undefined ? undefined : eq(antennas.state, state),
    );
    return this.any(
      this.db
        .select({ one: sql`1` })
        .from(antennas)
        .innerJoin(stations, eq(stations.id, antennas.stationId))
        .where(wanted)
        .limit(1)
        .all(),
    );
  }

  hasPrice(organisationId: string): boolean {
    return this.any(
      this.db
        .select({ one: sql`1` })
        .from(priceCards)
        .innerJoin(antennas, eq(antennas.id, priceCards.antennaId))
        .innerJoin(stations, eq(stations.id, antennas.stationId))
        .where(eq(stations.organisationId, organisationId))
        .limit(1)
        .all(),
    );
  }

  private any(rows: readonly unknown[]): boolean {
    return rows.length > 0;
  }
}
