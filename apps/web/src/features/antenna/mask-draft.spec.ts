import { describe, expect, it } from 'vitest';
import {
  beginDraft,
  csvOf,
  isSameMask,
  largestChange,
  maskDraft,
  maskOf,
  pointsOf,
  skyAbovePercent,
} from './mask-draft.js';

const flat = (elevationDeg: number) => pointsOf([[0, elevationDeg]]);

describe('what a mask leaves of the sky', () => {
  it('is the whole hemisphere over a flat horizon, and half of it above 30 degrees', () => {
    expect(skyAbovePercent(flat(0))).toBeCloseTo(100, 9);
    expect(skyAbovePercent(flat(30))).toBeCloseTo(50, 9);
    expect(skyAbovePercent(flat(90))).toBeCloseTo(0, 9);
  });

  it('gains nothing from ground that falls away below the horizon', () => {
    expect(skyAbovePercent(flat(-5))).toBeCloseTo(100, 9);
  });

  it('finds the largest change and its direction', () => {
    const before = pointsOf([
      [0, 5],
      [90, 5],
      [180, 5],
    ]);
    const now = before.map((point) => (point.azimuthDeg === 90 ? { ...point, elevationDeg: 12 } : point));
    expect(largestChange(before, now)).toEqual({ azimuthDeg: 90, changeDeg: 7 });
    expect(largestChange(now, before).changeDeg).toBe(-7);
  });
});

describe('the draft of a mask', () => {
  const points = pointsOf([
    [200, 3],
    [10, 5],
  ]);

  it('orders points by azimuth and gives them back as tuples', () => {
    expect(maskOf(points)).toEqual([
      [10, 5],
      [200, 3],
    ]);
    expect(csvOf(points)).toBe('azimuth_deg,elevation_deg\n10,5\n200,3\n');
  });

  it('goes back one drag at a time', () => {
    const raised = (elevationDeg: number) => points.map((point, index) => (index ? point : { ...point, elevationDeg }));
    let draft = beginDraft(points);
    draft = maskDraft(draft, { kind: 'change', points: raised(6), settled: false });
    draft = maskDraft(draft, { kind: 'change', points: raised(7), settled: false });
    expect(draft.past).toHaveLength(0);
    draft = maskDraft(draft, { kind: 'change', points: raised(8), settled: true });
    draft = maskDraft(draft, { kind: 'change', points: raised(9), settled: true });
    draft = maskDraft(draft, { kind: 'undo' });
    expect(draft.points[0]?.elevationDeg).toBe(8);
    draft = maskDraft(draft, { kind: 'undo' });
    expect(isSameMask(draft.points, points)).toBe(true);
    expect(maskDraft(draft, { kind: 'undo' })).toBe(draft);
  });

  it('does not count a click without a move as a step', () => {
    const draft = maskDraft(beginDraft(points), { kind: 'change', points: [...points], settled: true });
    expect(draft.past).toHaveLength(0);
  });
});
