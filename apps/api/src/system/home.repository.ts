/** What waits for somebody, read across the features. */
import { Inject, Injectable } from '@nestjs/common';
import {
  antennas,
  bookings,
  disputes,
  driftQuestions,
  organisations,
  outbox,
  type SkyberthDatabase,
  spacecraft,
  stations,
} from '@skyberth/drizzle';
import type { BookingState } from '@skyberth/shared';
import { and, asc, count, eq, gt, inArray, lte } from 'drizzle-orm';
import { DATABASE } from '../platform/database.module.js';

export interface WaitingBooking {
  readonly id: string;
  readonly number: number;
  readonly state: BookingState;
  readonly spacecraftName: string;
  readonly antennaName: string;
  readonly stationName: string;
  readonly aosMs: number;
  readonly losMs: number;
  readonly holdEndsMs: number | null;
  readonly answerByMs: number | null;
}
export interface WaitingStation {
  readonly id: string;
  readonly name: string;
  readonly ownerName: string;
  readonly state: 'draft' | 'waiting' | 'approved' | 'refused' | 'suspended';
  readonly stateNote: string;
}

/** More than a person reads at once; the counts count all. */
const MOST = 50;

@Injectable()
export class HomeRepository {
  constructor(@Inject(DATABASE) private readonly db: SkyberthDatabase) {}

  /** Bookings of one side in these states, and beginning by `untilMs`; the next ones first. */
  bookings(
    side: 'operator' | 'owner',
    organisationId: string,
    states: readonly BookingState[],
    untilMs: number,
  ): WaitingBooking[] {
    return this.db
      .select({
        id: bookings.id,
        number: bookings.number,
        state: bookings.state,
        spacecraftName: spacecraft.name,
        antennaName: antennas.name,
        stationName: stations.name,
        aosMs: bookings.aosMs,
        losMs: bookings.losMs,
        holdEndsMs: bookings.holdEndsMs,
        answerByMs: bookings.answerByMs,
      })
      .from(bookings)
      .innerJoin(spacecraft, eq(spacecraft.id, bookings.spacecraftId))
      .innerJoin(antennas, eq(antennas.id, bookings.antennaId))
      .innerJoin(stations, eq(stations.id, antennas.stationId))
      .where(and(this.ofSide(side, organisationId), inArray(bookings.state, [...states]), lte(bookings.aosMs, untilMs)))
      .orderBy(asc(bookings.aosMs))
      .limit(MOST)
      .all();
  }

  countBookings(side: 'operator' | 'owner', organisationId: string, states: readonly BookingState[]): number {
    const wanted = and(this.ofSide(side, organisationId), inArray(bookings.state, [...states]));
    return this.db.select({ rows: count() }).from(bookings).where(wanted).get()?.rows ?? 0;
  }

  private ofSide(side: 'operator' | 'owner', organisationId: string) {
    return eq(side === 'operator' ? bookings.operatorId : bookings.ownerId, organisationId);
  }

  /** Stations in these states; of one owner, or of all with null. */
  stations(organisationId: string | null, states: readonly WaitingStation['state'][]): WaitingStation[] {
    return this.db
      .select({
        id: stations.id,
        name: stations.name,
        ownerName: organisations.name,
        state: stations.state,
        stateNote: stations.stateNote,
      })
      .from(stations)
      .innerJoin(organisations, eq(organisations.id, stations.organisationId))
      .where(
        and(
          inArray(stations.state, [...states]),
          organisationId === null ? undefined : eq(stations.organisationId, organisationId),
        ),
      )
      .orderBy(asc(stations.createdMs))
      .limit(MOST)
      .all();
  }

  countStations(state: WaitingStation['state']): number {
    return this.db.select({ rows: count() }).from(stations).where(eq(stations.state, state)).get()?.rows ?? 0;
  }

  /** Disputes that wait for a decision; of one side, or of all with null. */
  disputes(side: 'operator' | 'owner' | null, organisationId = '') {
    const ofSide = side && eq(side === 'operator' ? disputes.operatorId : disputes.ownerId, organisationId);
    return this.db
      .select({
        id: disputes.id,
        number: disputes.number,
        reason: disputes.reason,
        statementDueMs: disputes.statementDueMs,
        decideByMs: disputes.decideByMs,
        bookingNumber: bookings.number,
      })
      .from(disputes)
      .innerJoin(bookings, eq(bookings.id, disputes.bookingId))
      .where(and(inArray(disputes.state, ['open', 'appealed']), ofSide ?? undefined))
      .orderBy(asc(disputes.decideByMs))
      .limit(MOST)
      .all();
  }

  /** Open questions about contacts that newer elements moved, the soonest first. */
  driftQuestions(operatorId: string) {
    return this.db
      .select({
        bookingId: bookings.id,
        number: bookings.number,
        aosMs: bookings.aosMs,
        sentence: driftQuestions.sentence,
      })
      .from(driftQuestions)
      .innerJoin(bookings, eq(bookings.id, driftQuestions.bookingId))
      .where(and(eq(driftQuestions.state, 'open'), eq(bookings.operatorId, operatorId)))
      .orderBy(asc(bookings.aosMs))
      .limit(MOST)
      .all();
  }

  countDisputes(): number {
    const waiting = inArray(disputes.state, ['open', 'appealed']);
    return this.db.select({ rows: count() }).from(disputes).where(waiting).get()?.rows ?? 0;
  }

  /** Active spacecraft of an operator. */
  spacecraft(organisationId: string): { readonly id: string; readonly name: string }[] {
    return this.db
      .select({ id: spacecraft.id, name: spacecraft.name })
      .from(spacecraft)
      .where(and(eq(spacecraft.organisationId, organisationId), eq(spacecraft.state, 'active')))
      .orderBy(asc(spacecraft.name))
      .limit(MOST)
      .all();
  }

  /** Things that could not be carried out, by kind, since `sinceMs`. */
  failedOutbox(sinceMs: number): { readonly kind: string; readonly rows: number }[] {
    return this.db
      .select({ kind: outbox.kind, rows: count() })
      .from(outbox)
      .where(and(eq(outbox.state, 'failed'), gt(outbox.createdMs, sinceMs)))
      .groupBy(outbox.kind)
      .all();
  }
}
