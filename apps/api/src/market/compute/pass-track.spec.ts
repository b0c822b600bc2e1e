import { describe, expect, it } from 'vitest';
import { lightPhrase } from './pass-track.js';

const at = (second: number) => Date.UTC(2026, 11, 1, 15, 0, second);
const light = (fromS: number, toS: number, state: 'sunlit' | 'penumbra' | 'umbra') => ({
  fromMs: at(fromS),
  toMs: at(toS),
  state,
});

describe('lightPhrase', () => {
  it('is one word where nothing changes', () => {
    expect(lightPhrase([light(0, 60, 'sunlit')])).toBe('sunlit');
    expect(lightPhrase([light(0, 30, 'umbra'), light(30, 60, 'penumbra')])).toBe('eclipsed');
  });

  it('says when it changes, and from when a second time', () => {
    expect(lightPhrase([light(0, 20, 'umbra'), light(20, 25, 'penumbra'), light(25, 60, 'sunlit')])).toBe(
      'sunlit from 15:00:25',
    );
    expect(lightPhrase([light(0, 10, 'sunlit'), light(10, 40, 'umbra'), light(40, 60, 'sunlit')])).toBe(
      'eclipsed from 15:00:10, sunlit from 15:00:40',
    );
  });
});
