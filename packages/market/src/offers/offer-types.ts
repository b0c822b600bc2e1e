/** What an offer is made from, and what comes out: the time that can be sold and, for every other minute, one reason. */
import type { Interval } from '../interval.js';

/** Why time cannot be sold. The order here is the order in which reasons claim a minute: the first one that fits. */
export const LOST_CODES = [
  'band',
  'polarisation',
  'power',
  'incompatible',
  'elements',
  'clearance',
  'mount',
  'too late',
  'notice',
  'horizon',
  'closed',
  'blackout',
  'spacecraft busy',
  'taken',
  'turn',
  'period',
  'short',
  'long',
  'whole only',
] as const;
export type LostCode = (typeof LOST_CODES)[number];

/** A stay above the mask as the engine found it; the engine's own pass fits, with a name of the caller's. */
export interface OfferPass {
  readonly id: string;
  readonly aosMs: number;
  readonly tcaMs: number;
  readonly losMs: number;
  readonly clippedStart: boolean;
  readonly clippedEnd: boolean;
  /** At AOS, highest point and LOS, from north through east. */
  readonly azimuthDeg: readonly [aos: number, highest: number, los: number];
  /** Azimuth at any instant of the pass; without it, straight between AOS, highest point and LOS the shorter way round. */
  readonly azimuthAtDeg?: ((timeMs: number) => number) | undefined;
  /** Stretches the geometry takes away (what the mount cannot follow: end stops, keyhole), in words. */
  readonly limits?: readonly PassLimit[] | undefined;
}

export interface PassLimit extends Interval {
  readonly sentence: string;
}

/** The antenna's booking rules and how it moves. */
export interface OfferAntenna {
  readonly name: string;
  readonly beams: number;
  readonly setupS: number;
  readonly teardownS: number;
  readonly minNoticeMin: number;
  readonly horizonDays: number;
  readonly minContactS: number;
  readonly maxContactS: number;
  readonly partsAllowed: boolean;
  /** How fast it turns in azimuth, for the time between two contacts. */
  readonly slewAzimuthDegPerS: number;
  /** Seconds to turn between two azimuths, where cable wrap or another mount makes it other than the shorter way round. */
  readonly turnTimeS?: ((fromAzimuthDeg: number, toAzimuthDeg: number) => number) | undefined;
}

/** A booking whose state keeps the beam. Only such bookings may be given. */
export interface OfferBooking {
  /** 1 to `beams`. */
  readonly beam: number;
  /** From the beginning of its set-up to the end of its teardown. */
  readonly guardFromMs: number;
  readonly guardToMs: number;
  /** Where the dish points when it begins and when it ends; `null` where unknown, then no turning time is asked for. */
  readonly startAzimuthDeg: number | null;
  readonly endAzimuthDeg: number | null;
  /** Bought by the one who asks. */
  readonly mine: boolean;
}

export interface OfferBlackout extends Interval {
  /** A few words, such as `feed change`. */
  readonly reason: string;
}

/** Something that rules out the antenna for this radio altogether, found outside (link, licence, age of the elements). */
export interface Objection {
  readonly code: 'band' | 'polarisation' | 'power' | 'incompatible' | 'elements';
  /** With figures: what the antenna has, what the radio needs. */
  readonly sentence: string;
  readonly remedy: string;
}

/** When transmitting is wanted: the times for which it is cleared. */
export interface ClearanceVerdict {
  readonly valid: readonly Interval[];
  /** Why not outside those times. */
  readonly sentence: string;
  readonly remedy: string;
}

export interface OffersInput {
  readonly antenna: OfferAntenna;
  readonly passes: readonly OfferPass[];
  /** Opening times of the antenna (availability rules and one-off openings, expanded). */
  readonly open: readonly Interval[];
  readonly blackouts: readonly OfferBlackout[];
  readonly bookings: readonly OfferBooking[];
  /** Name of the spacecraft, for sentences. */
  readonly spacecraft: string;
  /** Contacts that the same radio already has elsewhere; empty where two antennas at once are wanted. */
  readonly spacecraftContacts: readonly (Interval & { readonly antennaName: string })[];
  readonly objections: readonly Objection[];
  /** `null` when nothing is to be transmitted, or the antenna's policy asks for no clearance. */
  readonly clearance: ClearanceVerdict | null;
  readonly nowMs: number;
}

/** A stretch for sale on one beam: all of it where it fits `maxPartS`, else any part between the two lengths. */
export interface Offer extends Interval {
  readonly beam: number;
  /** Whether the stretch is the pass from AOS to LOS. */
  readonly wholePass: boolean;
  /** What a page proposes: the stretch, or the longest permitted part of it about the highest point. */
  readonly suggested: Interval;
  /** Shortest and longest part that may be bought; both are the stretch itself where parts are not sold. */
  readonly minPartS: number;
  readonly maxPartS: number;
}

/** Time of the pass that cannot be sold, with its one reason. */
export interface LostStretch extends Interval {
  readonly code: LostCode;
  /** For the board, one word or two. */
  readonly word: string;
  readonly sentence: string;
  /** What would make it possible. */
  readonly remedy: string;
}

/** One pass: what can be sold and what not. Together they are the pass, and no instant is in both. */
export interface PassOffers {
  readonly passId: string;
  /** Sorted by beginning. On an antenna of several beams two may overlap in time. */
  readonly offers: readonly Offer[];
  /** Sorted, disjoint. */
  readonly lost: readonly LostStretch[];
  /** Why it cannot be sold as a whole, with the part that can; `null` where it can. */
  readonly refusal: {
    readonly word: string;
    readonly code: LostCode;
    readonly sentence: string;
    readonly remedy: string;
  } | null;
}
