import { describe, expect, it } from 'vitest';
import { readCalendarFile } from './calendar-file.js';
import { entryInstances } from './entries.js';

const OSLO = { timeZone: 'Europe/Oslo', reason: 'maintenance' } as const;
const calendar = (...events: string[]) =>
  [
    'BEGIN:VCALENDAR',
    'VERSION:2.0',
    'PRODID:-//Tern Rock//Plan//EN',
    ...events.map(eventText),
    'END:VCALENDAR',
    '',
  ].join('\r\n');
const eventText = (lines: string) =>
  ['BEGIN:VEVENT', 'UID:1@tern.example', 'DTSTAMP:20261201T000000Z', ...lines.split('\n'), 'END:VEVENT'].join('\r\n');
const read = (...events: string[]) => readCalendarFile(calendar(...events), OSLO);
const startsOf = (event: string, fromUtc: string, toUtc: string) => {
  const [entry] = read(event).entries;
  if (!entry) throw new Error('The event was refused.');
  return entryInstances(entry, Date.parse(fromUtc), Date.parse(toUtc)).map((each) =>
    new Date(each.fromMs).toISOString().slice(0, 16),
  );
};
const refusalOf = (event: string) => read(event).refused[0]?.message;

describe('an iCalendar file of blackouts', () => {
  it('reads times in UTC, on a named clock and on the clock of the station', () => {
    const { entries, refused } = read(
      'SUMMARY:Bearings\nDTSTART:20261210T080000Z\nDTEND:20261210T100000Z',
      'DTSTART;TZID=America/New_York:20261210T080000\nDURATION:PT90M',
      'DTSTART:20261210T080000\nDTEND:20261210T093030',
    );
    expect(refused).toEqual([]);
    expect(entries).toMatchObject([
      { startLocal: '2026-12-10T08:00', timeZone: 'UTC', durationMin: 120, note: 'Bearings', rrule: null },
      { startLocal: '2026-12-10T08:00', timeZone: 'America/New_York', durationMin: 90 },
      { startLocal: '2026-12-10T08:00', timeZone: 'Europe/Oslo', durationMin: 91 },
    ]);
  });

  it('keeps a weekly event at its hour on the clock through both clock changes (RFC 5545 3.8.5.3)', () => {
    const event = 'DTSTART;TZID=America/New_York:20070301T090000\nDURATION:PT1H\nRRULE:FREQ=WEEKLY;COUNT=40';
    // RFC 5545 3.6.5 gives New York's changes of 2007: 11 March and 4 November.
    expect(startsOf(event, '2007-03-01T00:00:00Z', '2007-03-20T00:00:00Z')).toEqual([
      '2007-03-01T14:00',
      '2007-03-08T14:00',
      '2007-03-15T13:00',
    ]);
    expect(startsOf(event, '2007-10-31T00:00:00Z', '2007-11-10T00:00:00Z')).toEqual([
      '2007-11-01T13:00',
      '2007-11-08T14:00',
    ]);
  });

  it('leaves out what EXDATE names (RFC 5545 3.8.5.1), and counts it all the same', () => {
    const event =
      'DTSTART;TZID=Europe/Oslo:20261201T090000\nDURATION:PT1H\nRRULE:FREQ=DAILY;COUNT=4\nEXDATE;TZID=Europe/Oslo:20261202T090000,20261203T090000';
    expect(startsOf(event, '2026-11-01T00:00:00Z', '2027-01-01T00:00:00Z')).toEqual([
      '2026-12-01T08:00',
      '2026-12-04T08:00',
    ]);
  });

  it('takes whole days of 23 and 25 hours at the clock changes (2027-03-28 and 2026-10-25 in Oslo)', () => {
    const { entries } = read(
      'DTSTART;VALUE=DATE:20270328\nDTEND;VALUE=DATE:20270329',
      'DTSTART;VALUE=DATE:20261025',
      'DTSTART;VALUE=DATE:20261024\nRRULE:FREQ=DAILY;COUNT=3',
    );
    expect(entries.slice(0, 2).map((each) => each.durationMin)).toEqual([23 * 60, 25 * 60]);
    const [, , daily] = entries;
    if (!daily) throw new Error('The daily event was refused.');
    const lengths = entryInstances(daily, Date.parse('2026-10-20T00:00:00Z'), Date.parse('2026-11-01T00:00:00Z')).map(
      (each) => (each.toMs - each.fromMs) / 3_600_000,
    );
    expect(lengths).toEqual([24, 25, 24]);
  });

  it('names each event that it cannot keep as it is meant, and keeps the others', () => {
    const { entries, refused } = read(
      'SUMMARY:Good\nDTSTART:20261210T080000Z\nDTEND:20261210T100000Z',
      'SUMMARY:Backwards\nDTSTART:20261210T100000Z\nDTEND:20261210T080000Z',
    );
    expect(entries.map((each) => each.note)).toEqual(['Good']);
    expect(refused).toEqual([
      { event: '“Backwards” of 2026-12-10T10:00:00Z', message: 'It does not end after it begins.' },
    ]);
    expect(refusalOf('DTSTART:20261210T080000Z\nDTEND:20261210T100000Z\nSTATUS:CANCELLED')).toContain('cancelled');
    expect(refusalOf('DTSTART:20261210T080000Z\nDTEND:20261210T100000Z\nTRANSP:TRANSPARENT')).toContain('free time');
    expect(refusalOf('DTSTART:20261210T080000Z')).toContain('neither DTEND nor DURATION');
    expect(refusalOf('DTSTART;TZID=Tern Time:20261210T080000\nDURATION:PT1H')).toContain('“Tern Time”');
    expect(refusalOf('DTSTART:20261210T080000Z\nDURATION:PT1H\nRRULE:FREQ=HOURLY;COUNT=3')).toContain('FREQ');
    expect(refusalOf('DTSTART:20261210T080000Z\nDURATION:PT1H\nRDATE:20261211T080000Z')).toContain('RDATE');
    expect(refusalOf('DTSTART:20261210T080000Z\nDURATION:PT1H\nRECURRENCE-ID:20261210T080000Z')).toContain(
      'one instance',
    );
    expect(refusalOf('DTSTART;VALUE=DATE:20261210\nDTEND;VALUE=DATE:20261213\nRRULE:FREQ=MONTHLY')).toContain(
      'whole days',
    );
    expect(refusalOf('SUMMARY:No start')).toContain('DTSTART');
    expect(refusalOf('DTSTART:20261210T080000Z\nDURATION:PT30H\nRRULE:FREQ=DAILY;COUNT=3')).toContain(
      'overlaps itself',
    );
  });

  it('refuses what is no calendar, an empty one and one with too many events', () => {
    expect(() => readCalendarFile('from,to\n1,2', OSLO)).toThrow('not an iCalendar file');
    expect(() => readCalendarFile(calendar(), OSLO)).toThrow('no events');
    const many = Array.from({ length: 201 }, () => 'DTSTART:20261210T080000Z\nDURATION:PT1H');
    expect(() => read(...many)).toThrow('201 events');
  });
});
