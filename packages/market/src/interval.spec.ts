import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { type Interval, intersectIntervals, mergeIntervals, subtractIntervals, totalMs } from './interval.js';

const SPAN = 40;
const some = fc.array(
  fc
    .tuple(fc.integer({ min: 0, max: SPAN }), fc.integer({ min: 0, max: SPAN }))
    .map(([fromMs, toMs]): Interval => ({ fromMs, toMs })),
  { maxLength: 8 },
);

/** The independent way: which of the unit steps 0, 1, 2 ... are covered. */
const steps = (intervals: readonly Interval[]): boolean[] =>
  Array.from({ length: SPAN }, (_, step) => intervals.some((each) => each.fromMs <= step && step < each.toMs));

const isTidy = (intervals: readonly Interval[]): boolean =>
  intervals.every(
    (each, index) => each.toMs > each.fromMs && (index === 0 || each.fromMs > (intervals[index - 1] as Interval).toMs),
  );

describe('interval algebra', () => {
  it('joins stretches that touch and drops empty ones', () => {
    expect(
      mergeIntervals([
        { fromMs: 5, toMs: 9 },
        { fromMs: 1, toMs: 5 },
        { fromMs: 7, toMs: 7 },
      ]),
    ).toEqual([{ fromMs: 1, toMs: 9 }]);
  });

  it('agrees with counting step by step', () => {
    fc.assert(
      fc.property(some, some, (a, b) => {
        const inA = steps(a);
        const inB = steps(b);
        expect(steps(mergeIntervals(a))).toEqual(inA);
        expect(steps(intersectIntervals(a, b))).toEqual(inA.map((is, step) => is && inB[step]));
        expect(steps(subtractIntervals(a, b))).toEqual(inA.map((is, step) => is && !inB[step]));
        expect(totalMs(a)).toBe(inA.filter(Boolean).length);
      }),
    );
  });

  it('always answers sorted, disjoint and not touching', () => {
    fc.assert(
      fc.property(some, some, (a, b) => {
        for (const result of [mergeIntervals(a), intersectIntervals(a, b), subtractIntervals(a, b)])
          expect(isTidy(result)).toBe(true);
      }),
    );
  });
});
