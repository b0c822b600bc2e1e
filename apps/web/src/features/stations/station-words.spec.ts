import { describe, expect, it } from 'vitest';
import { countryName, nextStep, positionText } from './station-words.js';

const antenna = { id: 'a', name: 'West', state: 'on sale' as const, diameterM: 5.4, bands: ['S'], missing: [] };

describe('words about a station', () => {
  it('writes a position with its directions', () => {
    expect(positionText({ latitudeDeg: 54.47, longitudeDeg: -2.61, altitudeM: 318 })).toBe(
      '54.470°\u00a0N 2.610°\u00a0W, 318\u00a0m',
    );
  });

  it('names a country, and leaves what is no code as it is', () => {
    expect(countryName('NO')).toBe('Norway');
    expect(countryName('x')).toBe('x');
  });

  it('says the next step only where there is one', () => {
    const station = { state: 'approved' as const, stateNote: '', antennas: [antenna] };
    expect(nextStep(station)).toBe('');
    expect(nextStep({ ...station, antennas: [] })).toBe('Add its first antenna.');
    expect(nextStep({ ...station, antennas: [{ ...antenna, missing: ['x'] }] })).toBe('1 antenna is not yet complete.');
    expect(nextStep({ ...station, antennas: [antenna, { ...antenna, state: 'paused' }] })).toBe(
      '1 antenna is complete and not on sale.',
    );
  });
});
