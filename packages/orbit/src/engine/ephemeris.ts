/** One spacecraft's path over a period in Earth axes, sampled once and shared by every station. */
import { temeToEcef } from '../frames/look-angles.js';
import type { TrajectorySource } from '../types.js';
import { INTERVAL_NUMBERS, POINTS, SAMPLES_AROUND, writeIntervalPowers } from './interpolation.js';
import { evenPace, type Pace, paceOf } from './pace.js';
import { TurnTable } from './turn-table.js';

/** Ten years of the lowest orbit; beyond it a request is a mistake and memory would go. */
const MOST_SAMPLES = 2_000_000;
/** Second differences between samples stand for the curvature between them; this covers what they smooth over. */
const CURVATURE_MARGIN = 1.3;

export class Ephemeris {
  /** Place of the period's ends, counted in samples. */
  readonly startAt: number;
  readonly endAt: number;
  readonly slow: boolean;
  /** x y z in km of every sample, Earth axes. */
  readonly positions: Float64Array;
  private readonly velocities: Float64Array;
  readonly powers: Float64Array;
  /**
   * The source's own velocity, seen from the turning Earth, km/s, on slow orbits. SGP4's velocity is not quite the derivative
   * of its position: 0.02 m/s in low orbit, where the derivative therefore stands for it, but 1 m/s on a long ellipse.
   */
  readonly velocityPowers: Float64Array | undefined;
  private readonly known: Uint8Array;
  /** How many samples a path surely needs to come from one direction to another. */
  readonly turns: TurnTable;
  /** No component of the path leaves the chord between two samples by more. */
  readonly sagKm: number;
  readonly leastRadiusKm: number;
  readonly greatestRadiusKm: number;
  private readonly firstSample: number;

  private constructor(
    readonly fromMs: number,
    readonly toMs: number,
    private readonly pace: Pace,
    samples: Samples,
  ) {
    this.slow = pace.slow;
    this.firstSample = samples.first;
    this.positions = samples.positions;
    this.velocities = samples.velocities;
    const count = samples.positions.length / 3;
    this.powers = new Float64Array(INTERVAL_NUMBERS * (count - 1));
    this.velocityPowers = pace.slow ? new Float64Array(INTERVAL_NUMBERS * (count - 1)) : undefined;
    this.known = new Uint8Array(count);
    this.startAt = Math.max(0, pace.sampleAt(fromMs) - samples.first);
    this.endAt = Math.min(count - 1, pace.sampleAt(toMs) - samples.first);
    const { longestStepRad, sagKm, leastRadiusKm, greatestRadiusKm } = measure(samples.positions);
    this.turns = new TurnTable(longestStepRad, leastRadiusKm, greatestRadiusKm);
    this.sagKm = sagKm;
    this.leastRadiusKm = leastRadiusKm;
    this.greatestRadiusKm = greatestRadiusKm;
  }

  /**
   * Samples a period that the source answers for everywhere. Around the period three more samples are taken where the source
   * has them, so that interpolation is as good at the ends as in the middle.
   * @throws OrbitError of the source at the first instant inside the period that it cannot answer for.
   */
  static of(source: TrajectorySource, fromMs: number, toMs: number): Ephemeris {
    const pace = withEnoughSamples(paceOf(source, fromMs, toMs), fromMs, toMs);
    const last = Math.ceil(pace.sampleAt(toMs));
    if (last > MOST_SAMPLES)
      throw new RangeError(`A path of ${last} samples is asked for; ${MOST_SAMPLES} are permitted.`);
    const around = { first: -SAMPLES_AROUND, last: last + SAMPLES_AROUND };
    const inside = pace.timeMs(around.first) >= source.startMs && pace.timeMs(around.last) <= source.stopMs;
    const samples =
      (inside ? trySampling(source, pace, around) : undefined) ?? sampleWithin({ source, pace, fromMs, toMs });
    return new Ephemeris(fromMs, toMs, samples.pace, samples);
  }

  /** How long a sample lasts at a place: what turns a derivative by place into one by time. */
  secondsPerSample(at: number): number {
    return this.pace.msPerSample(at + this.firstSample) / 1000;
  }

  /** UTC milliseconds of a place counted in samples. */
  timeMs(at: number): number {
    return this.pace.timeMs(at + this.firstSample);
  }

  /** Makes sure that the polynomials of an interval are there, and returns where they begin. */
  interval(index: number): number {
    if (this.known[index] === 0) {
      writeIntervalPowers(this.positions, index, this.powers);
      if (this.velocityPowers) writeIntervalPowers(this.velocities, index, this.velocityPowers);
      this.known[index] = 1;
    }
    return INTERVAL_NUMBERS * index;
  }
}

interface Samples {
  readonly pace: Pace;
  readonly first: number;
  readonly positions: Float64Array;
  readonly velocities: Float64Array;
}

/** A short period is still sampled at eight places. */
function withEnoughSamples(pace: Pace, fromMs: number, toMs: number): Pace {
  const span = pace.sampleAt(toMs);
  const factor = span / (POINTS - 1);
  if (factor >= 1) return pace;
  if (!(factor > 0)) {
    const stepMs = Math.max(toMs - fromMs, 1_000) / (POINTS - 1);
    return evenPace(fromMs, stepMs, pace.slow);
  }
  return scaled(pace, factor);
}

function scaled(pace: Pace, factor: number): Pace {
  return {
    slow: pace.slow,
    timeMs: (at) => pace.timeMs(at * factor),
    msPerSample: (at) => pace.msPerSample(at * factor) * factor,
    sampleAt: (timeMs) => pace.sampleAt(timeMs) / factor,
  };
}

function trySampling(
  source: TrajectorySource,
  pace: Pace,
  range: { first: number; last: number },
): Samples | undefined {
  try {
    return sample(source, pace, range);
  } catch {
    // Whatever it was, sampling inside the period alone meets it again or does not need it.
    return undefined;
  }
}

/** Samples that lie exactly between the period's two ends, for a source that ends there. */
function sampleWithin(question: { source: TrajectorySource; pace: Pace; fromMs: number; toMs: number }): Samples {
  const { source, pace, fromMs, toMs } = question;
  const span = pace.sampleAt(toMs);
  const last = Math.max(POINTS - 1, Math.ceil(span));
  const factor = span / last;
  const even = scaled(pace, factor);
  const fitted: Pace = { ...even, timeMs: (at) => Math.min(toMs, Math.max(fromMs, even.timeMs(at))) };
  return sample(source, fitted, { first: 0, last });
}

function sample(source: TrajectorySource, pace: Pace, { first, last }: { first: number; last: number }): Samples {
  const count = last - first + 1;
  const positions = new Float64Array(3 * count);
  const velocities = new Float64Array(3 * count);
  const state = new Float64Array(6);
  for (let index = 0; index < count; index += 1) {
    const timeMs = pace.timeMs(first + index);
    source.stateTeme(timeMs, state);
    temeToEcef(timeMs, state);
    for (let axis = 0; axis < 3; axis += 1) {
      positions[3 * index + axis] = state[axis]!;
      velocities[3 * index + axis] = state[axis + 3]!;
    }
  }
  return { pace, first, positions, velocities };
}

function measure(positions: Float64Array) {
  let bend2 = 0;
  let least2 = Number.POSITIVE_INFINITY;
  let greatest2 = 0;
  let leastCosine = 1;
  let radiusBefore = 0;
  for (let at = 0; at < positions.length; at += 3) {
    const [x, y, z] = [positions[at]!, positions[at + 1]!, positions[at + 2]!];
    const radius2 = x * x + y * y + z * z;
    const radius = Math.sqrt(radius2);
    least2 = Math.min(least2, radius2);
    greatest2 = Math.max(greatest2, radius2);
    if (at >= 3) {
      const dot = x * positions[at - 3]! + y * positions[at - 2]! + z * positions[at - 1]!;
      leastCosine = Math.min(leastCosine, dot / (radius * radiusBefore));
    }
    radiusBefore = radius;
    if (at < 6) continue;
    const bx = x - 2 * positions[at - 3]! + positions[at - 6]!;
    const by = y - 2 * positions[at - 2]! + positions[at - 5]!;
    const bz = z - 2 * positions[at - 1]! + positions[at - 4]!;
    bend2 = Math.max(bend2, bx * bx + by * by + bz * bz);
  }
  const sagKm = (CURVATURE_MARGIN * Math.sqrt(bend2)) / 8;
  return {
    longestStepRad: Math.acos(Math.max(-1, leastCosine)),
    sagKm,
    leastRadiusKm: Math.sqrt(least2) - sagKm,
    greatestRadiusKm: Math.sqrt(greatest2) + sagKm,
  };
}
