import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { axisAngles, axisMoveS, type Mount, slewTimeS } from './mount.js';

const azEl: Mount = { kind: 'az-el', first: { rateDegPerS: 5 }, second: { rateDegPerS: 2 } };
const xy: Mount = {
  kind: 'x-y',
  first: { rateDegPerS: 3, minDeg: -88, maxDeg: 88 },
  second: { rateDegPerS: 3, minDeg: -88, maxDeg: 88 },
};

describe('axes', () => {
  it('of an X-Y mount read zero at the zenith, X to the east and Y to the north', () => {
    const at = (azimuthDeg: number, elevationDeg: number) =>
      axisAngles(xy, { azimuthDeg, elevationDeg }).map((angle) => Number(angle.toFixed(9)) + 0);
    expect(at(123, 90)).toEqual([0, 0]);
    expect(at(90, 30)).toEqual([60, 0]);
    expect(at(0, 30)).toEqual([0, 60]);
    expect(at(270, 0)[0]).toBe(-90);
  });

  it('of a tilted mount see its own axis as the zenith', () => {
    const tilted: Mount = { ...azEl, kind: 'tilted az-el', tiltDeg: 20, tiltAzimuthDeg: 130 };
    expect(axisAngles(tilted, { azimuthDeg: 130, elevationDeg: 70 })[1]).toBeCloseTo(90, 6);
    expect(axisAngles(tilted, { azimuthDeg: 310, elevationDeg: 0 })[1]).toBeCloseTo(-20, 9);
  });

  it('of a mount tilted by nothing are those of one that stands upright', () => {
    const upright: Mount = { ...azEl, kind: 'tilted az-el', tiltDeg: 0, tiltAzimuthDeg: 77 };
    fc.assert(
      fc.property(
        fc.double({ min: 0, max: 359.9, noNaN: true }),
        fc.double({ min: 0, max: 89, noNaN: true }),
        (a, e) => {
          const [first, second] = axisAngles(upright, { azimuthDeg: a, elevationDeg: e });
          expect(Math.abs(((first - a + 540) % 360) - 180)).toBeLessThan(1e-9);
          expect(second).toBeCloseTo(e, 9);
        },
      ),
    );
  });
});

describe('turning', () => {
  it('takes the shorter way round and the slower axis counts', () => {
    expect(slewTimeS(azEl, { azimuthDeg: 350, elevationDeg: 10 }, { azimuthDeg: 20, elevationDeg: 12 })).toBe(6);
    expect(slewTimeS(azEl, { azimuthDeg: 350, elevationDeg: 10 }, { azimuthDeg: 20, elevationDeg: 80 })).toBe(35);
  });

  it('goes the long way where a stop is between', () => {
    const stopped: Mount = { ...azEl, first: { rateDegPerS: 5, minDeg: 0, maxDeg: 360 } };
    expect(slewTimeS(stopped, { azimuthDeg: 350, elevationDeg: 10 }, { azimuthDeg: 20, elevationDeg: 10 })).toBe(66);
    const overlapping: Mount = { ...azEl, first: { rateDegPerS: 5, minDeg: -90, maxDeg: 450 } };
    expect(slewTimeS(overlapping, { azimuthDeg: 350, elevationDeg: 10 }, { azimuthDeg: 20, elevationDeg: 10 })).toBe(6);
  });

  it('needs time to speed up and slow down', () => {
    const axis = { rateDegPerS: 4, accelerationDegPerS2: 2 };
    expect(axisMoveS(axis, 40)).toBe(12);
    expect(axisMoveS(axis, 2)).toBe(2);
    expect(axisMoveS(axis, 8)).toBeCloseTo(4, 12);
  });

  it('never ends for a direction out of travel', () => {
    expect(slewTimeS(xy, { azimuthDeg: 0, elevationDeg: 0 }, { azimuthDeg: 90, elevationDeg: 40 })).toBe(
      Number.POSITIVE_INFINITY,
    );
  });
});
