/** Invented orbits that surely pass a northern station: over the poles at some 550 km, epoch a minute ago. */
import { tleText } from '../../api/harness/tle.js';

const MINUTE_MS = 60_000;

export interface InventedOrbit {
  readonly name: string;
  readonly catalogNumber: number;
  readonly epochMs: number;
}

export const aMinuteAgo = (): number => Date.now() - MINUTE_MS;

/**
 * A three-line set. From 70° north such an orbit is above the horizon on nearly every revolution, fifteen a day.
 * Two of the same epoch fly as one, as spacecraft do that have just been released together.
 */
export const elementSetOf = (orbit: InventedOrbit): string => tleText(orbit);
