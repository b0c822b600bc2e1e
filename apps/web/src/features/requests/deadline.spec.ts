import { describe, expect, it } from 'vitest';
import { byDeadline, deadlineMs, pressureOf } from './deadline.js';

const asked = { answerByUtc: '2026-12-01T14:00:00Z', aosUtc: '2026-12-01T18:00:00Z' };
const atMs = (time: string) => Date.parse(`2026-12-01T${time}Z`);

describe('the time to answer a request', () => {
  it('puts the one that ends first on top', () => {
    const later = { ...asked, answerByUtc: '2026-12-01T15:00:00Z' };
    expect([later, asked].sort(byDeadline)[0]).toBe(asked);
  });

  it('ends at AOS where no time was set', () => {
    expect(deadlineMs({ ...asked, answerByUtc: null })).toBe(atMs('18:00:00'));
  });

  it('presses in its last hour and is over at its end', () => {
    expect(pressureOf(asked, atMs('12:59:59'))).toBe('calm');
    expect(pressureOf(asked, atMs('13:00:00'))).toBe('pressing');
    expect(pressureOf(asked, atMs('14:00:00'))).toBe('over');
  });
});
