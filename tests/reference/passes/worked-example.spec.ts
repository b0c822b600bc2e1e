import { ecefToGeodetic, findPasses, lookAngles, parseElementSets, sgp4Source, temeToEcef } from '@skyberth/orbit';
import { describe, expect, it } from 'vitest';

/** Source: Skyfield documentation, "Earth Satellites"; rows marked as computed are Skyfield 1.45 on the same elements. */
const TLE = [
  '1 25544U 98067A   14020.93268519  .00009878  00000-0  18200-3 0  5082',
  '2 25544  51.6498 109.4756 0003572  55.9686 274.8005 15.49815350868473',
].join('\n');
const SITE = { latitudeDeg: 40.8939, longitudeDeg: -83.8917, altitudeM: 0 };

const source = sgp4Source(parseElementSets(TLE).sets[0]!);
const at = (clock: string) => Date.parse(`2014-01-23T${clock}Z`);
const passesAbove = (elevationDeg: number) =>
  findPasses({
    source,
    site: SITE,
    mask: [[0, elevationDeg]],
    fromMs: at('00:00:00'),
    toMs: at('00:00:00') + 86_400_000,
  });
const secondsFrom = (timeMs: number, clock: string) => Math.abs(timeMs - at(clock)) / 1000;

describe("Skyfield's worked example", () => {
  it('has two passes above 30 degrees, to the printed second', () => {
    const printed = [
      ['06:25:37', '06:26:58', '06:28:19'],
      ['12:54:56', '12:56:27', '12:57:58'],
    ] as const;
    const passes = passesAbove(30);
    expect(passes).toHaveLength(2);
    passes.forEach(({ aosMs, tcaMs, losMs }, index) => {
      const [rise, top, set] = printed[index]!;
      expect(secondsFrom(aosMs, rise)).toBeLessThan(1);
      expect(secondsFrom(tcaMs, top)).toBeLessThan(1);
      expect(secondsFrom(losMs, set)).toBeLessThan(1);
    });
  });

  it('has six above 10 degrees (computed)', () => {
    const computed = [
      ['06:23:42.1', '06:30:14.4', 54.36],
      ['08:01:05.2', '08:06:43.4', 24.41],
      ['09:39:51.3', '09:43:15.0', 13.16],
      ['11:16:47.5', '11:21:48.0', 19.16],
      ['12:53:05.3', '12:59:47.5', 85.75],
      ['14:31:58.9', '14:33:26.7', 10.54],
    ] as const;
    const passes = passesAbove(10);
    expect(passes).toHaveLength(6);
    passes.forEach((pass, index) => {
      const [rise, set, topDeg] = computed[index]!;
      expect(secondsFrom(pass.aosMs, rise)).toBeLessThan(0.15);
      expect(secondsFrom(pass.losMs, set)).toBeLessThan(0.15);
      expect(Math.abs(pass.maxElevationDeg - topDeg)).toBeLessThan(0.01);
    });
  });

  it('has a seventh above the plain horizon (computed)', () => {
    const passes = passesAbove(0);
    expect(passes).toHaveLength(7);
    const [first] = passes;
    expect(secondsFrom(first!.aosMs, '04:47:30.8')).toBeLessThan(0.15);
    expect(secondsFrom(first!.losMs, '04:54:19.4')).toBeLessThan(0.15);
    expect(Math.abs(first!.maxElevationDeg - 5.06)).toBeLessThan(0.01);
  });

  it('stands at 11:18:07 where the documentation prints it', () => {
    const look = lookAngles(source, SITE, at('11:18:07'));
    expect(Math.abs(look.elevationDeg - (16 + 16 / 60 + 32.6 / 3600))).toBeLessThan(0.01);
    expect(Math.abs(look.azimuthDeg - (350 + 15 / 60 + 20.4 / 3600))).toBeLessThan(0.01);
    expect(Math.abs(look.rangeKm - 1168.664)).toBeLessThan(0.05);
    const state = new Float64Array(6);
    source.stateTeme(at('11:18:07'), state);
    // Computed with python-sgp4.
    [-3920.140965, -1899.772784, 5203.726129].forEach((value, axis) => {
      expect(Math.abs(state[axis]! - value)).toBeLessThan(1e-4);
    });
    temeToEcef(at('11:18:07'), state);
    const place = ecefToGeodetic([state[0]!, state[1]!, state[2]!]);
    expect(Math.abs(place.latitudeDeg - (50 + 14 / 60 + 37.4 / 3600))).toBeLessThan(0.002);
    expect(Math.abs(place.longitudeDeg + (86 + 23 / 60 + 23.3 / 3600))).toBeLessThan(0.002);
    expect(Math.abs(place.altitudeM - 420_874)).toBeLessThan(50);
  });

  it('moves as the documentation prints it, "Find a satellite\'s range rate"', () => {
    const printed = [
      ['11:17:00', 1434.2, -4.74],
      ['11:18:00', 1190.5, -3.24],
      ['11:19:00', 1064.3, -0.84],
      ['11:20:00', 1097.3, 1.9],
      ['11:21:00', 1277.4, 3.95],
      ['11:22:00', 1553.6, 5.14],
    ] as const;
    for (const [clock, rangeKm, rateKmPerS] of printed) {
      const look = lookAngles(source, SITE, at(clock));
      expect(Math.abs(look.rangeKm - rangeKm)).toBeLessThan(0.1);
      expect(Math.abs(look.rangeRateKmPerS - rateKmPerS)).toBeLessThan(0.01);
    }
  });
});
