/** What of each pass is for sale to this caller, in the words of the wire. */
import { type Offer, type OfferPass, type OffersInput, offersFor, type PassOffers } from '@skyberth/market';
import type { MountGap } from '@skyberth/orbit';
import type { FoundPass, Need, Reason } from '@skyberth/shared';
import type { AntennaInput, BusyInput, CraftInput, Wish } from '../workers/job-types.js';
import { turnTimeOf } from './mounts.js';
import type { Fit } from './objections.js';
import { priceOf, writeMoney } from './price.js';
import type { Stay } from './stay.js';

export type Sale = Pick<FoundPass, 'state' | 'bookingId' | 'parts' | 'reasons'>;

export interface SaleQuestion {
  readonly craft: CraftInput;
  readonly antenna: AntennaInput;
  readonly fit: Fit;
  readonly open: OffersInput['open'];
  readonly stays: readonly Stay[];
  /** What the mount cannot follow and is not sold, by the places of the stays. */
  readonly limits: readonly (readonly MountGap[])[];
  readonly nowMs: number;
}

/** Everything that can be sold of each stay, and why the rest cannot; in the order of the stays. */
export function offersOf({ craft, antenna, fit, open, stays, limits, nowMs }: SaleQuestion): PassOffers[] {
  return offersFor({
    antenna: { ...antenna, turnTimeS: turnTimeOf(antenna) },
    passes: stays.map((stay, index): OfferPass => ({ ...stay, id: String(index), limits: limits[index] })),
    open,
    blackouts: antenna.blackouts,
    bookings: antenna.busy.map((busy) => ({ ...busy, mine: busy.own !== null })),
    spacecraft: craft.name,
    spacecraftContacts: craft.contacts.filter((contact) => contact.antennaId !== antenna.id),
    objections: fit.objections,
    clearance: fit.clearance,
    nowMs,
  });
}

/** The stretch that an offer proposes, rounded inwards to whole milliseconds, as bookings are kept. */
export const proposed = (offer: Offer): { fromMs: number; toMs: number } => ({
  fromMs: Math.ceil(offer.suggested.fromMs),
  toMs: Math.floor(offer.suggested.toMs),
});

export const reasonOf = (why: { code: string; word: string; sentence: string; remedy: string }): Reason => ({
  code: why.code,
  word: why.word,
  sentence: why.sentence,
  remedy: why.remedy,
});

/** Turns offers into the state, the parts and the reasons of one pass, within what the person wishes to pay and buy. */
export function saleOf(stay: Stay, offers: PassOffers, question: SaleQuestion & { readonly wish: Wish }): Sale {
  const own = ownBooking(stay, question);
  const judged = offers.offers.map((offer) => judge(offer, question));
  const parts = judged.flatMap((each) => (each.part === null ? [] : [each.part]));
  const reasons = [
    ...(offers.refusal === null ? [] : [reasonOf(offers.refusal)]),
    ...judged.flatMap((each) => (each.reason === null ? [] : [each.reason])),
  ];
  if (own !== null) return { state: stateOf(own), bookingId: own.own.bookingId, parts, reasons: [] };
  const whole = offers.refusal === null && parts.length > 0;
  return {
    state: whole ? 'for sale' : parts.length > 0 ? 'part for sale' : 'not for sale',
    bookingId: null,
    parts,
    reasons: whole ? [] : reasons,
  };
}

function judge(
  offer: Offer,
  { antenna, wish, nowMs }: SaleQuestion & { readonly wish: Wish },
): { part: FoundPass['parts'][number] | null; reason: Reason | null } {
  const stretch = proposed(offer);
  const lengthS = (stretch.toMs - stretch.fromMs) / 1000;
  if (lengthS < wish.shortestS) {
    const sentence = `${Math.floor(lengthS)} s could be sold, and you asked for at least ${wish.shortestS} s.`;
    return { part: null, reason: { code: 'short', word: 'short', sentence, remedy: 'Ask for a shorter contact.' } };
  }
  const { totalMinor, currency } = priceOf(antenna, stretch, nowMs);
  if (wish.highestPriceMinor !== null && totalMinor > wish.highestPriceMinor) {
    const sentence = `It costs ${writeMoney(totalMinor, currency)}, and you asked for at most ${writeMoney(wish.highestPriceMinor, currency)}.`;
    return { part: null, reason: { code: 'price', word: 'price', sentence, remedy: 'Raise the highest price.' } };
  }
  const part = { aosUtc: utc(stretch.fromMs), losUtc: utc(stretch.toMs), totalMinor };
  return { part, reason: null };
}

export const utc = (timeMs: number): string => new Date(timeMs).toISOString();

type OwnBusy = BusyInput & { readonly own: NonNullable<BusyInput['own']> };

/** The caller's own contact in this pass; of several the one that is furthest along. */
function ownBooking(stay: Stay, { antenna, craft }: SaleQuestion): OwnBusy | null {
  const mine = antenna.busy.filter(
    (busy): busy is OwnBusy =>
      busy.own !== null && busy.own.spacecraftId === craft.id && busy.aosMs < stay.losMs && stay.aosMs < busy.losMs,
  );
  return mine.reduce<OwnBusy | null>((best, each) => (best === null || rank(each) > rank(best) ? each : best), null);
}

const STATE_ORDER = ['done', 'held', 'asked', 'berth', 'under way'] as const;
const rank = (busy: OwnBusy): number => STATE_ORDER.indexOf(stateOf(busy));

/** The board's word for a booking's state. */
function stateOf({ own }: OwnBusy): (typeof STATE_ORDER)[number] {
  switch (own.state) {
    case 'held':
      return 'held';
    case 'awaiting owner':
      return 'asked';
    case 'confirmed':
      return 'berth';
    case 'under way':
      return 'under way';
    default:
      return 'done';
  }
}

/** Whether this need makes the station transmit. */
export const transmits = (need: Need): boolean => need !== 'downlink';
