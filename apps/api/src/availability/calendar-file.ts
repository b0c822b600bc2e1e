/** Blackouts from an iCalendar file (RFC 5545). What cannot be kept exactly as it is meant is refused by name, never guessed. */
import { DAY_MS, fromWallClock, isTimeZone, parseLocalDateTime } from '@skyberth/market';
import type { BlackoutEntry, ResponseOf, routes } from '@skyberth/shared';
import ICAL from 'ical.js';
import { DomainError } from '../platform/domain-error.js';
import { entryFaults } from './entries.js';

type Reading = ResponseOf<typeof routes.readCalendarFile>;

interface Defaults {
  /** IANA zone of all-day events and of times without a zone. */
  readonly timeZone: string;
  readonly reason: BlackoutEntry['reason'];
}

/** Events that one file may have: as many as can be blocked out at once. */
const MOST_EVENTS = 200;
const MINUTE_MS = 60_000;
const LONGEST_NOTE = 120;

/** Says why an event cannot be used. */
class Refused extends Error {}

/** Throws `bad-input` where the text is no iCalendar file, or has no events or too many. */
export function readCalendarFile(text: string, defaults: Defaults): Reading {
  const events = eventsOf(text);
  const reading: Reading = { entries: [], refused: [] };
  events.forEach((event, index) => {
    const summary = String(event.getFirstPropertyValue('summary') ?? '').trim();
    try {
      reading.entries.push(entryOf(event, summary, defaults));
    } catch (error) {
      if (!(error instanceof Refused)) throw error;
      const start = event.getFirstPropertyValue('dtstart');
      const name = [summary ? `“${summary}”` : `event ${index + 1}`, start === null ? '' : `of ${start}`];
      reading.refused.push({ event: name.filter(Boolean).join(' '), message: error.message });
    }
  });
  return reading;
}

function eventsOf(text: string): ICAL.Component[] {
  const events: ICAL.Component[] = [];
  try {
    const parsed: unknown = ICAL.parse(text);
    const calendars = Array.isArray(parsed) && Array.isArray(parsed[0]) ? parsed : [parsed];
    for (const each of calendars) events.push(...new ICAL.Component(each).getAllSubcomponents('vevent'));
  } catch (error) {
    // The library throws for text that breaks the grammar; its sentences name the place.
    const why = error instanceof Error ? ` ${error.message}` : '';
    throw new DomainError('bad-input', `That is not an iCalendar file.${why}`);
  }
  if (events.length === 0) throw new DomainError('bad-input', 'The calendar has no events.');
  if (events.length > MOST_EVENTS)
    throw new DomainError('bad-input', `The calendar has ${events.length} events; ${MOST_EVENTS} can be read at once.`);
  return events;
}

function entryOf(event: ICAL.Component, summary: string, defaults: Defaults): BlackoutEntry {
  refuseWhatIsNoBlackout(event);
  const start = event.getFirstProperty('dtstart');
  if (start === null) throw new Refused('It has no DTSTART.');
  const { time, timeZone } = timeOf(start, defaults.timeZone);
  const { durationMin, endLocal } = lengthOf(event, { time, timeZone });
  const entry: BlackoutEntry = {
    startLocal: localText(time),
    durationMin,
    endLocal,
    timeZone,
    rrule: recurrenceOf(event),
    exceptLocal: exceptionsOf(event, timeZone, time),
    reason: defaults.reason,
    note: summary.slice(0, LONGEST_NOTE),
  };
  const [fault] = entryFaults(entry);
  if (fault !== undefined) throw new Refused(fault.sentence);
  return entry;
}

function refuseWhatIsNoBlackout(event: ICAL.Component): void {
  const value = (name: string): string => String(event.getFirstPropertyValue(name) ?? '').toUpperCase();
  if (value('status') === 'CANCELLED') throw new Refused('It was cancelled.');
  if (value('transp') === 'TRANSPARENT') throw new Refused('It is marked as free time (TRANSP:TRANSPARENT).');
  if (event.hasProperty('recurrence-id'))
    throw new Refused('It moves one instance of a recurring event; block that time out by hand.');
  if (event.hasProperty('rdate')) throw new Refused('It lists further dates (RDATE), which are not read.');
  if (event.getAllProperties('rrule').length > 1) throw new Refused('It has more than one RRULE.');
}

/** A time as the file writes it, and the zone on whose clock it stands. */
function timeOf(property: ICAL.Property, ownZone: string): { time: ICAL.Time; timeZone: string } {
  const time: unknown = property.getFirstValue();
  if (!(time instanceof ICAL.Time)) throw new Refused(`${property.name.toUpperCase()} is no date or time.`);
  const named: unknown = property.getParameter('tzid');
  if (typeof named !== 'string') return { time, timeZone: time.zone === ICAL.Timezone.utcTimezone ? 'UTC' : ownZone };
  if (!isTimeZone(named))
    throw new Refused(`Its time zone “${named}” is not one of the IANA database, such as Europe/Oslo.`);
  return { time, timeZone: named };
}

const two = (value: number): string => String(value).padStart(2, '0');
/** Seconds are dropped: a blackout begins with the minute that its event begins in. */
const localText = ({ year, month, day, hour, minute }: ICAL.Time): string =>
  `${String(year).padStart(4, '0')}-${two(month)}-${two(day)}T${two(hour)}:${two(minute)}`;

const wallOf = (time: ICAL.Time): number => {
  const text = localText(time);
  try {
    return parseLocalDateTime(text);
  } catch {
    throw new Refused(`“${text}” is not a local time.`);
  }
};

interface Begin {
  readonly time: ICAL.Time;
  readonly timeZone: string;
}

/** Exact minutes; all-day events that come again end at midnight on the clock, so that a day of 23 hours stays a day. */
function lengthOf(event: ICAL.Component, begin: Begin): { durationMin: number | null; endLocal: string | null } {
  const end = event.getFirstProperty('dtend');
  const fromWallMs = wallOf(begin.time);
  const fromMs = fromWallClock(fromWallMs, begin.timeZone);
  const days = daysOf(event, begin, fromWallMs);
  if (days !== null) {
    if (event.hasProperty('rrule')) {
      if (days !== 1) throw new Refused('It takes several whole days and comes again; give it times of day instead.');
      return { durationMin: null, endLocal: '24:00' };
    }
    const toMs = fromWallClock(fromWallMs + days * DAY_MS, begin.timeZone);
    return { durationMin: minutes(toMs - fromMs), endLocal: null };
  }
  if (end === null) return { durationMin: minutes(durationMsOf(event)), endLocal: null };
  const { time, timeZone } = timeOf(end, begin.timeZone);
  const toMs = fromWallClock(wallOf(time), timeZone) + (time.second > 0 ? MINUTE_MS : 0);
  return { durationMin: minutes(toMs - fromMs), endLocal: null };
}

/** Whole days of an all-day event, null for one with times. Without an end it takes one day (RFC 5545 3.6.1). */
function daysOf(event: ICAL.Component, { time }: Begin, fromWallMs: number): number | null {
  if (!time.isDate) return null;
  const end: unknown = event.getFirstPropertyValue('dtend');
  if (end instanceof ICAL.Time) return (wallOf(end) - fromWallMs) / DAY_MS;
  return event.hasProperty('duration') ? durationMsOf(event) / DAY_MS : 1;
}

function durationMsOf(event: ICAL.Component): number {
  const duration: unknown = event.getFirstPropertyValue('duration');
  if (!(duration instanceof ICAL.Duration))
    throw new Refused('It has neither DTEND nor DURATION, so it takes no time.');
  return duration.toSeconds() * 1_000;
}

function minutes(lengthMs: number): number {
  if (!(lengthMs > 0)) throw new Refused('It does not end after it begins.');
  return Math.ceil(lengthMs / MINUTE_MS);
}

function recurrenceOf(event: ICAL.Component): string | null {
  const rule: unknown = event.getFirstPropertyValue('rrule');
  return rule instanceof ICAL.Recur ? rule.toString() : null;
}

/** Left-out starts, read on the clock of the event. An all-day exception leaves out that day’s start. */
function exceptionsOf(event: ICAL.Component, timeZone: string, begin: ICAL.Time): string[] {
  return event.getAllProperties('exdate').flatMap((property) => {
    const { timeZone: zone } = timeOf(property, timeZone);
    return property.getValues().map((value: unknown) => {
      if (!(value instanceof ICAL.Time)) throw new Refused('An EXDATE is no date or time.');
      if (value.isDate) return `${localText(value).slice(0, 10)}${localText(begin).slice(10)}`;
      if (zone !== timeZone)
        throw new Refused(`An EXDATE stands on the clock of ${zone}, the event on that of ${timeZone}.`);
      return localText(value);
    });
  });
}
