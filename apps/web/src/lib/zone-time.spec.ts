import { describe, expect, it } from 'vitest';
import { instantOf, readWallText, wallText, wallTimeOf, weekStart } from './zone-time.js';

const OSLO = 'Europe/Oslo';
// Clock changes of 2026 in the European Union: 29 March and 25 October, 01:00 UTC (Directive 2000/84/EC).

describe('clocks of a place', () => {
  it('reads an hour ahead in winter and two in summer', () => {
    expect(wallText(wallTimeOf(Date.UTC(2026, 11, 1, 14, 5, 9), OSLO))).toBe('2026-12-01 15:05:09');
    expect(wallText(wallTimeOf(Date.UTC(2026, 6, 1, 23, 30), OSLO))).toBe('2026-07-02 01:30:00');
  });

  it('finds the instant again', () => {
    for (const atMs of [Date.UTC(2026, 2, 29, 0, 30), Date.UTC(2026, 2, 29, 1, 30), Date.UTC(2026, 9, 25, 3, 0)]) {
      expect(instantOf(wallTimeOf(atMs, OSLO), OSLO)).toBe(atMs);
    }
  });

  it('takes the first of the hour that comes twice', () => {
    expect(instantOf(Date.UTC(2026, 9, 25, 2, 30), OSLO)).toBe(Date.UTC(2026, 9, 25, 0, 30));
  });

  it('lets a skipped time be the one after the jump', () => {
    expect(wallText(wallTimeOf(instantOf(Date.UTC(2026, 2, 29, 2, 30), OSLO), OSLO))).toBe('2026-03-29 03:30:00');
  });

  it('reads what it writes', () => {
    expect(readWallText('2026-12-01 15:05:09')).toBe(Date.UTC(2026, 11, 1, 15, 5, 9));
    expect(readWallText('2026-12-01')).toBe(Date.UTC(2026, 11, 1));
    expect(readWallText('soon')).toBeNaN();
  });

  it('begins a week on Monday', () => {
    expect(wallText(weekStart(Date.UTC(2026, 11, 1, 15)))).toBe('2026-11-30 00:00:00');
    expect(wallText(weekStart(Date.UTC(2026, 10, 30)))).toBe('2026-11-30 00:00:00');
    expect(wallText(weekStart(Date.UTC(2026, 11, 6, 23, 59)))).toBe('2026-11-30 00:00:00');
  });
});
