import { describe, expect, it } from 'vitest';
import { maskElevationAt, toDirection, toPoint } from './rose.js';

const rose = { centreX: 100, centreY: 100, radiusPx: 90 };

describe('the rose', () => {
  it('has north up, east right and the zenith in the middle', () => {
    expect(toPoint(rose, 0, 0)).toEqual({ x: 100, y: 10 });
    expect(toPoint(rose, 90, 0).x).toBeCloseTo(190, 9);
    expect(toPoint(rose, 213, 90).y).toBeCloseTo(100, 9);
  });

  it('goes from a direction to a place and back', () => {
    for (const azimuthDeg of [0, 12.5, 90, 179.9, 270, 359.9]) {
      const back = toDirection(rose, toPoint(rose, azimuthDeg, 23.5));
      expect(back.azimuthDeg).toBeCloseTo(azimuthDeg, 9);
      expect(back.elevationDeg).toBeCloseTo(23.5, 9);
    }
  });
});

describe('a mask between its points', () => {
  const mask = [
    { azimuthDeg: 350, elevationDeg: 10 },
    { azimuthDeg: 10, elevationDeg: 20 },
    { azimuthDeg: 100, elevationDeg: 2 },
  ];

  it('is straight, also across north', () => {
    expect(maskElevationAt(mask, 55)).toBeCloseTo(11, 9);
    expect(maskElevationAt(mask, 0)).toBeCloseTo(15, 9);
    expect(maskElevationAt(mask, 355)).toBeCloseTo(12.5, 9);
  });

  it('is exact on a point, flat with one point and nought with none', () => {
    expect(maskElevationAt(mask, 10)).toBe(20);
    expect(maskElevationAt([{ azimuthDeg: 40, elevationDeg: 7 }], 200)).toBe(7);
    expect(maskElevationAt([], 200)).toBe(0);
  });
});
