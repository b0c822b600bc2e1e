/** The filter of the search, as the address holds it and as the API takes it. Pure. */
import { BANDS, type Need, type SearchInput } from '@skyberth/shared';

export const VIEWS = ['board', 'calendar', 'table', 'map'] as const;
export type View = (typeof VIEWS)[number];

/** A rolling number of hours from now, or two fixed instants. */
export type Period =
  | { readonly kind: 'hours'; readonly hours: number }
  | { readonly kind: 'fixed'; readonly fromMs: number; readonly toMs: number };

export interface SearchFilter {
  /** Empty: every active spacecraft. */
  readonly spacecraftIds: readonly string[];
  readonly need: Need;
  /** Empty: any band. */
  readonly bands: readonly string[];
  readonly period: Period;
  /** Empty: every station. */
  readonly stationIds: readonly string[];
  readonly lowestElevationDeg: number;
  readonly shortestS: number;
  readonly highestPriceMinor: number | null;
  readonly view: View;
  /** The pass between the posts, and which of its parts for sale; null is the whole pass. */
  readonly passKey: string | null;
  readonly part: number | null;
}

export const DEFAULT_FILTER: SearchFilter = {
  spacecraftIds: [],
  need: 'downlink',
  bands: [],
  period: { kind: 'hours', hours: 24 },
  stationIds: [],
  lowestElevationDeg: 10,
  shortestS: 180,
  highestPriceMinor: null,
  view: 'board',
  passKey: null,
  part: null,
};

const NEEDS: readonly Need[] = ['downlink', 'uplink', 'both'];
const MOST_HOURS = 31 * 24;
const MINUTE_MS = 60_000;

/** Reads an address; whatever cannot be read takes its default, so that an old or mistyped link still opens. */
export function readFilter(search: URLSearchParams): SearchFilter {
  const need = search.get('for') as Need;
  const view = search.get('view') as View;
  return {
    spacecraftIds: listOf(search.get('craft')),
    need: NEEDS.includes(need) ? need : DEFAULT_FILTER.need,
    bands: listOf(search.get('bands')).filter((one) => (BANDS as readonly string[]).includes(one)),
    period: readPeriod(search),
    stationIds: listOf(search.get('at')),
    lowestElevationDeg: numberIn(search.get('above'), 0, 90) ?? DEFAULT_FILTER.lowestElevationDeg,
    shortestS: Math.round(numberIn(search.get('least'), 0, 86_400) ?? DEFAULT_FILTER.shortestS),
    highestPriceMinor: wholeOrNull(numberIn(search.get('upto'), 0, 9_999_999_999)),
    view: VIEWS.includes(view) ? view : DEFAULT_FILTER.view,
    passKey: search.get('pass'),
    part: wholeOrNull(numberIn(search.get('part'), 0, 99)),
  };
}

/** Writes only what differs from the default, so that addresses stay short. */
export function writeFilter(filter: SearchFilter): URLSearchParams {
  const search = new URLSearchParams();
  const put = (name: string, value: string, usual: string) => {
    if (value !== usual) search.set(name, value);
  };
  put('craft', filter.spacecraftIds.join(','), '');
  put('for', filter.need, DEFAULT_FILTER.need);
  put('bands', filter.bands.join(','), '');
  if (filter.period.kind === 'fixed') {
    search.set('from', isoMinute(filter.period.fromMs));
    search.set('to', isoMinute(filter.period.toMs));
  } else put('hours', String(filter.period.hours), '24');
  put('at', filter.stationIds.join(','), '');
  put('above', String(filter.lowestElevationDeg), String(DEFAULT_FILTER.lowestElevationDeg));
  put('least', String(filter.shortestS), String(DEFAULT_FILTER.shortestS));
  put('upto', filter.highestPriceMinor === null ? '' : String(filter.highestPriceMinor), '');
  put('view', filter.view, DEFAULT_FILTER.view);
  put('pass', filter.passKey ?? '', '');
  put('part', filter.part === null ? '' : String(filter.part), '');
  return search;
}

/** @param nowMs where a rolling period begins; give a time that stands still, or each second is another search */
export function searchInput(filter: SearchFilter, activeIds: readonly string[], nowMs: number): SearchInput {
  const { fromMs, toMs } = periodOf(filter.period, nowMs);
  const known = filter.spacecraftIds.filter((id) => activeIds.includes(id));
  return {
    spacecraftIds: [...(known.length > 0 ? known : activeIds)].slice(0, 100),
    need: filter.need,
    bands: [...filter.bands],
    fromUtc: new Date(fromMs).toISOString(),
    toUtc: new Date(toMs).toISOString(),
    stationIds: [...filter.stationIds],
    lowestElevationDeg: filter.lowestElevationDeg,
    shortestS: filter.shortestS,
    highestPriceMinor: filter.highestPriceMinor,
  };
}

export function periodOf(period: Period, nowMs: number): { fromMs: number; toMs: number } {
  return period.kind === 'fixed' ? period : { fromMs: nowMs, toMs: nowMs + period.hours * 60 * MINUTE_MS };
}

function readPeriod(search: URLSearchParams): Period {
  const fromMs = Date.parse(search.get('from') ?? '');
  const toMs = Date.parse(search.get('to') ?? '');
  if (toMs > fromMs && toMs - fromMs <= MOST_HOURS * 60 * MINUTE_MS) return { kind: 'fixed', fromMs, toMs };
  return { kind: 'hours', hours: Math.round(numberIn(search.get('hours'), 1, MOST_HOURS) ?? 24) };
}

const isoMinute = (atMs: number): string => `${new Date(atMs).toISOString().slice(0, 16)}Z`;
const listOf = (text: string | null): string[] => (text ?? '').split(',').filter(Boolean);
const wholeOrNull = (value: number | null): number | null => (value === null ? null : Math.round(value));

function numberIn(text: string | null, least: number, most: number): number | null {
  const value = text === null || text.trim() === '' ? Number.NaN : Number(text);
  return value >= least && value <= most ? value : null;
}
