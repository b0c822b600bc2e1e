/** Holding: ten minutes at a frozen price. The database decides who was first. */
import { Inject, Injectable } from '@nestjs/common';
import type { SkyberthDatabase } from '@skyberth/drizzle';
import type { BodyOf, Principal, Quote, routes } from '@skyberth/shared';
import { ClearanceBook } from '../clearances/clearance-book.js';
import { type BerthOffer, type BerthRequest, OfferService } from '../market/offer.service.js';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import { DATABASE } from '../platform/database.module.js';
import { DomainError } from '../platform/domain-error.js';
import { newId } from '../platform/ids.js';
import { type Db, write } from '../platform/transaction.js';
import { StandbyRepository } from '../standby/standby.repository.js';
import { checkInvoiceable } from './booking-money.js';
import { BookingSale } from './booking-sale.service.js';
import { BookingTransitions, BY_CLOCK, berthTaken, notCleared } from './booking-transitions.js';
import { moneyText, utcText } from './booking-words.js';
import { BookingRepository, type BookingRow } from './bookings.repository.js';

export const HOLD_MS = 10 * 60_000;
/** More would let one organisation keep a market from the others without paying. */
export const MOST_HOLDS = 20;

type Sellable = BerthOffer & { readonly quote: Quote };
export type HoldWish = BodyOf<typeof routes.holdBerth>;
/** For whom it is held. */
export type Buyer = Pick<Principal, 'personId' | 'organisationId'>;

export interface PreparedHold {
  readonly need: BerthRequest['need'];
  readonly offer: Sellable;
}

export interface HoldTerms {
  /** How many holds the organisation may have before this one. */
  readonly most?: number;
  readonly holdMs?: number;
  /** It is offered to the first of those who wait for it. */
  readonly isFromLine?: boolean;
}

@Injectable()
export class HoldService {
  constructor(
    @Inject(DATABASE) private readonly db: SkyberthDatabase,
    @Inject(CLOCK) private readonly clock: ClockPort,
    private readonly offers: OfferService,
    private readonly repository: BookingRepository,
    private readonly transitions: BookingTransitions,
    private readonly sale: BookingSale,
    private readonly line: StandbyRepository,
    private readonly clearances: ClearanceBook,
  ) {}

  /**
   * Computes the offer anew and holds it. Throws `berth-taken`, `spacecraft-busy`, `not-for-sale`, `price-changed`,
   * `elements-too-old`, `too-many`, and what the offer throws.
   */
  async hold(caller: Principal, wish: HoldWish): Promise<BookingRow> {
    const prepared = await this.prepare(caller.organisationId, wish);
    return write(this.db, (tx) => this.insert(tx, caller, prepared));
  }

  /** What is sure before the transaction: that it is for sale, at the price that the buyer saw. */
  async prepare(operatorId: string, wish: HoldWish): Promise<PreparedHold> {
    const offer = forSale(await this.offers.evaluate(operatorId, wish));
    if (offer.freshness.freshness === 'stale' && !wish.oldElementsAcknowledged) {
      throw new DomainError(
        'elements-too-old',
        'The orbital elements are too old for this pass to be sure. Load newer ones, or say that you know.',
      );
    }
    if (offer.quote.toPayMinor !== wish.expectedToPayMinor) {
      const { toPayMinor, currency } = offer.quote;
      throw new DomainError(
        'price-changed',
        `The price is now ${moneyText(toPayMinor, currency)}. Look at it and hold again if it suits you.`,
      );
    }
    checkInvoiceable(offer.quote);
    return { need: wish.need, offer };
  }

  /** An offer at whatever it costs now, for someone who waited for it. Throws as `hold` does. */
  async prepareAtPrice(operatorId: string, berth: BerthRequest): Promise<PreparedHold> {
    const offer = forSale(await this.offers.evaluate(operatorId, berth));
    checkInvoiceable(offer.quote);
    return { need: berth.need, offer };
  }

  /** Inside a write transaction: the last questions, and the row. Throws `berth-taken`, `spacecraft-busy`, `too-many`. */
  insert(
    tx: Db,
    caller: Buyer,
    { need, offer }: PreparedHold,
    { most = MOST_HOLDS, holdMs = HOLD_MS, isFromLine = false }: HoldTerms = {},
  ): BookingRow {
    const nowMs = this.clock.nowMs();
    const { antennaId, spacecraftId, guardFromMs, guardToMs, quote } = offer;
    for (const ended of this.repository.endedHolds(tx, nowMs, { antennaId, spacecraftId }))
      this.sale.lapseHold(tx, ended);
    if (this.repository.openHolds(tx, caller.organisationId, nowMs) >= most) {
      throw new DomainError(
        'too-many',
        `Your organisation holds ${most} passes already. Pay for some, or let some go.`,
      );
    }
    if (!this.repository.stillOnSale(tx, antennaId)) {
      throw new DomainError('not-for-sale', 'The station has just taken this antenna off sale.');
    }
    const beam = this.repository.freeBeams(tx, { antennaId, beams: offer.beams, guardFromMs, guardToMs })[0];
    if (beam === undefined) throw berthTaken();
    const operatorId = caller.organisationId;
    if (!isFromLine && this.line.isAwaitedByOthers(tx, { operatorId, antennaId, guardFromMs, guardToMs })) {
      throw new DomainError(
        'berth-taken',
        'Others wait for this time and are offered it first. You can join the line.',
      );
    }
    const cleared = this.clearances.covering(tx, { ...offer, bands: offer.transmitBands });
    if (need !== 'downlink' && cleared.length === 0) throw notCleared();
    const holdEndsMs = nowMs + holdMs;
    const booking = this.transitions.hold(
      tx,
      {
        id: newId(),
        number: this.repository.nextNumber(tx),
        operatorId: caller.organisationId,
        ownerId: offer.ownerId,
        spacecraftId,
        antennaId,
        beam,
        elementSetId: offer.elementSetId,
        need,
        state: 'held',
        aosMs: offer.aosMs,
        tcaMs: offer.tcaMs,
        losMs: offer.losMs,
        guardFromMs,
        guardToMs,
        pass: offer.pass,
        quote,
        currency: quote.currency,
        netMinor: quote.totalMinor,
        vatMinor: quote.vat.amountMinor,
        toPayMinor: quote.toPayMinor,
        holdEndsMs,
        answerByMs: offer.answerByMs,
        createdBy: caller.personId,
        createdMs: nowMs,
        changedMs: nowMs,
      },
      {
        mover: { actor: 'operator', person: caller },
        sentence: `Held until ${utcText(holdEndsMs)} at ${moneyText(quote.toPayMinor, quote.currency)}.`,
      },
    );
    this.noteClearances(tx, booking, cleared);
    if (offer.ephemerisId !== null && offer.source !== 'element set')
      this.repository.noteEphemeris(tx, booking.id, offer.ephemerisId, offer.source);
    return booking;
  }

  /** Both sides read in the diary of the contact in which band, and how, may be transmitted. */
  private noteClearances(tx: Db, booking: BookingRow, clearanceIds: readonly string[]): void {
    this.clearances.note(tx, booking.id, clearanceIds);
    for (const { number, band, conditions } of this.clearances.ofBooking(tx, booking.id)) {
      const sentence = `May transmit in ${band} band under clearance ${number}. ${conditions}`.trim();
      this.transitions.note(tx, booking, { kind: 'clearance', sentence, mover: BY_CLOCK });
    }
  }
}

/** The offer, where it can be sold. Reasons about someone's contact have codes of their own; the rest is not for sale. */
function forSale(offer: BerthOffer): Sellable {
  const [reason] = offer.reasons;
  if (!reason && offer.quote) return { ...offer, quote: offer.quote };
  const sentence = [reason?.sentence ?? 'That time has no price.', reason?.remedy].filter(Boolean).join(' ');
  if (reason?.code === 'taken') throw new DomainError('berth-taken', sentence);
  if (reason?.code === 'spacecraft busy') throw new DomainError('spacecraft-busy', sentence);
  throw new DomainError('not-for-sale', sentence);
}
