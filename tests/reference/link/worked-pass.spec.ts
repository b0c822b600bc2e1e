import { describe, expect, it } from 'vitest';
import { parseElementSets } from '../../../packages/orbit/src/elements/parse-element-sets.js';
import { sgp4Source } from '../../../packages/orbit/src/elements/sgp4-source.js';
import { lookAngles } from '../../../packages/orbit/src/frames/look-angles.js';
import { dopplerCurve, dopplerHz } from '../../../packages/orbit/src/radio/doppler.js';
import { lookAnglesWithLightTime } from '../../../packages/orbit/src/radio/light-time.js';

/** The worked example of the Skyfield documentation. */
const { sets } = parseElementSets(
  [
    '1 25544U 98067A   14020.93268519  .00009878  00000-0  18200-3 0  5082',
    '2 25544  51.6498 109.4756 0003572  55.9686 274.8005 15.49815350868473',
  ].join('\n'),
);
const source = sgp4Source(sets[0]!);
const site = { latitudeDeg: 40.8939, longitudeDeg: -83.8917, altitudeM: 0 };
const minuteMs = (minute: number) => Date.UTC(2014, 0, 23, 11, minute);

describe('Doppler of the worked pass at 437.5 MHz', () => {
  // "Find a satellite's range rate": rates read there; shifts at 437.5 MHz computed with satellite.js, 15 Hz.
  it.each([
    [17, -4.74, 6920.4],
    [18, -3.24, 4724.0],
    [19, -0.84, 1219.3],
    [20, 1.9, -2766.6],
    [21, 3.95, -5760.9],
    [22, 5.14, -7500.8],
  ])('at 11:%i', (minute, rateKmPerS, shiftHz) => {
    const { rangeRateKmPerS } = lookAngles(source, site, minuteMs(minute));
    expect(Math.abs(rangeRateKmPerS - rateKmPerS)).toBeLessThan(0.01);
    expect(Math.abs(dopplerHz(437.5e6, rangeRateKmPerS) - shiftHz)).toBeLessThan(15);
  });

  it('has a rate that is the slope of the shift', () => {
    // By definition; the chord over two seconds around the instant stands for the slope.
    const track = Array.from({ length: 301 }, (_, second) => lookAngles(source, site, minuteMs(17) + second * 1000));
    const curve = dopplerCurve(track, 437.5e6);
    for (let i = 1; i < 300; i += 1) {
      const chord = (curve[i + 1]!.dopplerHz - curve[i - 1]!.dopplerHz) / 2;
      expect(Math.abs(curve[i]!.dopplerRateHzPerS - chord)).toBeLessThan(0.01);
    }
  });

  it('moves by less than a hertz when light time is allowed for', () => {
    for (let minute = 17; minute <= 22; minute += 1) {
      const plain = lookAngles(source, site, minuteMs(minute));
      const heard = lookAnglesWithLightTime(source, site, minuteMs(minute), 'receive');
      const changeHz = dopplerHz(437.5e6, heard.rangeRateKmPerS) - dopplerHz(437.5e6, plain.rangeRateKmPerS);
      expect(Math.abs(changeHz)).toBeLessThan(1);
      expect(Math.abs(changeHz)).toBeGreaterThan(0);
    }
  });
});
