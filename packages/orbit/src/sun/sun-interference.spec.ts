import { describe, expect, it } from 'vitest';
import type { LookAngles } from '../types.js';
import { daylightIntervals, daylightPhase } from './daylight.js';
import { illumination, sunlitShare } from './illumination.js';
import { sunInterference, sunOutageAngleDeg } from './sun-interference.js';
import { sunPath } from './sun-path.js';
import { separationDeg, sunDirection, sunPositionTemeKm } from './sun-position.js';

const site = { latitudeDeg: 40, longitudeDeg: 0, altitudeM: 0 };
const NOON_MS = Date.UTC(2026, 5, 21, 12);
const HOUR_MS = 3_600_000;

/** A beam that sweeps through the place where the Sun stands at noon, a degree every ten seconds. */
function sweep(fromMs: number): LookAngles[] {
  return Array.from({ length: 61 }, (_, index) => {
    const timeMs = fromMs + index * 10_000;
    const sun = sunDirection(site, fromMs + 300_000);
    return {
      timeMs,
      azimuthDeg: sun.azimuthDeg,
      elevationDeg: sun.elevationDeg - 30 + index,
      rangeKm: 1000,
      rangeRateKmPerS: 0,
    };
  });
}

describe('the Sun beside the beam', () => {
  it('is met at the middle of a sweep through it', () => {
    const { closestDeg, closestMs, intervals } = sunInterference(sweep(NOON_MS), site, 2);
    expect(closestDeg!).toBeLessThan(0.1);
    expect(closestMs).toBe(NOON_MS + 300_000);
    expect(intervals).toHaveLength(1);
    expect(Math.abs(intervals[0]!.toMs - intervals[0]!.fromMs - 40_000)).toBeLessThan(1500);
  });

  it('does not count at night', () => {
    const { closestDeg, intervals } = sunInterference(sweep(NOON_MS + 12 * HOUR_MS), site, 170);
    expect(closestDeg).toBeUndefined();
    expect(intervals).toEqual([]);
  });

  it('lasts to the end of a pass that ends inside', () => {
    const half = sweep(NOON_MS).slice(0, 31);
    const { intervals } = sunInterference(half, site, 5);
    expect(intervals.at(-1)?.toMs).toBe(half.at(-1)?.timeMs);
  });

  it('reaches further for a small dish than for a large one', () => {
    const small = sunOutageAngleDeg({ diameterM: 1, frequencyMhz: 8200 });
    expect(small).toBeGreaterThan(sunOutageAngleDeg({ diameterM: 10, frequencyMhz: 8200 }));
    expect(sunOutageAngleDeg({ diameterM: 1000, frequencyMhz: 30000 })).toBeCloseTo(0.25, 3);
  });

  it('has angles that do not lose themselves near zero', () => {
    const a = { azimuthDeg: 10, elevationDeg: 40 };
    expect(separationDeg(a, { azimuthDeg: 10, elevationDeg: 40 + 1e-9 })).toBeCloseTo(1e-9, 12);
    expect(separationDeg({ azimuthDeg: 0, elevationDeg: 0 }, { azimuthDeg: 180, elevationDeg: 0 })).toBeCloseTo(180, 6);
  });
});

describe('the path of the Sun', () => {
  it('stays within a ten-thousandth of a degree of the theory all year', () => {
    const path = sunPath();
    const got = new Float64Array(3);
    for (let hour = 0; hour < 8766; hour += 37) {
      const timeMs = NOON_MS + hour * HOUR_MS + 1_234_567;
      path.positionTemeKm(timeMs, got);
      const theory = sunPositionTemeKm(timeMs);
      const apart = Math.hypot(got[0]! - theory[0]!, got[1]! - theory[1]!, got[2]! - theory[2]!);
      expect((apart / 149_597_870.7) * (180 / Math.PI)).toBeLessThan(1e-4);
    }
  });

  it('leads to the direction that the library gives', () => {
    const path = sunPath();
    for (let hour = 0; hour < 48; hour += 0.7) {
      const timeMs = NOON_MS + hour * HOUR_MS;
      expect(separationDeg(path.direction(site, timeMs), sunDirection(site, timeMs))).toBeLessThan(0.0003);
    }
  });
});

describe('day and night', () => {
  it('follow each other without a gap through all five phases', () => {
    const day = daylightIntervals(site, NOON_MS - 12 * HOUR_MS, NOON_MS + 12 * HOUR_MS);
    expect(day.slice(1).map(({ fromMs }) => fromMs)).toEqual(day.slice(0, -1).map(({ toMs }) => toMs));
    expect(new Set(day.map(({ phase }) => phase))).toEqual(
      new Set(['day', 'civil', 'nautical', 'astronomical', 'night']),
    );
    expect(day.map(({ fromMs, toMs }) => toMs - fromMs).every((length) => length > 0)).toBe(true);
  });

  it('are one long day in a polar summer and one long night in its winter', () => {
    const pole = { latitudeDeg: 78.2, longitudeDeg: 15, altitudeM: 0 };
    expect(daylightIntervals(pole, NOON_MS, NOON_MS + 24 * HOUR_MS).map(({ phase }) => phase)).toEqual(['day']);
    expect(daylightPhase({ ...pole, latitudeDeg: 89 }, Date.UTC(2026, 11, 21, 12))).toBe('night');
  });
});

describe('the shadow', () => {
  const sun = [149_597_870.7, 0, 0];

  it('darkens gradually from full sun to none', () => {
    const fractions: number[] = [];
    for (let y = 6500; y > 6200; y -= 1) fractions.push(illumination([-7000, y, 0], sun).sunlitFraction);
    expect(fractions[0]).toBe(1);
    expect(fractions.at(-1)).toBe(0);
    expect(fractions).toEqual([...fractions].sort((a, b) => b - a));
    expect(fractions.some((fraction) => fraction > 0.4 && fraction < 0.6)).toBe(true);
  });

  it('is a ring of Sun beyond the tip of the umbra', () => {
    const far = illumination([-3e6, 0, 0], sun);
    expect(far.state).toBe('penumbra');
    expect(far.sunlitFraction).toBeGreaterThan(0.5);
    expect(illumination([-1.3e6, 0, 0], sun).state).toBe('umbra');
  });

  it('has a share of a period', () => {
    expect(
      sunlitShare([
        { fromMs: 0, toMs: 30, state: 'sunlit' },
        { fromMs: 30, toMs: 31, state: 'penumbra' },
        { fromMs: 31, toMs: 40, state: 'umbra' },
      ]),
    ).toBe(0.75);
    expect(sunlitShare([])).toBe(0);
  });
});
