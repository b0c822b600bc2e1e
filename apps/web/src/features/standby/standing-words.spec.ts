import { describe, expect, it } from 'vitest';
import { standingOf } from './standing-words.js';

describe('standing in a line', () => {
  it('says who is next, who is not, and why it ended', () => {
    expect(standingOf({ state: 'waiting', place: 1, note: '' })).toBe('Next in line.');
    expect(standingOf({ state: 'waiting', place: 3, note: '' })).toBe('Number 3 in line.');
    expect(standingOf({ state: 'ended', place: null, note: 'The pass went by.' })).toBe('The pass went by.');
  });
});
