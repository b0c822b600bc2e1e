import { describe, expect, it } from 'vitest';
import type { TrajectorySource } from '../types.js';
import { type LookFunction, withLightTime } from './light-time.js';

/** A spacecraft that flies straight away from the axis at 7.5 km/s, 10,000 km up, over a station that does not turn. */
const source: TrajectorySource = {
  startMs: Number.NEGATIVE_INFINITY,
  stopMs: Number.POSITIVE_INFINITY,
  stateTeme: (timeMs, out) => out.set([(7.5 * timeMs) / 1000, 0, 10_000, 7.5, 0, 0]),
};
const look: LookFunction = (from, _site, timeMs) => {
  const [x, y, z, vx] = state(from, timeMs);
  const rangeKm = Math.hypot(x!, y!, z!);
  return { timeMs, azimuthDeg: 90, elevationDeg: 90, rangeKm, rangeRateKmPerS: (x! * vx!) / rangeKm };
};
function state(from: TrajectorySource, timeMs: number): Float64Array {
  const out = new Float64Array(6);
  from.stateTeme(timeMs, out);
  return out;
}
const site = { latitudeDeg: 0, longitudeDeg: 0, altitudeM: 0 };

describe('light time', () => {
  it('puts the spacecraft where the light that arrives now left it', () => {
    const heard = withLightTime(look, 'receive')(source, site, 600_000);
    const sentMs = 600_000 - (heard.rangeKm / 299_792.458) * 1000;
    expect(heard.rangeKm).toBeCloseTo(Math.hypot(7.5 * (sentMs / 1000), 10_000), 7);
    expect(heard.timeMs).toBe(600_000);
  });

  it('aims an uplink ahead by as much', () => {
    const geometric = look(source, site, 600_000);
    const heard = withLightTime(look, 'receive')(source, site, 600_000);
    const sent = withLightTime(look, 'transmit')(source, site, 600_000);
    expect(sent.rangeKm - geometric.rangeKm).toBeCloseTo(geometric.rangeKm - heard.rangeKm, 4);
    expect(sent.rangeKm).toBeGreaterThan(geometric.rangeKm);
  });
});
