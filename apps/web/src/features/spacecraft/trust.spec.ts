import { elementAgeErrorS } from '@skyberth/orbit';
import { describe, expect, it } from 'vitest';
import { ageAtError, dayStep, trustCurve } from './trust.js';

const LOW_ORBIT = 15.2;
const GEOSTATIONARY = 1.0027;

describe('trust in ageing elements', () => {
  it('finds the age at which the estimate reaches a limit', () => {
    const ageH = ageAtError(1, LOW_ORBIT) ?? Number.NaN;
    expect(elementAgeErrorS({ ageH, meanMotionRevPerDay: LOW_ORBIT })).toBeCloseTo(1, 6);
  });

  it('answers nothing for a limit that a year does not reach, and nought for one that the epoch has already', () => {
    expect(ageAtError(10_000, GEOSTATIONARY)).toBeNull();
    expect(ageAtError(0.01, LOW_ORBIT)).toBe(0);
  });

  it('draws from the epoch to beyond both now and the day on which the set is stale', () => {
    const young = trustCurve(LOW_ORBIT, 5);
    expect(young.points[0]?.ageH).toBe(0);
    expect(young.endH).toBeGreaterThan(young.staleH ?? Number.POSITIVE_INFINITY);
    expect(young.ageingH ?? 0).toBeLessThan(young.staleH ?? 0);
    expect(trustCurve(LOW_ORBIT, 2_000).endH).toBeGreaterThan(2_000);
  });

  it('marks whole days, no more than there is room for', () => {
    expect(dayStep(7 * 24, 7)).toBe(1);
    expect(dayStep(20 * 24, 7)).toBe(5);
    expect(dayStep(400 * 24, 5)).toBe(100);
  });
});
