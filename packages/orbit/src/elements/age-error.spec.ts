import { describe, expect, it } from 'vitest';
import { elementAgeErrorS } from './age-error.js';

const LOW = 15.2;

describe('the error that age brings', () => {
  it('grows with age, before the epoch as after it', () => {
    let last = 0;
    for (const ageH of [0, 1, 24, 72, 240, 1_000]) {
      const errorS = elementAgeErrorS({ ageH, meanMotionRevPerDay: LOW });
      expect(errorS).toBeGreaterThan(last);
      expect(elementAgeErrorS({ ageH: -ageH, meanMotionRevPerDay: LOW })).toBe(errorS);
      last = errorS;
    }
  });

  it('is larger the lower the orbit', () => {
    const after = (meanMotionRevPerDay: number) => elementAgeErrorS({ ageH: 240, meanMotionRevPerDay });
    expect(after(16)).toBeGreaterThan(after(14));
    expect(after(14)).toBeGreaterThan(after(2));
  });

  it('is a fraction of a second on the first day, seconds after a week, half a minute after a month in low orbit', () => {
    const after = (days: number) => elementAgeErrorS({ ageH: days * 24, meanMotionRevPerDay: LOW });
    expect(after(0)).toBeCloseTo(1 / 7.61, 2);
    expect(after(1)).toBeLessThan(0.5);
    expect(after(7)).toBeGreaterThan(1);
    expect(after(7)).toBeLessThan(5);
    expect(after(30)).toBeGreaterThan(20);
  });
});
