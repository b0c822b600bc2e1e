/** Decibels and the two constants of nature that every radio formula here leans on. */

/** Exact by definition of the metre (SI). */
export const SPEED_OF_LIGHT_M_PER_S = 299_792_458;
/** Exact by definition of the kelvin (SI 2019, CODATA 2018). */
export const BOLTZMANN_J_PER_K = 1.380649e-23;

/** A ratio of powers in dB; the ratio must be above zero. */
export function toDb(powerRatio: number): number {
  return 10 * Math.log10(powerRatio);
}

/** A ratio of powers out of dB. */
export function fromDb(db: number): number {
  return 10 ** (db / 10);
}

/** -10 log k: what C/N0 gains from Boltzmann's constant, 228.6 dB (W/K/Hz). */
export const MINUS_BOLTZMANN_DB = -toDb(BOLTZMANN_J_PER_K);

/** Wavelength in metres of a frequency in MHz. */
export function wavelengthM(frequencyMhz: number): number {
  return SPEED_OF_LIGHT_M_PER_S / (frequencyMhz * 1e6);
}
