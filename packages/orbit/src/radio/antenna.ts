/** What a dish does to a link: gain, beam width, pointing and polarisation losses, side lobes. */
import { toDb, wavelengthM } from './decibel.js';

export interface Dish {
  readonly diameterM: number;
  readonly frequencyMhz: number;
}

/** Boresight gain in dBi, 20 log(pi D / lambda) + 10 log(efficiency). Common antenna theory. */
export function dishGainDbi(dish: Dish & { efficiency: number }): number {
  return 20 * Math.log10((Math.PI * dish.diameterM) / wavelengthM(dish.frequencyMhz)) + toDb(dish.efficiency);
}

/** Full width at half power in degrees, 70 lambda / D: common practice, no source; the factor lies between 58 and 73. */
export function halfPowerBeamwidthDeg(dish: Dish): number {
  return (70 * wavelengthM(dish.frequencyMhz)) / dish.diameterM;
}

/**
 * Loss in dB of a beam that points `errorDeg` beside the spacecraft: 12 (error / width)^2, a Gaussian main lobe.
 * Common practice; fair to about half the beam width, where it reads 3 dB by construction.
 */
export function pointingLossDb(beam: { errorDeg: number; halfPowerBeamwidthDeg: number }): number {
  return 12 * (beam.errorDeg / beam.halfPowerBeamwidthDeg) ** 2;
}

/**
 * Side-lobe envelope in dBi of Recommendation ITU-R S.465-6 for D/lambda of 50 and more, and below; undefined inside
 * the main lobe, where the Recommendation gives none.
 */
export function sidelobeS465Dbi(dish: Dish, offAxisDeg: number): number | undefined {
  const ratio = dish.diameterM / wavelengthM(dish.frequencyMhz);
  const fromDeg = ratio >= 50 ? Math.max(1, 100 / ratio) : Math.max(2, 114 * ratio ** -1.09);
  if (offAxisDeg < fromDeg) return undefined;
  return offAxisDeg < 48 ? 32 - 25 * Math.log10(offAxisDeg) : -10;
}

/**
 * Side-lobe design objective in dBi of Recommendation ITU-R S.580-6, for dishes of D/lambda of 50 and more: its curve
 * to 20 degrees, then -3.5 dBi until S.465 lies lower, then S.465 (the part past 20 degrees: from memory).
 */
export function sidelobeS580Dbi(dish: Dish, offAxisDeg: number): number | undefined {
  const fromDeg = Math.max(1, (100 * wavelengthM(dish.frequencyMhz)) / dish.diameterM);
  if (offAxisDeg < fromDeg) return undefined;
  if (offAxisDeg <= 20) return 29 - 25 * Math.log10(offAxisDeg);
  return offAxisDeg <= 26.3 ? -3.5 : sidelobeS465Dbi(dish, offAxisDeg);
}

/** Sense of a wave as the two sides of a link name it. */
export type Polarisation = 'right' | 'left' | 'horizontal' | 'vertical';

export function isCircular(polarisation: Polarisation): boolean {
  return polarisation === 'right' || polarisation === 'left';
}

/**
 * Loss in dB between two pure polarisations: none if equal, 3.01 dB between linear and circular (half the power),
 * infinite between opposite ones, where real antennas leak some 20 to 30 dB down and nobody should count on it.
 * Linear against linear assumes that the spacecraft keeps its attitude; a tumbling one fades.
 */
export function polarisationLossDb(wave: Polarisation, antenna: Polarisation): number {
  if (wave === antenna) return 0;
  return isCircular(wave) === isCircular(antenna) ? Number.POSITIVE_INFINITY : toDb(2);
}

/** The antenna's best polarisation for a wave, with its loss; undefined if every one is opposite or none is offered. */
export function bestPolarisation(
  wave: Polarisation,
  offered: readonly Polarisation[],
): { polarisation: Polarisation; lossDb: number } | undefined {
  let best: { polarisation: Polarisation; lossDb: number } | undefined;
  for (const polarisation of offered) {
    const lossDb = polarisationLossDb(wave, polarisation);
    if (Number.isFinite(lossDb) && (best === undefined || lossDb < best.lossDb)) best = { polarisation, lossDb };
  }
  return best;
}

/** Tilt against the horizontal that rain formulas want: circular counts as 45 degrees (ITU-R P.838-3). */
export function polarisationTiltDeg(polarisation: Polarisation): number {
  if (isCircular(polarisation)) return 45;
  return polarisation === 'horizontal' ? 0 : 90;
}
