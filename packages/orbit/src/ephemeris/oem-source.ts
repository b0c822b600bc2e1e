/** A spacecraft's path from its operator's own ephemeris, inside the spans that the message says can be used. */
import { temeToEcef } from '../frames/look-angles.js';
import { EARTH_TURN_RAD_PER_S, gmstRad } from '../frames/sidereal.js';
import { OrbitError } from '../orbit-error.js';
import type { SourceSpan, TrajectorySource } from '../types.js';
import { aboutZ, gcrfToTeme, rotateInPlace, transpose } from './earth-orientation.js';
import { interpolateState } from './interpolate.js';
import type { Oem, OemSegment } from './oem.js';

export interface OemSource extends TrajectorySource {
  /** Unbroken stretches in rising order; between them the source throws. */
  readonly spans: readonly SourceSpan[];
}

/**
 * A source over every segment of a message. Each segment answers between its usable times (its first and last state
 * where it names none) by its own method and degree, in its own frame, turned into TEME afterwards. Where two segments
 * overlap the later one in the message answers, as CCSDS 502.0-B has it for a manoeuvre; where one ends at the instant at
 * which the next begins, there is no gap.
 * @throws OrbitError `outside ephemeris` for an instant in no span.
 */
export function oemSource(oem: Oem): OemSource {
  const parts = oem.segments.map(segmentPart).filter((part) => part.stopMs > part.startMs);
  const spans = joinSpans(parts);
  const [first, last] = [spans[0], spans.at(-1)];
  if (first === undefined || last === undefined) {
    throw new OrbitError('no ephemeris', 'The ephemeris has no segment with a usable span.');
  }
  return {
    startMs: first.startMs,
    stopMs: last.stopMs,
    spans,
    longestStepMs: Math.min(...oem.segments.map(meanStepMs)),
    stateTeme(timeMs, out) {
      const part = parts.findLast(({ startMs, stopMs }) => timeMs >= startMs && timeMs <= stopMs);
      if (part === undefined) throw outside(timeMs, spans);
      part.stateTeme(timeMs, out);
    },
  };
}

function outside(timeMs: number, spans: readonly SourceSpan[]): OrbitError {
  const instant = Math.abs(timeMs) < 8.64e15 ? new Date(timeMs).toISOString() : String(timeMs);
  const told = spans.map(
    ({ startMs, stopMs }) => `${new Date(startMs).toISOString()} to ${new Date(stopMs).toISOString()}`,
  );
  return new OrbitError(
    'outside ephemeris',
    `${instant} is outside the ephemeris, which covers ${told.join(' and ')}.`,
    {
      timeMs,
      spans,
    },
  );
}

/** A burn may be hidden between any two states, so a search must not stride over more of them than this. */
function meanStepMs({ timesMs }: OemSegment): number {
  return (timesMs.at(-1)! - timesMs[0]!) / (timesMs.length - 1);
}

function segmentPart(segment: OemSegment): TrajectorySource {
  const { timesMs } = segment;
  const startMs = Math.max(segment.useableStartMs ?? segment.startMs, timesMs[0]!);
  const stopMs = Math.min(segment.useableStopMs ?? segment.stopMs, timesMs.at(-1)!);
  if (segment.frame === 'ITRF') {
    return {
      startMs,
      stopMs,
      stateTeme(timeMs, out) {
        interpolateState(segment, segment.states, timeMs, out);
        earthFixedToTeme(timeMs, out);
      },
    };
  }
  // The celestial frames turn against TEME by less than a second of arc a day, so turning the states once and
  // interpolating in TEME is the same to well under a millimetre, and many times cheaper.
  const states = segment.frame === 'TEME' ? segment.states : statesInTeme(segment);
  return { startMs, stopMs, stateTeme: (timeMs, out) => interpolateState(segment, states, timeMs, out) };
}

/**
 * ICRF, GCRF and EME2000 are taken as the same axes. EME2000 stands 0.023 arc seconds beside the other two: 0.8 m in low
 * orbit, 5 m in a geostationary one.
 */
function statesInTeme(segment: OemSegment): Float64Array {
  const states = segment.states.slice();
  segment.timesMs.forEach((timeMs, row) => {
    const rotation = gcrfToTeme(timeMs);
    rotateInPlace(rotation, states, 6 * row);
    rotateInPlace(rotation, states, 6 * row + 3);
  });
  return states;
}

/** Position and velocity in Earth axes to TEME, in place; the velocity gains what the Earth's turning carries along. */
function earthFixedToTeme(timeMs: number, state: Float64Array): void {
  state[3]! -= EARTH_TURN_RAD_PER_S * state[1]!;
  state[4]! += EARTH_TURN_RAD_PER_S * state[0]!;
  const rotation = aboutZ(-gmstRad(timeMs));
  rotateInPlace(rotation, state, 0);
  rotateInPlace(rotation, state, 3);
}

function joinSpans(parts: readonly SourceSpan[]): SourceSpan[] {
  const joined: SourceSpan[] = [];
  for (const { startMs, stopMs } of [...parts].sort((a, b) => a.startMs - b.startMs)) {
    const last = joined.at(-1);
    if (last !== undefined && startMs <= last.stopMs) {
      joined[joined.length - 1] = { startMs: last.startMs, stopMs: Math.max(last.stopMs, stopMs) };
    } else {
      joined.push({ startMs, stopMs });
    }
  }
  return joined;
}

/** TEME at an instant to one of the frames that a message can be written in, in place. */
export function temeStateToFrame(frame: OemSegment['frame'], timeMs: number, state: Float64Array): void {
  if (frame === 'TEME') return;
  if (frame === 'ITRF') {
    temeToEcef(timeMs, state);
    return;
  }
  const rotation = transpose(gcrfToTeme(timeMs));
  rotateInPlace(rotation, state, 0);
  rotateInPlace(rotation, state, 3);
}
