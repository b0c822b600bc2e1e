import { describe, expect, it } from 'vitest';
import { headingAt, minuteTicks, skyWords, trackAt, trackBetween } from './track.js';

const rose = { centreX: 100, centreY: 100, radiusPx: 90 };
const T0 = Date.UTC(2026, 11, 1, 14, 0, 30);
const track = [
  { atMs: T0, azimuthDeg: 350, elevationDeg: 10 },
  { atMs: T0 + 60_000, azimuthDeg: 10, elevationDeg: 30 },
  { atMs: T0 + 120_000, azimuthDeg: 50, elevationDeg: 20 },
];

describe('a track on the sky plot', () => {
  it('takes the short way across north', () => {
    const middle = trackAt(track, T0 + 30_000);
    expect(middle?.azimuthDeg).toBeCloseTo(0, 9);
    expect(middle?.elevationDeg).toBeCloseTo(20, 9);
  });

  it('has no place before its first or after its last point', () => {
    expect(trackAt(track, T0 - 1)).toBeNull();
    expect(trackAt(track, T0 + 120_001)).toBeNull();
    expect(trackAt(track, T0)?.azimuthDeg).toBe(350);
  });

  it('is cut at both ends of a stretch', () => {
    const part = trackBetween(track, T0 + 30_000, T0 + 90_000);
    expect(part.map((point) => point.atMs - T0)).toEqual([30_000, 60_000, 90_000]);
  });

  it('has a tick on each full minute, square to its way', () => {
    const ticks = minuteTicks(rose, track, T0, T0 + 120_000, 4);
    expect(ticks.map((tick) => new Date(tick.atMs).getUTCSeconds())).toEqual([0, 0]);
    for (const tick of ticks) {
      const way = headingAt(rose, track, tick.atMs);
      const across = { x: tick.to.x - tick.from.x, y: tick.to.y - tick.from.y };
      expect(Math.abs(across.x * (way?.x ?? 1) + across.y * (way?.y ?? 1))).toBeLessThan(1e-9);
      expect(Math.hypot(across.x, across.y)).toBeCloseTo(8, 9);
    }
  });

  it('is told in words', () => {
    const words = skyWords({ label: '', mask: [], track, aosMs: T0, losMs: T0 + 120_000 });
    expect(words).toContain('Rises at 14:00:30 at azimuth 350.0°, elevation 10.0°.');
    expect(words).toContain('Highest at 14:01:30');
  });
});
