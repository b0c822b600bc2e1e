import { describe, expect, it } from 'vitest';
import { pointsOf } from './mask-draft.js';
import { minutesBySector, type SoldTrack, touchOf } from './sold-contacts.js';

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
  it('is untouched where the mask stays below the sold part', () => {
    expect(touchOf(sold, flat(5), flat(5))).toBeNull();
    expect(touchOf(sold, flat(0), flat(4))).toBeNull();
  });

  it('says how much falls away at each end, straight between the instants', () => {
    // 6 degrees a minute: 11 degrees is reached 110 s after the start, 60 s after AOS.
    expect(touchOf(sold, flat(5), flat(11))).toEqual({
      startsLaterMs: 60_000,
      endsSoonerMs: 60_000,
      cutOutMs: 0,
      isLost: false,
    });
  });

  it('sees a mast that cuts a piece out of the middle', () => {
    const mast = pointsOf([
      [0, 5],
      [90, 5],
      [90, 25],
      [100, 25],
      [100, 5],
    ]);
    // East of it the climb is clear from 25 degrees on; what was above 5 before that is lost at the beginning.
    const touch = touchOf(sold, flat(5), mast);
    expect(touch?.startsLaterMs).toBe(200_000);
    const low = touchOf(
      { ...sold, track: sold.track.map((p, i) => ({ ...p, azimuthDeg: i === 5 ? 270 : p.azimuthDeg })) },
      flat(5),
      pointsOf([
        [0, 5],
        [260, 5],
        [265, 40],
        [275, 40],
        [280, 5],
      ]),
    );
    expect(low?.startsLaterMs).toBe(0);
    expect(low?.cutOutMs).toBeGreaterThan(30_000);
  });

  it('is lost where nothing stays above it', () => {
    expect(touchOf(sold, flat(5), flat(31))?.isLost).toBe(true);
  });

  it('puts the minutes into the ten degrees in which they are flown', () => {
    const bars = minutesBySector([sold], flat(5), flat(20));
    expect(bars).toHaveLength(36);
    const total = bars.reduce((sum, bar) => sum + bar.minutesBefore, 0);
    expect(bars[9]?.minutesBefore).toBeCloseTo(5, 6);
    expect(bars[9]?.minutesNow).toBeCloseTo(3, 6);
    expect(total).toBeCloseTo(8, 6);
  });
});
