import { describe, expect, it } from 'vitest';
import { MINUTE_MS, pass, T0 } from './board-fixture.js';
import { humpsBetween, indexHumps, sellableMinutesByDay } from './hump-index.js';
import type { BoardHump } from './tide-board-types.js';

const at = (min: number) => T0 + min * MINUTE_MS;

describe('finding passes in a stretch of time', () => {
  it('finds what looking at each one finds, for many views', () => {
    const humps: BoardHump[] = [];
    for (let index = 0; index < 300; index += 1) {
      const from = (index * 37) % 900;
      humps.push(pass(`p${index}`, 'a1', from, from + 2 + ((index * 13) % 17)));
    }
    const found = indexHumps(humps);
    for (let from = -20; from < 930; from += 7) {
      const view = { fromMs: at(from), toMs: at(from + 11) };
      const [first, end] = humpsBetween(found, 'a1', view);
      const touched = (found.byRow.get('a1') ?? [])
        .slice(first, end)
        .filter((hump) => hump.profile.toMs >= view.fromMs)
        .map((hump) => hump.id);
      const expected = humps.filter((hump) => hump.profile.fromMs < view.toMs && hump.profile.toMs >= view.fromMs);
      expect(touched.sort()).toEqual(expected.map((hump) => hump.id).sort());
    }
  });

  it('knows nothing of a row without passes', () => {
    expect(humpsBetween(indexHumps([]), 'a1', { fromMs: 0, toMs: 1 })).toEqual([0, 0]);
  });
});

describe('minutes for sale a day', () => {
  it('counts overlapping passes of a row once and splits at midnight', () => {
    const index = indexHumps([
      pass('1', 'a1', 0, 10),
      pass('2', 'a1', 5, 12),
      pass('3', 'a1', 20, 30, 'taken'),
      pass('4', 'a2', 0, 10),
      pass('5', 'a1', 10 * 60 - 4, 10 * 60 + 6),
    ]);
    const minutes = sellableMinutesByDay(index, ['a1', 'a2']);
    expect(minutes.get(Date.UTC(2026, 11, 1))).toBeCloseTo(12 + 10 + 4, 9);
    expect(minutes.get(Date.UTC(2026, 11, 2))).toBeCloseTo(6, 9);
  });
});
