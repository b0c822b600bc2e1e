import { describe, expect, it } from 'vitest';
import { joinObjects } from './json-list.js';

const bytes = (text: string) => new TextEncoder().encode(text);

describe('joinObjects', () => {
  it('makes objects of heads and members, in any script', () => {
    const objects = [
      { head: '{"name":"Droëvlei – 1’s 衛星 🛰"', members: bytes('"a":1,"b":"é"') },
      { head: '{"name":"plain"', members: bytes('"a":2') },
    ];
    const text = new TextDecoder().decode(joinObjects(objects));
    expect(JSON.parse(`[${text}]`)).toEqual([
      { name: 'Droëvlei – 1’s 衛星 🛰', a: 1, b: 'é' },
      { name: 'plain', a: 2 },
    ]);
  });

  it('is empty for none', () => {
    expect(joinObjects([]).byteLength).toBe(0);
  });
});
