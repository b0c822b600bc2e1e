import { expect, it } from 'vitest';
import { minuteLabels, placeWords, scaleOf, yOf } from './evidence-scale.js';

const AOS = Date.UTC(2026, 10, 24, 14, 3, 40);
const LOS = AOS + 9 * 60_000;
const SCALE = scaleOf(AOS, LOS, 440);

it('runs down the page from before AOS to after LOS', () => {
  expect(yOf(SCALE, AOS)).toBeGreaterThan(0);
  expect(yOf(SCALE, LOS)).toBeLessThan(440);
  expect(yOf(SCALE, AOS)).toBeLessThan(yOf(SCALE, LOS));
});

it('labels whole minutes, as close as can be read', () => {
  const labels = minuteLabels(SCALE);
  expect(labels.every((at) => at % 60_000 === 0)).toBe(true);
  const [first = 0, second = 0] = labels;
  expect(yOf(SCALE, second) - yOf(SCALE, first)).toBeGreaterThanOrEqual(26);
});

it('keeps words apart and inside, in their order, however crowded', () => {
  const crowded = Array.from({ length: 12 }, (_none, index) => ({ atMs: LOS - index * 500 }));
  const placed = placeWords(crowded, SCALE, 30);
  placed.forEach(({ wordsY }, index) => {
    expect(wordsY).toBeLessThanOrEqual(440);
    const next = placed[index + 1];
    if (next) expect(next.wordsY - wordsY).toBeGreaterThanOrEqual(30);
  });
  expect(placed.map(({ item }) => item.atMs)).toEqual(crowded.map(({ atMs }) => atMs).toSorted((a, b) => a - b));
});
