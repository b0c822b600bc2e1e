import { describe, expect, it } from 'vitest';
import { wallText } from '../../lib/zone-time.js';
import { blackoutSpans, byDay, openingSpans } from './calendar-events.js';

const MONDAY = Date.UTC(2026, 10, 30);
const words = (spans: ReturnType<typeof byDay>) =>
  spans.map((span) => `${wallText(span.fromWallMs).slice(8, 16)} to ${wallText(span.toWallMs).slice(8, 16)}`);

describe('the week of an antenna', () => {
  const calendar = { timeZone: 'Europe/Oslo', open: [], openings: [], blackouts: [], rules: [] };

  it('draws open time on the clock of the station, a part for each day', () => {
    const open = [{ fromUtc: '2026-11-29T21:00:00Z', toUtc: '2026-12-01T23:00:00Z' }];
    expect(words(openingSpans({ ...calendar, open }, MONDAY))).toEqual([
      '30 00:00 to 01 00:00',
      '01 00:00 to 02 00:00',
    ]);
  });

  it('draws a blackout by its reason, and says when it comes again', () => {
    const blackout = {
      id: 'b',
      fromUtc: '2026-12-01T20:00:00Z',
      toUtc: '2026-12-02T03:00:00Z',
      repeats: true,
      reason: 'maintenance',
      note: '',
    };
    const spans = blackoutSpans({ ...calendar, blackouts: [blackout] }, MONDAY);
    expect(words(spans)).toEqual(['01 21:00 to 02 00:00', '02 00:00 to 02 04:00']);
    expect(spans[0]?.title).toBe('maintenance, again and again');
  });

  it('leaves out what lies in another week', () => {
    const span = { id: 'x', kind: 'contact' as const, title: '', fromWallMs: MONDAY - 10, toWallMs: MONDAY };
    expect(byDay(span, MONDAY)).toEqual([]);
  });
});
