/**
 * Where the Sun stands overhead, good to a few hundredths of a degree until 2050: enough for shading a map, never for pointing.
 * Source: the low-precision formulas for the Sun of The Astronomical Almanac, from memory.
 */

const RADIAN = Math.PI / 180;
const DAY_MS = 86_400_000;
const J2000_MS = Date.UTC(2000, 0, 1, 12);

/** Latitude and longitude (degrees, east positive) of the point under the Sun at a UTC instant. */
export function subsolarPoint(atMs: number): { latitudeDeg: number; longitudeDeg: number } {
  const days = (atMs - J2000_MS) / DAY_MS;
  const meanLongitudeDeg = 280.46 + 0.9856474 * days;
  const anomaly = (357.528 + 0.9856003 * days) * RADIAN;
  const eclipticDeg = meanLongitudeDeg + 1.915 * Math.sin(anomaly) + 0.02 * Math.sin(2 * anomaly);
  const obliquity = (23.439 - 0.0000004 * days) * RADIAN;
  const lambda = eclipticDeg * RADIAN;
  const latitudeDeg = Math.asin(Math.sin(obliquity) * Math.sin(lambda)) / RADIAN;
  const rightAscensionDeg = Math.atan2(Math.cos(obliquity) * Math.sin(lambda), Math.cos(lambda)) / RADIAN;
  const siderealDeg = 280.46062 + 360.98564737 * days;
  return { latitudeDeg, longitudeDeg: wrap(rightAscensionDeg - siderealDeg) };
}

/** The point opposite: middle of the night. */
export function antipode(point: { latitudeDeg: number; longitudeDeg: number }): [number, number] {
  return [wrap(point.longitudeDeg + 180), -point.latitudeDeg];
}

function wrap(angleDeg: number): number {
  return ((((angleDeg + 180) % 360) + 360) % 360) - 180;
}
