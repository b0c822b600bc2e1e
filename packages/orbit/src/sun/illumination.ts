/**
 * Light and shadow of a spacecraft: the Earth as a sphere of its equatorial radius, umbra and penumbra as cones (two
 * discs in the sky; the model of Montenbruck and Gill 3.4.2). The flattening and the atmosphere, which both shift the
 * crossing by seconds in low orbit, are left out.
 */
import { WGS84_RADIUS_KM } from '../frames/ellipsoid.js';
import type { TrajectorySource } from '../types.js';
import { type SunPath, sunPath } from './sun-path.js';
import { SUN_RADIUS_KM } from './sun-position.js';

export type LightState = 'sunlit' | 'penumbra' | 'umbra';

export interface Illumination {
  readonly state: LightState;
  /** Share of the Sun's disc that is seen, 0 to 1. */
  readonly sunlitFraction: number;
}

type Vector = ArrayLike<number>;

/** How far inside light or shadow a place is, radians: `umbra` below zero is dark, `penumbra` above zero is full sun. */
function shadowAnglesRad(position: Vector, sun: Vector): { earthRad: number; sunRad: number; apartRad: number } {
  const [x, y, z] = [position[0]!, position[1]!, position[2]!];
  const [dx, dy, dz] = [sun[0]! - x, sun[1]! - y, sun[2]! - z];
  const radiusKm = Math.hypot(x, y, z);
  const sunDistanceKm = Math.hypot(dx, dy, dz);
  const cosine = -(x * dx + y * dy + z * dz) / (radiusKm * sunDistanceKm);
  return {
    earthRad: Math.asin(Math.min(1, WGS84_RADIUS_KM / radiusKm)),
    sunRad: Math.asin(SUN_RADIUS_KM / sunDistanceKm),
    apartRad: Math.acos(Math.max(-1, Math.min(1, cosine))),
  };
}

/** Light at a place (km, any axes that the Sun's place shares), from the two discs in its sky. */
export function illumination(position: Vector, sun: Vector): Illumination {
  const { earthRad, sunRad, apartRad } = shadowAnglesRad(position, sun);
  if (apartRad >= earthRad + sunRad) return { state: 'sunlit', sunlitFraction: 1 };
  if (apartRad <= earthRad - sunRad) return { state: 'umbra', sunlitFraction: 0 };
  if (apartRad <= sunRad - earthRad) return { state: 'penumbra', sunlitFraction: 1 - (earthRad / sunRad) ** 2 };
  const covered = lensArea(earthRad, sunRad, apartRad) / (Math.PI * sunRad * sunRad);
  return { state: 'penumbra', sunlitFraction: 1 - covered };
}

/** Area that two discs share, by plane geometry; the angles are small enough beside the curvature for a fraction. */
function lensArea(earthRad: number, sunRad: number, apartRad: number): number {
  const toChord = (apartRad * apartRad + sunRad * sunRad - earthRad * earthRad) / (2 * apartRad);
  const halfChord = Math.sqrt(Math.max(0, sunRad * sunRad - toChord * toChord));
  return (
    sunRad * sunRad * Math.acos(Math.max(-1, Math.min(1, toChord / sunRad))) +
    earthRad * earthRad * Math.acos(Math.max(-1, Math.min(1, (apartRad - toChord) / earthRad))) -
    apartRad * halfChord
  );
}

/** Light at an instant of a trajectory. */
export function illuminationAt(source: TrajectorySource, timeMs: number, sun: SunPath = sunPath()): Illumination {
  const state = new Float64Array(6);
  const place = new Float64Array(3);
  source.stateTeme(timeMs, state);
  sun.positionTemeKm(timeMs, place);
  return illumination(state, place);
}

export interface LightInterval {
  readonly fromMs: number;
  readonly toMs: number;
  readonly state: LightState;
}

const STEP_MS = 20_000;
const CROSSING_TOLERANCE_MS = 1;

/**
 * Light and shadow over a period, unbroken from `fromMs` to `toMs`. Crossings are found to the millisecond; a shadow or
 * a penumbra shorter than the 20 s step between samples can be missed where a spacecraft just grazes it.
 */
export function lightIntervals(
  source: TrajectorySource,
  fromMs: number,
  toMs: number,
  sun: SunPath = sunPath(),
): LightInterval[] {
  const stateAt = (timeMs: number) => illuminationAt(source, timeMs, sun).state;
  const intervals: LightInterval[] = [];
  let startMs = fromMs;
  let state = stateAt(fromMs);
  for (let atMs = fromMs; atMs < toMs; atMs += STEP_MS) {
    const nextMs = Math.min(toMs, atMs + STEP_MS);
    for (const change of changesBetween(stateAt, [atMs, state], [nextMs, stateAt(nextMs)])) {
      intervals.push({ fromMs: startMs, toMs: change.timeMs, state });
      startMs = change.timeMs;
      state = change.state;
    }
  }
  intervals.push({ fromMs: startMs, toMs, state });
  return intervals;
}

/** Halves the step until each change stands alone: a step from sun to umbra holds the penumbra between. */
function changesBetween(
  stateAt: (timeMs: number) => LightState,
  from: readonly [number, LightState],
  to: readonly [number, LightState],
): { timeMs: number; state: LightState }[] {
  if (from[1] === to[1]) return [];
  if (to[0] - from[0] <= CROSSING_TOLERANCE_MS) return [{ timeMs: to[0], state: to[1] }];
  const middleMs = (from[0] + to[0]) / 2;
  const middle = [middleMs, stateAt(middleMs)] as const;
  return [...changesBetween(stateAt, from, middle), ...changesBetween(stateAt, middle, to)];
}

/** Share of a period in full sun, 0 to 1. */
export function sunlitShare(intervals: readonly LightInterval[]): number {
  const lengthMs = (some: readonly LightInterval[]) => some.reduce((sum, { fromMs, toMs }) => sum + toMs - fromMs, 0);
  const wholeMs = lengthMs(intervals);
  return wholeMs === 0 ? 0 : lengthMs(intervals.filter(({ state }) => state === 'sunlit')) / wholeMs;
}
