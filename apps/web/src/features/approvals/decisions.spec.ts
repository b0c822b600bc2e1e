import { StationState } from '@skyberth/shared';
import { describe, expect, it } from 'vitest';
import { decisionsFor } from './decisions.js';

describe('decisions about a station', () => {
  it('offers none where nobody has asked', () => {
    expect(decisionsFor('draft')).toEqual([]);
    expect(decisionsFor('refused')).toEqual([]);
  });

  it('lets a suspended station be approved again, and an approved one only be suspended', () => {
    expect(decisionsFor('suspended')).toEqual(['approve']);
    expect(decisionsFor('approved')).toEqual(['suspend']);
  });

  it('knows every state', () => {
    for (const state of StationState.options) expect(Array.isArray(decisionsFor(state))).toBe(true);
  });
});
