/**
 * How finely a path has to be sampled, as a smooth map from a running number to time. Steps are equal in eccentric anomaly:
 * short at perigee, long at apogee. In that variable an ellipse is one sine and one cosine, so that a polynomial through
 * eight samples follows it; in time it would need several times as many.
 */
import { EARTH_TURN_RAD_PER_S } from '../frames/sidereal.js';
import type { TrajectorySource } from '../types.js';

/** Earth's GM in km3/s2 (WGS72, as SGP4 has it). Only the spacing of samples depends on it. */
const EARTH_GM_KM3_PER_S2 = 398_600.8;
const TURN = 2 * Math.PI;

/** Below this the orbit is as good as a circle, and the place of its perigee means nothing. */
const ROUND_ECCENTRICITY = 0.03;
/** Beyond this the map would be all perigee; such a path gets equal short steps in time. */
const MOST_ECCENTRICITY = 0.985;
const FALLBACK_STEP_S = 30;

/**
 * Step in radians of the fastest turning in the path as the Earth sees it. The remainder of eight-point interpolation is
 * about 0.001 (step)^8 of the orbit's size: 0.2 rad leaves 2 cm in low orbit, which is a few microseconds of AOS, and still
 * under a millisecond where a pass rises a thousandth of a degree over the mask; 0.18 rad leaves 5 cm in the slow high ones.
 */
const STEP_LOW_RAD = 0.2;
const STEP_HIGH_RAD = 0.18;
/** Rad/s; a period of 225 minutes, where SGP4 itself divides near from deep space. */
const SLOW_MOTION = TURN / (225 * 60);

export interface Pace {
  /** A period above 225 minutes. */
  readonly slow: boolean;
  timeMs(sample: number): number;
  /** Derivative of `timeMs`. */
  msPerSample(sample: number): number;
  /** The inverse, by Newton; samples count from 0 at the start of the period. */
  sampleAt(timeMs: number): number;
}

interface Osculating {
  readonly eccentricity: number;
  readonly meanAnomaly: number;
  readonly motionRadPerS: number;
}

/** @throws OrbitError where the source cannot answer at the period's ends. */
export function paceOf(source: TrajectorySource, fromMs: number, toMs: number): Pace {
  const start = osculating(source, fromMs);
  const limited = stepLimit(source, start);
  if (!(start.eccentricity < MOST_ECCENTRICITY) || !(start.motionRadPerS > 0)) {
    return new EvenPace(
      fromMs,
      Math.min(FALLBACK_STEP_S * 1000, source.longestStepMs ?? Number.POSITIVE_INFINITY),
      false,
    );
  }
  if (start.eccentricity < ROUND_ECCENTRICITY) {
    return new EvenPace(fromMs, (limited / start.motionRadPerS) * 1000, start.motionRadPerS < SLOW_MOTION);
  }
  return new EllipticPace({ source, fromMs, toMs, start, stepRad: limited });
}

function stepLimit(source: TrajectorySource, { eccentricity, motionRadPerS }: Osculating): number {
  const turning = 1 + (EARTH_TURN_RAD_PER_S / motionRadPerS) * (1 + eccentricity);
  const step = (motionRadPerS < SLOW_MOTION ? STEP_HIGH_RAD : STEP_LOW_RAD) / turning;
  const longestS = (source.longestStepMs ?? Number.POSITIVE_INFINITY) / 1000;
  return Math.min(step, (longestS * motionRadPerS) / (1 + eccentricity));
}

/** Equal steps in time. */
export class EvenPace implements Pace {
  constructor(
    private readonly fromMs: number,
    private readonly stepMs: number,
    readonly slow: boolean,
  ) {}

  timeMs(sample: number): number {
    return this.fromMs + sample * this.stepMs;
  }

  msPerSample(_sample: number): number {
    return this.stepMs;
  }

  sampleAt(timeMs: number): number {
    return (timeMs - this.fromMs) / this.stepMs;
  }
}

interface EllipticQuestion {
  readonly source: TrajectorySource;
  readonly fromMs: number;
  readonly toMs: number;
  readonly start: Osculating;
  readonly stepRad: number;
}

/**
 * Mean anomaly as a quadratic of time, fitted to the rate over one revolution at each end of the period, so that drag and
 * resonance do not let the dense samples drift away from the true perigee.
 */
class EllipticPace implements Pace {
  readonly slow: boolean;
  private readonly fromMs: number;
  private readonly stepRad: number;
  private readonly eccentricity: number;
  private readonly startAnomaly: number;
  private readonly startE: number;
  /** Rad/s at the start, and its growth in rad/s2. */
  private readonly rate: number;
  private readonly change: number;

  constructor({ source, fromMs, toMs, start, stepRad }: EllipticQuestion) {
    const periodS = TURN / start.motionRadPerS;
    const spanS = (toMs - fromMs) / 1000;
    const long = spanS > 2 * periodS;
    this.slow = start.motionRadPerS < SLOW_MOTION;
    this.fromMs = fromMs;
    this.stepRad = stepRad;
    this.eccentricity = start.eccentricity;
    this.startAnomaly = start.meanAnomaly;
    this.startE = eccentricAnomaly(start.meanAnomaly, start.eccentricity);
    this.rate = long ? rateOver(source, fromMs, periodS) : start.motionRadPerS;
    const endRate = long ? rateOver(source, toMs - periodS * 1000, periodS) : this.rate;
    this.change = (endRate - this.rate) / Math.max(spanS - periodS, periodS);
  }

  timeMs(sample: number): number {
    return this.fromMs + this.secondsTo(sample) * 1000;
  }

  msPerSample(sample: number): number {
    const stretched = 1 - this.eccentricity * Math.cos(this.startE + sample * this.stepRad);
    return (1000 * this.stepRad * stretched) / (this.rate + this.change * this.secondsTo(sample));
  }

  sampleAt(timeMs: number): number {
    const seconds = (timeMs - this.fromMs) / 1000;
    const grown = (this.rate + 0.5 * this.change * seconds) * seconds;
    return (eccentricAnomaly(this.startAnomaly + grown, this.eccentricity) - this.startE) / this.stepRad;
  }

  private secondsTo(sample: number): number {
    const anomaly = this.startE + sample * this.stepRad;
    const grown = anomaly - this.eccentricity * Math.sin(anomaly) - this.startAnomaly;
    return (2 * grown) / (this.rate + Math.sqrt(this.rate * this.rate + 2 * this.change * grown));
  }
}

function rateOver(source: TrajectorySource, timeMs: number, periodS: number): number {
  const before = osculating(source, timeMs).meanAnomaly;
  const after = osculating(source, timeMs + periodS * 1000).meanAnomaly;
  const turned = (after - before) / TURN;
  return (TURN * (1 + turned - Math.round(turned))) / periodS;
}

/** Kepler's equation by Newton, whole turns kept. */
function eccentricAnomaly(meanAnomaly: number, e: number): number {
  let anomaly = meanAnomaly + e * Math.sin(meanAnomaly);
  for (let round = 0; round < 30; round += 1) {
    const step = (anomaly - e * Math.sin(anomaly) - meanAnomaly) / (1 - e * Math.cos(anomaly));
    anomaly -= Math.abs(step) > 1 ? Math.sign(step) : step;
    if (Math.abs(step) < 1e-13) break;
  }
  return anomaly;
}

/** Two-body elements of a state: energy for the size, the eccentricity vector's two components for the rest. */
function osculating(source: TrajectorySource, timeMs: number): Osculating {
  const s = new Float64Array(6);
  source.stateTeme(timeMs, s);
  const radius = Math.hypot(s[0]!, s[1]!, s[2]!);
  const speed2 = s[3]! ** 2 + s[4]! ** 2 + s[5]! ** 2;
  const outward = s[0]! * s[3]! + s[1]! * s[4]! + s[2]! * s[5]!;
  const axis = 1 / (2 / radius - speed2 / EARTH_GM_KM3_PER_S2);
  const eCosE = 1 - radius / axis;
  const eSinE = outward / Math.sqrt(EARTH_GM_KM3_PER_S2 * axis);
  const anomaly = Math.atan2(eSinE, eCosE);
  return {
    eccentricity: axis > 0 ? Math.hypot(eCosE, eSinE) : Number.POSITIVE_INFINITY,
    meanAnomaly: anomaly - eSinE,
    motionRadPerS: Math.sqrt(EARTH_GM_KM3_PER_S2 / axis ** 3),
  };
}
