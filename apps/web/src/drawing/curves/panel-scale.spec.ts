import { describe, expect, it } from 'vitest';
import { panelScale, roundStep, valueAtShare } from './panel-scale.js';

describe('the scale of a panel', () => {
  it('takes round steps', () => {
    expect(roundStep(65)).toBe(20);
    expect(roundStep(100)).toBe(20);
    expect(roundStep(0.37)).toBeCloseTo(0.1, 12);
  });

  it('covers its values and has nought among its lines where it crosses it', () => {
    const { min, max, ticks } = panelScale(Float32Array.from([-48, 51, Number.NaN]));
    expect(min).toBeLessThanOrEqual(-48);
    expect(max).toBeGreaterThanOrEqual(51);
    expect(ticks).toContain(0);
  });

  it('keeps a fixed side, and stands without any value', () => {
    expect(panelScale(Float32Array.from([3, 12]), { min: 0 }).min).toBe(0);
    expect(panelScale(Float32Array.from([Number.NaN]))).toMatchObject({ min: 0, max: 1 });
    expect(panelScale(Float32Array.from([4, 4])).max).toBeGreaterThan(4);
  });

  it('reads between samples and not where one is missing', () => {
    const values = Float32Array.from([0, 10, Number.NaN]);
    expect(valueAtShare(values, 0.25)).toBe(5);
    expect(valueAtShare(values, 0.5)).toBe(10);
    expect(valueAtShare(values, 0.75)).toBeNaN();
    expect(valueAtShare(values, -3)).toBe(0);
  });
});
