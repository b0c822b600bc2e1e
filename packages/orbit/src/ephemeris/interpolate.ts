/** Interpolation between the states of a segment, by the method and degree that the message names. */
import type { OemSegment } from './oem.js';

/** What is used where a message names none: common practice for orbits, and what the standard's own examples use. */
export const DEFAULT_INTERPOLATION = { method: 'LAGRANGE', degree: 7 } as const;

/**
 * Puts position (km) and velocity (km/s) at an instant into `out[0..5]`, in the axes of the given states. Lagrange and
 * linear take each of the six columns on its own; Hermite passes through positions and velocities together and its
 * velocity is the derivative of its position. Windows are centred where they can be and never leave the segment.
 * A segment shorter than the degree asks for is used whole, at the degree that it can carry.
 */
export function interpolateState(
  segment: Pick<OemSegment, 'timesMs' | 'interpolation' | 'interpolationDegree'>,
  states: Float64Array,
  timeMs: number,
  out: Float64Array,
): void {
  const method = segment.interpolation ?? DEFAULT_INTERPOLATION.method;
  const degree = method === 'LINEAR' ? 1 : (segment.interpolationDegree ?? DEFAULT_INTERPOLATION.degree);
  const points = method === 'HERMITE' ? Math.max(2, Math.ceil((degree + 1) / 2)) : degree + 1;
  const count = Math.min(points, segment.timesMs.length);
  const first = windowStart(segment.timesMs, timeMs, count);
  if (method === 'HERMITE') hermite(segment.timesMs, states, first, count, timeMs, out);
  else lagrange(segment.timesMs, states, first, count, timeMs, out);
}

/** Index of the first of `count` samples, as many before the instant as after it where the segment allows. */
function windowStart(timesMs: Float64Array, timeMs: number, count: number): number {
  let low = 0;
  let high = timesMs.length - 1;
  while (high - low > 1) {
    const middle = (low + high) >> 1;
    if (timesMs[middle]! <= timeMs) low = middle;
    else high = middle;
  }
  const centred = count % 2 === 0 ? low - count / 2 + 1 : nearest(timesMs, low, timeMs) - (count - 1) / 2;
  return Math.max(0, Math.min(timesMs.length - count, centred));
}

function nearest(timesMs: Float64Array, low: number, timeMs: number): number {
  return timeMs - timesMs[low]! <= timesMs[low + 1]! - timeMs ? low : low + 1;
}

function lagrange(
  timesMs: Float64Array,
  states: Float64Array,
  first: number,
  count: number,
  timeMs: number,
  out: Float64Array,
): void {
  out.fill(0, 0, 6);
  for (let i = first; i < first + count; i += 1) {
    let weight = 1;
    for (let j = first; j < first + count; j += 1) {
      if (j !== i) weight *= (timeMs - timesMs[j]!) / (timesMs[i]! - timesMs[j]!);
    }
    for (let column = 0; column < 6; column += 1) out[column]! += weight * states[6 * i + column]!;
  }
}

/**
 * Hermite by its basis: with l_i the Lagrange polynomial and s_i its slope at node i, position is the sum of
 * (1 - 2 s_i u) l_i^2 r_i + u l_i^2 v_i with u the time from the node; the velocity is its derivative.
 */
function hermite(
  timesMs: Float64Array,
  states: Float64Array,
  first: number,
  count: number,
  timeMs: number,
  out: Float64Array,
): void {
  out.fill(0, 0, 6);
  for (let i = first; i < first + count; i += 1) {
    const sinceNodeS = (timeMs - timesMs[i]!) / 1000;
    let value = 1;
    let slope = 0;
    let nodeSlope = 0;
    for (let j = first; j < first + count; j += 1) {
      if (j === i) continue;
      const gapS = (timesMs[i]! - timesMs[j]!) / 1000;
      const factor = (timeMs - timesMs[j]!) / 1000 / gapS;
      slope = slope * factor + value / gapS;
      value *= factor;
      nodeSlope += 1 / gapS;
    }
    const square = value * value;
    const squareSlope = 2 * value * slope;
    const leaning = 1 - 2 * nodeSlope * sinceNodeS;
    for (let axis = 0; axis < 3; axis += 1) {
      const r = states[6 * i + axis]!;
      const v = states[6 * i + 3 + axis]!;
      out[axis]! += square * (leaning * r + sinceNodeS * v);
      out[3 + axis]! += squareSlope * (leaning * r + sinceNodeS * v) + square * (v - 2 * nodeSlope * r);
    }
  }
}
