/** What a planning thread is given and what it sends back. Plain data; times are UTC milliseconds. */
import type { PlanInput, PlanOutcome, PlanProgress } from '@skyberth/shared';
import type { AntennaInput, CraftInput } from '../../market/workers/job-types.js';
import type { TaxParty } from '../tax-party.js';

/** What the market found for one spacecraft and one need, as the pieces of its JSON. */
export interface FoundText {
  readonly spacecraftId: string;
  readonly need: 'downlink' | 'both';
  readonly pieces: readonly Uint8Array[];
}

/** A contact that a spacecraft of the plan has already. */
export interface HadContact {
  readonly bookingId: string;
  readonly spacecraftId: string;
  readonly antennaId: string;
  readonly antennaName: string;
  readonly stationId: string;
  readonly stationName: string;
  readonly stationTimeZone: string;
  readonly need: 'downlink' | 'uplink' | 'both';
  readonly aosMs: number;
  readonly tcaMs: number;
  readonly losMs: number;
  readonly maxElevationDeg: number;
  readonly currency: string;
}

export interface PlanJob {
  readonly nowMs: number;
  readonly input: PlanInput;
  readonly fromMs: number;
  readonly toMs: number;
  readonly pinnedKeys: readonly string[];
  readonly struckKeys: readonly string[];
  readonly found: readonly FoundText[];
  readonly craft: readonly CraftInput[];
  readonly antennas: readonly AntennaInput[];
  readonly had: readonly HadContact[];
  readonly seller: TaxParty;
  readonly buyer: TaxParty;
  readonly limitS: number;
}

export type PlanMessage =
  | { readonly kind: 'progress'; readonly progress: PlanProgress }
  | { readonly kind: 'done'; readonly outcome: PlanOutcome }
  /** The need cannot be planned, with a sentence for the person. */
  | { readonly kind: 'refused'; readonly sentence: string };
