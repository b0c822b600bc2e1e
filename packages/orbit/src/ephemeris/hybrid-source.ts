/** An operator's ephemeris where it reaches, the element set everywhere else, and a plain answer which one it was. */
import type { TrajectorySource } from '../types.js';
import type { OemSource } from './oem-source.js';

export type TrajectoryOrigin = 'ephemeris' | 'elements';

export interface OriginSpan {
  readonly fromMs: number;
  readonly toMs: number;
  readonly origin: TrajectoryOrigin;
  readonly source: TrajectorySource;
}

export interface HybridSource extends TrajectorySource {
  originAt(timeMs: number): TrajectoryOrigin;
  /**
   * A period cut where the origin changes. The path jumps there by what the two disagree, so a search for passes runs on
   * each piece by itself and joins what touches (`joinAtSeams`).
   */
  spans(fromMs: number, toMs: number): OriginSpan[];
}

/** Joins the two sources. At an instant where both answer, the ephemeris does. */
export function hybridSource(ephemeris: OemSource, elements: TrajectorySource): HybridSource {
  const inside = (timeMs: number) =>
    ephemeris.spans.some(({ startMs, stopMs }) => timeMs >= startMs && timeMs <= stopMs);
  return {
    startMs: Math.min(ephemeris.startMs, elements.startMs),
    stopMs: Math.max(ephemeris.stopMs, elements.stopMs),
    originAt: (timeMs) => (inside(timeMs) ? 'ephemeris' : 'elements'),
    stateTeme: (timeMs, out) => (inside(timeMs) ? ephemeris : elements).stateTeme(timeMs, out),
    spans(fromMs, toMs) {
      const pieces: OriginSpan[] = [];
      let atMs = fromMs;
      const upTo = (untilMs: number, origin: TrajectoryOrigin) => {
        const endMs = Math.min(untilMs, toMs);
        if (endMs <= atMs) return;
        pieces.push({ fromMs: atMs, toMs: endMs, origin, source: origin === 'ephemeris' ? ephemeris : elements });
        atMs = endMs;
      };
      for (const { startMs, stopMs } of ephemeris.spans) {
        upTo(startMs, 'elements');
        if (atMs >= startMs) upTo(stopMs, 'ephemeris');
      }
      upTo(toMs, 'elements');
      return pieces;
    },
  };
}

/** What two pieces of one pass have in common when the search was cut at a seam. */
export interface SeamPass {
  readonly aosMs: number;
  readonly losMs: number;
  readonly clippedStart: boolean;
  readonly clippedEnd: boolean;
}

/**
 * Joins passes that a seam cut in two: one clipped at its end where the next is clipped at its start, at the same
 * instant. `join` makes one of the two; order and everything else stay.
 */
export function joinAtSeams<P extends SeamPass>(passes: readonly P[], join: (earlier: P, later: P) => P): P[] {
  const joined: P[] = [];
  for (const pass of passes) {
    const last = joined.at(-1);
    if (last?.clippedEnd && pass.clippedStart && last.losMs === pass.aosMs) {
      joined[joined.length - 1] = join(last, pass);
    } else {
      joined.push(pass);
    }
  }
  return joined;
}
