/**
 * Element sets of the invented spacecraft at any epoch: mean motion from the altitude, node and perigee turned by the
 * secular effect of J2 (Vallado, Fundamentals of Astrodynamics, secular rates of the node and perigee), written as TLE.
 */
import type { CastSpacecraft } from './operators.js';

const GM_KM3_PER_S2 = 398_600.8; // WGS72, the constants of SGP4
const EARTH_RADIUS_KM = 6_378.135;
const J2 = 0.001082616;
const DAY_S = 86_400;
const turn = (angleDeg: number) => ((angleDeg % 360) + 360) % 360;

/** Where its elements were published first; every later set is this one moved on. */
export const ELEMENTS_REFERENCE_MS = Date.UTC(2026, 0, 1);

/** The TLE of `spacecraft` at `epochMs`, with its name as a line above. */
export function tleAt(spacecraft: CastSpacecraft, epochMs: number, setNumber: number): string {
  const { orbit } = spacecraft;
  const axisKm = EARTH_RADIUS_KM + orbit.altitudeKm;
  const meanMotionRadPerS = Math.sqrt(GM_KM3_PER_S2 / axisKm ** 3);
  const inclinationRad = (orbit.inclinationDeg * Math.PI) / 180;
  const factor = 1.5 * J2 * (EARTH_RADIUS_KM / (axisKm * (1 - orbit.eccentricity ** 2))) ** 2 * meanMotionRadPerS;
  const elapsedS = (epochMs - ELEMENTS_REFERENCE_MS) / 1000;
  const degPerS = 180 / Math.PI;
  const raanDeg = turn(orbit.raanDeg - factor * Math.cos(inclinationRad) * degPerS * elapsedS);
  const argPerigeeDeg = turn(
    orbit.argPerigeeDeg + factor * (2 - 2.5 * Math.sin(inclinationRad) ** 2) * degPerS * elapsedS,
  );
  const revPerDay = (meanMotionRadPerS * DAY_S) / (2 * Math.PI);
  const revolutions = (revPerDay * elapsedS) / DAY_S;
  const meanAnomalyDeg = turn(orbit.meanAnomalyDeg + (revolutions % 1) * 360);
  const number = String(spacecraft.catalogNumber).padStart(5, '0');
  const line1 = `1 ${number}U 26001A   ${epochText(epochMs)}  .00000000  00000-0  40000-4 0 ${String(setNumber % 10_000).padStart(4, ' ')}`;
  const line2 = [
    `2 ${number}`,
    orbit.inclinationDeg.toFixed(4).padStart(8),
    raanDeg.toFixed(4).padStart(8),
    orbit.eccentricity.toFixed(7).slice(2),
    argPerigeeDeg.toFixed(4).padStart(8),
    meanAnomalyDeg.toFixed(4).padStart(8),
    revPerDay.toFixed(8).padStart(11) + String(Math.floor(revolutions) % 100_000).padStart(5),
  ].join(' ');
  return `${spacecraft.name}\n${line1}${checksum(line1)}\n${line2}${checksum(line2)}`;
}

function epochText(epochMs: number): string {
  const year = new Date(epochMs).getUTCFullYear();
  const day = (epochMs - Date.UTC(year, 0, 1)) / 86_400_000 + 1;
  return `${String(year % 100).padStart(2, '0')}${day.toFixed(8).padStart(12, '0')}`;
}

function checksum(line: string): number {
  let sum = 0;
  for (const character of line) sum += character === '-' ? 1 : /\d/.test(character) ? Number(character) : 0;
  return sum % 10;
}
