import type { ElementSet } from './element-set.js';

/**
 * What makes two element sets the same for SGP4, as one line of text to compare or to hash: object, exact epoch and every
 * value that moves the spacecraft. Name, format, set number and the unused derivatives take no part.
 */
export function elementSetDigest(set: ElementSet): string {
  return [
    set.catalogNumber,
    set.objectId,
    set.epochUtc.replace(/0+Z$/, 'Z'),
    set.meanMotionRevPerDay,
    set.eccentricity,
    set.inclinationDeg,
    set.raanDeg,
    set.argPerigeeDeg,
    set.meanAnomalyDeg,
    set.bstarPerEarthRadius,
  ].join('|');
}
