import { describe, expect, it } from 'vitest';
import { MINUTE_MS, pass, T0, threeRows } from './board-fixture.js';
import { indexHumps } from './hump-index.js';
import { afterPaging, entryHump, isMoveKey, neighbour } from './keyboard.js';

const layout = threeRows();
const index = indexHumps([
  pass('late', 'a1', 60, 70),
  pass('early', 'a1', 0, 10),
  pass('middle', 'a1', 30, 40),
  pass('below', 'b1', 28, 33),
  pass('belowFar', 'b1', 90, 99),
]);

describe('arrow keys on the board', () => {
  it('go from pass to pass in order of time', () => {
    expect(neighbour(index, layout, 'early', 'ArrowRight')?.id).toBe('middle');
    expect(neighbour(index, layout, 'middle', 'ArrowLeft')?.id).toBe('early');
    expect(neighbour(index, layout, 'early', 'End')?.id).toBe('late');
    expect(neighbour(index, layout, 'late', 'Home')?.id).toBe('early');
  });

  it('stay at an edge', () => {
    expect(neighbour(index, layout, 'early', 'ArrowLeft')).toBeNull();
    expect(neighbour(index, layout, 'late', 'ArrowRight')).toBeNull();
    expect(neighbour(index, layout, 'early', 'Home')).toBeNull();
    expect(neighbour(index, layout, 'early', 'ArrowUp')).toBeNull();
    expect(neighbour(index, layout, 'nobody', 'ArrowRight')).toBeNull();
  });

  it('skip a row without passes and take the nearest in time', () => {
    expect(neighbour(index, layout, 'middle', 'ArrowDown')?.id).toBe('below');
    expect(neighbour(index, layout, 'late', 'ArrowDown')?.id).toBe('belowFar');
    expect(neighbour(index, layout, 'below', 'ArrowUp')?.id).toBe('middle');
  });

  it('keep to the row when a page of time is turned', () => {
    expect(afterPaging(index, 'early', 32 * MINUTE_MS)?.id).toBe('middle');
    expect(afterPaging(index, 'early', 500 * MINUTE_MS)?.id).toBe('late');
    expect(afterPaging(index, 'nobody', 0)).toBeNull();
  });

  it('are told from other keys', () => {
    expect(isMoveKey('Home')).toBe(true);
    expect(isMoveKey('Enter')).toBe(false);
  });
});

describe('where the keyboard enters', () => {
  const view = { fromMs: T0, toMs: T0 + 120 * MINUTE_MS };

  it('is the picked pass, else the first still to end, else the first', () => {
    expect(entryHump(index, layout, view, ['below'], T0)?.id).toBe('below');
    expect(entryHump(index, layout, view, [], T0 + 35 * MINUTE_MS)?.id).toBe('middle');
    expect(entryHump(index, layout, view, [], T0 + 500 * MINUTE_MS)?.id).toBe('early');
    expect(entryHump(index, layout, { fromMs: 0, toMs: 1 }, [], T0)).toBeNull();
  });
});
