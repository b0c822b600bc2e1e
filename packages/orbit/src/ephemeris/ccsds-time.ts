/** Dates of CCSDS messages: calendar or day of year, any number of decimals, an optional Z (CCSDS 502.0-B, 301.0-B). */

const CALENDAR = /^(\d{4})-(\d{2})-(\d{2})T(\d{2}):(\d{2}):(\d{2})(\.\d*)?Z?$/;
const DAY_OF_YEAR = /^(\d{4})-(\d{3})T(\d{2}):(\d{2}):(\d{2})(\.\d*)?Z?$/;

/**
 * Milliseconds since 1970 of a date as its own clock shows it, fraction kept; undefined if it is no date. A second of 60
 * is taken for the first of the next minute, as UTC milliseconds know no other.
 */
export function parseCcsdsTime(text: string): number | undefined {
  const calendar = CALENDAR.exec(text);
  if (calendar) {
    const [, year, month, day, hour, minute, second, fraction] = calendar;
    const midnightMs = Date.UTC(Number(year), Number(month) - 1, Number(day));
    const date = new Date(midnightMs);
    if (date.getUTCMonth() !== Number(month) - 1 || date.getUTCDate() !== Number(day)) return undefined;
    return withClock(midnightMs, [hour, minute, second, fraction]);
  }
  const counted = DAY_OF_YEAR.exec(text);
  if (!counted) return undefined;
  const [, year, day, hour, minute, second, fraction] = counted;
  const midnightMs = Date.UTC(Number(year), 0, Number(day));
  if (Number(day) < 1 || new Date(midnightMs).getUTCFullYear() !== Number(year)) return undefined;
  return withClock(midnightMs, [hour, minute, second, fraction]);
}

function withClock(midnightMs: number, clock: readonly (string | undefined)[]): number | undefined {
  const [hour = '', minute = '', second = '', fraction = ''] = clock;
  if (Number(hour) > 23 || Number(minute) > 59 || Number(second) > 60) return undefined;
  const wholeS = Number(hour) * 3600 + Number(minute) * 60 + Number(second);
  return midnightMs + wholeS * 1000 + (fraction.length > 1 ? Number(fraction) * 1000 : 0);
}

/**
 * Writes milliseconds as `2026-12-01T00:00:00.5`, with as many decimals as are needed to read the same number back: up to
 * seven, a real number of milliseconds being good to a quarter of a microsecond in this century.
 */
export function formatCcsdsTime(timeMs: number): string {
  let wholeS = Math.floor(timeMs / 1000);
  let fraction = Math.round((timeMs - wholeS * 1000) * 1e4);
  if (fraction === 1e7) {
    wholeS += 1;
    fraction = 0;
  }
  const clock = new Date(wholeS * 1000).toISOString().slice(0, 19);
  return fraction === 0 ? clock : `${clock}.${String(fraction).padStart(7, '0').replace(/0+$/, '')}`;
}
