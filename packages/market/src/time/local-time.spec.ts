import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  fromWallClock,
  HOUR_MS,
  isoWeekday,
  isTimeZone,
  parseLocalDateTime,
  parseTimeOfDay,
  toWallClock,
} from './local-time.js';

const ZONES = ['Europe/Oslo', 'America/New_York', 'Australia/Lord_Howe', 'Asia/Kathmandu', 'Pacific/Apia', 'UTC'];

describe('station local time', () => {
  it('gives back every instant from the reading, except the second of two equal readings', () => {
    const instants = fc.integer({ min: Date.UTC(2015, 0, 1), max: Date.UTC(2035, 0, 1) });
    fc.assert(
      fc.property(fc.constantFrom(...ZONES), instants, (timeZone, timeMs) => {
        const back = fromWallClock(toWallClock(timeMs, timeZone), timeZone);
        expect(back <= timeMs && timeMs - back <= HOUR_MS).toBe(true);
        expect(toWallClock(back, timeZone)).toBe(toWallClock(timeMs, timeZone));
      }),
    );
  });

  it('moves by half an hour where the zone does (Lord Howe, 4 October 2026)', () => {
    const before = fromWallClock(Date.UTC(2026, 9, 4, 1, 59), 'Australia/Lord_Howe');
    const after = fromWallClock(Date.UTC(2026, 9, 4, 2, 30), 'Australia/Lord_Howe');
    expect(after - before).toBe(60_000);
  });

  it('refuses days that no calendar has, and times past 24:00', () => {
    expect(() => parseLocalDateTime('2026-02-30T08:00')).toThrow('“2026-02-30T08:00” is not a local time');
    expect(() => parseTimeOfDay('24:01')).toThrow('is not a time of day');
    expect(parseTimeOfDay('24:00')).toBe(1440);
  });

  it('knows impossible zones and counts Sunday as the seventh day', () => {
    expect(isTimeZone('Europe/Atlantis')).toBe(false);
    expect(() => fromWallClock(0, 'Europe/Atlantis')).toThrow('not a time zone');
    expect(isoWeekday(Date.UTC(2026, 11, 6))).toBe(7);
  });
});
