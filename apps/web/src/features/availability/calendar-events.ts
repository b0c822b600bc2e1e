/** What the week's calendar draws: opening hours, blackouts and contacts as wall times of the station. */
import type { Antenna, BookingSummary } from '@skyberth/shared';
import { wallTimeOf } from '../../lib/zone-time.js';

const DAY_MS = 86_400_000;
const MINUTE_MS = 60_000;

export type CalendarKind = 'open' | 'blackout' | 'contact' | 'asked';

/** A span of the station's clock. */
export interface CalendarSpan {
  readonly id: string;
  readonly kind: CalendarKind;
  readonly title: string;
  readonly fromWallMs: number;
  readonly toWallMs: number;
}

const minutesOf = (timeOfDay: string): number => Number(timeOfDay.slice(0, 2)) * 60 + Number(timeOfDay.slice(3, 5));

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

/** The weekly rules in the week that begins on a Monday, with the night that runs in from the Sunday before. */
export function openingSpans(rules: Antenna['availability'], weekStartMs: number): CalendarSpan[] {
  return rules.flatMap((rule, index) => {
    const from = minutesOf(rule.fromLocal);
    const to = minutesOf(rule.toLocal);
    const lengthMin = to > from ? to - from : to + 1440 - from;
    const days = rule.days.includes(7) ? [0, ...rule.days] : rule.days;
    return days.flatMap((day) => {
      const fromWallMs = weekStartMs + (day - 1) * DAY_MS + from * MINUTE_MS;
      const span = {
        id: `open ${index} ${day}`,
        kind: 'open' as const,
        title: 'Open',
        fromWallMs,
        toWallMs: fromWallMs + lengthMin * MINUTE_MS,
      };
      return byDay(span, weekStartMs);
    });
  });
}

export function blackoutSpans(blackouts: Antenna['blackouts'], timeZone: string, weekStartMs: number): CalendarSpan[] {
  return blackouts.flatMap((blackout) =>
    byDay(
      {
        id: blackout.id,
        kind: 'blackout',
        title: blackout.note ? `${blackout.reason}: ${blackout.note}` : blackout.reason,
        fromWallMs: wallTimeOf(Date.parse(blackout.fromUtc), timeZone),
        toWallMs: wallTimeOf(Date.parse(blackout.toUtc), timeZone),
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

/** Contacts that a blackout would lie over; they stay sold. */
export function touchedBy(
  bookings: readonly BookingSummary[],
  fromMs: number,
  toMs: number,
): readonly BookingSummary[] {
  return bookings.filter(
    (booking) =>
      ['awaiting owner', 'confirmed', 'under way'].includes(booking.state) &&
      Date.parse(booking.aosUtc) < toMs &&
      Date.parse(booking.losUtc) > fromMs,
  );
}
