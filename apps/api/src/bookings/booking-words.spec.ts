import { expect, it } from 'vitest';
import { lengthText, utcText } from './booking-words.js';

it('counts the days of the year from 1, also in leap years, and never rounds an instant up', () => {
  expect(utcText(Date.UTC(2026, 11, 1, 14, 5, 9, 999))).toBe('2026-335 14:05:09 UTC');
  expect(utcText(Date.UTC(2028, 11, 31, 23, 59, 59, 999))).toBe('2028-366 23:59:59 UTC');
  expect(utcText(Date.UTC(2027, 0, 1))).toBe('2027-001 00:00:00 UTC');
});

it('writes lengths to the second', () => {
  expect([570_000, 45_400, 61_000].map(lengthText)).toEqual(['9 min 30 s', '45 s', '1 min 01 s']);
});
