/**
 * The words that the whole package shares. Times are UTC milliseconds since 1970 as real numbers (fractions allowed),
 * angles are degrees at this border, lengths kilometres except an altitude, which is metres as a surveyor writes it.
 */

/** A place on the WGS84 ellipsoid. Latitude -90..90, longitude -180..180 (east positive), altitude above the ellipsoid. */
export interface GeodeticSite {
  readonly latitudeDeg: number;
  readonly longitudeDeg: number;
  readonly altitudeM: number;
}

/**
 * One corner of a horizon mask: what lies above `elevationDeg` at `azimuthDeg` (from north through east) is open sky.
 * Straight between corners, closed across north; two corners at one azimuth are a cliff.
 */
export type MaskPoint = readonly [azimuthDeg: number, elevationDeg: number];

/**
 * Where a spacecraft is, whatever it was made from: mean elements through SGP4, or an operator's own ephemeris.
 * Both methods throw `OrbitError` outside what the source can answer for.
 */
export interface TrajectorySource {
  /** First and last instant the source answers for; infinite for mean elements. */
  readonly startMs: number;
  readonly stopMs: number;
  /**
   * Where the source is not one unbroken path from start to stop: its unbroken stretches, or a function that cuts a period
   * into pieces with a source for each. A search runs on every piece by itself.
   */
  readonly spans?: readonly SourceSpan[] | ((fromMs: number, toMs: number) => readonly SourcePiece[]);
  /** Where the source may give out at some distance from an instant that it is good at (decay): that instant. */
  readonly epochMs?: number;
  /** Nothing in the path changes faster than this; absent where the orbit alone says how finely to sample. */
  readonly longestStepMs?: number;
  /** Writes x y z in km and vx vy vz in km/s, true equator mean equinox (TEME), into `out[0..5]`. */
  stateTeme(timeMs: number, out: Float64Array): void;
}

export interface SourceSpan {
  readonly startMs: number;
  readonly stopMs: number;
}

export interface SourcePiece {
  readonly fromMs: number;
  readonly toMs: number;
  readonly source: TrajectorySource;
}

/** Direction and distance of a spacecraft from a site at one instant. Azimuth 0..360 from north through east. */
export interface LookAngles {
  readonly timeMs: number;
  readonly azimuthDeg: number;
  readonly elevationDeg: number;
  readonly rangeKm: number;
  /** Positive going away. */
  readonly rangeRateKmPerS: number;
}

/** The three instants of a pass, in this order wherever an array of three stands. */
export type AosHighestLos<T> = readonly [aos: T, highest: T, los: T];

/** One unbroken stay above the mask. AOS and LOS are the crossings, or the ends of the period where clipped. */
export interface Pass {
  readonly aosMs: number;
  /** The instant of greatest elevation inside the visible interval. */
  readonly tcaMs: number;
  readonly losMs: number;
  readonly clippedStart: boolean;
  readonly clippedEnd: boolean;
  readonly maxElevationDeg: number;
  readonly azimuthDeg: AosHighestLos<number>;
  readonly elevationDeg: AosHighestLos<number>;
  readonly rangeKm: AosHighestLos<number>;
  readonly rangeRateKmPerS: AosHighestLos<number>;
}
