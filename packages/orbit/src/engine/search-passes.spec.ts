import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { ElementSet } from '../elements/element-set.js';
import { sgp4Source } from '../elements/sgp4-source.js';
import { lookAngles } from '../frames/look-angles.js';
import type { GeodeticSite, MaskPoint, Pass } from '../types.js';
import { maskElevationDeg } from './mask.js';
import { findPasses } from './search-passes.js';

const EPOCH_MS = Date.UTC(2026, 11, 1);
const HOUR_MS = 3_600_000;
const DAY_MS = 24 * HOUR_MS;

const BASE: ElementSet = {
  format: 'omm-json',
  objectName: 'LANTERN',
  objectId: '2026-900A',
  catalogNumber: 82_001,
  epochUtc: '2026-12-01T00:00:00.000000Z',
  epochMs: EPOCH_MS,
  meanMotionRevPerDay: 15.1,
  eccentricity: 0.001,
  inclinationDeg: 97.5,
  raanDeg: 20,
  argPerigeeDeg: 80,
  meanAnomalyDeg: 10,
  bstarPerEarthRadius: 4e-5,
  meanMotionDot: 0,
  meanMotionDdot: 0,
  elementSetNumber: 1,
  revolutionAtEpoch: 1,
  classification: 'U',
  sourceLine: 1,
};

const angle = fc.double({ min: 0, max: 359.9, noNaN: true });
/** Low orbits, and long ellipses whose perigee stays above the air. */
const orbit: fc.Arbitrary<ElementSet> = fc
  .record({
    low: fc.boolean(),
    meanMotionRevPerDay: fc.double({ min: 13, max: 15.4, noNaN: true }),
    eccentricity: fc.double({ min: 0, max: 0.01, noNaN: true }),
    inclinationDeg: fc.double({ min: 0, max: 179, noNaN: true }),
    raanDeg: angle,
    argPerigeeDeg: angle,
    meanAnomalyDeg: angle,
  })
  .map(({ low, ...rest }) => ({ ...BASE, ...rest, ...(low ? {} : { meanMotionRevPerDay: 2.01, eccentricity: 0.7 }) }));

const site: fc.Arbitrary<GeodeticSite> = fc.record({
  latitudeDeg: fc.oneof(fc.double({ min: -90, max: 90, noNaN: true }), fc.constantFrom(-90, 90, 0)),
  longitudeDeg: fc.oneof(fc.double({ min: -180, max: 180, noNaN: true }), fc.constantFrom(-180, 180)),
  altitudeM: fc.double({ min: 0, max: 4000, noNaN: true }),
});

const mask: fc.Arbitrary<MaskPoint[]> = fc
  .array(fc.tuple(fc.integer({ min: 0, max: 359 }), fc.integer({ min: 0, max: 35 })), { minLength: 1, maxLength: 8 })
  .map((points) =>
    points.map(([azimuthDeg, elevationDeg]): MaskPoint => [azimuthDeg, elevationDeg]).sort((a, b) => a[0] - b[0]),
  );

const RUNS = { numRuns: 25 };
/** On a busy machine; nothing here depends on how long it takes. */
const PATIENCE_MS = 120_000;
const period = { fromMs: EPOCH_MS + HOUR_MS, toMs: EPOCH_MS + HOUR_MS + DAY_MS };
const visibleMs = (passes: readonly Pass[]) => passes.reduce((sum, { aosMs, losMs }) => sum + losMs - aosMs, 0);

describe('passes', () => {
  it(
    'begin and end on the mask, hold their order, and are highest at their highest',
    () => {
      fc.assert(
        fc.property(orbit, site, mask, (set, place, corners) => {
          const source = sgp4Source(set);
          let lastMs = period.fromMs;
          for (const pass of findPasses({ source, site: place, mask: corners, ...period })) {
            expect(pass.aosMs).toBeGreaterThanOrEqual(lastMs);
            expect(pass.tcaMs).toBeGreaterThanOrEqual(pass.aosMs - 1e-3);
            expect(pass.losMs).toBeGreaterThanOrEqual(pass.tcaMs - 1e-3);
            lastMs = pass.losMs;
            const over = (timeMs: number) => {
              const { elevationDeg, azimuthDeg } = lookAngles(source, place, timeMs);
              return elevationDeg - maskElevationDeg(corners, azimuthDeg);
            };
            // Two milliseconds outside it is closed, two inside it is open: true of slopes, cliffs and corners alike.
            if (!pass.clippedStart) expect(over(pass.aosMs - 2)).toBeLessThan(1e-5);
            if (!pass.clippedEnd) expect(over(pass.losMs + 2)).toBeLessThan(1e-5);
            if (pass.losMs - pass.aosMs > 10) {
              expect(over(pass.aosMs + 2)).toBeGreaterThan(-1e-5);
              expect(over(pass.losMs - 2)).toBeGreaterThan(-1e-5);
            }
            for (let part = 0; part <= 20; part += 1) {
              const timeMs = pass.aosMs + ((pass.losMs - pass.aosMs) * part) / 20;
              expect(lookAngles(source, place, timeMs).elevationDeg).toBeLessThan(pass.maxElevationDeg + 1e-4);
            }
          }
        }),
        RUNS,
      );
    },
    PATIENCE_MS,
  );

  it(
    'are missed by no look from minute to minute',
    () => {
      fc.assert(
        fc.property(orbit, site, mask, (set, place, corners) => {
          const source = sgp4Source(set);
          const passes = findPasses({ source, site: place, mask: corners, ...period });
          for (let timeMs = period.fromMs; timeMs < period.toMs; timeMs += 60_000) {
            const { elevationDeg, azimuthDeg } = lookAngles(source, place, timeMs);
            const over = elevationDeg - maskElevationDeg(corners, azimuthDeg);
            if (Math.abs(over) < 1e-4) continue;
            const inside = passes.some(({ aosMs, losMs }) => timeMs >= aosMs && timeMs <= losMs);
            expect(inside, `${new Date(timeMs).toISOString()}: ${over} degrees over`).toBe(over > 0);
          }
        }),
        RUNS,
      );
    },
    PATIENCE_MS,
  );

  it(
    'are the same when the period is split anywhere',
    () => {
      fc.assert(
        fc.property(
          orbit,
          site,
          mask,
          fc.double({ min: 0.01, max: 0.99, noNaN: true }),
          (set, place, corners, part) => {
            const question = { source: sgp4Source(set), site: place, mask: corners };
            const splitMs = period.fromMs + DAY_MS * part;
            const whole = findPasses({ ...question, ...period });
            const halves = [
              ...findPasses({ ...question, fromMs: period.fromMs, toMs: splitMs }),
              ...findPasses({ ...question, fromMs: splitMs, toMs: period.toMs }),
            ];
            expect(Math.abs(visibleMs(whole) - visibleMs(halves))).toBeLessThan(1);
            const cut = whole.filter(({ aosMs, losMs }) => aosMs < splitMs && losMs > splitMs).length;
            expect(halves).toHaveLength(whole.length + cut);
          },
        ),
        RUNS,
      );
    },
    PATIENCE_MS,
  );

  it(
    'never grow when the mask is raised',
    () => {
      fc.assert(
        fc.property(orbit, site, mask, fc.integer({ min: 1, max: 20 }), (set, place, corners, byDeg) => {
          const question = { source: sgp4Source(set), site: place, ...period };
          const raised = corners.map(([azimuthDeg, elevationDeg]): MaskPoint => [azimuthDeg, elevationDeg + byDeg]);
          const before = visibleMs(findPasses({ ...question, mask: corners }));
          expect(visibleMs(findPasses({ ...question, mask: raised }))).toBeLessThanOrEqual(before + 1e-3);
          expect(visibleMs(findPasses({ ...question, mask: corners, minElevationDeg: 20 }))).toBeLessThanOrEqual(
            before + 1e-3,
          );
        }),
        RUNS,
      );
    },
    PATIENCE_MS,
  );

  it(
    'move with the Earth when node and longitude turn together',
    () => {
      fc.assert(
        fc.property(orbit, site, fc.double({ min: -170, max: 170, noNaN: true }), (set, place, turnDeg) => {
          const flat = { mask: [[0, 10]] as MaskPoint[], ...period };
          // Only where no third body is at work: the Moon does not turn along.
          fc.pre(set.eccentricity < 0.1);
          const longitudeDeg = ((place.longitudeDeg + turnDeg + 540) % 360) - 180;
          const before = findPasses({ source: sgp4Source(set), site: place, ...flat });
          const after = findPasses({
            source: sgp4Source({ ...set, raanDeg: (set.raanDeg + turnDeg + 360) % 360 }),
            site: { ...place, longitudeDeg },
            ...flat,
          });
          expect(Math.abs(visibleMs(before) - visibleMs(after))).toBeLessThan(5);
        }),
        RUNS,
      );
    },
    PATIENCE_MS,
  );
});
