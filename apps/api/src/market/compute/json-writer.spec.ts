import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { JsonWriter } from './json-writer.js';

const written = (work: (writer: JsonWriter) => void, capacity?: number): string => {
  const writer = new JsonWriter(capacity);
  work(writer);
  const { bytes, from, to } = writer.since(0);
  return bytes.toString('utf8', from, to);
};

describe('JsonWriter', () => {
  it('writes a rounded number without an exponent, and otherwise as JSON has it', () => {
    fc.assert(
      fc.property(
        fc.double({ min: -1e6, max: 1e6, noNaN: true }),
        fc.constantFrom(0, 1, 2, 3, 4, 6, 8),
        (value, decimals) => {
          const scale = 10 ** decimals;
          const rounded = Math.round(value * scale) / scale;
          const text = written((writer) => writer.fixed(value, decimals));
          expect(Number(text)).toBe(rounded + 0);
          const plain = JSON.stringify(rounded);
          if (!plain.includes('e')) expect(text).toBe(plain);
        },
      ),
    );
  });

  it.each([
    [0, 2, '0'],
    [-0.001, 2, '0'],
    [-0.5, 2, '-0.5'],
    [12.3, 2, '12.3'],
    [100, 2, '100'],
    [0.05, 2, '0.05'],
    [1e9, 3, '1000000000'],
  ] as const)('writes %s with %i decimals as %s', (value, decimals, text) => {
    expect(written((writer) => writer.fixed(value, decimals))).toBe(text);
  });

  it('refuses what is no number', () => {
    expect(() => written((writer) => writer.fixed(Number.NaN, 2))).toThrow('no place in JSON');
  });

  it('writes an instant as JSON has it', () => {
    fc.assert(
      fc.property(fc.integer({ min: Date.UTC(1957, 0, 1), max: Date.UTC(2200, 0, 1) }), (timeMs) => {
        expect(written((writer) => writer.utc(timeMs))).toBe(JSON.stringify(new Date(timeMs).toISOString()));
      }),
    );
  });

  it('grows, keeps what it wrote, and copies it in any script', () => {
    const value = { name: 'Droëvlei – 1’s 衛星 🛰', quote: '"' };
    const text = written((writer) => {
      writer.ascii('[');
      const from = writer.length;
      writer.json(value);
      const kept = writer.since(from);
      for (let i = 0; i < 50; i += 1) {
        writer.ascii(',');
        writer.copy(kept);
      }
      writer.ascii(']');
    }, 16);
    expect(JSON.parse(text)).toEqual(Array.from({ length: 51 }, () => value));
  });
});
