import { expect, it } from 'vitest';
import { howManyFit } from './how-many-fit.js';

it('keeps every item where there is room for all, to the pixel', () => {
  expect(howManyFit([100, 100, 100], 4, 308)).toBe(3);
  expect(howManyFit([100, 100, 100], 4, 307)).toBe(1);
});

it('keeps room for the button with the rest, and none in front of it when the line is narrow', () => {
  expect(howManyFit([100, 100, 100, 100], 4, 350)).toBe(2);
  expect(howManyFit([100, 100], 4, 60)).toBe(0);
  expect(howManyFit([], 4, 60)).toBe(0);
});
