import { FoundPass } from '@skyberth/shared';
import { describe, expect, it } from 'vitest';
import { z } from 'zod';
import { jsonText, SAMPLE_NOW_MS, sampleAntenna, sampleFlying, sampleSearch } from '../testing/samples.js';
import type { SearchJob } from '../workers/job-types.js';
import { PassDesk } from './pass-desk.js';
import { askToStop, daysDone, newPulseMemory } from './pulse.js';

const DAY_MS = 86_400_000;
const HOUR_MS = 3_600_000;

function found(desk: PassDesk, job: SearchJob): FoundPass[] {
  const outcome = desk.carryOut(job);
  if (outcome.kind !== 'found') throw new Error(`The search ended with “${outcome.kind}”.`);
  return z.array(FoundPass).parse(JSON.parse(jsonText(outcome.json)));
}

describe('a search at the desk', () => {
  it('keeps to the contract and counts what it sends', () => {
    const outcome = new PassDesk().carryOut(sampleSearch());
    if (outcome.kind !== 'found') throw new Error(outcome.kind);
    const passes = found(new PassDesk(), sampleSearch());
    expect(passes.length).toBeGreaterThan(10);
    expect(outcome.passes).toBe(passes.length);
    expect(outcome.forSale).toBe(passes.filter((pass) => pass.parts.length > 0).length);
    expect(passes.map((pass) => pass.geometry.aosUtc)).toEqual(passes.map((pass) => pass.geometry.aosUtc).sort());
  });

  it('gives the same passes whatever is remembered from before', () => {
    const warm = new PassDesk();
    warm.carryOut(sampleSearch({ fromMs: SAMPLE_NOW_MS - 2 * DAY_MS, toMs: SAMPLE_NOW_MS + DAY_MS }));
    warm.carryOut(sampleSearch({ fromMs: SAMPLE_NOW_MS + HOUR_MS, toMs: SAMPLE_NOW_MS + 5 * DAY_MS }));
    expect(found(warm, sampleSearch())).toEqual(found(new PassDesk(), sampleSearch()));
  });

  it('forgets nothing of an antenna but its old versions', () => {
    const desk = new PassDesk();
    const before = found(desk, sampleSearch());
    const lower = sampleAntenna({ version: 2, lowestReceiveDeg: 20, mask: [[0, 20]] });
    const after = found(desk, sampleSearch({ antennas: [lower] }));
    expect(after.length).toBeLessThan(before.length);
    for (const pass of after) expect(pass.geometry.elevationDeg[0]).toBeGreaterThan(19.9);
  });

  it('joins a pass that midnight cuts, and shows one whole that begins before the period', () => {
    // Not Sun-synchronous, so that its passes wander through the hours of the day.
    const drifting = sampleFlying({ inclinationDeg: 70 });
    const passes = found(new PassDesk(), sampleSearch({ spacecraft: [drifting], toMs: SAMPLE_NOW_MS + 20 * DAY_MS }));
    const over = passes.filter(({ geometry }) => geometry.aosUtc.slice(0, 10) !== geometry.losUtc.slice(0, 10));
    expect(over.length).toBeGreaterThan(0);
    for (const { geometry } of over) expect([geometry.clippedStart, geometry.clippedEnd]).toEqual([false, false]);
    const [first] = passes;
    if (first === undefined) throw new Error('There is no pass.');
    const middle = (Date.parse(first.geometry.aosUtc) + Date.parse(first.geometry.losUtc)) / 2;
    const [again] = found(
      new PassDesk(),
      sampleSearch({ spacecraft: [drifting], fromMs: middle, toMs: middle + DAY_MS }),
    );
    expect(again?.geometry).toEqual(first.geometry);
  });

  it('cuts a stay without end to the period', () => {
    // A place under the satellite: geostationary, with the node where Greenwich stands at the epoch.
    const still = { meanMotionRevPerDay: 1.0027, eccentricity: 0.0001, inclinationDeg: 0.01 };
    const everywhere = [-150, -90, -30, 30, 90, 150].map((longitudeDeg, index) =>
      sampleAntenna({
        id: `01939f7e-0000-7000-8000-0000000000f${index}`,
        site: { latitudeDeg: 0, longitudeDeg, altitudeM: 0 },
      }),
    );
    const passes = found(new PassDesk(), sampleSearch({ spacecraft: [sampleFlying(still)], antennas: everywhere }));
    expect(passes.length).toBeGreaterThanOrEqual(2);
    for (const { geometry, parts, profile } of passes) {
      expect(geometry).toMatchObject({ clippedStart: true, clippedEnd: true });
      expect([Date.parse(geometry.aosUtc), Date.parse(geometry.losUtc)]).toEqual([
        SAMPLE_NOW_MS,
        SAMPLE_NOW_MS + 3 * DAY_MS,
      ]);
      expect(profile.elevationDeg).toHaveLength(29);
      // Parts are sold, of at most the antenna's longest contact.
      for (const part of parts) expect(Date.parse(part.losUtc) - Date.parse(part.aosUtc)).toBe(1_200_000);
    }
  });

  it('stops beyond the most passes', () => {
    expect(new PassDesk().carryOut(sampleSearch({ maxPasses: 5 }))).toEqual({ kind: 'too many' });
  });

  it('stops when nobody waits any more', () => {
    const pulse = newPulseMemory();
    askToStop(pulse);
    expect(new PassDesk().carryOut(sampleSearch({ pulse }))).toEqual({ kind: 'cancelled' });
  });

  it('says when all of it is done', () => {
    const pulse = newPulseMemory();
    const spacecraft = [
      sampleFlying(),
      sampleFlying({ inclinationDeg: 70 }, { id: '01939f7e-0000-7000-8000-0000000000d2' }),
    ];
    const desk = new PassDesk();
    const first = desk.carryOut(sampleSearch({ spacecraft, pulse }));
    // Midday to midday three days later is four days of the calendar.
    expect(daysDone(pulse)).toBe(2 * 4);
    const again = desk.carryOut(sampleSearch({ spacecraft, pulse }));
    expect(daysDone(pulse)).toBe(4 * 4);
    expect(again).toEqual(first);
  });

  it('works out anew what a later moment, another wish or a new contact changes', () => {
    const desk = new PassDesk();
    found(desk, sampleSearch());
    const changes: Partial<SearchJob>[] = [
      { nowMs: SAMPLE_NOW_MS + 6 * HOUR_MS },
      { wish: { ...sampleSearch().wish, lowestElevationDeg: 40 } },
      { toMs: SAMPLE_NOW_MS + 2 * DAY_MS },
      {
        antennas: [
          sampleAntenna({ blackouts: [{ fromMs: SAMPLE_NOW_MS, toMs: SAMPLE_NOW_MS + DAY_MS, reason: 'oil' }] }),
        ],
      },
      {},
    ];
    for (const change of changes) {
      expect(found(desk, sampleSearch(change))).toEqual(found(new PassDesk(), sampleSearch(change)));
    }
  });

  it('uses for each pass the element set in force at its highest point', () => {
    const [span] = sampleFlying().spans;
    const [later] = sampleFlying({ meanAnomalyDeg: 20 }).spans;
    if (span === undefined || later === undefined) throw new Error('There are no elements.');
    const changeMs = SAMPLE_NOW_MS + DAY_MS;
    const spans = [
      { ...span, toMs: changeMs },
      { ...later, fromMs: changeMs, elementSetId: '01939f7e-0000-7000-8000-0000000000e2' },
    ];
    const keys = (some: FoundPass[]) => some.map((pass) => pass.geometry.tcaUtc);
    const one = keys(found(new PassDesk(), sampleSearch()));
    const two = keys(found(new PassDesk(), sampleSearch({ spacecraft: [sampleFlying({ meanAnomalyDeg: 20 })] })));
    const changeUtc = new Date(changeMs).toISOString();
    const both = keys(found(new PassDesk(), sampleSearch({ spacecraft: [sampleFlying({}, { spans })] })));
    expect(both).toEqual([...one.filter((tca) => tca < changeUtc), ...two.filter((tca) => tca >= changeUtc)]);
  });
});
