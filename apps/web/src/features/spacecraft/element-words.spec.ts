import { describe, expect, it } from 'vitest';
import { ageWords, errorWords, fateWords, heightWords, periodMs, trustWords } from './element-words.js';

const plain = (text: string): string => text.replaceAll('\u00a0', ' ').replaceAll('\u202f', ' ');

describe('words of element sets', () => {
  it('says the age, and of an epoch to come how far it is ahead', () => {
    expect(plain(ageWords(9.2))).toBe('9 h 12 min old');
    expect(plain(ageWords(76))).toBe('3 d 4 h old');
    expect(plain(ageWords(-3))).toBe('3 h ahead');
  });

  it('gives the error with figures that mean something', () => {
    expect(plain(errorWords(0.134))).toBe('±0.13 s');
    expect(plain(errorWords(4.26))).toBe('±4.3 s');
    expect(plain(errorWords(31.7))).toBe('±32 s');
  });

  it('writes one height for a round orbit and two for another', () => {
    expect(heightWords({ perigeeKm: 517.8, apogeeKm: 518.2 })).toBe('518');
    expect(plain(heightWords({ perigeeKm: 403, apogeeKm: 35_786 }))).toBe('403 × 35 786');
  });

  it('turns one revolution a day into a day', () => {
    expect(periodMs(1)).toBe(86_400_000);
  });

  it('says what saving would do with each kind of set', () => {
    const set = { objectName: 'WHIMBREL 4', spacecraftName: 'Whimbrel 4' };
    expect(fateWords({ ...set, fate: 'new' })).toBe('the newest of Whimbrel 4');
    expect(fateWords({ ...set, fate: 'older' })).toContain('a newer one stays in force');
    expect(fateWords({ ...set, fate: 'duplicate' })).toContain('kept already');
    expect(fateWords({ ...set, spacecraftName: null, fate: 'new-spacecraft' })).toBe(
      'adds WHIMBREL 4 as a new spacecraft',
    );
  });

  it('names the consequence of stale elements', () => {
    expect(trustWords('stale', 14)).toContain('Buying asks you to acknowledge it');
    expect(trustWords('ageing', 2)).not.toContain('acknowledge');
  });
});
