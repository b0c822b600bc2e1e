import { describe, expect, it } from 'vitest';
import type { ElementSet } from '../elements/element-set.js';
import { parseElementSets } from '../elements/parse-element-sets.js';
import { sgp4Source } from '../elements/sgp4-source.js';
import { lookAngles } from '../frames/look-angles.js';
import { OrbitError } from '../orbit-error.js';
import type { MaskPoint, TrajectorySource } from '../types.js';
import { findPasses, passAt, searchPassesColumns } from './search-passes.js';

const HOUR_MS = 3_600_000;
const DAY_MS = 24 * HOUR_MS;

/** An invented low polar orbit; its lines are left out so that single values can be changed. */
const LINES = [
  '1 81001U 26900A   26334.25000000  .00000000  00000-0  40000-4 0  9990',
  '2 81001  97.4800  12.0000 0012000  80.0000  10.0000 15.15323725  1000',
];
const { tle: _lines, ...BASE } = parseElementSets(LINES.join('\n')).sets[0] as ElementSet;
const EPOCH_MS = BASE.epochMs;
const period = { fromMs: EPOCH_MS + HOUR_MS, toMs: EPOCH_MS + HOUR_MS + DAY_MS };

describe('odd places and orbits', () => {
  const flat: MaskPoint[] = [[0, 5]];

  it('sees a geostationary spacecraft all the time, or never', () => {
    const source = sgp4Source({ ...BASE, meanMotionRevPerDay: 1.0027379, eccentricity: 0.0002, inclinationDeg: 0.05 });
    const look = lookAngles(source, { latitudeDeg: 0, longitudeDeg: 0, altitudeM: 0 }, EPOCH_MS);
    const under = [-180, -90, 0, 90].map((longitudeDeg) => ({ latitudeDeg: 10, longitudeDeg, altitudeM: 0 }));
    const counts = under.map((place) => findPasses({ source, site: place, mask: flat, ...period }));
    expect(look.rangeKm).toBeGreaterThan(35_000);
    for (const passes of counts) {
      if (passes.length === 0) continue;
      expect(passes).toMatchObject([
        { aosMs: period.fromMs, losMs: period.toMs, clippedStart: true, clippedEnd: true },
      ]);
    }
    expect(counts.filter(({ length }) => length === 1).length).toBeGreaterThanOrEqual(1);
    expect(counts.filter(({ length }) => length === 0).length).toBeGreaterThanOrEqual(1);
  });

  it('agrees on both sides of the antimeridian and over the pole', () => {
    const source = sgp4Source(BASE);
    const at = (latitudeDeg: number, longitudeDeg: number) =>
      findPasses({ source, site: { latitudeDeg, longitudeDeg, altitudeM: 0 }, mask: flat, ...period });
    const [east, west] = [at(10, 180), at(10, -180)];
    expect(east.length).toBeGreaterThan(1);
    expect(west).toHaveLength(east.length);
    east.forEach(({ aosMs, losMs, maxElevationDeg }, index) => {
      expect(Math.abs(aosMs - west[index]!.aosMs) + Math.abs(losMs - west[index]!.losMs)).toBeLessThan(0.01);
      expect(maxElevationDeg).toBeCloseTo(west[index]!.maxElevationDeg, 4);
    });
    expect(at(90, 0).length).toBe(at(90, 77).length);
    expect(at(90, 0).length).toBeGreaterThan(13);
  });

  it('finds the same before the epoch as after it', () => {
    const source = sgp4Source({ ...BASE, bstarPerEarthRadius: 0 });
    const question = { source, site: { latitudeDeg: 78, longitudeDeg: 15, altitudeM: 0 }, mask: flat };
    const before = findPasses({ ...question, fromMs: EPOCH_MS - 3 * DAY_MS, toMs: EPOCH_MS - 2 * DAY_MS });
    expect(before.length).toBeGreaterThan(12);
  });

  it('sees nothing over a wall', () => {
    expect(
      findPasses({
        source: sgp4Source(BASE),
        site: { latitudeDeg: 78, longitudeDeg: 15, altitudeM: 0 },
        mask: [[0, 90]],
        ...period,
      }),
    ).toEqual([]);
  });

  it('follows a spacecraft to its decay and says when it was', () => {
    const doomed = sgp4Source({ ...BASE, meanMotionRevPerDay: 16.35, bstarPerEarthRadius: 0.01, eccentricity: 0.0005 });
    const question = { source: doomed, site: { latitudeDeg: 70, longitudeDeg: 15, altitudeM: 0 }, mask: flat };
    const { faults } = searchPassesColumns({
      satellites: [doomed],
      sites: [question],
      fromMs: EPOCH_MS,
      toMs: EPOCH_MS + 30 * DAY_MS,
    });
    expect(faults).toHaveLength(1);
    const endMs = faults[0]!.error.data['timeMs'] as number;
    const passes = findPasses({ ...question, fromMs: EPOCH_MS, toMs: EPOCH_MS + 30 * DAY_MS });
    expect(passes.length).toBeGreaterThan(0);
    for (const { losMs } of passes) expect(losMs).toBeLessThanOrEqual(endMs);
    expect(() =>
      findPasses({ ...question, fromMs: EPOCH_MS + 40 * DAY_MS, toMs: EPOCH_MS + 41 * DAY_MS }),
    ).toThrowError(OrbitError);
  });

  it('throws for a period that is none, a place that is none and a mask that is none', () => {
    const question = { source: sgp4Source(BASE), site: { latitudeDeg: 0, longitudeDeg: 0, altitudeM: 0 }, mask: flat };
    expect(() => findPasses({ ...question, fromMs: 1, toMs: 1 })).toThrowError(/must end after it begins/);
    expect(() =>
      findPasses({ ...question, ...period, site: { latitudeDeg: 91, longitudeDeg: 0, altitudeM: 0 } }),
    ).toThrowError(/latitude is 91/);
    expect(() => findPasses({ ...question, ...period, mask: [] })).toThrowError(/at least one point/);
  });

  it('searches each span of a source by itself', () => {
    const inner = sgp4Source(BASE);
    const spans = [
      { startMs: period.fromMs, stopMs: period.fromMs + 6 * HOUR_MS },
      { startMs: period.fromMs + 9 * HOUR_MS, stopMs: period.toMs },
    ];
    const gappy: TrajectorySource = {
      startMs: period.fromMs,
      stopMs: period.toMs,
      spans,
      stateTeme(timeMs, out) {
        if (!spans.some(({ startMs, stopMs }) => timeMs >= startMs && timeMs <= stopMs))
          throw new OrbitError('outside ephemeris', 'No.');
        inner.stateTeme(timeMs, out);
      },
    };
    const question = { site: { latitudeDeg: 78, longitudeDeg: 15, altitudeM: 0 }, mask: flat };
    const whole = findPasses({ ...question, source: inner, ...period });
    const pieces = spans.flatMap(({ startMs, stopMs }) =>
      findPasses({ ...question, source: inner, fromMs: startMs, toMs: stopMs }),
    );
    const found = findPasses({ ...question, source: gappy, ...period });
    expect(found.length).toBe(pieces.length);
    expect(found.length).toBeLessThan(whole.length);
    found.forEach(({ aosMs, losMs }, index) => {
      expect(Math.abs(aosMs - pieces[index]!.aosMs) + Math.abs(losMs - pieces[index]!.losMs)).toBeLessThan(0.5);
    });
  });
});

describe('columns', () => {
  it('hold the same passes as the single search, whatever the list is divided into', () => {
    const sets = [BASE, { ...BASE, raanDeg: 140 }, { ...BASE, inclinationDeg: 51, meanAnomalyDeg: 200 }];
    const sites = [78, 0, -35].map((latitudeDeg) => ({
      site: { latitudeDeg, longitudeDeg: 15, altitudeM: 0 },
      mask: [[0, 5]] as MaskPoint[],
    }));
    const search = { sites, ...period };
    const all = searchPassesColumns({ ...search, satellites: sets.map(sgp4Source) });
    const rows = all.blocks.flatMap((block) =>
      Array.from({ length: block.count }, (_, row) => [block.satellite[row], block.site[row], passAt(block, row)]),
    );
    const single = sets.flatMap((set, satellite) =>
      sites.flatMap((one, place) =>
        findPasses({ source: sgp4Source(set), ...one, ...period }).map((pass) => [satellite, place, pass]),
      ),
    );
    expect(rows).toEqual(single);
    expect(all).toMatchObject({ count: rows.length, complete: true, faults: [] });
  });

  it('stop where they are told to', () => {
    const search = {
      sites: [{ site: { latitudeDeg: 78, longitudeDeg: 15, altitudeM: 0 }, mask: [[0, 5]] as MaskPoint[] }],
      ...period,
    };
    const satellites = [BASE, BASE, BASE].map(sgp4Source);
    const result = searchPassesColumns({ ...search, satellites, goOn: (done) => done < 1 });
    expect(result.complete).toBe(false);
    expect(new Set(result.blocks.flatMap(({ satellite, count }) => [...satellite.slice(0, count)]))).toEqual(
      new Set([0]),
    );
  });
});
