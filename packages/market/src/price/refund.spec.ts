import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { HOUR_MS } from '../time/local-time.js';
import { refund } from './refund.js';

/** The ladder and the pass that the picture of the board shows. */
const ladder = [
  { hoursBeforeAos: 24, refundPercent: 100 },
  { hoursBeforeAos: 4, refundPercent: 60 },
  { hoursBeforeAos: 0.5, refundPercent: 25 },
];
const aosMs = Date.UTC(2026, 11, 1, 15, 0, 5);
const cancelAt = (cancelMs: number) => refund({ ladder, aosMs, cancelMs, paidMinor: 8188 });

describe('cancellation ladder', () => {
  it('gives the pictured steps: 25 % now, till 14:30:05, then nothing', () => {
    const now = cancelAt(Date.UTC(2026, 11, 1, 14, 5, 9));
    expect(now).toMatchObject({
      refundPercent: 25,
      amountMinor: 2047,
      keptMinor: 6141,
      nextStepMs: Date.UTC(2026, 11, 1, 14, 30, 5),
    });
    expect(
      now.steps.map((step) => [
        step.refundPercent,
        step.untilMs === null ? null : (aosMs - step.untilMs) / HOUR_MS,
        step.now,
      ]),
    ).toEqual([
      [100, 24, false],
      [60, 4, false],
      [25, 0.5, true],
      [0, null, false],
    ]);
  });

  it('keeps a step to its very instant', () => {
    expect(cancelAt(aosMs - 24 * HOUR_MS).refundPercent).toBe(100);
    expect(cancelAt(aosMs - 24 * HOUR_MS + 1).refundPercent).toBe(60);
  });

  it('brings nothing back after the last step, and says nothing more is lost', () => {
    expect(cancelAt(aosMs - 1000)).toMatchObject({ refundPercent: 0, amountMinor: 0, nextStepMs: null });
  });

  it('brings nothing back once the contact has begun, even on a ladder that ends at AOS', () => {
    const toTheEnd = [{ hoursBeforeAos: 0, refundPercent: 50 }];
    expect(refund({ ladder: toTheEnd, aosMs, cancelMs: aosMs - 1, paidMinor: 100 }).amountMinor).toBe(50);
    expect(refund({ ladder: toTheEnd, aosMs, cancelMs: aosMs, paidMinor: 100 }).amountMinor).toBe(0);
  });

  it('rounds half a cent to the operator', () => {
    expect(
      refund({ ladder: [{ hoursBeforeAos: 1, refundPercent: 50 }], aosMs, cancelMs: 0, paidMinor: 101 }),
    ).toMatchObject({ amountMinor: 51, keptMinor: 50 });
  });

  it('never brings back more for waiting, and splits what was paid without loss', () => {
    const times = fc.integer({ min: aosMs - 60 * HOUR_MS, max: aosMs + HOUR_MS });
    fc.assert(
      fc.property(times, times, fc.integer({ min: 0, max: 1_000_000_000 }), (a, b, paidMinor) => {
        const early = refund({ ladder, aosMs, cancelMs: Math.min(a, b), paidMinor });
        const late = refund({ ladder, aosMs, cancelMs: Math.max(a, b), paidMinor });
        expect(early.amountMinor).toBeGreaterThanOrEqual(late.amountMinor);
        expect(early.amountMinor + early.keptMinor).toBe(paidMinor);
        expect(early.steps.filter((step) => step.now)).toHaveLength(1);
      }),
    );
  });

  it('refuses a ladder that rises', () => {
    expect(() => refund({ ladder: [...ladder].reverse(), aosMs, cancelMs: 0, paidMinor: 1 })).toThrow(
      'Steps go from many hours to few',
    );
  });
});
