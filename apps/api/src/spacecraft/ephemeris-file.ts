/** Reads an orbit ephemeris message into what is kept of it. Pure, so that a worker thread can do it. */

import type { StoredSegment } from '@skyberth/drizzle';
import { type OemFault, type OemSegment, oemSource, parseOem } from '@skyberth/orbit';
import { EPHEMERIS_LIMITS } from '@skyberth/shared';

/** Numbers that one state takes: its instant, place and velocity. */
export const NUMBERS_A_STATE = 7;
/** Nothing flies lower, and nothing farther is served from the ground here: farther out, somebody wrote metres. */
const RADIUS_KM = { least: 6_400, most: 1_000_000 } as const;

export interface EphemerisContent {
  readonly objectName: string;
  readonly objectId: string;
  readonly originator: string;
  /** First and last instant that it answers for, with gaps between where it has several spans. */
  readonly startMs: number;
  readonly stopMs: number;
  readonly segments: StoredSegment[];
  /** Segment by segment: all instants, then six numbers for each. */
  readonly states: Float64Array;
  readonly stateCount: number;
}

export type EphemerisReading =
  | { readonly kind: 'good'; readonly content: EphemerisContent }
  | { readonly kind: 'bad'; readonly faults: readonly Pick<OemFault, 'line' | 'message'>[] };

/** Never throws for what the text holds: that is told as faults. */
export function readEphemeris(text: string): EphemerisReading {
  const { oem, faults } = parseOem(text);
  const [first] = oem?.segments ?? [];
  if (oem === undefined || first === undefined) {
    const nothing = { line: 1, message: 'The text holds no segment with states.' };
    return { kind: 'bad', faults: faults.length > 0 ? faults : [nothing] };
  }
  const stateCount = oem.segments.reduce((sum, segment) => sum + segment.timesMs.length, 0);
  const problem = sizeProblem(stateCount) ?? objectProblem(oem.segments) ?? placeProblem(oem.segments);
  if (problem !== null) return { kind: 'bad', faults: [{ line: 1, message: problem }] };
  try {
    const { startMs, stopMs } = oemSource(oem);
    const { objectName, objectId } = first;
    const content: EphemerisContent = {
      objectName,
      objectId,
      originator: oem.originator,
      startMs,
      stopMs,
      segments: oem.segments.map(stored),
      states: packed(oem.segments, stateCount),
      stateCount,
    };
    return { kind: 'good', content };
  } catch (error) {
    return { kind: 'bad', faults: [{ line: 1, message: error instanceof Error ? error.message : String(error) }] };
  }
}

function sizeProblem(states: number): string | null {
  const most = EPHEMERIS_LIMITS.states;
  return states <= most
    ? null
    : `The file has ${states.toLocaleString('en')} states; at most ${most.toLocaleString('en')} are kept. Split it, or use longer steps.`;
}

function objectProblem(segments: readonly OemSegment[]): string | null {
  const ids = [...new Set(segments.map((segment) => segment.objectId.toUpperCase()))];
  return ids.length <= 1 ? null : `The file is about several objects: ${ids.join(', ')}. Give one file for each.`;
}

function placeProblem(segments: readonly OemSegment[]): string | null {
  for (const { states, timesMs } of segments) {
    for (let row = 0; row < timesMs.length; row += 1) {
      const radiusKm = Math.hypot(states[6 * row] ?? 0, states[6 * row + 1] ?? 0, states[6 * row + 2] ?? 0);
      if (radiusKm >= RADIUS_KM.least && radiusKm <= RADIUS_KM.most) continue;
      const when = new Date(timesMs[row] ?? 0).toISOString();
      return `The state of ${when} lies ${radiusKm.toPrecision(6)} km from the centre of the Earth; expected ${RADIUS_KM.least} to ${RADIUS_KM.most.toLocaleString('en')} km. States are in km and km/s.`;
    }
  }
  return null;
}

const stored = (segment: OemSegment): StoredSegment => ({
  frame: segment.frame,
  frameName: segment.frameName,
  startMs: segment.startMs,
  stopMs: segment.stopMs,
  useableStartMs: segment.useableStartMs ?? null,
  useableStopMs: segment.useableStopMs ?? null,
  interpolation: segment.interpolation ?? null,
  interpolationDegree: segment.interpolationDegree ?? null,
  count: segment.timesMs.length,
});

function packed(segments: readonly OemSegment[], stateCount: number): Float64Array {
  const all = new Float64Array(NUMBERS_A_STATE * stateCount);
  let at = 0;
  for (const { timesMs, states } of segments) {
    all.set(timesMs, at);
    all.set(states, at + timesMs.length);
    at += NUMBERS_A_STATE * timesMs.length;
  }
  return all;
}
