import { describe, expect, it } from 'vitest';
import { oemToKvn } from '../export/oem-writer.js';
import { sampleOem } from '../export/sample-oem.js';
import { OrbitError } from '../orbit-error.js';
import type { Pass, TrajectorySource } from '../types.js';
import { ephemerisSpans, hybridSource, passesAcross } from './hybrid-source.js';
import { interpolateState } from './interpolate.js';
import type { Oem, OemFrame } from './oem.js';
import { oemSource } from './oem-source.js';
import { parseOem } from './parse-oem.js';

const START_MS = Date.UTC(2026, 11, 1);

/** A circle at 7000 km, tilted, with the velocity that is exactly the derivative of the position. */
const circle: TrajectorySource = {
  startMs: Number.NEGATIVE_INFINITY,
  stopMs: Number.POSITIVE_INFINITY,
  stateTeme(timeMs, out) {
    const rate = Math.sqrt(398600.4418 / 7000 ** 3);
    const angle = rate * ((timeMs - START_MS) / 1000);
    const [c, s] = [Math.cos(angle), Math.sin(angle)];
    out.set([7000 * c, 4200 * s, 5600 * s, -7000 * rate * s, 4200 * rate * c, 5600 * rate * c]);
  },
};

function sampled(frame: OemFrame, stepS = 60): Oem {
  return sampleOem(circle, {
    objectName: 'LANTERN 9',
    objectId: '2026-909A',
    originator: 'HARBOUR',
    creationMs: START_MS,
    fromMs: START_MS,
    toMs: START_MS + 7_200_000,
    stepS,
    frame,
  });
}

function worst(source: TrajectorySource, fromMs: number, toMs: number): { km: number; kmPerS: number } {
  const [got, true_] = [new Float64Array(6), new Float64Array(6)];
  let [km, kmPerS] = [0, 0];
  for (let timeMs = fromMs; timeMs <= toMs; timeMs += 7_771) {
    source.stateTeme(timeMs, got);
    circle.stateTeme(timeMs, true_);
    km = Math.max(km, Math.hypot(got[0]! - true_[0]!, got[1]! - true_[1]!, got[2]! - true_[2]!));
    kmPerS = Math.max(kmPerS, Math.hypot(got[3]! - true_[3]!, got[4]! - true_[4]!, got[5]! - true_[5]!));
  }
  return { km, kmPerS };
}

describe('a source from an ephemeris', () => {
  it.each(['TEME', 'ICRF', 'GCRF', 'EME2000', 'ITRF'] as const)(
    'goes to %s and back, written and read, and stays on the orbit to a millimetre away from the edges',
    (frame) => {
      const { oem } = parseOem(oemToKvn(sampled(frame)));
      const { km, kmPerS } = worst(oemSource(oem!), START_MS + 300_000, START_MS + 6_900_000);
      expect(km).toBeLessThan(1e-6);
      expect(kmPerS).toBeLessThan(1e-8);
    },
  );

  it('is as good as its own degree: a straight line is not enough, Hermite of 7 is', () => {
    const [base] = sampled('TEME').segments;
    const withMethod = (interpolation: 'LINEAR' | 'LAGRANGE' | 'HERMITE', interpolationDegree: number) =>
      worst(
        oemSource({ ...sampled('TEME'), segments: [{ ...base!, interpolation, interpolationDegree }] }),
        START_MS + 300_000,
        START_MS + 6_900_000,
      );
    expect(withMethod('LINEAR', 1).km).toBeGreaterThan(3);
    expect(withMethod('LAGRANGE', 3).km).toBeGreaterThan(withMethod('LAGRANGE', 5).km);
    expect(withMethod('HERMITE', 7).km).toBeLessThan(1e-6);
    expect(withMethod('HERMITE', 7).kmPerS).toBeLessThan(1e-7);
  });

  it('meets every state at its own instant, also with an even number of points and a short segment', () => {
    const [segment] = sampled('TEME', 600).segments;
    const out = new Float64Array(6);
    for (const interpolation of ['LINEAR', 'LAGRANGE', 'HERMITE'] as const) {
      for (const interpolationDegree of [1, 2, 4, 15]) {
        segment!.timesMs.forEach((timeMs, row) => {
          interpolateState({ ...segment!, interpolation, interpolationDegree }, segment!.states, timeMs, out);
          for (let column = 0; column < 6; column += 1)
            expect(out[column]).toBeCloseTo(segment!.states[6 * row + column]!, 8);
        });
      }
    }
  });

  it('honours the usable span and says what it covers', () => {
    const [segment] = sampled('TEME').segments;
    const useable = { ...segment!, useableStartMs: START_MS + 600_000, useableStopMs: START_MS + 1_200_000 };
    const source = oemSource({ ...sampled('TEME'), segments: [useable] });
    expect([source.startMs, source.stopMs]).toEqual([START_MS + 600_000, START_MS + 1_200_000]);
    const out = new Float64Array(6);
    expect(() => source.stateTeme(START_MS + 599_999, out)).toThrowError(OrbitError);
    expect(() => source.stateTeme(START_MS + 1_200_001, out)).toThrowError(
      'covers 2026-12-01T00:10:00.000Z to 2026-12-01T00:20:00.000Z',
    );
    source.stateTeme(START_MS + 1_200_000, out);
  });

  it('never bridges a gap between segments, but knows that touching ones are one span', () => {
    const [segment] = sampled('TEME').segments;
    const cut = (from: number, to: number) => ({
      ...segment!,
      startMs: segment!.timesMs[from]!,
      stopMs: segment!.timesMs[to]!,
      timesMs: segment!.timesMs.slice(from, to + 1),
      states: segment!.states.slice(6 * from, 6 * to + 6),
    });
    const touching = oemSource({ ...sampled('TEME'), segments: [cut(0, 40), cut(40, 120)] });
    expect(touching.spans).toHaveLength(1);
    const gap = oemSource({ ...sampled('TEME'), segments: [cut(0, 40), cut(60, 120)] });
    expect(gap.spans).toEqual([
      { startMs: START_MS, stopMs: START_MS + 2_400_000 },
      { startMs: START_MS + 3_600_000, stopMs: START_MS + 7_200_000 },
    ]);
    expect(() => gap.stateTeme(START_MS + 3_000_000, new Float64Array(6))).toThrowError(/outside the ephemeris/);
  });
});

describe('an ephemeris with elements around it', () => {
  const hybrid = hybridSource(oemSource(sampled('TEME')), circle);

  it('answers from the ephemeris inside its span and from the elements outside', () => {
    expect(hybrid.originAt(START_MS - 1)).toBe('elements');
    expect(hybrid.originAt(START_MS)).toBe('ephemeris');
    expect(hybrid.originAt(START_MS + 7_200_001)).toBe('elements');
    expect(hybrid.startMs).toBe(Number.NEGATIVE_INFINITY);
    hybrid.stateTeme(START_MS - 86_400_000, new Float64Array(6));
  });

  it('cuts a period into pieces that leave nothing out', () => {
    const pieces = hybrid.spans(START_MS - 1000, START_MS + 8_000_000);
    expect(pieces.map(({ fromMs, toMs, origin }) => [fromMs - START_MS, toMs - START_MS, origin])).toEqual([
      [-1000, 0, 'elements'],
      [0, 7_200_000, 'ephemeris'],
      [7_200_000, 8_000_000, 'elements'],
    ]);
    expect(hybrid.spans(START_MS + 1000, START_MS + 2000)).toHaveLength(1);
    expect(hybrid.spans(START_MS - 2000, START_MS - 1000).map(({ origin }) => origin)).toEqual(['elements']);
  });

  it('joins a pass that the seam cut in two, with the higher of the two highest points', () => {
    const pass = (aosMs: number, losMs: number, top: number, clippedStart: boolean, clippedEnd: boolean): Pass => ({
      aosMs: START_MS + aosMs,
      tcaMs: START_MS + (aosMs + losMs) / 2,
      losMs: START_MS + losMs,
      clippedStart,
      clippedEnd,
      maxElevationDeg: top,
      azimuthDeg: [aosMs, top, losMs],
      elevationDeg: [5, top, 5],
      rangeKm: [2000, 600, 2000],
      rangeRateKmPerS: [-7, 0, 7],
    });
    const found = new Map([
      ['elements', [pass(-500, -400, 20, false, false), pass(-60, 0, 30, false, true)]],
      ['ephemeris', [pass(0, 90, 40, true, false)]],
    ]);
    const pieces = hybrid.spans(START_MS - 1000, START_MS + 1000);
    const passes = passesAcross(pieces, (_, fromMs) => found.get(fromMs < START_MS ? 'elements' : 'ephemeris')!);
    expect(passes.map(({ origin }) => origin)).toEqual(['elements', 'both']);
    expect(passes[1]).toMatchObject({
      aosMs: START_MS - 60,
      tcaMs: START_MS + 45,
      losMs: START_MS + 90,
      clippedStart: false,
      clippedEnd: false,
      maxElevationDeg: 40,
      azimuthDeg: [-60, 40, 90],
    });
  });

  it('has nothing to search in a gap of the ephemeris alone', () => {
    const ephemeris = oemSource(sampled('TEME'));
    expect(ephemerisSpans(ephemeris, START_MS - 2000, START_MS - 1000)).toEqual([]);
    expect(ephemerisSpans(ephemeris, START_MS - 1000, START_MS + 1000)).toMatchObject([
      { fromMs: START_MS, toMs: START_MS + 1000, origin: 'ephemeris' },
    ]);
  });
});

describe('a sampled message', () => {
  it('ends exactly at the end and refuses a step that would fill the memory', () => {
    const oem = sampled('TEME', 7);
    expect(oem.segments[0]!.timesMs.at(-1)).toBe(START_MS + 7_200_000);
    expect(() => sampled('TEME', 1e-3)).toThrowError(/at most 200000 states/);
    expect(() => sampled('TEME', 0)).toThrowError(OrbitError);
  });
});
