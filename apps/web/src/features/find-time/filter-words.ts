/** The parts of the filter sentence, in words. Pure. */
import type { Need } from '@skyberth/shared';
import { formatCalendarDay, formatDay, formatDuration, formatHourMinute, formatMoney } from '../../ui/format.js';
import type { Period, SearchFilter } from './search-filter.js';

interface Named {
  readonly id: string;
  readonly name: string;
}

/** `all 4 spacecraft`, `Whimbrel 4`, `2 spacecraft` */
export function spacecraftWords(chosen: readonly string[], active: readonly Named[]): string {
  const known = active.filter((one) => chosen.includes(one.id));
  if (known.length === 1 && known[0]) return known[0].name;
  if (known.length > 0 && known.length < active.length) return `${known.length} spacecraft`;
  return active.length === 1 && active[0] ? active[0].name : `all ${active.length} spacecraft`;
}

/** `any station`, `Tarnwick`, `3 stations` */
export function stationWords(chosen: readonly string[], stations: readonly Named[]): string {
  if (chosen.length === 0) return 'any station';
  const [only] = stations.filter((one) => chosen.includes(one.id));
  return chosen.length === 1 ? (only?.name ?? '1 station') : `${chosen.length} stations`;
}

const NEED_WORDS: Readonly<Record<Need, string>> = {
  downlink: 'downlink',
  uplink: 'uplink',
  both: 'downlink and uplink',
};

/** `downlink in S or X` */
export function needWords({ need, bands }: Pick<SearchFilter, 'need' | 'bands'>): string {
  if (bands.length === 0) return NEED_WORDS[need];
  const last = bands.at(-1) ?? '';
  const list = bands.length === 1 ? last : `${bands.slice(0, -1).join(', ')} or ${last}`;
  return `${NEED_WORDS[need]} in ${list}`;
}

/** `24 h`, `7 d`: a day and a night are better counted in hours. */
export const hoursWords = (hours: number): string =>
  hours <= 48 ? `${hours}\u00a0h` : formatDuration(hours * 3_600_000);

/** `in the next 24 h`, `from 2026-335 14:00 to 17:00` */
export function periodWords(period: Period): { lead: string; value: string } {
  if (period.kind === 'hours') return { lead: 'in', value: `the next ${hoursWords(period.hours)}` };
  const sameDay = formatDay(period.fromMs) === formatDay(period.toMs);
  const end = sameDay ? formatHourMinute(period.toMs) : `${formatDay(period.toMs)} ${formatHourMinute(period.toMs)}`;
  return { lead: 'from', value: `${formatDay(period.fromMs)} ${formatHourMinute(period.fromMs)} to ${end}` };
}

/** `at least 5 min`, `any time at all` */
export const lengthWords = (shortestS: number): string =>
  shortestS === 0 ? 'any length' : `at least ${formatDuration(shortestS * 1000)}`;

/** `€120`; `any price`. Where several currencies are for sale the figure is in each antenna's own. */
export function priceWords(highestPriceMinor: number | null, currency: string | null): string {
  if (highestPriceMinor === null) return 'any price';
  const isWhole = highestPriceMinor % 100 === 0;
  if (currency) return formatMoney({ amountMinor: highestPriceMinor, currency }, isWhole);
  return `${(highestPriceMinor / 100).toFixed(isWhole ? 0 : 2)} of the station’s currency`;
}

/** `Tue 1 Dec 2026` under the day of year, for headings. */
export const dayHeading = (atMs: number): string => `Day ${formatDay(atMs).slice(5)}, ${formatCalendarDay(atMs)}`;
