/** Station local time to UTC and back, by the rules that RFC 5545 gives for clock changes. */
import { IANAZone } from 'luxon';
import { MarketError } from '../market-error.js';

export const MINUTE_MS = 60_000;
export const HOUR_MS = 3_600_000;
export const DAY_MS = 86_400_000;

/** Days of one zone that are remembered; a thousand years is more than anyone books, so this only bounds hostile input. */
const MOST_DAYS_REMEMBERED = 400_000;

/** A zone with the offset of each UTC day on which no clock changes, since the engine's own look-up is slow. */
interface KnownZone {
  readonly zone: IANAZone;
  readonly offsetMsByDay: Map<number, number>;
}

const zones = new Map<string, KnownZone>();

/** Whether the engine's time zone database knows the name. */
export const isTimeZone = (name: string): boolean => name !== '' && IANAZone.isValidZone(name);

function zoneOf(name: string): KnownZone {
  const known = zones.get(name);
  if (known !== undefined) return known;
  if (!isTimeZone(name))
    throw new MarketError('bad time zone', `“${name}” is not a time zone of the IANA database, such as Europe/Oslo.`, {
      timeZone: name,
    });
  const made = { zone: IANAZone.create(name), offsetMsByDay: new Map<number, number>() };
  zones.set(name, made);
  return made;
}

/** NaN stands for a day on which the clock changes: there each instant is looked up. */
function offsetIn({ zone, offsetMsByDay }: KnownZone, timeMs: number): number {
  const day = Math.floor(timeMs / DAY_MS);
  let offset = offsetMsByDay.get(day);
  if (offset === undefined) {
    const first = zone.offset(day * DAY_MS) * MINUTE_MS;
    offset = zone.offset((day + 1) * DAY_MS) * MINUTE_MS === first ? first : Number.NaN;
    if (offsetMsByDay.size < MOST_DAYS_REMEMBERED) offsetMsByDay.set(day, offset);
  }
  return Number.isNaN(offset) ? zone.offset(timeMs) * MINUTE_MS : offset;
}

/** Milliseconds that local time is ahead of UTC at an instant. */
export const offsetMs = (timeMs: number, timeZone: string): number => offsetIn(zoneOf(timeZone), timeMs);

/**
 * A wall-clock reading as a number: the UTC milliseconds at which UTC clocks would show it. Never an instant; calendar
 * arithmetic on it is plain addition.
 */
export type WallClockMs = number;

/** What the clock at the station shows at an instant. */
export const toWallClock = (timeMs: number, timeZone: string): WallClockMs => timeMs + offsetMs(timeMs, timeZone);

/**
 * The instant at which the clock at the station shows this reading. Shown twice (autumn): the first time. Never shown
 * (spring): read with the offset before the gap, so 02:30 becomes 03:30. RFC 5545 3.3.5.
 */
export function fromWallClock(wallClockMs: WallClockMs, timeZone: string): number {
  const zone = zoneOf(timeZone);
  // A day either way is outside every zone's offset, so these are the offsets before and after any change near by.
  const before = offsetIn(zone, wallClockMs - DAY_MS);
  const after = offsetIn(zone, wallClockMs + DAY_MS);
  const first = wallClockMs - before;
  if (before === after || offsetIn(zone, first) === before) return first;
  const second = wallClockMs - after;
  return offsetIn(zone, second) === after ? second : first;
}

const LOCAL_DATE_TIME = /^(\d{4})-(\d{2})-(\d{2})T([01]\d|2[0-3]):([0-5]\d)$/;

/** Reads `YYYY-MM-DDTHH:mm`. Throws `bad local time` for another form or a day that no calendar has. */
export function parseLocalDateTime(text: string): WallClockMs {
  const match = LOCAL_DATE_TIME.exec(text);
  const [, year, month, day, hour, minute] = (match ?? []).map(Number);
  const wallClockMs = match === null ? Number.NaN : Date.UTC(year as number, (month as number) - 1, day, hour, minute);
  if (Number.isNaN(wallClockMs) || formatLocalDateTime(wallClockMs) !== text) {
    throw new MarketError('bad local time', `“${text}” is not a local time such as 2026-12-01T08:30.`, { text });
  }
  return wallClockMs;
}

export const formatLocalDateTime = (wallClockMs: WallClockMs): string =>
  new Date(wallClockMs).toISOString().slice(0, 16);

/** Minutes after midnight of `HH:mm`; `24:00` is 1440. Throws `bad local time`. */
export function parseTimeOfDay(text: string): number {
  const match = /^(?:([01]\d|2[0-3]):([0-5]\d)|24:00)$/.exec(text);
  if (match === null)
    throw new MarketError('bad local time', `“${text}” is not a time of day such as 08:30 or 24:00.`, { text });
  return match[1] === undefined ? 1440 : Number(match[1]) * 60 + Number(match[2]);
}

/** ISO weekday, 1 is Monday. */
export const isoWeekday = (wallClockMs: WallClockMs): number => new Date(wallClockMs).getUTCDay() || 7;

/** Midnight that begins the day. */
export const startOfDay = (wallClockMs: WallClockMs): WallClockMs => Math.floor(wallClockMs / DAY_MS) * DAY_MS;
