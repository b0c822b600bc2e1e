import { daylightIntervals } from '@skyberth/orbit';
import { describe, expect, it } from 'vitest';
import { nightsOf } from './nights.js';

const fromMs = Date.UTC(2026, 11, 1);
const toMs = fromMs + 2 * 86_400_000;
/** Straight lines over ten minutes, and no parallax of the Sun. */
const TOLERANCE_MS = 5_000;

describe('nightsOf', () => {
  it('agrees with the daylight that is worked out instant by instant', () => {
    const sites = [
      { latitudeDeg: 48.1, longitudeDeg: 11.6, altitudeM: 500 },
      { latitudeDeg: -33.4, longitudeDeg: 179.9, altitudeM: 0 },
      { latitudeDeg: 0.2, longitudeDeg: -78.5, altitudeM: 2_800 },
    ];
    nightsOf(sites, fromMs, toMs).forEach((nights, index) => {
      const site = sites[index];
      if (site === undefined) throw new Error('There is no such site.');
      const days = daylightIntervals(site, fromMs, toMs).filter(({ phase }) => phase === 'day');
      const dusks = days.map((day) => day.toMs).filter((timeMs) => timeMs < toMs);
      const dawns = days.map((day) => day.fromMs).filter((timeMs) => timeMs > fromMs);
      const begins = nights.map((night) => night.fromMs).filter((timeMs) => timeMs > fromMs);
      const ends = nights.map((night) => night.toMs).filter((timeMs) => timeMs < toMs);
      expect(begins).toHaveLength(dusks.length);
      expect(ends).toHaveLength(dawns.length);
      begins.forEach((timeMs, i) => {
        expect(Math.abs(timeMs - (dusks[i] ?? 0))).toBeLessThan(TOLERANCE_MS);
      });
      ends.forEach((timeMs, i) => {
        expect(Math.abs(timeMs - (dawns[i] ?? 0))).toBeLessThan(TOLERANCE_MS);
      });
    });
  });

  it('is one night in the polar winter and none in the polar summer', () => {
    const [north, south] = nightsOf(
      [
        { latitudeDeg: 80, longitudeDeg: 0, altitudeM: 0 },
        { latitudeDeg: -80, longitudeDeg: 0, altitudeM: 0 },
      ],
      fromMs,
      toMs,
    );
    expect(north).toEqual([{ fromMs, toMs }]);
    expect(south).toEqual([]);
  });
});
