import { describe, expect, it } from 'vitest';
import { MINUTE_MS, pass, T0, threeRows } from './board-fixture.js';
import { humpAt, targetColumn } from './hit-test.js';
import { indexHumps } from './hump-index.js';

const view = { fromMs: T0, toMs: T0 + 100 * MINUTE_MS };
const WIDTH_PX = 1000;
const index = indexHumps([pass('wide', 'a1', 10, 20), pass('thin', 'a1', 40, 40.2), pass('over', 'a1', 18, 30)]);

describe('the pass under the pointer', () => {
  const layout = threeRows();
  const yPx = (layout.rows[0]?.topPx ?? 0) + 4;
  const hit = (xPx: number, y = yPx) => humpAt(index, layout, view, WIDTH_PX, { xPx, yPx: y })?.id;

  it('is hit in its whole column, however high the pointer is in the row', () => {
    expect(hit(101)).toBe('wide');
    expect(hit(101, yPx + 55)).toBe('wide');
    expect(hit(101, yPx + 75)).toBeUndefined();
    expect(hit(97)).toBeUndefined();
  });

  it('has a target that a pointer can reach however short it is', () => {
    expect(hit(401 - 11)).toBe('thin');
    expect(hit(401 - 14)).toBeUndefined();
  });

  it('is the nearer one where two overlap', () => {
    expect(hit(185)).toBe('wide');
    expect(hit(199)).toBe('over');
  });

  it('has a target of 44 px on the phone (WCAG 2.2, 2.5.5)', () => {
    const thin = index.byId.get('thin');
    if (!thin) throw new Error('the fixture lost its pass');
    const [x0, x1] = targetColumn(thin, view, WIDTH_PX, threeRows('phone').measures.targetPx);
    expect(x1 - x0).toBeCloseTo(44, 9);
  });
});
