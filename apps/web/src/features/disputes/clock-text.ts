/** Times of a contact typed as clock times in UTC; the day is that of the contact, or the one after past midnight. */
const DAY_MS = 86_400_000;
/** Nobody logs a contact longer than this before its AOS. */
const EARLY_MS = DAY_MS / 4;

/** `14:07:12` */
export const clockOf = (utc: string): string => new Date(Date.parse(utc)).toISOString().slice(11, 19);

/** The instant of a clock time near the contact, or null where the text is no time. Seconds may be left out. */
export function utcOfClock(text: string, aosUtc: string): string | null {
  const match = /^\s*([01]?\d|2[0-3]):([0-5]\d)(?::([0-5]\d))?\s*$/.exec(text);
  if (!match) return null;
  const aosMs = Date.parse(aosUtc);
  const dayMs = Math.floor(aosMs / DAY_MS) * DAY_MS;
  const [hours, minutes, seconds] = [Number(match[1]), Number(match[2]), Number(match[3] ?? 0)];
  let atMs = dayMs + ((hours * 60 + minutes) * 60 + seconds) * 1000;
  if (atMs < aosMs - EARLY_MS) atMs += DAY_MS;
  else if (atMs > aosMs + DAY_MS - EARLY_MS) atMs -= DAY_MS;
  return new Date(atMs).toISOString();
}
