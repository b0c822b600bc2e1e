import { describe, expect, it } from 'vitest';
import { joinDays, type Stay } from './stay.js';

const stay = (
  aosMs: number,
  losMs: number,
  maxElevationDeg: number,
  cut: { start?: boolean; end?: boolean } = {},
): Stay => ({
  elementSetId: 'e',
  shape: null,
  answer: null,
  joined: null,
  aosMs,
  tcaMs: (aosMs + losMs) / 2,
  losMs,
  clippedStart: cut.start ?? false,
  clippedEnd: cut.end ?? false,
  maxElevationDeg,
  azimuthDeg: [aosMs, maxElevationDeg, losMs],
  elevationDeg: [1, maxElevationDeg, 2],
  rangeKm: [3, 4, 5],
  rangeRateKmPerS: [-6, 0, 6],
});

describe('joinDays', () => {
  it('joins two pieces of one pass that midnight has cut, with the higher highest point', () => {
    const [joined, ...more] = joinDays([stay(100, 200, 20, { end: true }), stay(200, 260, 35, { start: true })]);
    expect(more).toEqual([]);
    expect(joined).toMatchObject({
      aosMs: 100,
      losMs: 260,
      tcaMs: 230,
      maxElevationDeg: 35,
      clippedStart: false,
      clippedEnd: false,
    });
    expect(joined?.azimuthDeg).toEqual([100, 35, 260]);
  });

  it('joins a stay over many days and keeps that it goes on', () => {
    const days = [0, 1, 2, 3].map((day) => stay(day * 100, (day + 1) * 100, 40, { start: true, end: true }));
    expect(joinDays(days)).toMatchObject([{ aosMs: 0, losMs: 400, clippedStart: true, clippedEnd: true }]);
  });

  it('leaves passes apart that only follow each other', () => {
    expect(joinDays([stay(0, 100, 10), stay(150, 200, 10)])).toHaveLength(2);
    expect(joinDays([stay(0, 100, 10, { end: true }), stay(150, 200, 10, { start: true })])).toHaveLength(2);
  });
});
