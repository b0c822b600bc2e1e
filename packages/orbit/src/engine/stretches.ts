/** The parts of a period that a source can answer for, and what stops it elsewhere. */
import { OrbitError } from '../orbit-error.js';
import type { SourcePiece, TrajectorySource } from '../types.js';
import { Ephemeris } from './ephemeris.js';
import { SampleRoom } from './sample-room.js';

const DAY_MS = 86_400_000;
/** Between epoch and period the source is asked this often: a decay takes days to be passed through. */
const PROBE_MS = DAY_MS / 4;
const MOST_PROBES = 400;
/** An end found by halving is this sharp. */
const SHARP_MS = 1;
/** A decay shows first at one perigee, at the next one earlier in the search; each attempt ends the path before the one met. */
const MOST_ATTEMPTS = 60;
/** Shorter than this nothing can be sampled. */
const LEAST_STRETCH_MS = 10;

export interface SampledPath {
  /** In rising order, one for each unbroken part. */
  readonly ephemerides: readonly Ephemeris[];
  /** Why parts of the period are missing, if the source gave out. */
  readonly fault: OrbitError | undefined;
}

/**
 * Samples all of a period that can be sampled. Never throws an `OrbitError`: what goes wrong is in `fault`. The path is good
 * until the same `rooms` are given for another one; without them it is its own.
 */
export function samplePath(
  source: TrajectorySource,
  fromMs: number,
  toMs: number,
  rooms: SampleRoom[] = [],
): SampledPath {
  const ephemerides: Ephemeris[] = [];
  let fault: OrbitError | undefined;
  for (const piece of piecesOf(source, fromMs, toMs)) {
    if (piece.toMs - piece.fromMs < LEAST_STRETCH_MS) continue;
    try {
      // Each part of a path lives as long as the others, so each has a room of its own.
      const room = rooms[ephemerides.length] ?? new SampleRoom();
      rooms[ephemerides.length] = room;
      const sound = soundPart(piece, room);
      fault ??= sound.fault;
      if (sound.ephemeris) ephemerides.push(sound.ephemeris);
    } catch (error) {
      if (!(error instanceof OrbitError)) throw error;
      fault ??= error;
    }
  }
  return { ephemerides, fault };
}

function piecesOf(source: TrajectorySource, fromMs: number, toMs: number): readonly SourcePiece[] {
  const { spans } = source;
  if (typeof spans === 'function') {
    return spans(fromMs, toMs).flatMap((piece) =>
      piece.source === source ? [piece] : piecesOf(piece.source, piece.fromMs, piece.toMs),
    );
  }
  const stretches = spans ?? [source];
  return stretches
    .map(({ startMs, stopMs }) => ({ fromMs: Math.max(fromMs, startMs), toMs: Math.min(toMs, stopMs), source }))
    .filter((piece) => piece.toMs > piece.fromMs);
}

interface SoundPart {
  readonly ephemeris: Ephemeris | undefined;
  readonly fault: OrbitError | undefined;
}

/**
 * Follows a source with an epoch outwards from it as far as it answers: the first instant without an answer ends its use on
 * that side, even where it answers again later, because then the answers mean nothing.
 */
function soundPart({ source, fromMs, toMs }: SourcePiece, room: SampleRoom): SoundPart {
  const { epochMs } = source;
  if (epochMs === undefined) return { ephemeris: Ephemeris.of(source, fromMs, toMs, room), fault: undefined };
  const anchorMs = Math.min(toMs, Math.max(fromMs, epochMs));
  const lost = firstFailure(source, epochMs, anchorMs);
  if (lost) return { ephemeris: undefined, fault: lost.fault };
  let [startMs, endMs] = [fromMs, toMs];
  let fault: OrbitError | undefined;
  for (let attempt = 0; attempt < MOST_ATTEMPTS && endMs - startMs >= LEAST_STRETCH_MS; attempt += 1) {
    try {
      return { ephemeris: Ephemeris.of(source, startMs, endMs, room), fault };
    } catch (error) {
      if (!(error instanceof OrbitError)) throw error;
      const failedMs = error.data['timeMs'];
      if (typeof failedMs !== 'number') return { ephemeris: undefined, fault: error };
      const failure = firstFailure(source, anchorMs, failedMs) ?? { lastGoodMs: anchorMs, fault: error };
      fault = failure.fault;
      if (failedMs > anchorMs) endMs = Math.min(failure.lastGoodMs, endMs - SHARP_MS);
      else startMs = Math.max(failure.lastGoodMs, startMs + SHARP_MS);
    }
  }
  return { ephemeris: undefined, fault };
}

interface Failure {
  readonly lastGoodMs: number;
  readonly fault: OrbitError;
}

/** Asks a source from one instant to another; the first failure is narrowed down by halving. */
function firstFailure(source: TrajectorySource, fromMs: number, toMs: number): Failure | undefined {
  const spanMs = toMs - fromMs;
  const probes = Math.min(MOST_PROBES, Math.ceil(Math.abs(spanMs) / PROBE_MS));
  let goodMs = fromMs;
  const atStart = faultAt(source, fromMs);
  if (atStart) return { lastGoodMs: fromMs, fault: atStart };
  for (let probe = 1; probe <= probes; probe += 1) {
    const timeMs = fromMs + (spanMs * probe) / probes;
    const fault = faultAt(source, timeMs);
    if (fault) return narrowed(source, goodMs, { lastGoodMs: timeMs, fault });
    goodMs = timeMs;
  }
  return undefined;
}

function narrowed(source: TrajectorySource, good: number, failed: Failure): Failure {
  let goodMs = good;
  let { lastGoodMs: badMs, fault } = failed;
  while (Math.abs(badMs - goodMs) > SHARP_MS) {
    const middleMs = 0.5 * (goodMs + badMs);
    const there = faultAt(source, middleMs);
    if (there) [badMs, fault] = [middleMs, there];
    else goodMs = middleMs;
  }
  return { lastGoodMs: goodMs, fault };
}

const scratch = new Float64Array(6);

function faultAt(source: TrajectorySource, timeMs: number): OrbitError | undefined {
  try {
    source.stateTeme(timeMs, scratch);
    return undefined;
  } catch (error) {
    if (error instanceof OrbitError) return error;
    throw error;
  }
}
