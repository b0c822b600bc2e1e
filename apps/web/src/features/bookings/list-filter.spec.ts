import { describe, expect, it } from 'vitest';
import {
  calendarQuery,
  DEFAULT_LIST_FILTER,
  type ListFilter,
  listQuery,
  readListFilter,
  writeListFilter,
} from './list-filter.js';

const NOW = Date.UTC(2026, 11, 1, 14);

describe('the filter of bookings', () => {
  it('comes back from the address', () => {
    const filter: ListFilter = {
      view: 'calendar',
      when: 'past',
      states: ['held', 'under way'],
      spacecraftId: 'w4',
      page: 3,
      day: '2026-11-01',
    };
    expect(readListFilter(writeListFilter(filter))).toEqual(filter);
    expect(writeListFilter(DEFAULT_LIST_FILTER).toString()).toBe('');
  });

  it('takes defaults for what cannot be read', () => {
    const search = new URLSearchParams('when=never&state=lost&page=-2&day=2026-13-45&view=globe');
    expect(readListFilter(search)).toEqual(DEFAULT_LIST_FILTER);
  });

  it('asks for what is to come soonest first, and for the past latest first', () => {
    expect(listQuery(DEFAULT_LIST_FILTER, NOW)).toMatchObject({ fromUtc: '2026-12-01T14:00:00.000Z', sort: 'aos' });
    expect(listQuery({ ...DEFAULT_LIST_FILTER, when: 'past' }, NOW)).toMatchObject({
      toUtc: '2026-12-01T14:00:00.000Z',
      sort: '-aos',
    });
    expect(listQuery({ ...DEFAULT_LIST_FILTER, when: 'all' }, NOW)).not.toHaveProperty('fromUtc');
  });

  it('covers the days beside a month', () => {
    const query = calendarQuery({ ...DEFAULT_LIST_FILTER, day: '2027-02-10' }, NOW);
    expect(query.fromUtc).toBe('2027-01-25T00:00:00.000Z');
    expect(query.toUtc).toBe('2027-03-15T00:00:00.000Z');
  });
});
