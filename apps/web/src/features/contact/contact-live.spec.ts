import { describe, expect, it } from 'vitest';
import { liveAt, type TrackInstant, valueAt } from './contact-live.js';

const at = (atMs: number, azimuthDeg: number, elevationDeg: number): TrackInstant => ({
  atMs,
  azimuthDeg,
  elevationDeg,
  rangeKm: 1000 - atMs / 100,
  rangeRateKmPerS: -5,
});
const track = [at(0, 350, 0), at(10_000, 10, 0), at(20_000, 10, 20)];

describe('the live position', () => {
  it('crosses north by the short way', () => {
    expect(liveAt(track, 5_000)?.azimuthDeg).toBeCloseTo(0, 9);
    expect(liveAt(track, 2_500)?.azimuthDeg).toBeCloseTo(355, 9);
  });

  it('turns by the angle on the sky: along the horizon as fast as azimuth, upwards as fast as elevation', () => {
    expect(liveAt(track, 3_000)?.turningDegPerS).toBeCloseTo(2, 9);
    expect(liveAt(track, 15_000)?.turningDegPerS).toBeCloseTo(2, 9);
  });

  it('is nowhere before AOS and after LOS, and still known at both', () => {
    expect(liveAt(track, -1)).toBeNull();
    expect(liveAt(track, 20_001)).toBeNull();
    expect(liveAt(track, 0)?.rangeKm).toBe(1000);
    expect(liveAt(track, 20_000)?.elevationDeg).toBe(20);
    expect(liveAt([], 0)).toBeNull();
  });
});

describe('a value along the track', () => {
  it('is straight between its points and unknown where none was computed', () => {
    expect(valueAt(track, [10, 20, 40], 15_000)).toBe(30);
    expect(valueAt(track, [], 15_000)).toBeNaN();
    expect(valueAt(track, [10, 20, 40], 30_000)).toBeNaN();
  });
});
