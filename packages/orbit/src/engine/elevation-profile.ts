import { siteFrame } from '../frames/ellipsoid.js';
import { lookAt, temeToEcef } from '../frames/look-angles.js';
import { OrbitError } from '../orbit-error.js';
import type { GeodeticSite, TrajectorySource } from '../types.js';

/** A day at one sample a second. */
const MOST_SAMPLES = 86_401;

export interface ProfileQuestion {
  readonly source: TrajectorySource;
  readonly site: GeodeticSite;
  readonly fromMs: number;
  readonly toMs: number;
  /** Distance of the samples; the last one stands at `toMs` itself. */
  readonly stepS: number;
}

/**
 * What a drawing of a pass needs: azimuth and elevation in degrees, in turn, at equal steps from `fromMs` on and once at
 * `toMs`. Straight from the source, without interpolation.
 * @throws OrbitError `bad interval` for a period or step that makes no samples or too many, and what the source throws.
 */
export function elevationProfile({ source, site, fromMs, toMs, stepS }: ProfileQuestion): Float32Array {
  const steps = Math.ceil((toMs - fromMs) / (stepS * 1000) - 1e-9);
  if (!(stepS > 0) || !(steps >= 1 && steps < MOST_SAMPLES)) {
    throw new OrbitError('bad interval', `A profile needs 1 to ${MOST_SAMPLES - 1} steps; this one has ${steps}.`, {
      steps,
    });
  }
  const frame = siteFrame(site);
  const state = new Float64Array(6);
  const profile = new Float32Array(2 * (steps + 1));
  for (let step = 0; step <= steps; step += 1) {
    const timeMs = step === steps ? toMs : fromMs + step * stepS * 1000;
    source.stateTeme(timeMs, state);
    temeToEcef(timeMs, state);
    const { azimuthDeg, elevationDeg } = lookAt(frame, timeMs, state);
    profile[2 * step] = azimuthDeg;
    profile[2 * step + 1] = elevationDeg;
  }
  return profile;
}
