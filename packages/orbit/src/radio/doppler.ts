/**
 * Doppler in the radio convention: received f = f0 (1 - rr / c), rr positive going away (as astropy documents it after
 * NRAO). At 7 km/s the exact relativistic value differs by under 0.1 m/s of range rate.
 */
import { SPEED_OF_LIGHT_M_PER_S } from './decibel.js';

const SPEED_OF_LIGHT_KM_PER_S = SPEED_OF_LIGHT_M_PER_S / 1000;

/** Received minus transmitted frequency in Hz: positive coming nearer. */
export function dopplerHz(frequencyHz: number, rangeRateKmPerS: number): number {
  return (-frequencyHz * rangeRateKmPerS) / SPEED_OF_LIGHT_KM_PER_S;
}

/** Range rate in km/s that a received frequency means. The inverse of `dopplerHz`. */
export function rangeRateFromFrequencyKmPerS(frequencyHz: number, receivedHz: number): number {
  return SPEED_OF_LIGHT_KM_PER_S * (1 - receivedHz / frequencyHz);
}

/** What the station must send so that the spacecraft hears `frequencyHz`. */
export function uplinkFrequencyHz(frequencyHz: number, rangeRateKmPerS: number): number {
  return frequencyHz / (1 - rangeRateKmPerS / SPEED_OF_LIGHT_KM_PER_S);
}

export interface DopplerSample {
  readonly timeMs: number;
  readonly dopplerHz: number;
  /** Change a second; always negative through the middle of a pass. */
  readonly dopplerRateHzPerS: number;
}

/**
 * Doppler and its rate at the instants of a track. The rate is the slope of the parabola through three neighbours (one
 * side at the ends), so it is as good as the track is dense: at 1 s steps within 0.02 % of the steepest rate of a low pass.
 */
export function dopplerCurve(
  track: readonly { timeMs: number; rangeRateKmPerS: number }[],
  frequencyHz: number,
): DopplerSample[] {
  return track.map((sample, index) => ({
    timeMs: sample.timeMs,
    dopplerHz: dopplerHz(frequencyHz, sample.rangeRateKmPerS),
    dopplerRateHzPerS: track.length < 2 ? 0 : dopplerHz(frequencyHz, accelerationAt(track, index)),
  }));
}

/** Range acceleration in km/s2 from the three samples around an index; from two where there are no more. */
function accelerationAt(track: readonly { timeMs: number; rangeRateKmPerS: number }[], index: number): number {
  if (track.length === 2) return slope(track[0]!, track[1]!);
  const middle = Math.min(track.length - 2, Math.max(1, index));
  const [before, centre, after] = [track[middle - 1]!, track[middle]!, track[middle + 1]!];
  const early = slope(before, centre);
  const late = slope(centre, after);
  const bend = (late - early) / (after.timeMs - before.timeMs);
  const at = track[index]!.timeMs;
  return early + bend * (2 * at - before.timeMs - centre.timeMs);
}

function slope(
  from: { timeMs: number; rangeRateKmPerS: number },
  to: { timeMs: number; rangeRateKmPerS: number },
): number {
  return ((to.rangeRateKmPerS - from.rangeRateKmPerS) * 1000) / (to.timeMs - from.timeMs);
}
