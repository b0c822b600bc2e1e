import { describe, expect, it } from 'vitest';
import { shortNameOf } from './naming.js';

describe('a short name', () => {
  it.each([
    ['Whimbrel 4', 'W4'],
    ['WHIMBREL-12', 'W12'],
    ['Gull', 'Gull'],
    ['Oystercatcher', 'Oyster'],
    ['Red Knot North 7', 'RKN7'],
    ['Object 25544', 'O25544'],
    ['Object 270001', 'O27000'],
  ])('of %s is %s', (name, short) => {
    expect(shortNameOf(name)).toBe(short);
  });
});
