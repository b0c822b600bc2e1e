/**
 * A pass search with nothing clever in it: elevation above the mask every few seconds, and halving where its sign
 * changes. Written apart from the product's engine, so that the two can be wrong only separately.
 */
import type { MaskPoint, TrajectorySource } from '../../../packages/orbit/src/types.js';

export interface PlainStation {
  readonly id: string;
  readonly latitudeDeg: number;
  readonly longitudeDeg: number;
  readonly altitudeM: number;
  readonly mask: readonly MaskPoint[];
}

export interface PlainPass {
  readonly aosMs: number;
  readonly losMs: number;
}

const RAD = Math.PI / 180;

/** WGS84 (ERFA eform). */
const SEMI_MAJOR_KM = 6378.137;
const FLATTENING = 1 / 298.257223563;

/** Greenwich mean sidereal time of 1982, Aoki et al., as a plain sum of degrees. */
function siderealRad(timeMs: number): number {
  const days = (timeMs - 946_728_000_000) / 86_400_000;
  const t = days / 36_525;
  const turn = 360.98564736629 * days;
  // The constant, rate a day and square of the same formula in degrees.
  return (280.46061837 + (turn % 360) + 0.000387933 * t * t - (t * t * t) / 38_710_000) * RAD;
}

function aboveMaskDeg(source: TrajectorySource, station: PlainStation, timeMs: number, state: Float64Array): number {
  source.stateTeme(timeMs, state);
  const theta = siderealRad(timeMs);
  const x = Math.cos(theta) * state[0]! + Math.sin(theta) * state[1]!;
  const y = -Math.sin(theta) * state[0]! + Math.cos(theta) * state[1]!;
  const [lat, lon] = [station.latitudeDeg * RAD, station.longitudeDeg * RAD];
  const e2 = FLATTENING * (2 - FLATTENING);
  const n = SEMI_MAJOR_KM / Math.sqrt(1 - e2 * Math.sin(lat) ** 2);
  const heightKm = station.altitudeM / 1000;
  const dx = x - (n + heightKm) * Math.cos(lat) * Math.cos(lon);
  const dy = y - (n + heightKm) * Math.cos(lat) * Math.sin(lon);
  const dz = state[2]! - (n * (1 - e2) + heightKm) * Math.sin(lat);
  const east = -Math.sin(lon) * dx + Math.cos(lon) * dy;
  const north = -Math.sin(lat) * (Math.cos(lon) * dx + Math.sin(lon) * dy) + Math.cos(lat) * dz;
  const up = Math.cos(lat) * (Math.cos(lon) * dx + Math.sin(lon) * dy) + Math.sin(lat) * dz;
  const azimuthDeg = (Math.atan2(east, north) / RAD + 360) % 360;
  return Math.asin(up / Math.hypot(dx, dy, dz)) / RAD - maskDeg(station.mask, azimuthDeg);
}

/** Straight between corners, closed across north; the masks of the scenario have no cliffs. */
function maskDeg(points: readonly MaskPoint[], azimuthDeg: number): number {
  const corners = [...points].sort((a, b) => a[0] - b[0]);
  const next = corners.find(([azimuth]) => azimuth >= azimuthDeg) ?? corners[0]!;
  const before = corners.findLast(([azimuth]) => azimuth < azimuthDeg) ?? corners.at(-1)!;
  const spanDeg = (next[0] - before[0] + 360) % 360;
  if (spanDeg === 0) return next[1];
  return before[1] + ((next[1] - before[1]) * ((azimuthDeg - before[0] + 360) % 360)) / spanDeg;
}

export function plainSearch(
  source: TrajectorySource,
  station: PlainStation,
  [fromMs, toMs]: readonly [number, number],
  stepMs: number,
): PlainPass[] {
  const state = new Float64Array(6);
  const above = (timeMs: number) => aboveMaskDeg(source, station, timeMs, state);
  const passes: PlainPass[] = [];
  let openMs = above(fromMs) >= 0 ? fromMs : undefined;
  for (let atMs = fromMs; atMs < toMs; atMs += stepMs) {
    const nextMs = Math.min(toMs, atMs + stepMs);
    const isUp = above(nextMs) >= 0;
    if (isUp === (openMs !== undefined)) continue;
    let [low, high] = [atMs, nextMs];
    while (high - low > 0.01) {
      const middle = (low + high) / 2;
      if (above(middle) >= 0 === isUp) high = middle;
      else low = middle;
    }
    if (openMs === undefined) openMs = high;
    else {
      passes.push({ aosMs: openMs, losMs: high });
      openMs = undefined;
    }
  }
  if (openMs !== undefined) passes.push({ aosMs: openMs, losMs: toMs });
  return passes;
}
