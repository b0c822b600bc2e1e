import { describe, expect, it } from 'vitest';
import type { LookAngles } from '../types.js';
import type { Mount } from './mount.js';
import { mountCoverage } from './mount-coverage.js';

/** Straight flight over a flat Earth at 500 km and 7.5 km/s, northwards, passing `asideKm` to the east; one second apart. */
function flyOver(asideKm: number): LookAngles[] {
  return Array.from({ length: 401 }, (_, index) => {
    const northKm = (index - 200) * 7.5;
    const rangeKm = Math.hypot(500, northKm, asideKm);
    return {
      timeMs: index * 1000,
      azimuthDeg: ((Math.atan2(asideKm, northKm) * 180) / Math.PI + 360) % 360,
      elevationDeg: (Math.asin(500 / rangeKm) * 180) / Math.PI,
      rangeKm,
      rangeRateKmPerS: (7.5 * northKm) / rangeKm,
    };
  });
}

const slow: Mount = { kind: 'az-el', first: { rateDegPerS: 5 }, second: { rateDegPerS: 5, minDeg: 0, maxDeg: 90 } };

describe('the part of a pass that a mount can follow', () => {
  it('is all of a pass well away from the zenith', () => {
    expect(mountCoverage(flyOver(300), slow)).toEqual({ intervals: [{ fromMs: 0, toMs: 400_000 }], gaps: [] });
  });

  it('has a gap around the zenith as long as half a turn takes', () => {
    const { intervals, gaps } = mountCoverage(flyOver(2), slow);
    expect(gaps).toHaveLength(1);
    const lengthS = (gaps[0]!.toMs - gaps[0]!.fromMs) / 1000;
    // At 2 km aside nearly all of 180 degrees passes at once: about 180 / 5 s, a little less for what is left outside.
    expect(lengthS).toBeGreaterThan(33);
    expect(lengthS).toBeLessThan(37);
    expect((gaps[0]!.toMs + gaps[0]!.fromMs) / 2).toBeCloseTo(200_000, -4);
    expect(gaps[0]!.code).toBe('keyhole');
    expect(gaps[0]!.sentence).toMatch(/turn at \d+\.\d degrees\/s; the mount turns at 5/);
    expect(intervals).toEqual([
      { fromMs: 0, toMs: gaps[0]!.fromMs },
      { fromMs: gaps[0]!.toMs, toMs: 400_000 },
    ]);
  });

  it('has a longer gap with a slower mount and none with a fast one', () => {
    const lost = (rateDegPerS: number) => {
      const { gaps } = mountCoverage(flyOver(20), { ...slow, first: { rateDegPerS } });
      return gaps.reduce((sum, { fromMs, toMs }) => sum + toMs - fromMs, 0);
    };
    expect(lost(2)).toBeGreaterThan(lost(5));
    expect(lost(30)).toBe(0);
  });

  it('has no gap at the zenith for an X-Y mount, nor for one tilted away from it', () => {
    const xy: Mount = { kind: 'x-y', first: { rateDegPerS: 3 }, second: { rateDegPerS: 3 } };
    expect(mountCoverage(flyOver(2), xy).gaps).toEqual([]);
    const tilted: Mount = {
      ...slow,
      kind: 'tilted az-el',
      tiltDeg: 30,
      tiltAzimuthDeg: 90,
      second: { rateDegPerS: 5 },
    };
    expect(mountCoverage(flyOver(2), tilted).gaps).toEqual([]);
  });

  it('names the axis and the limit that it is about', () => {
    const lazy: Mount = { kind: 'az-el', first: { rateDegPerS: 60 }, second: { rateDegPerS: 0.3 } };
    expect(mountCoverage(flyOver(300), lazy).gaps[0]?.sentence).toMatch(
      /^The elevation would have to turn at 0\.\d degrees\/s; the mount turns at 0\.3, so the dish loses/,
    );
    const heavy: Mount = {
      kind: 'az-el',
      first: { rateDegPerS: 60, accelerationDegPerS2: 0.5 },
      second: { rateDegPerS: 5 },
    };
    expect(mountCoverage(flyOver(20), heavy).gaps[0]?.sentence).toContain(
      "The azimuth would have to change its rate faster than the mount's 0.5 degrees/s2",
    );
  });

  it('ends at a stop of the elevation', () => {
    const low: Mount = { ...slow, second: { rateDegPerS: 5, minDeg: 30, maxDeg: 85 } };
    const { gaps } = mountCoverage(flyOver(100), low);
    expect(gaps.map(({ code }) => code)).toEqual(['travel', 'travel']);
    expect(gaps[0]!.sentence).toBe('The spacecraft is beyond the elevation travel of 30 to 85 degrees.');
  });

  it('chooses the turn that spares unwinding, and unwinds where none does', () => {
    // To the west of the station the pass goes from 180 over 270 to 360 degrees; to the east from 180 over 90 to 0.
    const west = flyOver(-300);
    const roomy: Mount = { ...slow, first: { rateDegPerS: 5, minDeg: -270, maxDeg: 270 } };
    expect(mountCoverage(west, roomy).gaps).toEqual([]);
    const narrow: Mount = { ...slow, first: { rateDegPerS: 5, minDeg: -80, maxDeg: 300 } };
    const { gaps } = mountCoverage(west, narrow);
    expect(gaps).toHaveLength(1);
    expect(gaps[0]!.code).toBe('unwind');
    expect((gaps[0]!.toMs - gaps[0]!.fromMs) / 1000).toBeGreaterThan(60);
  });

  it('says nothing about a track too short to judge', () => {
    expect(mountCoverage(flyOver(0).slice(0, 1), slow)).toEqual({ intervals: [], gaps: [] });
  });
});
