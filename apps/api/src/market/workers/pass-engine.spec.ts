import { describe, expect, it } from 'vitest';
import { laneOf } from './pass-engine.js';

describe('laneOf', () => {
  it('always sends the same name to the same lane', () => {
    for (const name of ['a', 'b', '01939f7e-0000-7000-8000-000000000001'])
      expect(laneOf(name, 4)).toBe(laneOf(name, 4));
  });

  it('stays within the lanes and uses all of them', () => {
    const used = new Set(Array.from({ length: 200 }, (_, i) => laneOf(`spacecraft ${i}`, 3)));
    expect([...used].sort()).toEqual([0, 1, 2]);
    expect(laneOf('anything', 1)).toBe(0);
  });
});
