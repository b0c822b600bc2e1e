import { expect, it } from 'vitest';
import { clockOf, utcOfClock } from './clock-text.js';

const AOS = '2026-11-24T23:55:10.000Z';

it('reads clock times near the contact, across midnight', () => {
  expect(utcOfClock('23:57', AOS)).toBe('2026-11-24T23:57:00.000Z');
  expect(utcOfClock('0:02:30', AOS)).toBe('2026-11-25T00:02:30.000Z');
  expect(utcOfClock('23:59:59', '2026-11-25T00:01:00.000Z')).toBe('2026-11-24T23:59:59.000Z');
  expect(clockOf(AOS)).toBe('23:55:10');
});

it('refuses what is no time', () => {
  for (const text of ['', '24:00', '12', '12:60', 'noon', '12:00:00.5']) expect(utcOfClock(text, AOS)).toBeNull();
});
