/**
 * Look angles with the time that light takes. Without it a direction is the geometric one at the instant, which is this
 * package's convention for AOS, LOS and tables. Doppler changes little by it: over a spacecraft at 500 km, v^2 / r times
 * 1.7 ms is 0.19 m/s, a quarter of a hertz at 437 MHz and 5 Hz at 8.2 GHz.
 */
import { type SiteFrame, siteFrame } from '../frames/ellipsoid.js';
import { lookAngles } from '../frames/look-angles.js';
import type { GeodeticSite, LookAngles, TrajectorySource } from '../types.js';
import { SPEED_OF_LIGHT_M_PER_S } from './decibel.js';

/** Two rounds leave under a nanosecond of light time, even at 8 km/s. */
const ROUNDS = 2;

/**
 * `receive`: where the signal heard at `timeMs` was sent from. `transmit`: where the spacecraft will be when what is sent
 * at `timeMs` arrives. The station stays where it is at `timeMs`. Throws what the source throws.
 */
export function lookAnglesWithLightTime(
  source: TrajectorySource,
  site: GeodeticSite | SiteFrame,
  timeMs: number,
  leg: 'receive' | 'transmit',
): LookAngles {
  const frame = 'positionKm' in site ? site : siteFrame(site);
  const sign = leg === 'receive' ? -1 : 1;
  let answer = lookAngles(source, frame, timeMs);
  for (let round = 0; round < ROUNDS; round += 1) {
    const lightMs = (answer.rangeKm * 1e6) / SPEED_OF_LIGHT_M_PER_S;
    const shifted: TrajectorySource = {
      startMs: source.startMs,
      stopMs: source.stopMs,
      stateTeme: (atMs, out) => source.stateTeme(atMs + sign * lightMs, out),
    };
    answer = lookAngles(shifted, frame, timeMs);
  }
  return answer;
}
