import { describe, expect, it } from 'vitest';
import { DEFAULT_FILTER, periodOf, readFilter, type SearchFilter, searchInput, writeFilter } from './search-filter.js';

const NOW = Date.UTC(2026, 11, 1, 14, 5);

describe('the address of a search', () => {
  it('is empty for the usual search', () => {
    expect(writeFilter(DEFAULT_FILTER).toString()).toBe('');
    expect(readFilter(new URLSearchParams())).toEqual(DEFAULT_FILTER);
  });

  it('brings back every part of the filter', () => {
    const filter: SearchFilter = {
      spacecraftIds: ['a', 'b'],
      need: 'both',
      bands: ['S', 'X'],
      period: { kind: 'fixed', fromMs: NOW, toMs: NOW + 7_200_000 },
      stationIds: ['s'],
      lowestElevationDeg: 12.5,
      shortestS: 300,
      highestPriceMinor: 12_000,
      view: 'table',
      passKey: 'k:1',
      part: 1,
    };
    expect(readFilter(writeFilter(filter))).toEqual(filter);
  });

  it('opens with defaults where it cannot be read', () => {
    const search = new URLSearchParams('for=dance&above=steep&hours=0&least=-4&view=globe&bands=S,Q&from=x&to=y&upto=');
    expect(readFilter(search)).toEqual({ ...DEFAULT_FILTER, bands: ['S'] });
  });

  it('does not take a period that ends before it begins or lasts over 31 days', () => {
    const backwards = new URLSearchParams('from=2026-12-02T00:00Z&to=2026-12-01T00:00Z');
    const endless = new URLSearchParams('from=2026-12-01T00:00Z&to=2027-02-01T00:00Z');
    expect(readFilter(backwards).period.kind).toBe('hours');
    expect(readFilter(endless).period.kind).toBe('hours');
  });
});

describe('what the API is asked', () => {
  it('takes every active spacecraft where none is chosen, or none of those chosen is active', () => {
    expect(searchInput(DEFAULT_FILTER, ['a', 'b'], NOW).spacecraftIds).toEqual(['a', 'b']);
    expect(searchInput({ ...DEFAULT_FILTER, spacecraftIds: ['gone'] }, ['a'], NOW).spacecraftIds).toEqual(['a']);
    expect(searchInput({ ...DEFAULT_FILTER, spacecraftIds: ['b'] }, ['a', 'b'], NOW).spacecraftIds).toEqual(['b']);
  });

  it('begins a rolling period at the time given', () => {
    expect(periodOf({ kind: 'hours', hours: 6 }, NOW)).toEqual({ fromMs: NOW, toMs: NOW + 21_600_000 });
    expect(searchInput(DEFAULT_FILTER, ['a'], NOW).toUtc).toBe('2026-12-02T14:05:00.000Z');
  });
});
