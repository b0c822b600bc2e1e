import { describe, expect, it } from 'vitest';
import { wallText } from '../../lib/zone-time.js';
import { blackoutSpans, byDay, openingSpans } from './calendar-events.js';

const MONDAY = Date.UTC(2026, 10, 30);
const words = (spans: ReturnType<typeof byDay>) =>
  spans.map((span) => `${wallText(span.fromWallMs).slice(8, 16)} to ${wallText(span.toWallMs).slice(8, 16)}`);

describe('the week of an antenna', () => {
  it('opens by the rules of the week', () => {
    expect(words(openingSpans([{ days: [1, 3], fromLocal: '08:00', toLocal: '24:00' }], MONDAY))).toEqual([
      '30 08:00 to 01 00:00',
      '02 08:00 to 03 00:00',
    ]);
  });

  it('brings in the night from the Sunday before, and cuts the one after', () => {
    expect(words(openingSpans([{ days: [7], fromLocal: '22:00', toLocal: '06:00' }], MONDAY))).toEqual([
      '30 00:00 to 30 06:00',
      '06 22:00 to 07 00:00',
    ]);
  });

  it('draws a blackout on the clock of the station, a part for each day', () => {
    const blackout = {
      id: 'b',
      antennaId: 'a',
      fromUtc: '2026-12-01T20:00:00Z',
      toUtc: '2026-12-02T03:00:00Z',
      reason: 'maintenance',
      note: '',
    };
    expect(words(blackoutSpans([blackout], 'Europe/Oslo', MONDAY))).toEqual([
      '01 21:00 to 02 00:00',
      '02 00:00 to 02 04:00',
    ]);
  });

  it('leaves out what lies in another week', () => {
    const span = { id: 'x', kind: 'contact' as const, title: '', fromWallMs: MONDAY - 10, toWallMs: MONDAY };
    expect(byDay(span, MONDAY)).toEqual([]);
  });
});
