import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { MaskPoint } from '../types.js';
import { compileMask, maskElevationDeg, validateMask } from './mask.js';
import { parseMaskCsv } from './mask-csv.js';

const point = fc.tuple(fc.integer({ min: 0, max: 360 }), fc.integer({ min: -5, max: 60 })) as fc.Arbitrary<MaskPoint>;
const points = fc.array(point, { minLength: 1, maxLength: 20 });
const azimuth = fc.double({ min: 0, max: 360, noNaN: true });

describe('a horizon mask', () => {
  it('is straight between corners and closed across north', () => {
    const mask = compileMask([
      [355, 20],
      [5, 20],
      [10, 8],
      [180, 5],
      [350, 8],
    ]);
    const heights = [355, 0, 360, 5, 7.5, 10, 95, 352.5].map((at) => maskElevationDeg(mask, at));
    const expected = [20, 20, 20, 20, 14, 8, 6.5, 14];
    heights.forEach((height, index) => {
      expect(height).toBeCloseTo(expected[index]!, 9);
    });
  });

  it('jumps at a cliff, wherever the list begins', () => {
    const cliff: MaskPoint[] = [
      [90, 5],
      [90, 30],
      [120, 30],
      [120, 5],
    ];
    for (let start = 0; start < cliff.length; start += 1) {
      const mask = compileMask([...cliff.slice(start), ...cliff.slice(0, start)]);
      expect([89.999, 90, 119.999, 120, 300].map((at) => Math.round(maskElevationDeg(mask, at)))).toEqual([
        5, 30, 30, 5, 5,
      ]);
    }
  });

  it('takes 0 and 360 for one azimuth', () => {
    const mask = compileMask([
      [0, 5],
      [180, 15],
      [360, 5],
    ]);
    expect(maskElevationDeg(mask, 0)).toBe(5);
    expect(maskElevationDeg(mask, 270)).toBeCloseTo(10, 9);
  });

  it('stays between its lowest and highest corner', () => {
    fc.assert(
      fc.property(points, azimuth, (corners, at) => {
        const mask = compileMask(corners);
        const height = maskElevationDeg(mask, at);
        expect(height).toBeGreaterThanOrEqual(Math.min(...corners.map(([, elevationDeg]) => elevationDeg)) - 1e-9);
        expect(height).toBeLessThanOrEqual(Math.max(...corners.map(([, elevationDeg]) => elevationDeg)) + 1e-9);
      }),
    );
  });

  it('with a floor is the higher of the two everywhere', () => {
    fc.assert(
      fc.property(points, azimuth, fc.integer({ min: -5, max: 60 }), (corners, at, floorDeg) => {
        // At a cliff rounding may fall to either side.
        fc.pre(corners.every(([azimuthDeg]) => Math.abs((azimuthDeg % 360) - at) > 1e-6));
        const plain = maskElevationDeg(compileMask(corners), at);
        const floored = maskElevationDeg(compileMask(corners, floorDeg), at);
        expect(floored).toBeCloseTo(Math.max(plain, floorDeg), 6);
      }),
    );
  });

  it('says in sentences what is wrong with it', () => {
    expect(validateMask([])).toEqual(['A mask needs at least one point.']);
    expect(
      validateMask([
        [10, 5],
        [361, 95],
      ]),
    ).toEqual([
      'Mask point 2: the azimuth is 361; it must lie between 0 and 360 degrees.',
      'Mask point 2: the elevation is 95; it must lie between -10 and 90 degrees.',
    ]);
    expect(() => compileMask([[Number.NaN, 0]])).toThrowError(/azimuth is NaN/);
  });
});

describe('a mask as a table', () => {
  it.each([
    ['azimuth,elevation\n0,5\n90,12.5\n'],
    ['# survey\r\nAzimuth;Elevation\r\n0;5\r\n90;12,5\r\n'],
    ['0\t5\n90\t12.5'],
    ['\ufeff"0","5"\n\n"90","12.5"'],
  ])('reads %j', (text) => {
    expect(parseMaskCsv(text)).toEqual({
      points: [
        [0, 5],
        [90, 12.5],
      ],
      faults: [],
    });
  });

  it('names line, field and value of what it cannot read', () => {
    const { points: read, faults } = parseMaskCsv('az,el\n0,5\n400,5\n10\n20,high\n');
    expect(read).toEqual([[0, 5]]);
    expect(faults.map(({ message }) => message)).toEqual([
      'Line 3, azimuth: found "400", expected degrees from 0 to 360.',
      'Line 4, row: found "10", expected an azimuth and an elevation.',
      'Line 5, elevation: found "high", expected degrees from -10 to 90.',
    ]);
    expect(parseMaskCsv('').faults).toHaveLength(1);
  });
});
