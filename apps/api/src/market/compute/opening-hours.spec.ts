import { describe, expect, it } from 'vitest';
import { sampleAntenna } from '../testing/samples.js';
import { OpeningHours } from './opening-hours.js';

const DAY_MS = 86_400_000;
const fromMs = Date.UTC(2026, 11, 1);

describe('OpeningHours', () => {
  it('opens on weekdays by the clock of the station', () => {
    const weekly = [{ days: [1, 2, 3, 4, 5], fromLocal: '08:00', toLocal: '16:00' }];
    const open = new OpeningHours().of(sampleAntenna({ weekly }), fromMs, fromMs + DAY_MS);
    // Tuesday in Oslo, an hour ahead of UTC in winter.
    expect(open).toContainEqual({ fromMs: Date.UTC(2026, 11, 1, 7), toMs: Date.UTC(2026, 11, 1, 15) });
  });

  it('is never open without rules, and open throughout with all of the week', () => {
    const hours = new OpeningHours();
    expect(hours.of(sampleAntenna({ weekly: [] }), fromMs, fromMs + DAY_MS)).toEqual([]);
    const [always] = hours.of(sampleAntenna(), fromMs, fromMs + 40 * DAY_MS);
    expect(always?.fromMs).toBeLessThanOrEqual(fromMs);
    expect(always?.toMs).toBeGreaterThanOrEqual(fromMs + 40 * DAY_MS);
  });

  it('gives the same answer again', () => {
    const hours = new OpeningHours();
    expect(hours.of(sampleAntenna(), fromMs, fromMs + DAY_MS)).toBe(hours.of(sampleAntenna(), fromMs, fromMs + DAY_MS));
  });
});
