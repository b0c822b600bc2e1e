import { describe, expect, it } from 'vitest';
import { T0 } from './board-fixture.js';
import { draggedView } from './gestures.js';
import { timeToX, xToTime } from './view.js';

const view = { fromMs: T0, toMs: T0 + 3_600_000 };
const target = { widthPx: () => 600, limits: () => undefined };

describe('dragging the board', () => {
  it('keeps the instant under one finger', () => {
    const held = xToTime(view, 600, 400);
    const moved = draggedView({ view, x: 400, spreadPx: 0 }, 250, 0, target);
    expect(timeToX(moved, 600, held)).toBeCloseTo(250, 6);
    expect(moved.toMs - moved.fromMs).toBe(3_600_000);
  });

  it('keeps the instant between two fingers and widens with them', () => {
    const held = xToTime(view, 600, 300);
    const pinched = draggedView({ view, x: 300, spreadPx: 100 }, 340, 200, target);
    expect(timeToX(pinched, 600, held)).toBeCloseTo(340, 6);
    expect(pinched.toMs - pinched.fromMs).toBeCloseTo(1_800_000, 6);
  });

  it('stops at the limits', () => {
    const limited = { widthPx: () => 600, limits: () => ({ fromMs: T0, toMs: T0 + 7_200_000 }) };
    expect(draggedView({ view, x: 0, spreadPx: 0 }, 500, 0, limited)).toEqual(view);
  });
});
