import { describe, expect, it } from 'vitest';
import { conflictsOf } from './conflicts.js';

const request = { aosUtc: '2026-12-02T10:00:00.000Z', losUtc: '2026-12-02T10:09:00.000Z' };
const blackout = (fromUtc: string, toUtc: string) => ({
  id: fromUtc,
  fromUtc,
  toUtc,
  repeats: false,
  reason: 'own use',
  note: '',
});

describe('a request and the owner’s own calendar', () => {
  it('is free within the hours and without blackouts', () => {
    const open = [{ fromUtc: request.aosUtc, toUtc: request.losUtc }];
    expect(conflictsOf({ open, blackouts: [] }, request)).toEqual({ blackouts: [], isOutsideHours: false });
  });

  it('collides with a blackout that overlaps it, not with one that only touches it', () => {
    const over = blackout('2026-12-02T10:08:00.000Z', '2026-12-02T12:00:00.000Z');
    const after = blackout('2026-12-02T10:09:00.000Z', '2026-12-02T12:00:00.000Z');
    const open = [{ fromUtc: request.aosUtc, toUtc: request.losUtc }];
    expect(conflictsOf({ open, blackouts: [over, after] }, request).blackouts).toEqual([over]);
  });

  it('lies outside hours that end before it does', () => {
    const open = [{ fromUtc: request.aosUtc, toUtc: '2026-12-02T10:05:00.000Z' }];
    expect(conflictsOf({ open, blackouts: [] }, request).isOutsideHours).toBe(true);
  });
});
