import { describe, expect, it } from 'vitest';
import { findCraft, fleetWords, identityWords, radioWords, rateWords } from './craft-words.js';

const craft = (name: string, catalogNumber: number | null = null) => ({
  name,
  shortName: name.slice(0, 3),
  catalogNumber,
  internationalDesignator: catalogNumber === null ? null : '2026-101A',
});

describe('words of spacecraft', () => {
  it('counts a fleet by how fresh its elements are, kinds that are absent left out', () => {
    expect(fleetWords([{ freshness: 'fresh' }, { freshness: 'none' }, { freshness: 'fresh' }])).toBe(
      '3 spacecraft; elements: 2 fresh, 1 without elements.',
    );
  });

  it('names what identifies it, as far as it is known', () => {
    expect(identityWords(craft('Whimbrel', 61_234))).toBe('Whi on the board, number 61234, 2026-101A');
    expect(identityWords(craft('Whimbrel'))).toBe('Whi on the board');
  });

  it('joins the directions of a band', () => {
    expect(
      radioWords([
        { band: 'S', direction: 'uplink' },
        { band: 'X', direction: 'downlink' },
        { band: 'S', direction: 'downlink' },
      ]),
    ).toBe('S down and up, X down');
  });

  it('writes rates in the unit that fits, without losing a figure', () => {
    expect(rateWords(9_600)).toBe('9.6\u00a0kbit/s');
    expect(rateWords(150_000_000)).toBe('150\u00a0Mbit/s');
    expect(rateWords(1_250_000_000)).toBe('1.25\u00a0Gbit/s');
    expect(rateWords(300)).toBe('300\u00a0bit/s');
    expect(rateWords(1_500_500)).toBe('1\u202f500.5\u00a0kbit/s');
    expect(rateWords(0)).toBe('0\u00a0bit/s');
  });

  it('finds by name, number or designator, whatever the case', () => {
    const all = [craft('Whimbrel 4', 61_234), craft('Plover')];
    expect(findCraft(all, ' whim ')).toEqual([all[0]]);
    expect(findCraft(all, '612')).toEqual([all[0]]);
    expect(findCraft(all, '2026-101a')).toEqual([all[0]]);
    expect(findCraft(all, '')).toBe(all);
    expect(findCraft(all, 'null')).toEqual([]);
  });
});
