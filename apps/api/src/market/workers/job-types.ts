/**
 * What the market asks its pass engine and what comes back. Everything here crosses into worker threads, so it is plain
 * data: no functions, no classes. Times are UTC milliseconds.
 */
import type { Interval, LadderStep, OfferBlackout, PriceCard, Quote as PriceQuote } from '@skyberth/market';
import type { ElementSet, GeodeticSite, MaskPoint, MountGap } from '@skyberth/orbit';
import type {
  AntennaBand,
  BookingState,
  Mount,
  Need,
  PassDetail,
  PassGeometry,
  PassSource,
  Radio,
  Reason,
  WeeklyRule,
} from '@skyberth/shared';
import type { z } from 'zod';
import type { CraftClearance } from '../../clearances/clearance-book.js';
import type { KeptEphemeris } from '../../spacecraft/ephemerides.service.js';

/** One element set and the passes it answers for: those whose highest point lies in `[fromMs, toMs)`. */
export interface ElementsSpan extends Interval {
  readonly elementSetId: string;
  /** Names the content of the set; the same digest always gives the same passes. */
  readonly digest: string;
  readonly elementSet: ElementSet;
  /** The operator's own ephemerides; at each instant the last that reaches it answers instead of the element set. */
  readonly ephemerides: readonly EphemerisInput[];
}

/** An ephemeris as it is kept; its numbers lie in shared memory. */
export type EphemerisInput = KeptEphemeris;

export interface CraftInput {
  readonly id: string;
  readonly name: string;
  readonly shortName: string;
  /** Sorted and touching; empty where the spacecraft has no elements. */
  readonly spans: readonly ElementsSpan[];
  readonly radios: readonly Radio[];
  /** Leave to transmit to it, at whichever station; also what is asked for and not yet in force. */
  readonly clearances: readonly CraftClearance[];
  /** Contacts it already has, on whichever antenna. */
  readonly contacts: readonly (Interval & { readonly antennaId: string; readonly antennaName: string })[];
}

/** A booking that keeps a beam of the antenna. */
export interface BusyInput {
  readonly beam: number;
  readonly guardFromMs: number;
  readonly guardToMs: number;
  readonly aosMs: number;
  readonly losMs: number;
  readonly startAzimuthDeg: number | null;
  readonly endAzimuthDeg: number | null;
  /** Set only where the booking is the caller's own: nobody learns whom another contact serves. */
  readonly own: { readonly bookingId: string; readonly spacecraftId: string; readonly state: BookingState } | null;
}

/** An antenna on sale with all that bounds what it can sell in the period asked for. */
export interface AntennaInput {
  readonly id: string;
  readonly stationId: string;
  readonly stationName: string;
  /** Rises with every change that can move a pass. */
  readonly version: number;
  readonly name: string;
  readonly site: GeodeticSite;
  readonly mask: readonly MaskPoint[];
  readonly mount: z.infer<typeof Mount>;
  readonly tiltDeg: number;
  readonly slewAzimuthDegPerS: number;
  readonly slewElevationDegPerS: number;
  readonly lowestReceiveDeg: number;
  readonly lowestTransmitDeg: number;
  readonly bands: readonly AntennaBand[];
  readonly setupS: number;
  readonly teardownS: number;
  readonly beams: number;
  readonly minNoticeMin: number;
  readonly horizonDays: number;
  readonly minContactS: number;
  readonly maxContactS: number;
  readonly partsAllowed: boolean;
  readonly timeZone: string;
  readonly weekly: readonly WeeklyRule[];
  /** Open beyond the weekly hours. */
  readonly openings: readonly Interval[];
  readonly blackouts: readonly OfferBlackout[];
  /** The card that a purchase now would freeze. */
  readonly price: PriceCard & { readonly ladder: readonly LadderStep[] };
  readonly busy: readonly BusyInput[];
  /** What the caller has bought at this station, for volume tiers. */
  readonly bought: readonly Interval[];
}

/** What the person wants to hear or send, and within which limits. */
export interface Wish {
  readonly need: Need;
  /** Names of bands; empty for whatever the radios use. */
  readonly bands: readonly string[];
  readonly lowestElevationDeg: number;
  readonly shortestS: number;
  /** In minor units of each antenna's own currency. */
  readonly highestPriceMinor: number | null;
}

export interface SearchJob {
  readonly kind: 'search';
  readonly nowMs: number;
  readonly fromMs: number;
  readonly toMs: number;
  readonly wish: Wish;
  readonly spacecraft: readonly CraftInput[];
  readonly antennas: readonly AntennaInput[];
  /** The search stops with `tooMany` beyond so many passes. */
  readonly maxPasses: number;
  /** Memory of `newPulseMemory`, shared with the asker: how far the search is, and whether it is to stop. */
  readonly pulse: SharedArrayBuffer | null;
}

export type SearchOutcome =
  | {
      readonly kind: 'found';
      /**
       * The passes as JSON in pieces of shared memory, each pass behind a comma, without the brackets around them; by
       * spacecraft, antenna and AOS. As objects, and even as copies, so many would hold up the event loop.
       */
      readonly json: readonly Uint8Array[];
      readonly passes: number;
      readonly forSale: number;
      /** What stopped a spacecraft's elements from being used, by spacecraft; the others are complete. */
      readonly faults: readonly { readonly spacecraftId: string; readonly sentence: string }[];
    }
  | { readonly kind: 'too many' }
  | { readonly kind: 'cancelled' };

/** One pass in full, or the part of it that is asked for. */
export interface PassJob {
  readonly kind: 'pass';
  readonly nowMs: number;
  readonly need: Need;
  readonly bands: readonly string[];
  readonly aosMs: number;
  readonly losMs: number;
  readonly spacecraft: CraftInput;
  readonly antenna: AntennaInput;
  /** Whether to work out track, links and Sun as well. */
  readonly withTrack: boolean;
  /** A booked contact stays what it is: its times are taken as given, and no offer is made. */
  readonly booked: boolean;
}

export type PassOutcome =
  | {
      readonly kind: 'pass';
      readonly elementSetId: string;
      /** What the stretch was computed from, and the ephemeris where that was one. */
      readonly source: PassSource;
      readonly ephemerisId: string | null;
      /** The whole stay above the mask. */
      readonly pass: PassGeometry;
      /** The stretch asked for, snapped to what is for sale; milliseconds are whole. */
      readonly aosMs: number;
      readonly tcaMs: number;
      readonly losMs: number;
      readonly part: PassGeometry;
      /** What of the stretch the mount cannot follow. */
      readonly gaps: readonly MountGap[];
      /** Why it cannot be sold; empty where it can. */
      readonly reasons: readonly Reason[];
      /** Before VAT; null where nothing is for sale. */
      readonly price: PriceQuote | null;
      readonly detail: PassTrack | null;
    }
  | { readonly kind: 'no pass'; readonly reasons: readonly Reason[] }
  | { readonly kind: 'elements unusable'; readonly sentence: string };

/** The part of `PassDetail` that is geometry and radio. */
export type PassTrack = Pick<PassDetail, 'track' | 'sun' | 'illumination' | 'links'>;

export const CONTACT_FILES = ['pointing.csv', 'frequency.csv', 'ephemeris.oem', 'elements.omm'] as const;
export type ContactFileName = (typeof CONTACT_FILES)[number];

/** One file for flying a contact. */
export interface FileJob {
  readonly kind: 'file';
  readonly file: ContactFileName;
  readonly createdMs: number;
  readonly need: Need;
  readonly aosMs: number;
  readonly tcaMs: number;
  readonly losMs: number;
  readonly spacecraft: CraftInput;
  readonly antenna: AntennaInput;
  readonly stationName: string;
  readonly operatorName: string;
}

export type FileOutcome =
  | { readonly kind: 'file'; readonly text: string }
  | { readonly kind: 'elements unusable'; readonly sentence: string };

/** Hours of night at places, for the board's paper. */
export interface NightsJob {
  readonly kind: 'nights';
  readonly fromMs: number;
  readonly toMs: number;
  readonly sites: readonly GeodeticSite[];
}

export interface NightsOutcome {
  readonly kind: 'nights';
  /** In the order of the sites. */
  readonly nights: readonly (readonly Interval[])[];
}

export type EngineJob = SearchJob | PassJob | FileJob | NightsJob;

/** The answer that belongs to a job. */
export type OutcomeOf<J extends EngineJob> = J extends SearchJob
  ? SearchOutcome
  : J extends PassJob
    ? PassOutcome
    : J extends FileJob
      ? FileOutcome
      : NightsOutcome;
