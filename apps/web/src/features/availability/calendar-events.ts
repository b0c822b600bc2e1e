/** What the week's calendar draws: opening hours, blackouts and contacts as wall times of the station. */
import type { AntennaCalendar, BookingSummary } from '@skyberth/shared';
import { wallTimeOf } from '../../lib/zone-time.js';

const DAY_MS = 86_400_000;

export type CalendarKind = 'open' | 'blackout' | 'contact' | 'asked';

/** A span of the station's clock. */
export interface CalendarSpan {
  readonly id: string;
  readonly kind: CalendarKind;
  readonly title: string;
  readonly fromWallMs: number;
  readonly toWallMs: number;
}

/** Cuts a span at midnights and to the week: a calendar draws one day's part at a time. */
export function byDay(span: CalendarSpan, weekStartMs: number): CalendarSpan[] {
  const parts: CalendarSpan[] = [];
  for (let day = 0; day < 7; day += 1) {
    const dayStart = weekStartMs + day * DAY_MS;
    const fromWallMs = Math.max(span.fromWallMs, dayStart);
    const toWallMs = Math.min(span.toWallMs, dayStart + DAY_MS);
    if (toWallMs > fromWallMs) parts.push({ ...span, id: `${span.id} ${day}`, fromWallMs, toWallMs });
  }
  return parts;
}

/** When the antenna is open, weekly hours and openings together. */
export function openingSpans(calendar: AntennaCalendar, weekStartMs: number): CalendarSpan[] {
  return calendar.open.flatMap((open, index) =>
    byDay({ ...wallSpan(open, calendar.timeZone), id: `open${index}`, kind: 'open', title: 'Open' }, weekStartMs),
  );
}

const wallSpan = ({ fromUtc, toUtc }: { fromUtc: string; toUtc: string }, timeZone: string) => ({
  fromWallMs: wallTimeOf(Date.parse(fromUtc), timeZone),
  toWallMs: wallTimeOf(Date.parse(toUtc), timeZone),
});

export function blackoutSpans({ blackouts, timeZone }: AntennaCalendar, weekStartMs: number): CalendarSpan[] {
  return blackouts.flatMap((blackout) =>
    byDay(
      {
        ...wallSpan(blackout, timeZone),
        id: blackout.id,
        kind: 'blackout',
        title: `${blackout.note ? `${blackout.reason}: ${blackout.note}` : blackout.reason}${blackout.repeats ? ', again and again' : ''}`,
      },
      weekStartMs,
    ),
  );
}

/** States in which a contact still takes the antenna's time, or has taken it. */
export const SHOWN_STATES = 'awaiting owner,confirmed,under way,reporting,settled,failed,in dispute';

export function contactSpans(
  bookings: readonly BookingSummary[],
  timeZone: string,
  weekStartMs: number,
): CalendarSpan[] {
  return bookings.flatMap((booking) =>
    byDay(
      {
        id: booking.id,
        kind: booking.state === 'awaiting owner' ? 'asked' : 'contact',
        title: booking.spacecraftName,
        fromWallMs: wallTimeOf(Date.parse(booking.aosUtc), timeZone),
        toWallMs: wallTimeOf(Date.parse(booking.losUtc), timeZone),
      },
      weekStartMs,
    ),
  );
}
