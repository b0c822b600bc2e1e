import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { type CalendarEvent, foldLine, icalendar } from './icalendar.js';

const event: CalendarEvent = {
  uid: 'contact-7@harbour.example',
  stampMs: Date.UTC(2026, 10, 30, 8),
  startMs: Date.UTC(2026, 11, 1, 11, 32, 5, 905),
  endMs: Date.UTC(2026, 11, 1, 11, 41, 9, 183),
  summary: 'Lantern 1 over Basin; downlink, 68.9\u00b0',
  description: 'AOS 11:32:05\nCheck the mask: C:\\mask, please',
  location: 'Basin',
  place: { latitudeDeg: -23.5, longitudeDeg: 15.25 },
  status: 'CONFIRMED',
  sequence: 2,
  categories: ['contact', 'X band'],
  remindMinutes: [30],
};
const head = { name: 'Contacts', productId: '-//Harbour Example//Contacts//EN', refreshMinutes: 60 };

/** Undoes folding and escapes: RFC 5545 3.1 and 3.3.11. */
function unfold(text: string): string[] {
  return text.replaceAll('\r\n ', '').split('\r\n').slice(0, -1);
}
function unescaped(text: string): string {
  return text.replace(/\\([\\;,nN])/g, (_, sign: string) => (sign.toLowerCase() === 'n' ? '\n' : sign));
}
function valueOfProperty(text: string, name: string): string | undefined {
  return unfold(text)
    .find((line) => line.startsWith(`${name}:`))
    ?.slice(name.length + 1);
}

describe('a calendar', () => {
  const text = icalendar([event], head);

  it('has what RFC 5545 3.6.1 asks of an event, once each', () => {
    const lines = unfold(text);
    for (const name of ['UID', 'DTSTAMP', 'DTSTART', 'DTEND']) {
      expect(lines.filter((line) => line.startsWith(`${name}:`))).toHaveLength(1);
    }
    expect(lines.some((line) => line.startsWith('DURATION'))).toBe(false);
    expect(valueOfProperty(text, 'DTSTART')).toBe('20261201T113206Z');
    expect(valueOfProperty(text, 'DTEND')).toBe('20261201T114109Z');
    expect(valueOfProperty(text, 'GEO')).toBe('-23.500000;15.250000');
    expect(lines).toContain('TRIGGER:-PT30M');
    expect(lines).toContain('REFRESH-INTERVAL;VALUE=DURATION:PT60M');
  });

  it('gives its texts back', () => {
    expect(unescaped(valueOfProperty(text, 'SUMMARY')!)).toBe(event.summary);
    expect(valueOfProperty(text, 'DESCRIPTION')).toBe('AOS 11:32:05\\nCheck the mask: C:\\\\mask\\, please');
    expect(unescaped(valueOfProperty(text, 'DESCRIPTION')!)).toBe(event.description);
    expect(valueOfProperty(text, 'CATEGORIES')).toBe('contact,X band');
  });

  it('never has a line over 75 octets nor a bare line feed, and loses nothing, whatever the text', () => {
    fc.assert(
      fc.property(fc.string({ unit: 'binary', maxLength: 400 }), (summary) => {
        const made = icalendar([{ ...event, summary }], head);
        for (const line of made.split('\r\n')) expect(Buffer.byteLength(line)).toBeLessThanOrEqual(75);
        expect(made.replaceAll('\r\n', '')).not.toMatch(/[\r\n]/);
        const printable = [...summary.replace(/\r\n?/g, '\n')]
          .filter(
            (character) =>
              character === '\n' || character === '\t' || !/\p{Cc}/u.test(character) || character >= '\u0080',
          )
          .join('');
        expect(unescaped(valueOfProperty(made, 'SUMMARY')!)).toBe(printable);
      }),
    );
  });

  it('cannot be made to carry a property of a stranger through a URL', () => {
    const made = icalendar([{ ...event, url: 'https://harbour.example/1\r\nATTENDEE:mailto:x@y.example' }], head);
    expect(unfold(made).some((line) => line.startsWith('ATTENDEE'))).toBe(false);
  });

  it('folds inside no character', () => {
    expect(foldLine(`${'a'.repeat(74)}\u20ac`)).toBe(`${'a'.repeat(74)}\r\n \u20ac\r\n`);
    expect(foldLine('b'.repeat(75))).toBe(`${'b'.repeat(75)}\r\n`);
  });
});
