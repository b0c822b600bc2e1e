/** An operator's ephemeris where it reaches, the element set everywhere else, and a plain answer which one it was. */
import type { AosHighestLos, Pass, TrajectorySource } from '../types.js';
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
   * each piece by itself and joins what touches (`passesAcross`).
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

/** The part of a period that an ephemeris alone answers for, gaps left out. */
export function ephemerisSpans(ephemeris: OemSource, fromMs: number, toMs: number): OriginSpan[] {
  return ephemeris.spans
    .map(({ startMs, stopMs }) => ({ fromMs: Math.max(fromMs, startMs), toMs: Math.min(toMs, stopMs) }))
    .filter((span) => span.toMs > span.fromMs)
    .map((span) => ({ ...span, origin: 'ephemeris' as const, source: ephemeris }));
}

/** A pass with what it was made from: `both` where a seam lies inside. */
export interface OriginPass extends Pass {
  readonly origin: TrajectoryOrigin | 'both';
}

/** Searches each piece by itself with the given finder and joins the halves of a pass that a seam cut. */
export function passesAcross(
  pieces: readonly OriginSpan[],
  find: (source: TrajectorySource, fromMs: number, toMs: number) => readonly Pass[],
): OriginPass[] {
  const passes = pieces.flatMap(({ source, fromMs, toMs, origin }) =>
    find(source, fromMs, toMs).map((pass): OriginPass => ({ ...pass, origin })),
  );
  return joinAtSeams(passes, (earlier, later) => ({
    ...joinedPass(earlier, later),
    origin: earlier.origin === later.origin ? later.origin : 'both',
  }));
}

/**
 * Joins the halves of passes that a seam cut: one clipped at its end where the next is clipped at its start, at the same
 * instant. For passes of one site in rising order, as a search over a source with seams gives them.
 */
export function joinAtSeams<P extends Pass>(passes: readonly P[], join: (earlier: P, later: P) => P): P[] {
  const whole: P[] = [];
  for (const pass of passes) {
    const last = whole.at(-1);
    if (last?.clippedEnd && pass.clippedStart && last.losMs === pass.aosMs) whole[whole.length - 1] = join(last, pass);
    else whole.push(pass);
  }
  return whole;
}

/** AOS of the earlier half, LOS of the later, and whichever highest point is higher. */
export function joinedPass(earlier: Pass, later: Pass): Pass {
  const top = earlier.maxElevationDeg >= later.maxElevationDeg ? earlier : later;
  const three = (name: 'azimuthDeg' | 'elevationDeg' | 'rangeKm' | 'rangeRateKmPerS'): AosHighestLos<number> => [
    earlier[name][0],
    top[name][1],
    later[name][2],
  ];
  return {
    aosMs: earlier.aosMs,
    tcaMs: top.tcaMs,
    losMs: later.losMs,
    clippedStart: earlier.clippedStart,
    clippedEnd: later.clippedEnd,
    maxElevationDeg: top.maxElevationDeg,
    azimuthDeg: three('azimuthDeg'),
    elevationDeg: three('elevationDeg'),
    rangeKm: three('rangeKm'),
    rangeRateKmPerS: three('rangeRateKmPerS'),
  };
}
