/** What a station reports while a contact runs. */
import { Inject, Injectable } from '@nestjs/common';
import type { SkyberthDatabase } from '@skyberth/drizzle';
import type { ContactEvent, ContactOrbit, LiveReport, Principal, ResponseOf, routes } from '@skyberth/shared';
import { BookingTransitions } from '../bookings/booking-transitions.js';
import { utcText } from '../bookings/booking-words.js';
import { BookingRepository, type BookingRow } from '../bookings/bookings.repository.js';
import { ContactFiles } from '../market/contact-files.js';
import { MarketInputs } from '../market/market-inputs.js';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import { DATABASE } from '../platform/database.module.js';
import { DomainError } from '../platform/domain-error.js';
import { type Db, refusalOf, write } from '../platform/transaction.js';
import { DishRepository, stopWords } from '../run-sheet/dish.repository.js';
import { LiveRepository } from './live.repository.js';
import { contactEventView, LiveHub } from './live-hub.js';

/** Clocks of stations differ a little from ours. */
const AHEAD_MS = 5_000;
/** A second a line for three hours; more helps nobody who reads it. */
const MOST_REPORTS = 10_000;

@Injectable()
export class LiveService {
  constructor(
    @Inject(DATABASE) private readonly db: SkyberthDatabase,
    @Inject(CLOCK) private readonly clock: ClockPort,
    private readonly bookings: BookingRepository,
    private readonly transitions: BookingTransitions,
    private readonly dishes: DishRepository,
    private readonly repository: LiveRepository,
    private readonly hub: LiveHub,
    private readonly inputs: MarketInputs,
    private readonly files: ContactFiles,
  ) {}

  /** Throws `not-found` for a contact of others. */
  events(caller: Principal, bookingId: string): ResponseOf<typeof routes.contactEvents> {
    const booking = this.bookings.forViewer(caller, bookingId);
    const listening = { viewer: caller, bookingId, stationId: null };
    const stop = booking.state === 'confirmed' ? this.dishes.stopOf(this.db, booking.antennaId) : null;
    const isStation = caller.organisationId === booking.ownerId;
    return {
      items: this.repository.missed(listening, 0, 2 * MOST_REPORTS).map(contactEventView),
      // Who is at the dish is the station's business; the other side learns that it is not clear.
      dishStop:
        stop && (isStation ? stopWords(stop) : 'The dish is not clear yet. The station releases it before AOS.'),
    };
  }

  /** Throws `not-found` for a contact of others, and `elements-unusable`. */
  async orbit(caller: Principal, bookingId: string): Promise<ContactOrbit> {
    const booking = this.bookings.forViewer(caller, bookingId);
    const period = { fromMs: booking.aosMs, toMs: booking.losMs };
    const { latitudeDeg, longitudeDeg, altitudeM } = this.inputs.antenna(booking.antennaId, period).site;
    const [craft] = this.inputs.craft(booking.operatorId, [booking.spacecraftId], period);
    const isOwnOrbit = craft?.spans.some((span) => span.ephemerides.length > 0) ?? false;
    const omm = isOwnOrbit ? null : (await this.files.make('elements.omm', booking)).body;
    return { site: { latitudeDeg, longitudeDeg, altitudeM }, omm };
  }

  /**
   * Writes the report down and, where it begins or ends the contact, moves the booking. Throws `wrong-state` outside of set-up
   * to report, `dish-not-clear` while somebody is at the dish, and `too-many`.
   */
  report(caller: Principal, bookingId: string, report: LiveReport): ContactEvent {
    const seq = write(this.db, (tx) => {
      const booking = this.bookings.forViewer(caller, bookingId, tx);
      const nowMs = this.clock.nowMs();
      const happenedMs = report.happenedUtc === null ? nowMs : Date.parse(report.happenedUtc);
      refuseOutside(booking, { nowMs, happenedMs });
      if (this.repository.reports(tx, bookingId) >= MOST_REPORTS)
        throw new DomainError('too-many', `This contact has ${MOST_REPORTS} live reports already.`);
      const written = this.repository.add(tx, {
        bookingId,
        kind: report.kind,
        atMs: nowMs,
        happenedMs,
        value: figureOf(report),
        sentence: sentenceOf(report, happenedMs - booking.aosMs),
        actorId: caller.personId,
        actorOrganisationId: caller.organisationId,
      });
      this.move(tx, caller, booking, report);
      return written;
    });
    this.hub.poke();
    const event = this.repository.bySeq(seq);
    if (!event) throw new Error('The report was not kept.');
    return contactEventView(event);
  }

  private move(tx: Db, caller: Principal, booking: BookingRow, report: LiveReport): void {
    const mover = { actor: 'owner', person: caller } as const;
    if (report.kind === 'acquired' && booking.state === 'confirmed') {
      const stop = this.dishes.stopOf(tx, booking.antennaId);
      if (stop) throw new DomainError('dish-not-clear', stopWords(stop));
      try {
        const sentence = 'The station has the signal: the contact began.';
        this.transitions.apply(tx, booking.id, { cause: 'contact begins', mover, sentence });
      } catch (error) {
        if (refusalOf(error)?.includes('dish-not-clear'))
          throw new DomainError('dish-not-clear', 'Somebody is signed in at the dish, or it is to stay still.');
        throw error;
      }
    }
    if (report.kind === 'lost' && report.isFinal && booking.state === 'under way') {
      const sentence = 'The station reports the signal lost for good: the contact is over and its report is expected.';
      this.transitions.apply(tx, booking.id, { cause: 'contact ends', mover, sentence });
    }
  }
}

const FLOWN: readonly BookingRow['state'][] = ['confirmed', 'under way', 'reporting'];

function refuseOutside(booking: BookingRow, { nowMs, happenedMs }: { nowMs: number; happenedMs: number }): void {
  if (!FLOWN.includes(booking.state))
    throw new DomainError('wrong-state', `Berth ${booking.number} is ${booking.state}; it takes no live reports.`);
  if (nowMs < booking.guardFromMs)
    throw new DomainError(
      'wrong-state',
      `Berth ${booking.number} takes live reports from its set-up on, ${utcText(booking.guardFromMs)}.`,
    );
  if (happenedMs > nowMs + AHEAD_MS || happenedMs < booking.guardFromMs) {
    const detail = `What happened lies between set-up, ${utcText(booking.guardFromMs)}, and now.`;
    throw new DomainError('bad-input', detail, [{ pointer: '/happenedUtc', detail }]);
  }
}

function figureOf(report: LiveReport): number | null {
  if (report.kind === 'bytes') return report.bytes;
  return report.kind === 'eb/n0' ? report.ebN0Db : null;
}

function sentenceOf(report: LiveReport, afterAosMs: number): string {
  switch (report.kind) {
    case 'acquired':
      return `Acquired, ${Math.abs(afterAosMs / 1000).toFixed(1)} s ${afterAosMs < 0 ? 'before' : 'after'} the predicted AOS`;
    case 'lost':
      return report.isFinal ? 'Lost for good' : 'Signal lost';
    case 'bytes':
      return `${report.bytes.toLocaleString('en')} bytes received so far`;
    case 'eb/n0':
      return `Eb/N0 ${report.ebN0Db.toFixed(1)} dB`;
    case 'note':
      return report.text;
  }
}
