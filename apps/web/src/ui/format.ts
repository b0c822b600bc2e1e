/**
 * How times, durations, degrees and money are written everywhere: UTC with the day of year, words for units,
 * thin spaces between thousands, the currency always. Pure; no clock and no locale of the machine.
 */

const SECOND_MS = 1000;
const MINUTE_MS = 60 * SECOND_MS;
const HOUR_MS = 60 * MINUTE_MS;
const DAY_MS = 24 * HOUR_MS;
const THIN_SPACE = '\u202f';
const NO_BREAK_SPACE = '\u00a0';
const MINUS = '\u2212';

/** Day of year of a UTC instant, 1 to 366. */
export function dayOfYear(atMs: number): number {
  const year = new Date(atMs).getUTCFullYear();
  return Math.floor((atMs - Date.UTC(year, 0, 1)) / DAY_MS) + 1;
}

/** `2026-335` */
export function formatDay(atMs: number): string {
  return `${new Date(atMs).getUTCFullYear()}-${String(dayOfYear(atMs)).padStart(3, '0')}`;
}

/** `14:05:09`, cut to the second as a clock does. */
export function formatTime(atMs: number): string {
  return new Date(atMs).toISOString().slice(11, 19);
}

/** `14:05` */
export function formatHourMinute(atMs: number): string {
  return new Date(atMs).toISOString().slice(11, 16);
}

/** `2026-335 14:05:09` */
export function formatDayTime(atMs: number): string {
  return `${formatDay(atMs)} ${formatTime(atMs)}`;
}

/** Formats are costly to make and are asked for in every frame of a drawing. */
const formats = new Map<string, Intl.DateTimeFormat>();

function zonedFormat(timeZone: string, options: Intl.DateTimeFormatOptions): Intl.DateTimeFormat {
  const key = `${timeZone} ${Object.keys(options).join()}`;
  const known = formats.get(key);
  if (known) return known;
  const made = new Intl.DateTimeFormat('en-GB', { timeZone, ...options });
  formats.set(key, made);
  return made;
}

/** `Tue 1 Dec 2026`, of the UTC day or of the day in `timeZone`. */
export function formatCalendarDay(atMs: number, timeZone = 'UTC'): string {
  const parts = zonedFormat(timeZone, {
    weekday: 'short',
    day: 'numeric',
    month: 'short',
    year: 'numeric',
  }).formatToParts(atMs);
  const part = (type: Intl.DateTimeFormatPartTypes) => parts.find((one) => one.type === type)?.value ?? '';
  return `${part('weekday')} ${part('day')} ${part('month').slice(0, 3)} ${part('year')}`;
}

/** `15:05` on the clocks of a place; with seconds `15:05:09`. */
export function formatLocalTime(atMs: number, timeZone: string, withSeconds = false): string {
  const clock = { hour: '2-digit', minute: '2-digit', hourCycle: 'h23' } as const;
  return zonedFormat(timeZone, withSeconds ? { ...clock, second: '2-digit' } : clock).format(atMs);
}

/** `45 s`, `9 min 42 s`, `2 h 32 min`, `3 d 4 h`: two units at most, rounded to the smaller one. */
export function formatDuration(durationMs: number): string {
  const sign = durationMs < 0 ? MINUS : '';
  const ms = Math.abs(durationMs);
  const seconds = Math.round(ms / SECOND_MS);
  if (seconds < 60) return `${sign}${seconds}${NO_BREAK_SPACE}s`;
  if (seconds < 3600) return sign + twoUnits(seconds, 60, 'min', 's');
  const minutes = Math.round(ms / MINUTE_MS);
  if (minutes < 1440) return sign + twoUnits(minutes, 60, 'h', 'min');
  return sign + twoUnits(Math.round(ms / HOUR_MS), 24, 'd', 'h');
}

function twoUnits(count: number, perLarge: number, large: string, small: string): string {
  const whole = Math.floor(count / perLarge);
  const rest = count % perLarge;
  const head = `${whole}${NO_BREAK_SPACE}${large}`;
  if (rest === 0) return head;
  return `${head} ${small === 's' ? String(rest).padStart(2, '0') : rest}${NO_BREAK_SPACE}${small}`;
}

/** `4:21`, `1:02:03`; never below `0:00`. Rounded up, so that it shows 0:00 only when the time has come. */
export function formatCountdown(remainingMs: number): string {
  const seconds = Math.max(0, Math.ceil(remainingMs / SECOND_MS));
  const two = (value: number) => String(value).padStart(2, '0');
  const hours = Math.floor(seconds / 3600);
  const minutes = Math.floor((seconds % 3600) / 60);
  return hours > 0 ? `${hours}:${two(minutes)}:${two(seconds % 60)}` : `${minutes}:${two(seconds % 60)}`;
}

/** `39.5°` */
export function formatDegrees(angleDeg: number, decimals = 1): string {
  return `${formatNumber(angleDeg, decimals)}°`;
}

/** `2 214`, `−12.5`: fixed decimals, thin spaces, a true minus. */
export function formatNumber(value: number, decimals = 0): string {
  const [whole = '0', fraction] = Math.abs(value).toFixed(decimals).split('.');
  const isZero = Number(Math.abs(value).toFixed(decimals)) === 0;
  const grouped = whole.replace(/\B(?=(\d{3})+(?!\d))/g, THIN_SPACE);
  return `${value < 0 && !isZero ? MINUS : ''}${grouped}${fraction ? `.${fraction}` : ''}`;
}

/** Whole minor units of an ISO 4217 currency. */
export interface Amount {
  readonly amountMinor: number;
  readonly currency: string;
}

/**
 * Currencies that have not two decimals, by ISO 4217 (list one, February 2026). Never the engine's own figures, which give
 * none for HUF, IDR, IQD and others, so that amounts would be shown a hundred times too large.
 */
const DECIMALS = new Map<string, number>([
  ...'BIF CLP DJF GNF ISK JPY KMF KRW PYG RWF UGX UYI VND VUV XAF XOF XPF'.split(' ').map((code) => [code, 0] as const),
  ...'BHD IQD JOD KWD LYD OMR TND'.split(' ').map((code) => [code, 3] as const),
  ...'CLF UYW'.split(' ').map((code) => [code, 4] as const),
]);

/** Decimals of a currency. */
export const currencyDecimals = (currency: string): number => DECIMALS.get(currency) ?? 2;

/** `€81.88`, `−€1 185.87`; a currency without a sign of its own is written `CHF 81.88`. */
export function formatMoney({ amountMinor, currency }: Amount, whole = false): string {
  const decimals = currencyDecimals(currency);
  const number = formatNumber(Math.abs(amountMinor) / 10 ** decimals, whole ? 0 : decimals);
  const sign = currencySign(currency);
  const minus = amountMinor < 0 && /[1-9]/.test(number) ? MINUS : '';
  return `${minus}${sign}${/[A-Z]$/.test(sign) ? NO_BREAK_SPACE : ''}${number}`;
}

function currencySign(currency: string): string {
  const parts = new Intl.NumberFormat('en-GB', { style: 'currency', currency }).formatToParts(0);
  return parts.find((part) => part.type === 'currency')?.value ?? currency;
}

/** `21.4 GB`, `62 MB`, `38 kB`: decimal units, three figures at most. */
export function formatBytes(bytes: number): string {
  const units = ['B', 'kB', 'MB', 'GB', 'TB', 'PB'];
  let value = bytes;
  let index = 0;
  while (Math.abs(value) >= 999.5 && index < units.length - 1) {
    value /= 1000;
    index += 1;
  }
  const decimals = index > 0 && Math.abs(value) < 99.95 && value % 1 !== 0 ? 1 : 0;
  return `${formatNumber(value, decimals)}${NO_BREAK_SPACE}${units[index] ?? 'B'}`;
}
