import { describe, expect, it } from 'vitest';
import { antipode, subsolarPoint } from './sun.js';

describe('the point under the Sun', () => {
  it('is on the equator at an equinox and on a tropic at a solstice (2026 instants, from memory)', () => {
    expect(Math.abs(subsolarPoint(Date.UTC(2026, 2, 20, 14, 46)).latitudeDeg)).toBeLessThan(0.02);
    expect(subsolarPoint(Date.UTC(2026, 5, 21, 8, 25)).latitudeDeg).toBeCloseTo(23.44, 1);
    expect(subsolarPoint(Date.UTC(2026, 11, 21, 20, 50)).latitudeDeg).toBeCloseTo(-23.44, 1);
  });

  it('follows the equation of time: about 16 minutes fast in early November, 14 slow in mid-February (from memory)', () => {
    const minutes = (atMs: number) => -subsolarPoint(atMs).longitudeDeg * 4;
    expect(minutes(Date.UTC(2026, 10, 3, 12))).toBeCloseTo(16.4, 0);
    expect(minutes(Date.UTC(2026, 1, 11, 12))).toBeCloseTo(-14.2, 0);
  });

  it('has its opposite on the other side', () => {
    expect(antipode({ latitudeDeg: 10, longitudeDeg: 170 })).toEqual([-10, -10]);
  });
});
