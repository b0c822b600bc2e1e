import { describe, expect, it } from 'vitest';
import { lookAngles } from '../frames/look-angles.js';
import type { TrajectorySource } from '../types.js';
import { lookAnglesWithLightTime } from './light-time.js';

/** A spacecraft that flies past a station at the pole, 10,000 km up, at 7.5 km/s. */
const source: TrajectorySource = {
  startMs: Number.NEGATIVE_INFINITY,
  stopMs: Number.POSITIVE_INFINITY,
  stateTeme: (timeMs, out) => out.set([(7.5 * timeMs) / 1000, 0, 16_000, 7.5, 0, 0]),
};
const pole = { latitudeDeg: 90, longitudeDeg: 0, altitudeM: 0 };
const AT_MS = 600_000;

describe('light time', () => {
  const geometric = lookAngles(source, pole, AT_MS);
  const heard = lookAnglesWithLightTime(source, pole, AT_MS, 'receive');
  const sent = lookAnglesWithLightTime(source, pole, AT_MS, 'transmit');

  it('puts the spacecraft where the light that arrives now left it', () => {
    const leftMs = AT_MS - (heard.rangeKm / 299_792.458) * 1000;
    // The pole stands still, so the range at that instant is the same distance.
    expect(heard.rangeKm).toBeCloseTo(lookAngles(source, pole, leftMs).rangeKm, 7);
    expect(heard.timeMs).toBe(AT_MS);
  });

  it('aims an uplink ahead by as much', () => {
    expect(sent.rangeKm).toBeGreaterThan(geometric.rangeKm);
    expect(sent.rangeKm - geometric.rangeKm).toBeCloseTo(geometric.rangeKm - heard.rangeKm, 4);
  });
});
