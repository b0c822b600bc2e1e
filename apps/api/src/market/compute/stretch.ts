/** The geometry of a part of a stay: what is sold, or what lies within a period. */

import type { GeodeticSite } from '@skyberth/orbit';
import { type LookAngles, lookAngles, type TrajectorySource } from '@skyberth/orbit';
import type { Stay } from './stay.js';

/** Samples among which the highest point of a part is looked for; a permanent stay may have several. */
const SAMPLES = 96;
/** The highest point is found to this many milliseconds. */
const HIGHEST_TOLERANCE_MS = 1;
const GOLDEN = (Math.sqrt(5) - 1) / 2;

/**
 * The stay as if it began and ended at the given instants, with angles and ranges recomputed there. Equal to the stay where
 * the instants are its own.
 */
export function stretchOf(question: {
  stay: Stay;
  source: TrajectorySource;
  site: GeodeticSite;
  fromMs: number;
  toMs: number;
}): Stay {
  const { stay, source, site, fromMs, toMs } = question;
  if (fromMs === stay.aosMs && toMs === stay.losMs) return stay;
  const at = (timeMs: number): LookAngles => lookAngles(source, site, timeMs);
  const inside = stay.tcaMs >= fromMs && stay.tcaMs <= toMs;
  const tcaMs = inside ? stay.tcaMs : highestBetween((timeMs) => at(timeMs).elevationDeg, fromMs, toMs);
  const looks = [at(fromMs), at(tcaMs), at(toMs)] as const;
  return {
    elementSetId: stay.elementSetId,
    shape: null,
    answer: null,
    gaps: null,
    joined: null,
    aosMs: fromMs,
    tcaMs,
    losMs: toMs,
    clippedStart: fromMs > stay.aosMs || stay.clippedStart,
    clippedEnd: toMs < stay.losMs || stay.clippedEnd,
    maxElevationDeg: looks[1].elevationDeg,
    azimuthDeg: [looks[0].azimuthDeg, looks[1].azimuthDeg, looks[2].azimuthDeg],
    elevationDeg: [looks[0].elevationDeg, looks[1].elevationDeg, looks[2].elevationDeg],
    rangeKm: [looks[0].rangeKm, looks[1].rangeKm, looks[2].rangeKm],
    rangeRateKmPerS: [looks[0].rangeRateKmPerS, looks[1].rangeRateKmPerS, looks[2].rangeRateKmPerS],
  };
}

/** The instant of greatest value: the best of many samples, then the golden section about it. Whole milliseconds. */
export function highestBetween(valueAt: (timeMs: number) => number, fromMs: number, toMs: number): number {
  const stepMs = (toMs - fromMs) / SAMPLES;
  let best = 0;
  let most = Number.NEGATIVE_INFINITY;
  for (let i = 0; i <= SAMPLES; i += 1) {
    const value = valueAt(fromMs + i * stepMs);
    if (value > most) {
      most = value;
      best = i;
    }
  }
  let low = fromMs + Math.max(0, best - 1) * stepMs;
  let high = fromMs + Math.min(SAMPLES, best + 1) * stepMs;
  while (high - low > HIGHEST_TOLERANCE_MS) {
    const left = high - GOLDEN * (high - low);
    const right = low + GOLDEN * (high - low);
    if (valueAt(left) < valueAt(right)) low = left;
    else high = right;
  }
  return Math.min(toMs, Math.max(fromMs, Math.round((low + high) / 2)));
}
