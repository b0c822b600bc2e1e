import { describe, expect, it } from 'vitest';
import { elevationShare } from '../common/elevation-scale.js';
import { MINUTE_MS, pass, T0 } from './board-fixture.js';
import { apexOf, curveBetween, openWater, sampleAt, statedPart } from './curve.js';

const hump = pass('p', 'a1', 0, 8);
const frame = { x: (atMs: number) => (atMs - T0) / 1000, baseY: 60, humpPx: 50 };

describe('the curve of a pass', () => {
  it('is straight between samples and held beyond its ends', () => {
    const { profile } = hump;
    expect(sampleAt(profile, profile.elevationDeg, T0 + MINUTE_MS)).toBeCloseTo(15, 5);
    expect(sampleAt(profile, profile.elevationDeg, T0 - MINUTE_MS)).toBe(5);
    expect(sampleAt(profile, profile.elevationDeg, T0 + 20 * MINUTE_MS)).toBe(5);
  });

  it('begins and ends exactly where it is cut', () => {
    const points = curveBetween(hump.profile, frame, T0 + 90_000, T0 + 400_000);
    expect(points.xs[0]).toBe(90);
    expect(points.xs.at(-1)).toBe(400);
    expect(points.xs).toEqual([...points.xs].sort((a, b) => a - b));
  });

  it('is highest where the pass is', () => {
    const apex = apexOf(curveBetween(hump.profile, frame, hump.aosMs, hump.losMs));
    expect(apex.x).toBe(240);
    expect(apex.y).toBeCloseTo(60 - 50 * (45 / 90) ** 0.58, 6);
  });

  it('leaves out points closer than a pixel when seen from far', () => {
    const far = { ...frame, x: (atMs: number) => (atMs - T0) / 1_000_000 };
    expect(curveBetween(hump.profile, far, hump.aosMs, hump.losMs).xs.length).toBeLessThanOrEqual(3);
  });

  it('has open water only where the curve is above and the land below', () => {
    const points = { xs: [0, 10, 20, 30, 40], tops: [50, 20, 20, 20, 50], lands: [55, 55, 30, 55, 55] };
    expect(openWater(points, 25, 50)).toEqual([10, 10]);
    expect(openWater({ ...points, lands: [55, 55, 55, 55, 55] }, 25, 50)).toEqual([10, 30]);
    expect(openWater(points, 10, 50)).toBeNull();
  });

  it('is about the bought part only, and never about more than the pass', () => {
    const part = { fromMs: T0 - MINUTE_MS, toMs: T0 + 3 * MINUTE_MS };
    expect(statedPart({ ...hump, part })).toEqual({ fromMs: hump.aosMs, toMs: part.toMs });
  });
});

describe('the stretch near the horizon', () => {
  it('runs from the ground to the zenith and lifts low passes', () => {
    expect(elevationShare(-3)).toBe(0);
    expect(elevationShare(0)).toBe(0);
    expect(elevationShare(90)).toBe(1);
    expect(elevationShare(10)).toBeGreaterThan(10 / 90);
    expect(elevationShare(Number.NaN)).toBe(0);
  });
});
