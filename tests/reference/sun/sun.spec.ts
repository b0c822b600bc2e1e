import { describe, expect, it } from 'vitest';
import { parseElementSets } from '../../../packages/orbit/src/elements/parse-element-sets.js';
import { sgp4Source } from '../../../packages/orbit/src/elements/sgp4-source.js';
import { daylightIntervals } from '../../../packages/orbit/src/sun/daylight.js';
import { illumination, illuminationAt, lightIntervals } from '../../../packages/orbit/src/sun/illumination.js';
import { refractionDeg } from '../../../packages/orbit/src/sun/refraction.js';
import { sunDirection, sunPositionTemeKm } from '../../../packages/orbit/src/sun/sun-position.js';
import type { TrajectorySource } from '../../../packages/orbit/src/types.js';

/** The set of the Skyfield documentation's example pass. */
function stationSource(): TrajectorySource {
  const { sets } = parseElementSets(
    [
      '1 25544U 98067A   14020.93268519  .00009878  00000-0  18200-3 0  5082',
      '2 25544  51.6498 109.4756 0003572  55.9686 274.8005 15.49815350868473',
    ].join('\n'),
  );
  return sgp4Source(sets[0]!);
}

describe('the place of the Sun', () => {
  it('is that of the NREL example without refraction', () => {
    // NREL/TP-560-34302 (Reda and Andreas 2008): e0 = 39.872046 deg, azimuth 194.340241 deg; 2003-10-17 12:30:30 UTC-7.
    const site = { latitudeDeg: 39.742476, longitudeDeg: -105.1786, altitudeM: 1830.14 };
    const { azimuthDeg, elevationDeg } = sunDirection(site, Date.UTC(2003, 9, 17, 19, 30, 30));
    expect(Math.abs(elevationDeg - 39.872046)).toBeLessThan(0.003);
    expect(Math.abs(azimuthDeg - 194.340241)).toBeLessThan(0.003);
  });

  it('has the refraction of the NREL example', () => {
    // The same report, refraction step: 0.016332 deg at 820 hPa and 11 C.
    expect(Math.abs(refractionDeg(39.872046, { pressureHpa: 820, temperatureC: 11 }) - 0.016332)).toBeLessThan(5e-7);
  });

  it('is that of the low-precision formula on 2006-04-02', () => {
    // Vallado, Example 5-1: (0.9771945, 0.1924424, 0.0834308) AU, good to 0.01 deg.
    const [x = 0, y = 0, z = 0] = sunPositionTemeKm(Date.UTC(2006, 3, 2));
    const [ex, ey, ez] = [0.9771945, 0.1924424, 0.0834308];
    const cosine = (x * ex + y * ey + z * ez) / (Math.hypot(x, y, z) * Math.hypot(ex, ey, ez));
    expect((Math.acos(cosine) * 180) / Math.PI).toBeLessThan(0.01);
    expect(Math.hypot(x, y, z) / 149597870.7).toBeCloseTo(Math.hypot(ex, ey, ez), 4);
  });

  it('rises and sets on 1996-03-23 at 40 N as the almanac formula says', () => {
    // Vallado, Example 5-2: sunrise 5.97276 h, sunset 18.25491 h UT.
    const midnightMs = Date.UTC(1996, 2, 23);
    const site = { latitudeDeg: 40, longitudeDeg: 0, altitudeM: 0 };
    const day = daylightIntervals(site, midnightMs, midnightMs + 86_400_000).find(({ phase }) => phase === 'day')!;
    expect(Math.abs((day.fromMs - midnightMs) / 3_600_000 - 5.97276)).toBeLessThan(0.02);
    expect(Math.abs((day.toMs - midnightMs) / 3_600_000 - 18.25491)).toBeLessThan(0.02);
  });
});

describe('light and shadow', () => {
  // Vallado companion test_in_shadow; Curtis Example 12.8 via the same tests.
  it.each([
    [[-41260.1818, 8684.1578, 0], [148470363.193, -9449738.112, -4096753.81], 'umbra'],
    [[2817.899, -14110.473, -7502.672], [-11747041, 139486985, 60472278], 'umbra'],
  ])('of the vector case %j', (position, sun, state) => {
    expect(illumination(position, sun).state).toBe(state);
  });

  it('of a spacecraft on JD 2449763.5 over the sunny side', () => {
    // Vallado 2022, Example 5-6: lit.
    const sun = sunPositionTemeKm((2449763.5 - 2440587.5) * 86_400_000);
    expect(illumination([0, -4464.696, -5102.509], sun).state).toBe('sunlit');
  });

  it('follow the list of the Skyfield documentation', () => {
    // "Find when a satellite is in sunlight": 2014-01-20 00:00 to 01:40 every 20 minutes.
    const source = stationSource();
    const midnightMs = Date.UTC(2014, 0, 20);
    const lit = [0, 20, 40, 60, 80, 100].map(
      (minute) => illuminationAt(source, midnightMs + minute * 60_000).sunlitFraction > 0.5,
    );
    expect(lit).toEqual([true, true, false, false, true, true]);
    for (const second of [0, 60, 161]) {
      expect(illuminationAt(source, Date.UTC(2014, 0, 23, 6, 25, 37 + second)).state).toBe('umbra');
      expect(illuminationAt(source, Date.UTC(2014, 0, 23, 12, 54, 56 + second)).state).toBe('sunlit');
    }
  });

  it('cross half shadow at 00:38:06 and 01:14:04', () => {
    // satellite.js 7.1.0 shadowFraction on the same set, 3 s.
    const source = stationSource();
    const midnightMs = Date.UTC(2014, 0, 20);
    const penumbras = lightIntervals(source, midnightMs, midnightMs + 5_400_000).filter(
      ({ state }) => state === 'penumbra',
    );
    const middles = penumbras.map(({ fromMs, toMs }) => (fromMs + toMs) / 2 - midnightMs);
    expect(middles).toHaveLength(2);
    expect(Math.abs(middles[0]! - 2_286_000)).toBeLessThan(3000);
    expect(Math.abs(middles[1]! - 4_444_000)).toBeLessThan(3000);
  });

  it('last about 69.4 minutes at the most in a geostationary orbit', () => {
    // Common practice: 69.4 min behind a cylinder; the Sun's 0.533 deg take 2.13 min, so 67.3 of umbra and 71.5 in all.
    const dayMs = 86_164_090.5;
    const noonMs = Date.UTC(2026, 2, 20, 14, 46);
    const source: TrajectorySource = {
      startMs: Number.NEGATIVE_INFINITY,
      stopMs: Number.POSITIVE_INFINITY,
      stateTeme(timeMs, out) {
        const angle = (2 * Math.PI * (timeMs - noonMs)) / dayMs;
        out.set([42164.17 * Math.cos(angle), 42164.17 * Math.sin(angle), 0, 0, 0, 0]);
      },
    };
    const dark = lightIntervals(source, noonMs, noonMs + dayMs).filter(({ state }) => state !== 'sunlit');
    const minutes = dark.reduce((sum, { fromMs, toMs }) => sum + toMs - fromMs, 0) / 60_000;
    expect(Math.abs(minutes - 71.5)).toBeLessThan(2);
    const umbra = dark.find(({ state }) => state === 'umbra')!;
    expect(Math.abs((umbra.toMs - umbra.fromMs) / 60_000 - 67.3)).toBeLessThan(1);
  });
});
