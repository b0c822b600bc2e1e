/** The filter of the bookings page, as the address holds it and as the API takes it. Pure. */
import { BOOKING_STATES, type BookingState, routes } from '@skyberth/shared';
import type { BookingFilter } from '../../lib/booking-queries.js';

export const WHENS = ['coming', 'past', 'all'] as const;
export type When = (typeof WHENS)[number];

export interface ListFilter {
  readonly view: 'calendar' | 'list';
  readonly when: When;
  /** Empty: every state. */
  readonly states: readonly BookingState[];
  readonly spacecraftId: string | null;
  readonly page: number;
  /** A day of the month that the calendar shows, `YYYY-MM-DD`; null is today. */
  readonly day: string | null;
}

export const DEFAULT_LIST_FILTER: ListFilter = {
  view: 'list',
  when: 'coming',
  states: [],
  spacecraftId: null,
  page: 1,
  day: null,
};

export function readListFilter(search: URLSearchParams): ListFilter {
  const when = search.get('when') as When;
  const day = search.get('day') ?? '';
  const page = Number(search.get('page'));
  return {
    view: search.get('view') === 'calendar' ? 'calendar' : 'list',
    when: WHENS.includes(when) ? when : DEFAULT_LIST_FILTER.when,
    states: BOOKING_STATES.filter((state) => (search.get('state') ?? '').split(',').includes(state)),
    spacecraftId: search.get('craft'),
    page: Number.isInteger(page) && page > 0 ? page : 1,
    day: /^\d{4}-\d{2}-\d{2}$/.test(day) && !Number.isNaN(Date.parse(day)) ? day : null,
  };
}

export function writeListFilter(filter: ListFilter): URLSearchParams {
  const search = new URLSearchParams();
  if (filter.view !== DEFAULT_LIST_FILTER.view) search.set('view', filter.view);
  if (filter.when !== DEFAULT_LIST_FILTER.when) search.set('when', filter.when);
  if (filter.states.length > 0) search.set('state', filter.states.join(','));
  if (filter.spacecraftId) search.set('craft', filter.spacecraftId);
  if (filter.page > 1) search.set('page', String(filter.page));
  if (filter.day) search.set('day', filter.day);
  return search;
}

export const PAGE_SIZE = 25;
const DAY_MS = 86_400_000;

/** @param nowMs give a time that stands still, or each second is another question */
export function listQuery(filter: ListFilter, nowMs: number): BookingFilter {
  const nowUtc = new Date(nowMs).toISOString();
  return {
    ...common(filter),
    page: filter.page,
    pageSize: PAGE_SIZE,
    ...(filter.when === 'coming' ? { fromUtc: nowUtc, sort: 'aos' as const } : { sort: '-aos' as const }),
    ...(filter.when === 'past' ? { toUtc: nowUtc } : {}),
  };
}

/** Where the whole list under this filter is read as a file. */
export function exportAddress(filter: ListFilter, nowMs: number): string {
  const { page: _page, pageSize: _size, ...query } = listQuery(filter, nowMs);
  const words = Object.entries(query).flatMap(([name, value]) => (value === undefined ? [] : [[name, String(value)]]));
  return `${routes.exportBookings.path}?${new URLSearchParams(words)}`;
}

/** The six weeks around the shown month, so that the days of its neighbours are filled too. */
export function calendarQuery(filter: ListFilter, nowMs: number): BookingFilter {
  const shown = new Date(filter.day ? Date.parse(filter.day) : nowMs);
  const monthMs = Date.UTC(shown.getUTCFullYear(), shown.getUTCMonth(), 1);
  return {
    ...common(filter),
    fromUtc: new Date(monthMs - 7 * DAY_MS).toISOString(),
    toUtc: new Date(monthMs + 42 * DAY_MS).toISOString(),
    pageSize: 200,
    sort: 'aos',
  };
}

const common = (filter: ListFilter): BookingFilter => ({
  ...(filter.states.length > 0 ? { state: filter.states.join(',') } : {}),
  ...(filter.spacecraftId ? { spacecraftId: filter.spacecraftId } : {}),
});
