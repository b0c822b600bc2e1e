import { describe, expect, it } from 'vitest';
import { dopplerCurve } from './doppler.js';

/** Straight flight past the station at 7.5 km/s with 500 km between: range rate and its slope in closed form. */
const speed = 7.5;
const flyPast = (stepS: number) =>
  Array.from({ length: Math.round(600 / stepS) + 1 }, (_, index) => {
    const t = index * stepS - 300;
    const rangeKm = Math.hypot(500, speed * t);
    return {
      timeMs: t * 1000,
      rangeRateKmPerS: (speed * speed * t) / rangeKm,
      accelerationKmPerS2: (speed * speed * 500 * 500) / rangeKm ** 3,
    };
  });

describe('the Doppler curve', () => {
  it('falls all the way, fastest at the nearest point', () => {
    const curve = dopplerCurve(flyPast(1), 8.2e9);
    for (const sample of curve) expect(sample.dopplerRateHzPerS).toBeLessThan(0);
    const steepest = curve.reduce((a, b) => (b.dopplerRateHzPerS < a.dopplerRateHzPerS ? b : a));
    expect(steepest.timeMs).toBe(0);
  });

  it('has the slope of the closed form within 0.02 % of the steepest at 1 s steps', () => {
    const track = flyPast(1);
    const steepest = (speed * speed) / 500;
    dopplerCurve(track, 299_792.458e3).forEach((sample, index) => {
      expect(Math.abs(sample.dopplerRateHzPerS / -1000 - track[index]!.accelerationKmPerS2)).toBeLessThan(
        2e-4 * steepest,
      );
    });
  });

  it('manages with one and two samples', () => {
    const track = flyPast(300);
    expect(dopplerCurve(track.slice(0, 1), 1e9)[0]?.dopplerRateHzPerS).toBe(0);
    expect(dopplerCurve(track.slice(0, 2), 1e9)).toHaveLength(2);
  });
});
