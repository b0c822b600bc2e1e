/** One spacecraft's path over a period in Earth axes, sampled once and shared by every station. */
import { temeToEcef } from '../frames/look-angles.js';
import type { TrajectorySource } from '../types.js';
import { INTERVAL_NUMBERS, POINTS, SAMPLES_AROUND, writeIntervalPowers } from './interpolation.js';
import { EvenPace, type Pace, paceOf } from './pace.js';
import { SampleRoom } from './sample-room.js';
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
    this.powers = samples.room.powers(count);
    this.velocityPowers = pace.slow ? new Float64Array(INTERVAL_NUMBERS * (count - 1)) : undefined;
    this.known = samples.room.known(count);
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
   * `room` lends the memory; an ephemeris that took its own may be kept.
   * @throws OrbitError of the source at the first instant inside the period that it cannot answer for.
   */
  static of(source: TrajectorySource, fromMs: number, toMs: number, room = new SampleRoom()): Ephemeris {
    const pace = withEnoughSamples(paceOf(source, fromMs, toMs), fromMs, toMs);
    const last = Math.ceil(pace.sampleAt(toMs));
    if (last > MOST_SAMPLES)
      throw new RangeError(`A path of ${last} samples is asked for; ${MOST_SAMPLES} are permitted.`);
    const around = { first: -SAMPLES_AROUND, last: last + SAMPLES_AROUND };
    const inside = pace.timeMs(around.first) >= source.startMs && pace.timeMs(around.last) <= source.stopMs;
    const samples =
      (inside ? trySampling(source, pace, { ...around, room }) : undefined) ??
      sampleWithin({ source, pace, fromMs, toMs, room });
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

interface SampleRange {
  readonly first: number;
  readonly last: number;
  readonly room: SampleRoom;
}

interface Samples {
  readonly room: SampleRoom;
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
    return new EvenPace(fromMs, stepMs, pace.slow);
  }
  return new ScaledPace(pace, factor);
}

/** Another pace with its samples nearer together or wider apart. */
class ScaledPace implements Pace {
  readonly slow: boolean;

  constructor(
    private readonly pace: Pace,
    private readonly factor: number,
    private readonly fromMs = Number.NEGATIVE_INFINITY,
    private readonly toMs = Number.POSITIVE_INFINITY,
  ) {
    this.slow = pace.slow;
  }

  /** Never outside the bounds, where the source may have no answer a rounding away. */
  timeMs(sample: number): number {
    return Math.min(this.toMs, Math.max(this.fromMs, this.pace.timeMs(sample * this.factor)));
  }

  msPerSample(sample: number): number {
    return this.pace.msPerSample(sample * this.factor) * this.factor;
  }

  sampleAt(timeMs: number): number {
    return this.pace.sampleAt(timeMs) / this.factor;
  }
}

function trySampling(source: TrajectorySource, pace: Pace, range: SampleRange): Samples | undefined {
  try {
    return sample(source, pace, range);
  } catch {
    // Whatever it was, sampling inside the period alone meets it again or does not need it.
    return undefined;
  }
}

interface WithinQuestion {
  readonly source: TrajectorySource;
  readonly pace: Pace;
  readonly fromMs: number;
  readonly toMs: number;
  readonly room: SampleRoom;
}

/** Samples that lie exactly between the period's two ends, for a source that ends there. */
function sampleWithin(question: WithinQuestion): Samples {
  const { source, pace, fromMs, toMs, room } = question;
  const span = pace.sampleAt(toMs);
  const last = Math.max(POINTS - 1, Math.ceil(span));
  const factor = span / last;
  const fitted = new ScaledPace(pace, factor, fromMs, toMs);
  return sample(source, fitted, { first: 0, last, room });
}

function sample(source: TrajectorySource, pace: Pace, { first, last, room }: SampleRange): Samples {
  const count = last - first + 1;
  const positions = room.positions(count);
  const velocities = room.velocities(count);
  const to = { state: new Float64Array(6), positions, velocities };
  for (let index = 0; index < count; index += 1) writeSample(source, pace.timeMs(first + index), index, to);
  return { pace, room, first, positions, velocities };
}

interface SampleTarget {
  readonly state: Float64Array;
  readonly positions: Float64Array;
  readonly velocities: Float64Array;
}

/** On its own, because a loop as long as this is compiled while it runs, and thrown away at its end, for each path anew. */
function writeSample(source: TrajectorySource, timeMs: number, index: number, to: SampleTarget): void {
  const { state, positions, velocities } = to;
  source.stateTeme(timeMs, state);
  temeToEcef(timeMs, state);
  const at = 3 * index;
  positions[at] = state[0]!;
  positions[at + 1] = state[1]!;
  positions[at + 2] = state[2]!;
  velocities[at] = state[3]!;
  velocities[at + 1] = state[4]!;
  velocities[at + 2] = state[5]!;
}

function measure(positions: Float64Array) {
  let bend2 = 0;
  let least2 = Number.POSITIVE_INFINITY;
  let greatest2 = 0;
  let leastCosine = 1;
  let radiusBefore = 0;
  for (let at = 0; at < positions.length; at += 3) {
    const x = positions[at]!;
    const y = positions[at + 1]!;
    const z = positions[at + 2]!;
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
