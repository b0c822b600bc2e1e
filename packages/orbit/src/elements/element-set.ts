/** Mean elements for SGP4, whatever form they came in. */

export type ElementFormat = 'tle' | 'omm-kvn' | 'omm-xml' | 'omm-json' | 'omm-csv';

/** Everything is as read: no value is rounded or turned into another unit. */
export interface ElementSet {
  readonly format: ElementFormat;
  /** Empty where two bare lines came without a name. */
  readonly objectName: string;
  /** International designator as `1998-067A`; empty where a TLE leaves it blank. */
  readonly objectId: string;
  /** Up to nine digits; above 339999 only an OMM can carry it. */
  readonly catalogNumber: number;
  /** UTC as ISO 8601 with Z, six decimals of a second or as many as were written. */
  readonly epochUtc: string;
  /** The same instant in milliseconds since 1970, fraction kept. */
  readonly epochMs: number;
  /** Kozai mean motion as SGP4 takes it. */
  readonly meanMotionRevPerDay: number;
  readonly eccentricity: number;
  readonly inclinationDeg: number;
  readonly raanDeg: number;
  readonly argPerigeeDeg: number;
  readonly meanAnomalyDeg: number;
  /** Drag term, per Earth radius. */
  readonly bstarPerEarthRadius: number;
  /** First derivative over two, rev/day2, as both formats print it; SGP4 does not use it. */
  readonly meanMotionDot: number;
  /** Second derivative over six, rev/day3; SGP4 does not use it. */
  readonly meanMotionDdot: number;
  readonly elementSetNumber: number;
  readonly revolutionAtEpoch: number;
  /** U, C or S. */
  readonly classification: string;
  /** The two lines, where they are what was read. */
  readonly tle?: readonly [line1: string, line2: string];
  /** Line of the text that this set begins on, from 1. */
  readonly sourceLine: number;
}

/** What is wrong in a text of element sets, where, and what would have been right. */
export interface ElementFault {
  readonly line: number;
  readonly field: string;
  readonly found: string;
  readonly expected: string;
  readonly message: string;
}
