import { describe, expect, it } from 'vitest';
import { ephemerisState, faultyLine } from './ephemeris-words.js';

describe('words of an ephemeris', () => {
  it('finds the line that a fault names', () => {
    expect(faultyLine('Line 17, X: found "7.5x", expected a number.')).toBe(17);
    expect(faultyLine('The file has 300,000 states; at most 200,000 are kept.')).toBeNull();
  });

  it('tells where it stands in time, a withdrawal first', () => {
    const span = { startUtc: '2026-12-01T00:00:00.000Z', stopUtc: '2026-12-02T00:00:00.000Z', withdrawnUtc: null };
    const at = (hours: number) => Date.UTC(2026, 11, 1, hours);
    expect(ephemerisState(span, at(-1))).toBe('to come');
    expect(ephemerisState(span, at(12))).toBe('in use');
    expect(ephemerisState(span, at(25))).toBe('over');
    expect(ephemerisState({ ...span, withdrawnUtc: span.startUtc }, at(12))).toBe('withdrawn');
  });
});
