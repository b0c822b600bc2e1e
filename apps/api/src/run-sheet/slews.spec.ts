import type { PassGeometry } from '@skyberth/shared';
import { describe, expect, it } from 'vitest';
import { conflictsOf, slewBetween } from './slews.js';

const MINUTE_MS = 60_000;
const pass = (azimuthDeg: [number, number, number]) =>
  ({ azimuthDeg, elevationDeg: [5, 60, 5] }) as unknown as PassGeometry;
const antenna = { mount: 'az-el', tiltDeg: 0, slewAzimuthDegPerS: 3, slewElevationDegPerS: 3 } as const;
const before = { aosMs: 0, losMs: 10 * MINUTE_MS, pass: pass([10, 90, 180]) };
const booking = {
  id: 'b',
  antennaId: 'a',
  number: 4127,
  state: 'confirmed' as const,
  guardFromMs: 20 * MINUTE_MS,
  guardToMs: 32 * MINUTE_MS,
};
const quiet = { slew: null, closed: [], stop: null, nowMs: 0, antennaName: 'Tarnwick East' };

describe('a slew between two contacts', () => {
  it('takes the way by the rate of the mount, the short way round', () => {
    const next = { aosMs: 11 * MINUTE_MS, losMs: 20 * MINUTE_MS, pass: pass([357, 90, 180]) };
    const slew = slewBetween(antenna, { ...before, pass: pass([10, 90, 3]) }, next);
    expect(slew).toMatchObject({ needS: 2, givenS: 60, fits: true, fromAzimuthDeg: 3 });
  });
  it('does not fit where the dish has less time than it needs, by as little as it may be', () => {
    const next = (afterS: number) => ({
      aosMs: before.losMs + afterS * 1000,
      losMs: before.losMs + 600_000,
      pass: pass([0, 90, 180]),
    });
    expect(slewBetween(antenna, before, next(60)).fits).toBe(true);
    expect(slewBetween(antenna, before, next(59.999)).fits).toBe(false);
  });
});

describe('conflicts', () => {
  it('are none where nothing is in the way', () => {
    expect(conflictsOf(booking, quiet)).toEqual([]);
  });
  it('name a closure that reaches into the contact, and by how much', () => {
    const closed = { fromMs: 31 * MINUTE_MS, toMs: 90 * MINUTE_MS, reason: 'maintenance' };
    const [found, ...rest] = conflictsOf(booking, { ...quiet, closed: [closed] });
    expect(rest).toEqual([]);
    expect(found).toMatchObject({ kind: 'blackout' });
    expect(found?.sentence).toContain('60 s of it inside berth 4127');
    const touching = { ...closed, fromMs: booking.guardToMs };
    expect(conflictsOf(booking, { ...quiet, closed: [touching] })).toEqual([]);
  });
  it('name people at the dish only when the dish moves soon', () => {
    const stop = { people: ['Priya Nair'], reason: null };
    expect(conflictsOf(booking, { ...quiet, stop })).toMatchObject([{ kind: 'people' }]);
    expect(conflictsOf(booking, { ...quiet, stop, nowMs: -60 * MINUTE_MS })).toEqual([]);
    const [running] = conflictsOf({ ...booking, state: 'under way' }, { ...quiet, stop });
    expect(running?.sentence).toContain('the dish moves');
    const kept = { people: [], reason: 'ice' };
    expect(conflictsOf(booking, { ...quiet, stop: kept })).toMatchObject([{ kind: 'stop' }]);
  });
});
