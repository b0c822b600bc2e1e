import { describe, expect, it } from 'vitest';
import { pointsOf } from './mask-draft.js';
import { minutesBySector, type SoldTrack } from './sold-contacts.js';

const START_MS = Date.UTC(2026, 11, 1, 14);
const utc = (ms: number) => new Date(START_MS + ms).toISOString();
/** Rises from 0 to 30 degrees in five minutes and sets in five, due east then due south. */
const sold: SoldTrack = {
  aosUtc: utc(50_000),
  losUtc: utc(550_000),
  track: Array.from({ length: 11 }, (_, index) => ({
    timeUtc: utc(index * 60_000),
    azimuthDeg: index <= 5 ? 95 : 185,
    elevationDeg: index <= 5 ? index * 6 : (10 - index) * 6,
    rangeKm: 1000,
    rangeRateKmPerS: 0,
    sunlit: 1,
  })),
};
const flat = (elevationDeg: number) => pointsOf([[0, elevationDeg]]);

describe('sold contacts under a new mask', () => {
  it('puts the minutes into the ten degrees in which they are flown', () => {
    const bars = minutesBySector([sold], flat(5), flat(20));
    expect(bars).toHaveLength(36);
    const total = bars.reduce((sum, bar) => sum + bar.minutesBefore, 0);
    expect(bars[9]?.minutesBefore).toBeCloseTo(5, 6);
    expect(bars[9]?.minutesNow).toBeCloseTo(3, 6);
    expect(total).toBeCloseTo(8, 6);
  });
});
