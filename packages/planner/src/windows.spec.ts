import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { maximalCliques } from './cliques.js';
import { gapWindows, longestGap } from './windows.js';

const PERIOD = { fromMs: 0, toMs: 100 };
const stretches = fc
  .array(fc.tuple(fc.integer({ min: 0, max: 90 }), fc.integer({ min: 1, max: 10 })), { maxLength: 8 })
  .map((pairs) => pairs.map(([fromMs, lengthMs]) => ({ fromMs, toMs: fromMs + lengthMs })));

const overlap = (a: { fromMs: number; toMs: number }, b: { fromMs: number; toMs: number }): boolean =>
  a.fromMs < b.toMs && b.fromMs < a.toMs;

describe('windows of the longest gap', () => {
  it('hold one stretch each exactly where the gap is short enough, for every set without overlaps', () => {
    fc.assert(
      fc.property(stretches, fc.integer({ min: 5, max: 60 }), (all, longestMs) => {
        const windows = gapWindows(all, PERIOD, longestMs);
        for (let set = 0; set < 2 ** all.length; set += 1) {
          const chosen = all.flatMap((_, index) => ((set >> index) & 1 ? [index] : []));
          const some = chosen.flatMap((index) => all[index] ?? []);
          if (some.some((a, i) => some.some((b, j) => i < j && overlap(a, b)))) continue;
          const each = windows.every(({ needed }) => needed.some((index) => chosen.includes(index)));
          expect(each).toBe(longestGap(some, PERIOD).lengthMs <= longestMs);
        }
      }),
      { seed: 335, numRuns: 200 },
    );
  });
});

describe('maximal cliques', () => {
  it('say of every set what all pairs say', () => {
    fc.assert(
      fc.property(stretches, (all) => {
        const cliques = maximalCliques(all, 1);
        for (const [i, a] of all.entries())
          for (const [j, b] of all.entries())
            if (i < j) expect(cliques.some((each) => each.includes(i) && each.includes(j))).toBe(overlap(a, b));
      }),
      { seed: 335, numRuns: 300 },
    );
  });
});
