import { readFileSync } from 'node:fs';
import { type ElementSet, type GeodeticSite, type MaskPoint, parseElementSets } from '@skyberth/orbit';

/** The scenario and what Skyfield 1.45 with python-sgp4 2.15 made of it; see data/passes/README.md. */
const folder = new URL('../data/passes/', import.meta.url);

type Three = readonly [aos: number, highest: number, los: number];

export interface ExpectedPass {
  readonly satelliteId: string;
  readonly stationId: string;
  readonly aosUtc: string;
  readonly tcaUtc: string;
  readonly losUtc: string;
  readonly clippedStart: boolean;
  readonly clippedEnd: boolean;
  readonly maxElevationDeg: number;
  readonly azimuthDeg: Three;
  readonly elevationDeg: Three;
  readonly rangeKm: Three;
  readonly rangeRateKmS: Three;
}

export interface Scenario {
  readonly from: string;
  readonly to: string;
  readonly satellites: readonly { readonly id: string; readonly name: string; readonly tle: readonly string[] }[];
  readonly stations: readonly (GeodeticSite & { readonly id: string; readonly mask: readonly MaskPoint[] })[];
}

export const scenarioPath = new URL('scenario.json', folder);

export function readScenario(): Scenario {
  return JSON.parse(readFileSync(scenarioPath, 'utf8'));
}

export function readExpected(): readonly ExpectedPass[] {
  const { passes } = JSON.parse(readFileSync(new URL('expected.json', folder), 'utf8'));
  return passes;
}

export function elementSetOf(satellite: Scenario['satellites'][number]): ElementSet {
  const { sets, faults } = parseElementSets(satellite.tle.join('\n'));
  const [set] = sets;
  if (set === undefined || faults.length > 0) throw new Error(`The elements of ${satellite.id} cannot be read.`);
  return set;
}
