/** Where the Sun is: as seen from the Earth's centre in our axes, and from a station. */
import { AstroTime, Body, Equator, GeoVector, Horizon, Observer } from 'astronomy-engine';
import { gcrfToTeme, rotateInPlace } from '../ephemeris/earth-orientation.js';
import type { GeodeticSite } from '../types.js';

/** IAU 2012, exact. */
export const ASTRONOMICAL_UNIT_KM = 149_597_870.7;
/** IAU 2015 nominal solar radius. */
export const SUN_RADIUS_KM = 695_700;

const J2000_UTC_NOON_MS = 946_728_000_000;
const DAY_MS = 86_400_000;

/** The library counts UT in days since noon of 2000-01-01; UT1 is taken as UTC. */
export function astroTime(timeMs: number): AstroTime {
  return new AstroTime((timeMs - J2000_UTC_NOON_MS) / DAY_MS);
}

/** Apparent place of the Sun (light time and aberration included), TEME, km. Theory: VSOP87 shortened by astronomy-engine. */
export function sunPositionTemeKm(timeMs: number): Float64Array {
  const { x, y, z } = GeoVector(Body.Sun, astroTime(timeMs), true);
  const position = Float64Array.of(x, y, z).map((au) => au * ASTRONOMICAL_UNIT_KM);
  rotateInPlace(gcrfToTeme(timeMs), position, 0);
  return position;
}

export interface Direction {
  readonly azimuthDeg: number;
  readonly elevationDeg: number;
}

/** Direction of the Sun's centre from a station, without refraction. */
export function sunDirection(site: GeodeticSite, timeMs: number): Direction {
  const observer = new Observer(site.latitudeDeg, site.longitudeDeg, site.altitudeM);
  const time = astroTime(timeMs);
  const { ra, dec } = Equator(Body.Sun, time, observer, true, true);
  const { azimuth, altitude } = Horizon(time, observer, ra, dec);
  return { azimuthDeg: azimuth, elevationDeg: altitude };
}

/** Angle between two directions at one station, degrees; exact also where they are close. */
export function separationDeg(a: Direction, b: Direction): number {
  const rad = Math.PI / 180;
  const [elevationA, elevationB] = [a.elevationDeg * rad, b.elevationDeg * rad];
  const half =
    Math.sin((elevationA - elevationB) / 2) ** 2 +
    Math.cos(elevationA) * Math.cos(elevationB) * Math.sin(((a.azimuthDeg - b.azimuthDeg) * rad) / 2) ** 2;
  return (2 * Math.asin(Math.sqrt(Math.min(1, half)))) / rad;
}
