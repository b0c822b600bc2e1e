import { readFileSync } from 'node:fs';
import { parseElementSets } from '@skyberth/orbit';
import { describe, expect, it } from 'vitest';
import type { MarketInputs } from '../market/market-inputs.js';
import { sampleAntenna } from '../market/testing/samples.js';
import { InProcessEngine } from '../market/workers/in-process-engine.js';
import type { CraftInput } from '../market/workers/job-types.js';
import type { KeptElements } from '../spacecraft/elements.service.js';
import { carriedEnds, DriftGeometry, MOST_SHIFT_MS } from './drift-geometry.js';

const data = new URL('../../../../tests/reference/data/', import.meta.url);
type Table = readonly (readonly [aosUtc: string, losUtc: string])[];
interface Tables {
  readonly spacecraft: readonly {
    readonly id: string;
    readonly sold: readonly string[];
    readonly newer: readonly string[];
    readonly passes: Readonly<Record<string, { readonly sold: Table; readonly newer: Table }>>;
  }[];
}
interface Scenario {
  readonly stations: readonly {
    readonly id: string;
    readonly latitudeDeg: number;
    readonly longitudeDeg: number;
    readonly altitudeM: number;
    readonly mask: readonly (readonly [number, number])[];
  }[];
}
// Skyfield 1.45 with python-sgp4 2.15; see tests/reference/data/drift/README.md and data/passes/README.md.
const { spacecraft } = JSON.parse(readFileSync(new URL('drift/tables.json', data), 'utf8')) as Tables;
const { stations } = JSON.parse(readFileSync(new URL('passes/scenario.json', data), 'utf8')) as Scenario;

/** Both tables and our own times are whole milliseconds; the rest is room for other machines' rounding. */
const SHIFT_TOLERANCE_MS = 20;

const kept = (lines: readonly string[]): KeptElements => {
  const [elementSet] = parseElementSets(lines.join('\n')).sets;
  if (!elementSet) throw new Error('The elements cannot be read.');
  const { epochMs, epochUtc } = elementSet;
  return { id: lines.join(), spacecraftId: 'craft', digest: lines.join(), epochMs, epochUtc, elementSet };
};

/** A drift geometry over one station's horizon, with nothing else to bound the passes. */
function geometryAt(stationId: string): DriftGeometry {
  const station = stations.find(({ id }) => id === stationId);
  if (!station) throw new Error(`There is no station ${stationId}.`);
  const antenna = sampleAntenna({
    id: stationId,
    site: station,
    mask: station.mask,
    lowestReceiveDeg: -10,
    lowestTransmitDeg: -10,
  });
  const craft: CraftInput = {
    id: 'craft',
    name: 'Craft',
    shortName: 'C',
    spans: [],
    radios: [],
    clearances: [],
    contacts: [],
  };
  const inputs = { craft: () => [craft], antenna: () => antenna, forEngine: () => [antenna] };
  return new DriftGeometry(inputs as unknown as MarketInputs, new InProcessEngine());
}

const booked = (aosMs: number, losMs: number) => ({
  operatorId: 'operator',
  spacecraftId: 'craft',
  antennaId: 'antenna',
  need: 'downlink' as const,
  aosMs,
  losMs,
});
const ms = (pass: readonly [string, string]) => ({ aosMs: Date.parse(pass[0]), losMs: Date.parse(pass[1]) });

const pairs = spacecraft.flatMap((craft) =>
  Object.keys(craft.passes).map((stationId) => [craft.id, stationId] as const),
);
describe('what newer elements do to a booked pass', () => {
  it.each(pairs)('of %s over %s is the difference of the two reference tables', async (craftId, stationId) => {
    const craft = spacecraft.find(({ id }) => id === craftId);
    const tables = craft?.passes[stationId];
    if (!craft || !tables) throw new Error('The table is not there.');
    const geometry = geometryAt(stationId);
    const [sold, newer] = [kept(craft.sold), kept(craft.newer)];
    for (const before of tables.sold.map(ms)) {
      const shared = (after: { aosMs: number; losMs: number }) =>
        Math.min(after.losMs, before.losMs) - Math.max(after.aosMs, before.aosMs);
      // The pass it has become: the one that shares most time with it, or the nearest in reach.
      const after = tables.newer
        .map(ms)
        .filter((each) => shared(each) > -MOST_SHIFT_MS)
        .toSorted((a, b) => shared(b) - shared(a))[0];
      const carried = await geometry.carry(booked(before.aosMs, before.losMs), sold, newer);
      if (!after) {
        expect(carried).toBeNull();
        continue;
      }
      const shift = { aosMs: (carried?.aosMs ?? 0) - before.aosMs, losMs: (carried?.losMs ?? 0) - before.losMs };
      expect(Math.abs(shift.aosMs - (after.aosMs - before.aosMs))).toBeLessThanOrEqual(SHIFT_TOLERANCE_MS);
      expect(Math.abs(shift.losMs - (after.losMs - before.losMs))).toBeLessThanOrEqual(SHIFT_TOLERANCE_MS);
    }
  });

  it('has tables that differ by less than a second, and by more than ten', () => {
    const shifts = spacecraft.flatMap(({ passes }) =>
      Object.values(passes).flatMap(({ sold, newer }) =>
        sold.flatMap((pass, index) => {
          const other = newer[index];
          return other && sold.length === newer.length ? [Math.abs(ms(other).aosMs - ms(pass).aosMs)] : [];
        }),
      ),
    );
    expect(shifts.some((shiftMs) => shiftMs > 100 && shiftMs < 1_000)).toBe(true);
    expect(shifts.some((shiftMs) => shiftMs > 10_000)).toBe(true);
  });
});

describe('the booked stretch', () => {
  const before = { aosMs: 0, tcaMs: 300_000, losMs: 600_000 };
  const after = { aosMs: 20_000, tcaMs: 318_000, losMs: 616_000 };

  it('takes the ends of the pass where it was all of it', () => {
    expect(carriedEnds({ aosMs: 1, losMs: 600_000 }, before, after)).toEqual({ aosMs: 20_000, losMs: 616_000 });
  });
  it('moves with the highest point where it was a part, and is cut to the pass', () => {
    expect(carriedEnds({ aosMs: 100_000, losMs: 200_000 }, before, after)).toEqual({ aosMs: 118_000, losMs: 218_000 });
    const early = { aosMs: 200_000, tcaMs: 310_000, losMs: 400_000 };
    expect(carriedEnds({ aosMs: 100_000, losMs: 250_000 }, before, early)).toEqual({ aosMs: 200_000, losMs: 260_000 });
  });
  it('is lost where nothing of it is left', () => {
    expect(carriedEnds({ aosMs: 10_000, losMs: 50_000 }, before, { ...after, aosMs: 100_000 })).toBeNull();
  });
});
