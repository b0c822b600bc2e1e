/** Epochs to the last digit that was written: whole days and a whole number of microseconds or finer inside the day. */
import { parseCcsdsTime } from '../ephemeris/ccsds-time.js';

const DAY_MS = 86_400_000;

export interface Epoch {
  readonly epochMs: number;
  readonly epochUtc: string;
}

/**
 * The epoch of a TLE: two-digit year (57 to 99 are 1957 to 1999, 00 to 56 are 2000 to 2056; source: CelesTrak FAQ) and day
 * of year with eight decimals. A hundred-millionth of a day is 864 microseconds exactly, so nothing is rounded.
 */
export function tleEpoch(twoDigitYear: number, day: number, dayFraction8: number): Epoch {
  const year = twoDigitYear < 57 ? 2000 + twoDigitYear : 1900 + twoDigitYear;
  const midnightMs = Date.UTC(year, 0, day);
  const micros = dayFraction8 * 864;
  return { epochMs: midnightMs + micros / 1000, epochUtc: isoMicros(midnightMs, micros) };
}

function isoMicros(midnightMs: number, microsOfDay: number): string {
  const seconds = Math.floor(microsOfDay / 1_000_000);
  const fraction = String(microsOfDay % 1_000_000).padStart(6, '0');
  return `${new Date(midnightMs + seconds * 1000).toISOString().slice(0, 19)}.${fraction}Z`;
}

/** The epoch of an OMM, calendar or day of year, every written decimal kept (six at least); undefined if it is no date. */
export function ommEpoch(text: string): Epoch | undefined {
  const epochMs = parseCcsdsTime(text);
  if (epochMs === undefined) return undefined;
  const decimals = /\.(\d*)Z?$/.exec(text)?.[1] ?? '';
  const wholeMs = parseCcsdsTime(text.replace(/(\.\d*)?Z?$/, ''));
  if (wholeMs === undefined || !Number.isFinite(epochMs)) return undefined;
  const iso = new Date(wholeMs).toISOString().slice(0, 19);
  return { epochMs, epochUtc: `${iso}.${decimals.padEnd(6, '0')}Z` };
}

/**
 * The epoch as a TLE prints it, or undefined where it does not fit: a year outside 1957 to 2056, or an instant that is no
 * whole number of hundred-millionths of a day.
 */
export function tleEpochText(epochUtc: string): string | undefined {
  const parts = /^(\d{4})-(\d{2})-(\d{2})T(\d{2}):(\d{2}):(\d{2})\.(\d{6})(0*)Z$/.exec(epochUtc);
  if (!parts) return undefined;
  const [year, month, date, hour, minute, second, micro] = parts.slice(1, 8).map(Number) as [
    number,
    number,
    number,
    number,
    number,
    number,
    number,
  ];
  if (year < 1957 || year > 2056) return undefined;
  const micros = ((hour * 60 + minute) * 60 + second) * 1_000_000 + micro;
  if (micros % 864 !== 0) return undefined;
  const day = Math.round((Date.UTC(year, month - 1, date) - Date.UTC(year, 0, 1)) / DAY_MS) + 1;
  const fraction = String(micros / 864).padStart(8, '0');
  return `${String(year % 100).padStart(2, '0')}${String(day).padStart(3, '0')}.${fraction}`;
}
