import { describe, expect, it } from 'vitest';
import { freshNeed, needOf, valuesOf } from './need-values.js';

const NOW_MS = Date.UTC(2026, 11, 1, 23, 59);

describe('the need of a plan', () => {
  it('begins tomorrow, as UTC counts days', () => {
    expect(freshNeed(NOW_MS, ['a']).firstDay).toBe('2026-12-02');
  });

  it('comes back from the wire as it was typed', () => {
    const fresh = freshNeed(NOW_MS, ['a', 'b']);
    const typed = { ...fresh, budgetMinor: 120_000, craft: fresh.craft.map((each) => ({ ...each, gbPerDay: 1.5 })) };
    expect(valuesOf(needOf(typed))).toEqual(typed);
    expect(needOf(typed).craft[0]?.bytesPerDay).toBe(1_500_000_000);
  });
});
