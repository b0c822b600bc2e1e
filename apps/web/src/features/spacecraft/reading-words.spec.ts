import { describe, expect, it } from 'vitest';
import {
  countToSave,
  goodWords,
  listWords,
  newCraftNames,
  ownSentence,
  saveBlock,
  savedWords,
  saveLabel,
} from './reading-words.js';

const set = (fate: 'new' | 'new-spacecraft' | 'duplicate' | 'older', objectName = 'A', catalogNumber = 1) => ({
  fate,
  objectName,
  objectId: '',
  catalogNumber,
});

describe('what was read', () => {
  it('counts good sets by what saving would do', () => {
    expect(goodWords([set('new'), set('new'), set('older'), set('duplicate')])).toBe(
      '4 element sets can be used: 2 are newer than what you have, 1 joins a history, 1 is kept already.',
    );
  });

  it('names each new spacecraft once, however many sets it has', () => {
    const good = [
      set('new-spacecraft', 'A', 7),
      set('new-spacecraft', 'A', 7),
      set('new-spacecraft', 'B', 8),
      set('new'),
    ];
    expect(newCraftNames(good)).toEqual(['A', 'B']);
    expect(newCraftNames([set('new-spacecraft', 'A', 0), set('new-spacecraft', 'a', 0)])).toEqual(['A']);
  });

  it('does not count what is kept already or left out', () => {
    const good = [set('new'), set('older'), set('duplicate'), set('new-spacecraft')];
    expect(countToSave(good, true)).toBe(3);
    expect(countToSave(good, false)).toBe(2);
    expect(saveLabel(1)).toBe('Save 1 element set');
  });
});

describe('what is wrong', () => {
  it('is not said twice', () => {
    const fault = { found: '4', expected: '1 in column 69' };
    expect(ownSentence({ ...fault, message: 'Line 5, checksum: found "4", expected 1 in column 69.' })).toBeNull();
    expect(ownSentence({ ...fault, message: 'The two lines carry different numbers.' })).toContain('two lines');
    expect(ownSentence({ found: '', expected: '', message: 'The rest is not listed.' })).toBe(
      'The rest is not listed.',
    );
  });
});

describe('consent', () => {
  const wish = { good: [set('new')], faultCount: 0, keepGoodOnes: false, addSpacecraft: true };

  it('is not needed where nothing is wrong', () => {
    expect(saveBlock(wish)).toBeNull();
  });

  it('is needed as soon as one thing is wrong', () => {
    expect(saveBlock({ ...wish, faultCount: 1 })).toContain('agree to leave out');
    expect(saveBlock({ ...wish, faultCount: 1, keepGoodOnes: true })).toBeNull();
  });

  it('cannot save what is not there or not new', () => {
    expect(saveBlock({ ...wish, good: [] })).toContain('no good element set');
    expect(saveBlock({ ...wish, good: [set('duplicate')] })).toContain('Nothing is new');
    expect(saveBlock({ ...wish, good: [set('new-spacecraft')], addSpacecraft: false })).toContain('left out');
  });
});

describe('after saving', () => {
  it('says what was saved and what was there before', () => {
    expect(savedWords({ saved: 1, duplicates: 0 })).toBe('1 element set is saved.');
    expect(savedWords({ saved: 5, duplicates: 2 })).toBe('5 element sets are saved. 2 were kept already.');
  });

  it('lists names, and a long list by its beginning', () => {
    expect(listWords(['A'])).toBe('A');
    expect(listWords(['A', 'B', 'C'])).toBe('A, B and C');
    expect(listWords(['A', 'B', 'C', 'D', 'E'])).toBe('A, B, C, D and E');
    expect(listWords(['A', 'B', 'C', 'D', 'E', 'F'])).toBe('A, B, C, D and 2 more');
  });
});
