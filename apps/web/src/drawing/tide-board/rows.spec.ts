import { describe, expect, it } from 'vitest';
import { threeRows } from './board-fixture.js';
import { lowerBound, rowAt, rowsBetween } from './rows.js';

describe('the rows of the board', () => {
  const layout = threeRows();
  const { stripPx, rowPx } = layout.measures;

  it('stand below their station’s strip, one after the other', () => {
    expect(layout.rows.map((row) => row.topPx)).toEqual([stripPx, stripPx + rowPx, 2 * stripPx + 2 * rowPx]);
    expect(layout.heightPx).toBe(2 * stripPx + 3 * rowPx);
  });

  it('are found by their height, and a strip is no row', () => {
    expect(rowAt(layout, stripPx)?.row.id).toBe('a1');
    expect(rowAt(layout, stripPx + rowPx - 0.5)?.row.id).toBe('a1');
    expect(rowAt(layout, stripPx + rowPx)?.row.id).toBe('a2');
    expect(rowAt(layout, 3)).toBeNull();
    expect(rowAt(layout, layout.heightPx + 1)).toBeNull();
  });

  it('are cut to the ones in sight', () => {
    expect(rowsBetween(layout, 0, layout.heightPx)).toEqual([0, 3]);
    expect(rowsBetween(layout, stripPx + 5, stripPx + 6)).toEqual([0, 1]);
    expect(rowsBetween(layout, 0, 3)).toEqual([0, 0]);
  });

  it('need no strip on the phone', () => {
    expect(threeRows('phone').rows[0]?.topPx).toBe(0);
  });
});

describe('the first index that holds', () => {
  it('is found at both ends and in the middle', () => {
    for (let edge = 0; edge <= 9; edge += 1) expect(lowerBound(9, (index) => index >= edge)).toBe(edge);
  });
});
