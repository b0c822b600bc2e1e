/** Heights of perigee and apogee from mean elements, for people to recognise an orbit by. */

/** SGP4's own constants, WGS-72: Hoots & Roehrich, Spacetrack Report No. 3 (from memory). */
const GRAVITY_KM3_PER_S2 = 398_600.8;
const EARTH_RADIUS_EQUATORIAL_KM = 6_378.135;
const DAY_S = 86_400;

/** Kepler's third law on the mean motion; the oblate Earth moves the true heights by some kilometres. */
export function orbitShape(elements: { readonly meanMotionRevPerDay: number; readonly eccentricity: number }): {
  readonly perigeeKm: number;
  readonly apogeeKm: number;
} {
  const meanMotionRadPerS = (elements.meanMotionRevPerDay * 2 * Math.PI) / DAY_S;
  const semiMajorKm = Math.cbrt(GRAVITY_KM3_PER_S2 / meanMotionRadPerS ** 2);
  return {
    perigeeKm: semiMajorKm * (1 - elements.eccentricity) - EARTH_RADIUS_EQUATORIAL_KM,
    apogeeKm: semiMajorKm * (1 + elements.eccentricity) - EARTH_RADIUS_EQUATORIAL_KM,
  };
}
