/**
 * Wall clocks of a place. A wall time is the reading of the clock there, written as if it were UTC milliseconds, so that
 * calendars, which know no zones, can draw it. Zones come from the browser's own IANA database.
 */

const HOUR_MS = 3_600_000;
const formats = new Map<string, Intl.DateTimeFormat>();

function formatOf(timeZone: string): Intl.DateTimeFormat {
  const known = formats.get(timeZone);
  if (known) return known;
  const made = new Intl.DateTimeFormat('en-GB', {
    timeZone,
    hourCycle: 'h23',
    year: 'numeric',
    month: '2-digit',
    day: '2-digit',
    hour: '2-digit',
    minute: '2-digit',
    second: '2-digit',
  });
  formats.set(timeZone, made);
  return made;
}

/** The clock's reading in `timeZone` at an instant, both in milliseconds. */
export function wallTimeOf(atMs: number, timeZone: string): number {
  const part: Record<string, number> = {};
  for (const { type, value } of formatOf(timeZone).formatToParts(atMs)) part[type] = Number(value);
  const { year = 0, month = 1, day = 1, hour = 0, minute = 0, second = 0 } = part;
  const whole = Date.UTC(year, month - 1, day, hour, minute, second);
  return whole + (((atMs % 1000) + 1000) % 1000);
}

/**
 * The instant at which the clock in `timeZone` reads `wallMs`. In the hour that a clock skips in spring, the reading after
 * the jump is taken; of the hour it repeats in autumn, the first (as RFC 5545 3.3.5 has it).
 */
export function instantOf(wallMs: number, timeZone: string): number {
  const offsets = [-24, 0, 24].map((hours) => {
    const around = wallMs + hours * HOUR_MS;
    return wallTimeOf(around, timeZone) - around;
  });
  const candidates = [...new Set(offsets)].map((offset) => wallMs - offset).sort((a, b) => a - b);
  const exact = candidates.find((candidate) => wallTimeOf(candidate, timeZone) === wallMs);
  return exact ?? wallMs - (offsets[0] ?? 0);
}

/** `2026-12-01 14:05:09` of a wall time: what Mantine's calendars and date fields read and write. */
export function wallText(wallMs: number): string {
  return new Date(wallMs).toISOString().slice(0, 19).replace('T', ' ');
}

/** The wall time in `2026-12-01 14:05:09`, `2026-12-01 14:05` or `2026-12-01`. NaN for anything else. */
export function readWallText(text: string): number {
  return Date.parse(`${text.length === 10 ? `${text}T00:00:00` : text.replace(' ', 'T')}Z`);
}

/** The instant at which the clock in `timeZone` reads this text; NaN for what is no reading. */
export function instantOfText(text: string, timeZone: string): number {
  const wallMs = readWallText(text);
  return Number.isNaN(wallMs) ? Number.NaN : instantOf(wallMs, timeZone);
}

/** Wall time of the Monday 00:00 that begins the week of a wall time. */
export function weekStart(wallMs: number): number {
  const day = Math.floor(wallMs / (24 * HOUR_MS));
  // 1 January 1970 was a Thursday.
  return (day - ((((day + 3) % 7) + 7) % 7)) * 24 * HOUR_MS;
}
