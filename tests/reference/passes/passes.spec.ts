import { findPasses, type Pass, sgp4Source } from '@skyberth/orbit';
import { describe, expect, it } from 'vitest';
import { type ExpectedPass, elementSetOf, readExpected, readScenario } from './read-scenario.js';

/** The expected times are printed to the millisecond, so half of one is theirs. */
const AOS_LOS_TOLERANCE_MS = 1;
const ELEVATION_TOLERANCE_DEG = 0.0002;
const RANGE_TOLERANCE_KM = 0.05;
const RANGE_RATE_TOLERANCE_KM_PER_S = 0.0002;
/**
 * An azimuth says where something is across the sky: near the zenith a hair's breadth is many degrees of it. The expected
 * ones are printed to three decimals, so half of the last is theirs.
 */
const ACROSS_TOLERANCE_DEG = 0.0006;

const scenario = readScenario();
const expected = readExpected();
const [fromMs, toMs] = [Date.parse(scenario.from), Date.parse(scenario.to)];

function passesOf(satelliteId: string, stationId: string): Pass[] {
  const satellite = scenario.satellites.find(({ id }) => id === satelliteId)!;
  const station = scenario.stations.find(({ id }) => id === stationId)!;
  return findPasses({ source: sgp4Source(elementSetOf(satellite)), site: station, mask: station.mask, fromMs, toMs });
}

function comparePass(found: Pass, wanted: ExpectedPass): void {
  expect(Math.abs(found.aosMs - Date.parse(wanted.aosUtc))).toBeLessThan(AOS_LOS_TOLERANCE_MS);
  expect(Math.abs(found.losMs - Date.parse(wanted.losUtc))).toBeLessThan(AOS_LOS_TOLERANCE_MS);
  expect([found.clippedStart, found.clippedEnd]).toEqual([wanted.clippedStart, wanted.clippedEnd]);
  expect(Math.abs(found.maxElevationDeg - wanted.maxElevationDeg)).toBeLessThan(ELEVATION_TOLERANCE_DEG);
  for (const at of [0, 1, 2] as const) {
    expect(Math.abs(found.elevationDeg[at] - wanted.elevationDeg[at])).toBeLessThan(ELEVATION_TOLERANCE_DEG);
    expect(Math.abs(found.rangeKm[at] - wanted.rangeKm[at])).toBeLessThan(RANGE_TOLERANCE_KM);
    expect(Math.abs(found.rangeRateKmPerS[at] - wanted.rangeRateKmS[at])).toBeLessThan(RANGE_RATE_TOLERANCE_KM_PER_S);
    const turn = Math.abs(found.azimuthDeg[at] - wanted.azimuthDeg[at]);
    const across = Math.min(turn, 360 - turn) * Math.cos((wanted.elevationDeg[at] * Math.PI) / 180);
    expect(across).toBeLessThan(ACROSS_TOLERANCE_DEG);
  }
}

describe('the passes that Skyfield 1.45 with python-sgp4 2.15 finds', () => {
  const pairs = scenario.satellites.flatMap(({ id }) => scenario.stations.map((station) => [id, station.id] as const));

  it('are 826 in all', () => {
    expect(expected).toHaveLength(826);
    expect(pairs.reduce((sum, [satellite, station]) => sum + passesOf(satellite, station).length, 0)).toBe(826);
  });

  it.each(pairs)('of %s over %s are all there, none is extra, each to a millisecond', (satelliteId, stationId) => {
    const wanted = expected.filter((pass) => pass.satelliteId === satelliteId && pass.stationId === stationId);
    const found = passesOf(satelliteId, stationId);
    expect(found).toHaveLength(wanted.length);
    found.forEach((pass, index) => {
      comparePass(pass, wanted[index]!);
    });
  });
});
