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

interface MeanElements {
  readonly raanDeg: number;
  readonly argPerigeeDeg: number;
  readonly meanAnomalyDeg: number;
  readonly revPerDay: number;
  /** Since the first published set. */
  readonly revolutions: number;
}

function meanElementsAt({ orbit }: CastSpacecraft, epochMs: number): MeanElements {
  const axisKm = EARTH_RADIUS_KM + orbit.altitudeKm;
  const meanMotionRadPerS = Math.sqrt(GM_KM3_PER_S2 / axisKm ** 3);
  const inclinationRad = (orbit.inclinationDeg * Math.PI) / 180;
  const factor = 1.5 * J2 * (EARTH_RADIUS_KM / (axisKm * (1 - orbit.eccentricity ** 2))) ** 2 * meanMotionRadPerS;
  const elapsedS = (epochMs - ELEMENTS_REFERENCE_MS) / 1000;
  const turnedDeg = factor * elapsedS * (180 / Math.PI);
  const revPerDay = (meanMotionRadPerS * DAY_S) / (2 * Math.PI);
  const revolutions = (revPerDay * elapsedS) / DAY_S;
  return {
    raanDeg: turn(orbit.raanDeg - turnedDeg * Math.cos(inclinationRad)),
    argPerigeeDeg: turn(orbit.argPerigeeDeg + turnedDeg * (2 - 2.5 * Math.sin(inclinationRad) ** 2)),
    meanAnomalyDeg: turn(orbit.meanAnomalyDeg + (revolutions % 1) * 360),
    revPerDay,
    revolutions,
  };
}

/** Four decimals as a TLE writes an angle; 359.99996 is 0, not 360. */
const angle = (deg: number): string =>
  turn(Number(deg.toFixed(4)))
    .toFixed(4)
    .padStart(8);

/** The TLE of `spacecraft` at `epochMs`, with its name as a line above. */
export function tleAt(spacecraft: CastSpacecraft, epochMs: number, setNumber: number): string {
  const { orbit } = spacecraft;
  const mean = meanElementsAt(spacecraft, epochMs);
  const number = String(spacecraft.catalogNumber).padStart(5, '0');
  const line1 = `1 ${number}U 26001A   ${epochText(epochMs)}  .00000000  00000-0  40000-4 0 ${String(setNumber % 10_000).padStart(4, ' ')}`;
  const line2 = [
    `2 ${number}`,
    angle(orbit.inclinationDeg),
    angle(mean.raanDeg),
    orbit.eccentricity.toFixed(7).slice(2),
    angle(mean.argPerigeeDeg),
    angle(mean.meanAnomalyDeg),
    mean.revPerDay.toFixed(8).padStart(11) + String(Math.floor(mean.revolutions) % 100_000).padStart(5),
  ].join(' ');
  return `${spacecraft.name}\n${line1}${checksum(line1)}\n${line2}${checksum(line2)}`;
}

/** The same as CCSDS OMM keywords, as the element feed serves them. */
export function ommAt(spacecraft: CastSpacecraft, epochMs: number, setNumber: number): Record<string, string | number> {
  const mean = meanElementsAt(spacecraft, epochMs);
  return {
    CCSDS_OMM_VERS: '2.0',
    CREATION_DATE: new Date(epochMs).toISOString().slice(0, -1),
    ORIGINATOR: 'DEMO FEED',
    OBJECT_NAME: spacecraft.name,
    OBJECT_ID: '2026-001A',
    CENTER_NAME: 'EARTH',
    REF_FRAME: 'TEME',
    TIME_SYSTEM: 'UTC',
    MEAN_ELEMENT_THEORY: 'SGP4',
    EPOCH: new Date(epochMs).toISOString().slice(0, -1),
    MEAN_MOTION: Number(mean.revPerDay.toFixed(8)),
    ECCENTRICITY: spacecraft.orbit.eccentricity,
    INCLINATION: spacecraft.orbit.inclinationDeg,
    RA_OF_ASC_NODE: Number(mean.raanDeg.toFixed(4)),
    ARG_OF_PERICENTER: Number(mean.argPerigeeDeg.toFixed(4)),
    MEAN_ANOMALY: Number(mean.meanAnomalyDeg.toFixed(4)),
    EPHEMERIS_TYPE: 0,
    CLASSIFICATION_TYPE: 'U',
    NORAD_CAT_ID: spacecraft.catalogNumber,
    ELEMENT_SET_NO: setNumber % 10_000,
    REV_AT_EPOCH: Math.floor(mean.revolutions) % 100_000,
    BSTAR: 0.00004,
    MEAN_MOTION_DOT: 0,
    MEAN_MOTION_DDOT: 0,
  };
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
