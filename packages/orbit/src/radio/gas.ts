/** Absorption by oxygen and water vapour, line by line: Recommendation ITU-R P.676-12, Annex 1, section 1. */
import { OXYGEN_LINES, type SpectralLine, WATER_VAPOUR_LINES } from './gas-lines.js';

/** Air at one place. `pressureHpa` is the total pressure without water vapour: the "dry" pressure of the Recommendation. */
export interface Air {
  readonly pressureHpa: number;
  readonly temperatureK: number;
  readonly waterVapourGPerM3: number;
}

/** Sea level of the reference atmosphere of Recommendation ITU-R P.835. */
export const SEA_LEVEL_AIR: Air = { pressureHpa: 1013.25, temperatureK: 288.15, waterVapourGPerM3: 7.5 };

export interface SpecificGasAttenuation {
  readonly oxygenDbPerKm: number;
  readonly waterDbPerKm: number;
  readonly totalDbPerKm: number;
}

/** What the line formulas share at one place: theta = 300 / T, dry pressure and vapour pressure in hPa. */
interface LineAir {
  readonly theta: number;
  readonly dryHpa: number;
  readonly vapourHpa: number;
}

/**
 * Specific attenuation by gases in dB/km.
 * Source: ITU-R P.676-12 Annex 1 equations (1) to (9), with the lines of its Tables 1 and 2.
 * @param frequencyGhz 1 to 1000 GHz; below 1 GHz the formulas still hold but the value is negligible.
 */
export function specificGasAttenuation(frequencyGhz: number, air: Air = SEA_LEVEL_AIR): SpecificGasAttenuation {
  const place: LineAir = {
    theta: 300 / air.temperatureK,
    dryHpa: air.pressureHpa,
    vapourHpa: (air.waterVapourGPerM3 * air.temperatureK) / 216.7,
  };
  const oxygen = sumOfLines(frequencyGhz, OXYGEN_LINES, (line) => oxygenLine(line, place));
  const water = sumOfLines(frequencyGhz, WATER_VAPOUR_LINES, (line) => waterLine(line, place));
  const oxygenDbPerKm = 0.182 * frequencyGhz * (oxygen + dryContinuum(frequencyGhz, place));
  const waterDbPerKm = 0.182 * frequencyGhz * water;
  return { oxygenDbPerKm, waterDbPerKm, totalDbPerKm: oxygenDbPerKm + waterDbPerKm };
}

interface LineShape {
  readonly strength: number;
  readonly widthGhz: number;
  readonly interference: number;
}

function sumOfLines(
  frequencyGhz: number,
  lines: readonly SpectralLine[],
  shapeOf: (line: SpectralLine) => LineShape,
): number {
  let sum = 0;
  for (const line of lines) {
    const { strength, widthGhz, interference } = shapeOf(line);
    const below = line[0] - frequencyGhz;
    const above = line[0] + frequencyGhz;
    const widthSquared = widthGhz * widthGhz;
    sum +=
      strength *
      (frequencyGhz / line[0]) *
      ((widthGhz - interference * below) / (below * below + widthSquared) +
        (widthGhz - interference * above) / (above * above + widthSquared));
  }
  return sum;
}

/** Equations (3), (6a), (6b) and (7) for oxygen; the root term is the Zeeman splitting. */
function oxygenLine([, a1, a2, a3, a4, a5, a6]: SpectralLine, { theta, dryHpa, vapourHpa }: LineAir): LineShape {
  const width = a3 * 1e-4 * (dryHpa * theta ** (0.8 - a4) + 1.1 * vapourHpa * theta);
  return {
    strength: a1 * 1e-7 * dryHpa * theta ** 3 * Math.exp(a2 * (1 - theta)),
    widthGhz: Math.sqrt(width * width + 2.25e-6),
    interference: (a5 + a6 * theta) * 1e-4 * (dryHpa + vapourHpa) * theta ** 0.8,
  };
}

/** Equations (3), (6a) and (6b) for water vapour; the root term is the Doppler broadening. */
function waterLine([f0, b1, b2, b3, b4, b5, b6]: SpectralLine, { theta, dryHpa, vapourHpa }: LineAir): LineShape {
  const width = b3 * 1e-4 * (dryHpa * theta ** b4 + b5 * vapourHpa * theta ** b6);
  return {
    strength: b1 * 1e-1 * vapourHpa * theta ** 3.5 * Math.exp(b2 * (1 - theta)),
    widthGhz: 0.535 * width + Math.sqrt(0.217 * width * width + (2.1316e-12 * f0 * f0) / theta),
    interference: 0,
  };
}

/** Equations (8) and (9): the non-resonant spectrum of oxygen and pressure-induced nitrogen absorption. */
function dryContinuum(frequencyGhz: number, { theta, dryHpa, vapourHpa }: LineAir): number {
  const width = 5.6e-4 * (dryHpa + vapourHpa) * theta ** 0.8;
  const debye = 6.14e-5 / (width * (1 + (frequencyGhz / width) ** 2));
  const nitrogen = (1.4e-12 * dryHpa * theta ** 1.5) / (1 + 1.9e-5 * frequencyGhz ** 1.5);
  return frequencyGhz * dryHpa * theta * theta * (debye + nitrogen);
}
