/** Makes an ephemeris message out of any trajectory, to be handed to another program. */
import { formatCcsdsTime } from '../ephemeris/ccsds-time.js';
import type { Oem, OemFrame } from '../ephemeris/oem.js';
import { temeStateToFrame } from '../ephemeris/oem-source.js';
import { OrbitError } from '../orbit-error.js';
import type { TrajectorySource } from '../types.js';

export interface OemRequest {
  readonly objectName: string;
  readonly objectId: string;
  readonly originator: string;
  readonly creationMs: number;
  readonly fromMs: number;
  readonly toMs: number;
  readonly stepS: number;
  readonly frame: OemFrame;
  readonly comments?: readonly string[];
}

/** A degree that carries a low orbit at 60 s steps to under a metre. */
const DEGREE = 7;
const MOST_STATES = 200_000;

/**
 * States every `stepS` from `fromMs`, the last exactly at `toMs`; the reader is told to use Lagrange of degree 7.
 * Velocities are the trajectory's own. Throws what the trajectory throws outside its span.
 */
export function sampleOem(source: TrajectorySource, request: OemRequest): Oem {
  const { fromMs, toMs, stepS, frame } = request;
  if (!(toMs > fromMs) || !(stepS > 0) || (toMs - fromMs) / (1000 * stepS) > MOST_STATES) {
    throw new OrbitError(
      'bad interval',
      `An ephemeris needs a period and a step above zero, and at most ${MOST_STATES} states.`,
      {
        fromMs,
        toMs,
        stepS,
      },
    );
  }
  // The small allowance keeps a rounding error from making a last step of nothing.
  const steps = Math.ceil((toMs - fromMs) / (1000 * stepS) - 1e-9);
  const timesMs = Float64Array.from({ length: steps + 1 }, (_, row) => Math.min(toMs, fromMs + row * stepS * 1000));
  const states = new Float64Array(6 * timesMs.length);
  const state = new Float64Array(6);
  timesMs.forEach((timeMs, row) => {
    source.stateTeme(timeMs, state);
    temeStateToFrame(frame, timeMs, state);
    states.set(state, 6 * row);
  });
  return {
    version: '2.0',
    creationDate: formatCcsdsTime(request.creationMs),
    originator: request.originator,
    messageId: undefined,
    classification: undefined,
    comments: request.comments ?? [],
    segments: [
      {
        objectName: request.objectName,
        objectId: request.objectId,
        centerName: 'EARTH',
        frame,
        frameName: frame,
        startMs: fromMs,
        stopMs: toMs,
        useableStartMs: undefined,
        useableStopMs: undefined,
        interpolation: 'LAGRANGE',
        interpolationDegree: DEGREE,
        comments: [],
        timesMs,
        states,
        accelerations: undefined,
        covariances: [],
      },
    ],
  };
}
