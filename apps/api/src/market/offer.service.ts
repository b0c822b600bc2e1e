/** Recomputes one pass exactly when it is to be held, so that nothing is sold on a browser's word. */
import { Inject, Injectable } from '@nestjs/common';
import type { BerthRequest as BerthRequestSchema, PassGeometry, PassSource, Quote, Reason } from '@skyberth/shared';
import type { z } from 'zod';
import { CONFIG, type Config } from '../platform/config.js';
import { type Freshness, freshnessOf } from '../spacecraft/freshness.js';
import { type Caution, cautionsFor } from './cautions.js';
import { radiosFor, transmitBands } from './compute/objections.js';
import { MarketRepository } from './market.repository.js';
import { type PassAnswer, PassFinder } from './pass-finder.js';
import { quoteFor } from './quote.js';
import { vatOf } from './tax.js';

export type BerthRequest = z.output<typeof BerthRequestSchema>;

export interface BerthOffer {
  /** The stretch that is sold, with azimuths and ranges at its own two ends. */
  readonly pass: PassGeometry;
  readonly aosMs: number;
  readonly tcaMs: number;
  readonly losMs: number;
  /** With set-up and teardown: what the antenna is kept for. */
  readonly guardFromMs: number;
  readonly guardToMs: number;
  readonly elementSetId: string;
  /** What the pass was computed from, and the ephemeris where that was one. */
  readonly source: PassSource;
  readonly ephemerisId: string | null;
  readonly freshness: Trust;
  /** Null exactly where `reasons` is not empty. */
  readonly quote: Quote | null;
  readonly acceptance: 'instant' | 'owner';
  /** Until when the owner must have answered; null where nobody is asked. */
  readonly answerByMs: number | null;
  readonly ownerId: string;
  readonly spacecraftId: string;
  readonly antennaId: string;
  readonly beams: number;
  /** Bands that the antenna would transmit in; empty where nothing is to be transmitted. */
  readonly transmitBands: readonly string[];
  readonly cautions: readonly Caution[];
  /** Why it cannot be sold; empty where it can. */
  readonly reasons: readonly Reason[];
}

@Injectable()
export class OfferService {
  constructor(
    private readonly finder: PassFinder,
    private readonly repository: MarketRepository,
    @Inject(CONFIG) private readonly config: Config,
  ) {}

  /**
   * The request as it can be sold now: its ends snapped to the recomputed pass where they lie within a millisecond of it,
   * else taken as a part of it. Anything outside what is for sale, be it by two milliseconds, comes back with reasons.
   * Throws `not-found`, `elements-unusable`, and `not-for-sale` where there is no pass at all.
   */
  async evaluate(operatorId: string, request: BerthRequest): Promise<BerthOffer> {
    const answer = await this.finder.find({
      operatorId,
      spacecraftId: request.spacecraftId,
      antennaId: request.antennaId,
      need: request.need,
      bands: request.bands,
      aosMs: Date.parse(request.aosUtc),
      losMs: Date.parse(request.losUtc),
      withTrack: false,
      booked: false,
    });
    const { outcome, sale, craft, nowMs } = answer;
    const guardFromMs = outcome.aosMs - sale.setupS * 1000;
    const reasons = sale.onSale ? outcome.reasons : [NOT_ON_SALE, ...outcome.reasons];
    return {
      pass: outcome.part,
      aosMs: outcome.aosMs,
      tcaMs: outcome.tcaMs,
      losMs: outcome.losMs,
      guardFromMs,
      guardToMs: outcome.losMs + sale.teardownS * 1000,
      elementSetId: outcome.elementSetId,
      source: outcome.source,
      ephemerisId: outcome.ephemerisId,
      freshness: freshnessFor(answer),
      quote: reasons.length > 0 ? null : this.quote(operatorId, answer),
      acceptance: sale.acceptance,
      answerByMs: sale.acceptance === 'owner' ? Math.min(nowMs + sale.answerWithinMin * 60_000, guardFromMs) : null,
      ownerId: sale.ownerId,
      spacecraftId: craft.id,
      antennaId: sale.id,
      beams: sale.beams,
      transmitBands: request.need === 'downlink' ? [] : transmitBands(craft, answer.antenna, request.bands),
      cautions: cautionsFor({
        need: request.need,
        sun: null,
        radiosOnFile: radiosFor(craft, request.need, []).length > 0,
        stale: freshnessFor(answer).freshness === 'stale',
        untrackable: outcome.gaps.map((gap) => gap.sentence),
      }),
      reasons,
    };
  }

  /** The price of what the engine found, with the VAT of this buyer; null where nothing is for sale. */
  quote(operatorId: string, { outcome, sale, nowMs }: PassAnswer): Quote | null {
    if (outcome.price === null) return null;
    const buyer = this.repository.taxedOrganisation(operatorId);
    if (buyer === undefined) throw new Error(`There is no organisation ${operatorId}.`);
    const { marketplace } = this.config;
    const seller = { country: marketplace.address.country, vatNumber: marketplace.vatNumber };
    const vat = vatOf({ seller, buyer, netMinor: outcome.price.totalMinor, dateMs: nowMs });
    return quoteFor({ price: outcome.price, vat, ladder: sale.price.ladder, aosMs: outcome.aosMs, nowMs });
  }
}

/** For an antenna that is paused, or whose station is not approved. */
export const NOT_ON_SALE: Reason = {
  code: 'not on sale',
  word: 'paused',
  sentence: 'The owner does not sell time on this antenna at the moment.',
  remedy: 'Choose another antenna.',
};

/** How far a pass can be trusted; the error is null where nobody but the operator can know it. */
export type Trust = Omit<Freshness, 'timingErrorS'> & { readonly timingErrorS: number | null };

/** An operator's own ephemeris is not judged by the age of the element set beside it. */
export const OWN_EPHEMERIS = { freshness: 'fresh', timingErrorS: null } as const;

/** Age and trust of the elements as of now, or as of the contact where that is over; the error is that of the contact. */
export function freshnessFor({ outcome, span, nowMs }: PassAnswer): Trust {
  const { meanMotionRevPerDay } = span.elementSet;
  const epochMs = span.elementSet.epochMs;
  const now = freshnessOf(epochMs, meanMotionRevPerDay, Math.min(nowMs, outcome.tcaMs));
  if (outcome.source === 'ephemeris') return { ...now, ...OWN_EPHEMERIS };
  return { ...now, timingErrorS: freshnessOf(epochMs, meanMotionRevPerDay, outcome.tcaMs).timingErrorS };
}
