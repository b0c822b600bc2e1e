import { describe, expect, it } from 'vitest';
import { foundPass, searchResult } from './find-time-fixture.js';
import { centralAngleDeg, passRows, reachDeg, rowsByDay, sortRows } from './pass-rows.js';

const { geometry } = foundPass();
const cheap = foundPass({ key: 'cheap', parts: [{ ...geometry, totalMinor: 100 }] });
const refused = foundPass({ key: 'refused', state: 'not for sale', parts: [] });
const tomorrow = foundPass({
  key: 'tomorrow',
  geometry: { ...geometry, aosUtc: '2026-12-02T00:00:00.000Z', losUtc: '2026-12-02T00:12:00.000Z' },
});
const rows = passRows(searchResult([refused, tomorrow, foundPass(), cheap]));

describe('rows of the table', () => {
  it('names place and spacecraft and measures the length', () => {
    expect(rows[2]).toMatchObject({ antennaName: 'Hollenvik 1', spacecraftName: 'Whimbrel 4', lengthMs: 570_000 });
  });

  it('sorts by price with the unpriced last, by length with the longest first', () => {
    expect(sortRows(rows, 'price').map((row) => row.key)).toEqual(['cheap', 'w4-h1-15', 'tomorrow', 'refused']);
    expect(sortRows(rows, 'length')[0]?.key).toBe('tomorrow');
  });

  it('puts a pass at midnight on the day that begins', () => {
    expect(rowsByDay(rows).map((day) => day.rows.length)).toEqual([3, 1]);
  });
});

describe('reach of a station', () => {
  it('is a right triangle straight up and on the horizon', () => {
    expect(centralAngleDeg(90, 560)).toBeCloseTo(0, 9);
    // On the horizon the tangent to the sphere gives cos(angle) = R / (R + h).
    const heightKm = 560;
    const rangeKm = Math.sqrt((6378.137 + heightKm) ** 2 - 6378.137 ** 2);
    expect(centralAngleDeg(0, rangeKm)).toBeCloseTo((Math.acos(6378.137 / (6378.137 + heightKm)) * 180) / Math.PI, 9);
  });

  it('is unknown without a pass', () => {
    expect(reachDeg([], ['h1'])).toBeNull();
    expect(reachDeg([foundPass()], ['h1'])).toBeGreaterThan(15);
  });
});
