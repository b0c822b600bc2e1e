import { describe, expect, it } from 'vitest';
import { takenIntervals } from './taken.js';
import type { BusyInput } from './workers/job-types.js';

const period = { fromMs: 0, toMs: 1_000 };
const busy = (beam: number, fromMs: number, toMs: number, mine = false): BusyInput => ({
  beam,
  guardFromMs: fromMs,
  guardToMs: toMs,
  aosMs: fromMs,
  losMs: toMs,
  startAzimuthDeg: null,
  endAzimuthDeg: null,
  own: mine ? { bookingId: 'b', spacecraftId: 's', state: 'confirmed' } : null,
});

describe('takenIntervals', () => {
  it("shows other people's contacts merged and cut to the period, and not the caller's own", () => {
    const contacts = [busy(1, -100, 50), busy(1, 50, 80), busy(1, 200, 300, true), busy(1, 900, 1_200)];
    expect(takenIntervals(1, contacts, period)).toEqual([
      { fromMs: 0, toMs: 80 },
      { fromMs: 900, toMs: 1_000 },
    ]);
  });

  it('shows an antenna of two beams as taken only while neither is free', () => {
    const contacts = [busy(1, 100, 300), busy(2, 200, 400), busy(1, 500, 600)];
    expect(takenIntervals(2, contacts, period)).toEqual([{ fromMs: 200, toMs: 300 }]);
  });

  it("shows nothing while only the caller's own contacts fill both beams", () => {
    expect(takenIntervals(2, [busy(1, 100, 300, true), busy(2, 200, 400, true)], period)).toEqual([]);
  });
});
