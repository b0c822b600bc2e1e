/** iCalendar by RFC 5545 with the calendar properties of RFC 7986. Text in, text out: the caller says when it is. */

export interface CalendarEvent {
  /** The same for ever for the same contact, so that a changed one replaces itself. */
  readonly uid: string;
  /** When this text was made. */
  readonly stampMs: number;
  readonly startMs: number;
  /** Exclusive, as RFC 5545 3.6.1 has it. */
  readonly endMs: number;
  readonly summary: string;
  readonly description?: string;
  readonly location?: string;
  readonly place?: { readonly latitudeDeg: number; readonly longitudeDeg: number };
  readonly url?: string;
  readonly status?: 'TENTATIVE' | 'CONFIRMED' | 'CANCELLED';
  /** Goes up with each change that matters. */
  readonly sequence?: number;
  readonly categories?: readonly string[];
  /** Minutes before the start at which to remind. */
  readonly remindMinutes?: readonly number[];
}

export interface CalendarHead {
  readonly name: string;
  readonly description?: string;
  /** Names the maker of the text, RFC 5545 3.7.3. */
  readonly productId: string;
  /** How often a subscriber should look again. */
  readonly refreshMinutes?: number;
  readonly url?: string;
}

/** A whole calendar: CRLF, folded at 75 octets, times in UTC. */
export function icalendar(events: readonly CalendarEvent[], head: CalendarHead): string {
  const lines = ['BEGIN:VCALENDAR', 'VERSION:2.0', `PRODID:${escapeText(head.productId)}`, 'CALSCALE:GREGORIAN'];
  lines.push(`NAME:${escapeText(head.name)}`);
  if (head.description !== undefined) lines.push(`DESCRIPTION:${escapeText(head.description)}`);
  if (head.refreshMinutes !== undefined) lines.push(`REFRESH-INTERVAL;VALUE=DURATION:PT${head.refreshMinutes}M`);
  if (head.url !== undefined) lines.push(`URL:${oneLine(head.url)}`);
  for (const event of events) lines.push(...eventLines(event));
  lines.push('END:VCALENDAR');
  return lines.map(foldLine).join('');
}

function eventLines(event: CalendarEvent): string[] {
  const lines = [
    'BEGIN:VEVENT',
    `UID:${escapeText(event.uid)}`,
    `DTSTAMP:${utcStamp(event.stampMs)}`,
    `DTSTART:${utcStamp(event.startMs)}`,
    `DTEND:${utcStamp(event.endMs)}`,
    `SUMMARY:${escapeText(event.summary)}`,
  ];
  if (event.description !== undefined) lines.push(`DESCRIPTION:${escapeText(event.description)}`);
  if (event.location !== undefined) lines.push(`LOCATION:${escapeText(event.location)}`);
  if (event.place) lines.push(`GEO:${event.place.latitudeDeg.toFixed(6)};${event.place.longitudeDeg.toFixed(6)}`);
  if (event.url !== undefined) lines.push(`URL:${oneLine(event.url)}`);
  if (event.status !== undefined) lines.push(`STATUS:${event.status}`);
  if (event.sequence !== undefined) lines.push(`SEQUENCE:${event.sequence}`);
  if (event.categories?.length) lines.push(`CATEGORIES:${event.categories.map(escapeText).join(',')}`);
  for (const minutes of event.remindMinutes ?? []) {
    lines.push(
      'BEGIN:VALARM',
      'ACTION:DISPLAY',
      `DESCRIPTION:${escapeText(event.summary)}`,
      `TRIGGER:-PT${minutes}M`,
      'END:VALARM',
    );
  }
  lines.push('END:VEVENT');
  return lines;
}

/** `20261201T093000Z`: UTC to the second, the nearest one. */
function utcStamp(timeMs: number): string {
  return `${new Date(Math.round(timeMs / 1000) * 1000).toISOString().slice(0, 19).replace(/[-:]/g, '')}Z`;
}

/** RFC 5545 3.3.11: backslash, semicolon, comma and newline are escaped, a colon is not; other controls are dropped. */
function escapeText(text: string): string {
  return text
    .replace(/\r\n|\r/g, '\n')
    .replace(/[\\;,]/g, (sign) => `\\${sign}`)
    .replaceAll('\n', '\\n')
    .replace(CONTROLS, '');
}

// biome-ignore lint/suspicious/noControlCharactersInRegex: RFC 5545 3.1 forbids exactly these.
const CONTROLS = /[\u0000-\u0008\u000a-\u001f\u007f]/g;

/** A URL has no escapes, so a line break in it would begin a property of the writer's choice. */
function oneLine(text: string): string {
  return text.replace(CONTROLS, '');
}

const LONGEST_LINE_OCTETS = 75;

/** RFC 5545 3.1: a line longer than 75 octets goes on in the next, behind a space, never inside a character. */
export function foldLine(line: string): string {
  let folded = '';
  let octets = 0;
  for (const character of line) {
    const size = utf8Length(character);
    if (octets + size > LONGEST_LINE_OCTETS) {
      folded += '\r\n ';
      octets = 1;
    }
    folded += character;
    octets += size;
  }
  return `${folded}\r\n`;
}

function utf8Length(character: string): number {
  const point = character.codePointAt(0) ?? 0;
  if (point < 0x80) return 1;
  if (point < 0x800) return 2;
  return point < 0x10000 ? 3 : 4;
}
