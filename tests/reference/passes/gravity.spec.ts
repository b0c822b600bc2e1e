import { readFileSync } from 'node:fs';
import { findPasses, parseElementSets, sgp4Source } from '@skyberth/orbit';
import { describe, expect, it } from 'vitest';
import { elementSetOf, readScenario } from './read-scenario.js';

/** GM in km3/s2 and radius in km: WGS84 (IERS 2010), and WGS72 as SGP4 has it. Source: Orekit Constants, python-sgp4. */
const GM_WGS84 = 398_600.4418;
const GM_WGS72 = 398_600.8;
const RADIUS_KM = 6378.137;
const DAY_S = 86_400;

const axisOf = (revPerDay: number) => Math.cbrt(GM_WGS72 * (DAY_S / (2 * Math.PI * revPerDay)) ** 2);

describe("gravity's own checks", () => {
  it('has g = GM/R2 of 9.79829 m/s2, and the Earth weigh 5.97217e24 kg (CODATA 2018)', () => {
    expect((GM_WGS84 / RADIUS_KM ** 2) * 1000).toBeCloseTo(9.79829, 5);
    expect((GM_WGS84 * 1e9) / 6.6743e-11 / 1e24).toBeCloseTo(5.97217, 4);
  });

  it('puts the geostationary orbit at 42164.170 km', () => {
    const axis = Math.cbrt(GM_WGS84 * (86_164.0905 / (2 * Math.PI)) ** 2);
    expect(Math.abs(axis - 42_164.17)).toBeLessThan(0.05);
  });

  const verification = readFileSync(new URL('../data/aiaa-2006-6753/SGP4-VER.TLE', import.meta.url), 'utf8')
    .split('\n')
    .map((line) => (line.startsWith('2 ') ? line.slice(0, 69) : line))
    .join('\n');
  const published = parseElementSets(verification, { ignoreChecksums: true }).sets;
  const sets = [...readScenario().satellites.map(elementSetOf), ...published];

  it('reads every set of the verification file but the repeated one', () => {
    expect(published).toHaveLength(32);
  });

  it.each(sets.map((set, index) => [set.catalogNumber, index] as const))(
    'follows Kepler: the energy of %i (set %i) belongs to its mean motion',
    (number, index) => {
      // 33333 to 33335 are made to break the theory.
      const set = sets[index]!;
      const source = sgp4Source(set);
      const state = new Float64Array(6);
      if (number === 33334) {
        expect(() => source.stateTeme(set.epochMs, state)).toThrow();
        return;
      }
      source.stateTeme(set.epochMs, state);
      const [x = 0, y = 0, z = 0, vx = 0, vy = 0, vz = 0] = state;
      const axis = 1 / (2 / Math.hypot(x, y, z) - (vx * vx + vy * vy + vz * vz) / GM_WGS72);
      // The oblate Earth moves the osculating axis by up to (3/2) J2 (R/p)2 a (1-e)^-1 around the mean one.
      const mean = axisOf(set.meanMotionRevPerDay);
      const shape = 1 - set.eccentricity ** 2;
      const allowed = (3 * 0.00108263 * (RADIUS_KM / mean) ** 2) / shape ** 3 + 1e-3;
      expect(Math.abs(axis / mean - 1)).toBeLessThan(allowed);
    },
  );

  it('keeps passes within the bound of the sphere table: 500 km, above 5 degrees, 9.21 min and a few per cent', () => {
    const set = { ...sets[0]!, meanMotionRevPerDay: 15.2195, eccentricity: 0.0001, bstarPerEarthRadius: 0 };
    const { tle: _, ...elements } = set;
    const passes = findPasses({
      source: sgp4Source(elements),
      site: { latitudeDeg: 60, longitudeDeg: 0, altitudeM: 0 },
      mask: [[0, 5]],
      fromMs: set.epochMs,
      toMs: set.epochMs + 10 * DAY_S * 1000,
    });
    const longestMin = Math.max(...passes.map(({ aosMs, losMs }) => losMs - aosMs)) / 60_000;
    expect(longestMin).toBeGreaterThan(9.21 * 0.95);
    expect(longestMin).toBeLessThan(9.21 * 1.05);
  });
});
