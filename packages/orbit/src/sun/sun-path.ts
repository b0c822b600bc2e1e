/** The Sun over a period, cheap enough to be asked at every sample of every pass. */
import { meanSidereal1982Rad } from '../ephemeris/earth-orientation.js';
import type { GeodeticSite } from '../types.js';
import { type Direction, sunPositionTemeKm } from './sun-position.js';

export interface SunPath {
  /** Writes x y z, TEME, km. */
  positionTemeKm(timeMs: number, out: Float64Array): void;
  /** Direction of the Sun's centre seen along the station's horizon, without refraction and without its parallax of 9". */
  direction(site: GeodeticSite, timeMs: number): Direction;
}

const KNOT_MS = 86_400_000;
const RAD = Math.PI / 180;

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
  const place = new Float64Array(3);
  return {
    positionTemeKm,
    direction(site, timeMs) {
      positionTemeKm(timeMs, place);
      return horizonDirection(site, timeMs, place);
    },
  };
}

function horizonDirection(
  site: GeodeticSite,
  timeMs: number,
  [x = 0, y = 0, z = 0]: ArrayLike<number> & Iterable<number>,
): Direction {
  const hourRad = meanSidereal1982Rad(timeMs) + site.longitudeDeg * RAD;
  const latitudeRad = site.latitudeDeg * RAD;
  const meridian = Math.cos(hourRad) * x + Math.sin(hourRad) * y;
  const east = -Math.sin(hourRad) * x + Math.cos(hourRad) * y;
  const north = -Math.sin(latitudeRad) * meridian + Math.cos(latitudeRad) * z;
  const up = Math.cos(latitudeRad) * meridian + Math.sin(latitudeRad) * z;
  return {
    azimuthDeg: (Math.atan2(east, north) / RAD + 360) % 360,
    elevationDeg: Math.atan2(up, Math.hypot(east, north)) / RAD,
  };
}
