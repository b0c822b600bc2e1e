import { describe, expect, it } from 'vitest';
import { WeightedCache } from './weighted-cache.js';

describe('WeightedCache', () => {
  it('forgets what was used longest ago when it grows too heavy', () => {
    const cache = new WeightedCache<number>(10);
    cache.set('a', 1, 4);
    cache.set('b', 2, 4);
    expect(cache.get('a')).toBe(1);
    cache.set('c', 3, 4);
    expect(cache.get('b')).toBeUndefined();
    expect(cache.get('a')).toBe(1);
    expect(cache.get('c')).toBe(3);
    expect(cache.weight).toBe(8);
  });

  it('counts a replaced value once and does not keep one heavier than itself', () => {
    const cache = new WeightedCache<number>(10);
    cache.set('a', 1, 6);
    cache.set('a', 2, 7);
    expect([cache.get('a'), cache.weight, cache.size]).toEqual([2, 7, 1]);
    cache.set('a', 3, 11);
    expect([cache.get('a'), cache.weight, cache.size]).toEqual([undefined, 0, 0]);
  });
});
