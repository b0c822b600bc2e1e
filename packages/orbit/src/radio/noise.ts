/** Noise that the sky puts into a receiving antenna, and G/T as the elevation changes. */
import { fromDb, toDb } from './decibel.js';

/** Background of the sky at microwaves, K (ITU-R P.618-13 section 3). */
const COSMIC_BACKGROUND_K = 2.7;

/**
 * Mean radiating temperature of the absorbing medium, K: 275 for clouds and rain (ITU-R P.618-13 section 3; the figure
 * from memory).
 */
export const MEDIUM_TEMPERATURE_K = 275;

/**
 * Noise temperature of the sky seen through an absorbing atmosphere, K.
 * Source: ITU-R P.618-13 section 3, T = Tmr (1 - 10^(-A/10)) + 2.7 * 10^(-A/10).
 */
export function skyNoiseK(attenuationDb: number, mediumK: number = MEDIUM_TEMPERATURE_K): number {
  const passed = fromDb(-attenuationDb);
  return mediumK * (1 - passed) + COSMIC_BACKGROUND_K * passed;
}

/**
 * G/T in dB/K at another sky than the one it was stated for: the gain stays, the noise grows or shrinks by the sky's.
 * The stated figure is taken as one of clear sky at `statedAttenuationDb` (the gases at the elevation it was measured at).
 * @param systemNoiseK the whole noise temperature behind the stated figure.
 */
export function gOverTUnderSky(figure: {
  gOverTDbPerK: number;
  systemNoiseK: number;
  statedAttenuationDb: number;
  attenuationDb: number;
}): number {
  const changeK = skyNoiseK(figure.attenuationDb) - skyNoiseK(figure.statedAttenuationDb);
  return figure.gOverTDbPerK - toDb(1 + changeK / figure.systemNoiseK);
}

/** Noise temperature in K of a receiver of a noise figure in dB, against 290 K (IEEE definition). */
export function noiseFigureToK(noiseFigureDb: number): number {
  return 290 * (fromDb(noiseFigureDb) - 1);
}
