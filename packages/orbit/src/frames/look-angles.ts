/** From the frame that SGP4 answers in to what a station sees. No refraction, no light time, no polar motion. */
import type { GeodeticSite, LookAngles, TrajectorySource } from '../types.js';
import { DEG, type SiteFrame, siteFrame } from './ellipsoid.js';
import { EARTH_TURN_RAD_PER_S, gmstRad } from './sidereal.js';

/**
 * Turns a state (x y z km, vx vy vz km/s) from TEME into Earth axes, in place. The velocity is the one seen by somebody who
 * turns with the Earth, so that its part along the line of sight is the range rate.
 */
export function temeToEcef(timeMs: number, state: Float64Array): void {
  const turn = gmstRad(timeMs);
  const cos = Math.cos(turn);
  const sin = Math.sin(turn);
  const x = state[0]!;
  const y = state[1]!;
  const vx = state[3]!;
  const vy = state[4]!;
  state[0] = cos * x + sin * y;
  state[1] = cos * y - sin * x;
  state[3] = cos * vx + sin * vy + EARTH_TURN_RAD_PER_S * state[1];
  state[4] = cos * vy - sin * vx - EARTH_TURN_RAD_PER_S * state[0];
}

/** Direction and distance of a state in Earth axes as seen from a station. */
export function lookAt(frame: SiteFrame, timeMs: number, state: Float64Array): LookAngles {
  const { positionKm, east, north, up } = frame;
  const x = state[0]! - positionKm[0];
  const y = state[1]! - positionKm[1];
  const z = state[2]! - positionKm[2];
  const eastKm = east[0] * x + east[1] * y + east[2] * z;
  const northKm = north[0] * x + north[1] * y + north[2] * z;
  const upKm = up[0] * x + up[1] * y + up[2] * z;
  const rangeKm = Math.hypot(x, y, z);
  const azimuthDeg = Math.atan2(eastKm, northKm) / DEG;
  return {
    timeMs,
    azimuthDeg: azimuthDeg < 0 ? azimuthDeg + 360 : azimuthDeg,
    // The arc tangent keeps its digits near the zenith, where the arc sine loses half of them.
    elevationDeg: Math.atan2(upKm, Math.hypot(eastKm, northKm)) / DEG,
    rangeKm,
    rangeRateKmPerS: (x * state[3]! + y * state[4]! + z * state[5]!) / rangeKm,
  };
}

/**
 * Look angles straight from the source at one instant, without any interpolation.
 * @throws OrbitError where the source has no answer, or `bad place` for an impossible site.
 */
export function lookAngles(source: TrajectorySource, site: GeodeticSite | SiteFrame, timeMs: number): LookAngles {
  const state = new Float64Array(6);
  source.stateTeme(timeMs, state);
  temeToEcef(timeMs, state);
  return lookAt('positionKm' in site ? site : siteFrame(site), timeMs, state);
}
