/** The Sun over a period, cheap enough to be asked at every sample of every pass. */
import { type SiteFrame, siteFrame } from '../frames/ellipsoid.js';
import { lookAt, temeToEcef } from '../frames/look-angles.js';
import type { GeodeticSite } from '../types.js';
import { type Direction, sunPositionTemeKm } from './sun-position.js';

export interface SunPath {
  /** Writes x y z, TEME, km. */
  positionTemeKm(timeMs: number, out: Float64Array): void;
  /** Direction of the Sun's centre from a station, without refraction. */
  direction(site: GeodeticSite | SiteFrame, timeMs: number): Direction;
}

const KNOT_MS = 86_400_000;

/**
 * Computes the Sun's place once a day and puts a cubic through four days, which stays within a ten-thousandth of a degree
 * of the theory. Keep one path for as long as the same period is asked about.
 */
export function sunPath(): SunPath {
  const knots = new Map<number, Float64Array>();
  const knot = (day: number): Float64Array => {
    const known = knots.get(day);
    if (known !== undefined) return known;
    const made = sunPositionTemeKm(day * KNOT_MS);
    knots.set(day, made);
    return made;
  };
  const positionTemeKm = (timeMs: number, out: Float64Array): void => {
    const day = Math.floor(timeMs / KNOT_MS);
    const u = timeMs / KNOT_MS - day;
    const weights = [
      (-u * (u - 1) * (u - 2)) / 6,
      ((u + 1) * (u - 1) * (u - 2)) / 2,
      (-(u + 1) * u * (u - 2)) / 2,
      ((u + 1) * u * (u - 1)) / 6,
    ];
    out.fill(0, 0, 3);
    weights.forEach((weight, index) => {
      const place = knot(day - 1 + index);
      for (let axis = 0; axis < 3; axis += 1) out[axis]! += weight * place[axis]!;
    });
  };
  const state = new Float64Array(6);
  return {
    positionTemeKm,
    direction(site, timeMs) {
      state.fill(0);
      positionTemeKm(timeMs, state);
      temeToEcef(timeMs, state);
      return lookAt('positionKm' in site ? site : siteFrame(site), timeMs, state);
    },
  };
}
