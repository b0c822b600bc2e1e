import { describe, expect, it } from 'vitest';
import {
  dayOfYear,
  formatBytes,
  formatCalendarDay,
  formatCountdown,
  formatDayTime,
  formatDegrees,
  formatDuration,
  formatLocalTime,
  formatMoney,
  formatNumber,
} from './format.js';

const AT = Date.UTC(2026, 11, 1, 14, 5, 9, 400);
const plain = (text: string) => text.replace(/[\u00a0\u202f]/g, ' ');

describe('times', () => {
  it('counts the days of a year as ISO 8601 ordinal dates do', () => {
    expect(dayOfYear(Date.UTC(2026, 0, 1))).toBe(1);
    expect(dayOfYear(Date.UTC(2024, 11, 31, 23, 59, 59))).toBe(366);
    expect(dayOfYear(Date.UTC(1985, 3, 12))).toBe(102); // ISO 8601, the standard's own example 1985-102
  });

  it('writes UTC with the day of year and cuts to the second', () => {
    expect(formatDayTime(AT)).toBe('2026-335 14:05:09');
  });

  it('writes the calendar day and a place’s own clock', () => {
    expect(formatCalendarDay(AT)).toBe('Tue 1 Dec 2026');
    expect(formatLocalTime(AT, 'Europe/Oslo')).toBe('15:05');
    expect(formatLocalTime(AT, 'America/Argentina/Buenos_Aires', true)).toBe('11:05:09');
  });
});

describe('durations', () => {
  it.each([
    [0, '0 s'],
    [45_000, '45 s'],
    [59_600, '1 min'],
    [582_000, '9 min 42 s'],
    [541_000, '9 min 01 s'],
    [600_000, '10 min'],
    [9_120_000, '2 h 32 min'],
    [3_599_600, '1 h'],
    [3 * 86_400_000 + 4 * 3_600_000, '3 d 4 h'],
    [-45_000, '−45 s'],
  ])('%i ms is %s', (ms, text) => {
    expect(plain(formatDuration(ms))).toBe(text);
  });

  it('counts down to zero and not below', () => {
    expect(formatCountdown(261_000)).toBe('4:21');
    expect(formatCountdown(260_001)).toBe('4:21');
    expect(formatCountdown(3_723_000)).toBe('1:02:03');
    expect(formatCountdown(1)).toBe('0:01');
    expect(formatCountdown(-5_000)).toBe('0:00');
  });
});

describe('numbers', () => {
  it('groups by thousands, with a true minus and no minus zero', () => {
    expect(plain(formatNumber(14823.4, 2))).toBe('14 823.40');
    expect(formatNumber(-0.04, 1)).toBe('0.0');
    expect(formatNumber(-12.5, 1)).toBe('−12.5');
    expect(formatDegrees(39.46)).toBe('39.5°');
  });

  it('writes money with its currency, by the decimals of ISO 4217', () => {
    expect(formatMoney({ amountMinor: 8188, currency: 'EUR' })).toBe('€81.88');
    expect(formatMoney({ amountMinor: 8188, currency: 'EUR' }, true)).toBe('€82');
    expect(plain(formatMoney({ amountMinor: -118587, currency: 'EUR' }))).toBe('−€1 185.87');
    expect(plain(formatMoney({ amountMinor: 8188, currency: 'CHF' }))).toBe('CHF 81.88');
    expect(plain(formatMoney({ amountMinor: 8188, currency: 'JPY' }))).toMatch(/8 188$/);
    expect(plain(formatMoney({ amountMinor: 8188, currency: 'KWD' }))).toBe('KWD 8.188');
    // The engine's own data has no decimals for it; ISO 4217 (list one) has two.
    expect(plain(formatMoney({ amountMinor: 8188, currency: 'HUF' }))).toBe('HUF 81.88');
  });

  it('writes volumes in decimal units', () => {
    expect(plain(formatBytes(62_000_000))).toBe('62 MB');
    expect(plain(formatBytes(21_400_000_000))).toBe('21.4 GB');
    expect(plain(formatBytes(999))).toBe('999 B');
    expect(plain(formatBytes(999_600))).toBe('1.0 MB');
  });
});
