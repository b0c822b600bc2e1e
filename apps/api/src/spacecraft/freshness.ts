/** How far elements can still be trusted, from the estimated error that their age brings. */

import { elementAgeErrorS } from '@skyberth/orbit';
import { type ElementFreshness, FRESHNESS_FROM_S } from '@skyberth/shared';

export interface Freshness {
  readonly freshness: Exclude<ElementFreshness, 'none'>;
  /** Negative for an epoch that is still to come. */
  readonly ageH: number;
  /** One sigma of AOS and LOS, estimated by common practice. */
  readonly timingErrorS: number;
}

const HOUR_MS = 3_600_000;

/** How elements of this epoch serve at `atMs`; the mean motion tells the class of orbit. */
export function freshnessOf(epochMs: number, meanMotionRevPerDay: number, atMs: number): Freshness {
  const ageH = (atMs - epochMs) / HOUR_MS;
  const timingErrorS = elementAgeErrorS({ ageH: Math.abs(ageH), meanMotionRevPerDay });
  const freshness =
    timingErrorS < FRESHNESS_FROM_S.ageing ? 'fresh' : timingErrorS < FRESHNESS_FROM_S.stale ? 'ageing' : 'stale';
  return { freshness, ageH, timingErrorS };
}
