/** A stay above the mask in whole milliseconds, as the market sells it. */
import type { Interval } from '@skyberth/market';
import type { AosHighestLos, MountGap, Pass } from '@skyberth/orbit';
import type { PassGeometry } from '@skyberth/shared';
import type { WrittenText } from './json-writer.js';

/** The engine's pass with its three instants rounded once, so that search, hold and contact page speak of the same time. */
export interface Stay extends Pass {
  readonly elementSetId: string;
  /** Geometry and profile as they travel, from the first time they were sent; null until then. */
  shape: WrittenText | null;
  /** The whole pass as it was last sent, and for which question; null until then. */
  answer: SentAnswer | null;
  /** What the mount cannot follow of it, once somebody has asked; null until then. */
  gaps: readonly MountGap[] | null;
  /** What joining it with the next day's piece has made, so that the whole is remembered like any other stay. */
  joined: { readonly second: Stay; readonly whole: Stay } | null;
}

export interface SentAnswer {
  /** Of `QuestionNames`. */
  readonly question: string;
  /** The instants of asking at which it is the answer. */
  readonly at: Interval;
  readonly text: WrittenText;
  readonly forSale: boolean;
}

/** Two pieces of one stay meet at a day's end; the engine may place each edge a rounding away from it. */
const SAME_INSTANT_MS = 2;

const triple = (value: AosHighestLos<number>, decimals: number): [number, number, number] => {
  const scale = 10 ** decimals;
  const round = (each: number): number => Math.round(each * scale) / scale;
  return [round(value[0]), round(value[1]), round(value[2])];
};

/** For the wire: angles to 0.0001°, ranges to the metre, range rates to the millimetre a second. */
export function geometryOf(stay: Pass): PassGeometry {
  return {
    aosUtc: new Date(stay.aosMs).toISOString(),
    tcaUtc: new Date(stay.tcaMs).toISOString(),
    losUtc: new Date(stay.losMs).toISOString(),
    clippedStart: stay.clippedStart,
    clippedEnd: stay.clippedEnd,
    azimuthDeg: triple(stay.azimuthDeg, 4),
    elevationDeg: triple(stay.elevationDeg, 4),
    rangeKm: triple(stay.rangeKm, 3),
    rangeRateKmPerS: triple(stay.rangeRateKmPerS, 6),
    maxElevationDeg: Math.round(stay.maxElevationDeg * 1e4) / 1e4,
  };
}

/** Joins pieces that were cut at the ends of days. `stays` is sorted by AOS. */
export function joinDays(stays: readonly Stay[]): Stay[] {
  const joined: Stay[] = [];
  for (const stay of stays) {
    const before = joined.at(-1);
    if (before?.clippedEnd && stay.clippedStart && Math.abs(stay.aosMs - before.losMs) <= SAME_INSTANT_MS) {
      joined[joined.length - 1] = join(before, stay);
    } else {
      joined.push(stay);
    }
  }
  return joined;
}

function join(first: Stay, second: Stay): Stay {
  if (first.joined?.second !== second) first.joined = { second, whole: joinAnew(first, second) };
  return first.joined.whole;
}

function joinAnew(first: Stay, second: Stay): Stay {
  const higher = second.maxElevationDeg > first.maxElevationDeg ? second : first;
  const three = (of: (stay: Stay) => AosHighestLos<number>): AosHighestLos<number> => [
    of(first)[0],
    of(higher)[1],
    of(second)[2],
  ];
  return {
    elementSetId: first.elementSetId,
    shape: null,
    answer: null,
    gaps: null,
    joined: null,
    aosMs: first.aosMs,
    clippedStart: first.clippedStart,
    tcaMs: higher.tcaMs,
    losMs: second.losMs,
    clippedEnd: second.clippedEnd,
    maxElevationDeg: higher.maxElevationDeg,
    azimuthDeg: three((stay) => stay.azimuthDeg),
    elevationDeg: three((stay) => stay.elevationDeg),
    rangeKm: three((stay) => stay.rangeKm),
    rangeRateKmPerS: three((stay) => stay.rangeRateKmPerS),
  };
}
