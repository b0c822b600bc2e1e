import { lookAngles, sgp4Source, siteFrame } from '@skyberth/orbit';
import { describe, expect, it } from 'vitest';
import { SAMPLE_NOW_MS, sampleElements, sampleFlying } from '../testing/samples.js';
import { TrackTables } from './track-table.js';

/** A pixel of the board is worth far more. */
const TOLERANCE_DEG = 0.001;

describe('TrackTables', () => {
  it.each([
    ['a low orbit', {}],
    ['an eccentric orbit', { meanMotionRevPerDay: 2.006, eccentricity: 0.7, inclinationDeg: 63.4 }],
  ])('reads %s as the propagator has it', (_name, change) => {
    const [span] = sampleFlying(change).spans;
    if (span === undefined) throw new Error('There are no elements.');
    const frame = siteFrame({ latitudeDeg: 69.3, longitudeDeg: 16.1, altitudeM: 40 });
    const source = sgp4Source(sampleElements(change));
    const tables = new TrackTables();
    const read = { azimuthDeg: 0, elevationDeg: 0 };
    for (let i = 0; i < 500; i += 1) {
      const timeMs = SAMPLE_NOW_MS + i * 347_911;
      const exact = lookAngles(source, frame, timeMs);
      tables.look(span, frame, timeMs, read);
      expect(Math.abs(read.elevationDeg - exact.elevationDeg)).toBeLessThan(TOLERANCE_DEG);
      const apart = Math.abs(read.azimuthDeg - exact.azimuthDeg) * Math.cos((exact.elevationDeg * Math.PI) / 180);
      expect(Math.min(apart, Math.abs(360 - apart))).toBeLessThan(TOLERANCE_DEG);
    }
  });
});
