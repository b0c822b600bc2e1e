import { describe, expect, it } from 'vitest';
import { addPoint, azimuthAfter, isChanged, keyMove, movePoint, removePoint } from './mask-points.js';

const points = [
  { id: 'a', azimuthDeg: 10, elevationDeg: 5 },
  { id: 'b', azimuthDeg: 100, elevationDeg: 14 },
  { id: 'c', azimuthDeg: 250, elevationDeg: 8 },
];

describe('editing a mask', () => {
  it('keeps a point between its neighbours and above the horizon', () => {
    expect(movePoint(points, 'b', { azimuthDeg: 300, elevationDeg: -4 })[1]).toEqual({
      id: 'b',
      azimuthDeg: 249.9,
      elevationDeg: 0,
    });
    expect(movePoint(points, 'a', { azimuthDeg: -20, elevationDeg: 99 })[0]).toEqual({
      id: 'a',
      azimuthDeg: 0,
      elevationDeg: 90,
    });
    expect(movePoint(points, 'c', { azimuthDeg: 400, elevationDeg: 8 })[2]?.azimuthDeg).toBe(359.9);
  });

  it('rounds to a tenth of a degree', () => {
    const up = keyMove('ArrowUp', false, { id: 'b', azimuthDeg: 100, elevationDeg: 14.2 });
    expect(movePoint(points, 'b', up ?? { azimuthDeg: 0, elevationDeg: 0 })[1]?.elevationDeg).toBe(14.3);
  });

  it('moves by 0.1 degree, with Shift by 1, and leaves other keys alone', () => {
    const point = points[1] as (typeof points)[0];
    expect(keyMove('ArrowRight', false, point)?.azimuthDeg).toBeCloseTo(100.1, 9);
    expect(keyMove('ArrowDown', true, point)?.elevationDeg).toBe(13);
    expect(keyMove('Tab', false, point)).toBeNull();
  });

  it('adds a point on the line, once, in order', () => {
    const more = addPoint(points, 55, 'new');
    expect(more.map((point) => point.id)).toEqual(['a', 'new', 'b', 'c']);
    expect(more[1]?.elevationDeg).toBe(9.5);
    expect(addPoint(more, 55.04, 'again')).toBe(more);
  });

  it('finds the middle to the next point, across north from the last', () => {
    expect(azimuthAfter(points, 'a')).toBe(55);
    expect(azimuthAfter(points, 'c')).toBe(310);
    expect(azimuthAfter([{ id: 'z', azimuthDeg: 30, elevationDeg: 1 }], 'z')).toBe(210);
  });

  it('keeps the last point', () => {
    const one = removePoint(removePoint(points, 'a'), 'b');
    expect(one.map((point) => point.id)).toEqual(['c']);
    expect(removePoint(one, 'c')).toBe(one);
  });

  it('knows which points differ from the mask in force', () => {
    expect(isChanged({ id: 'a', azimuthDeg: 10, elevationDeg: 5 }, points)).toBe(false);
    expect(isChanged({ id: 'a', azimuthDeg: 10, elevationDeg: 5.1 }, points)).toBe(true);
    expect(isChanged({ id: 'n', azimuthDeg: 10, elevationDeg: 5 }, points)).toBe(true);
  });
});
