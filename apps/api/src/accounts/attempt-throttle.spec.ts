import { describe, expect, it } from 'vitest';
import { AttemptThrottle } from './attempt-throttle.js';

const rule = { freeAttempts: 3, firstWaitMs: 10_000, longestWaitMs: 60_000 };

describe('the throttle', () => {
  it('lets the free attempts through and then asks to wait, longer each time, up to the limit', () => {
    const throttle = new AttemptThrottle(rule);
    for (const _ of [1, 2, 3]) throttle.begin('k', 0);
    expect(() => throttle.begin('k', 9_999)).toThrow('Wait 1 s');
    throttle.begin('k', 10_000);
    expect(() => throttle.begin('k', 29_999)).toThrow('Wait 1 s');
    throttle.begin('k', 30_000);
    throttle.begin('k', 70_000);
    throttle.begin('k', 130_000);
    expect(() => throttle.begin('k', 130_001)).toThrow('Wait 60 s');
    expect(() => throttle.begin('k', 190_000)).not.toThrow();
  });

  it('is not lengthened by attempts made while waiting', () => {
    const throttle = new AttemptThrottle(rule);
    for (const _ of [1, 2, 3]) throttle.begin('k', 0);
    for (let at = 1; at < 10_000; at += 100) expect(() => throttle.begin('k', at)).toThrow('Wait');
    expect(() => throttle.begin('k', 10_000)).not.toThrow();
  });

  it('counts each key for itself and forgets after success or a quiet hour', () => {
    const throttle = new AttemptThrottle(rule);
    for (const _ of [1, 2, 3]) throttle.begin('a', 0);
    expect(() => throttle.begin('b', 1)).not.toThrow();
    throttle.clear('a');
    expect(() => throttle.begin('a', 1)).not.toThrow();
    for (const _ of [1, 2]) throttle.begin('b', 2);
    expect(() => throttle.begin('b', 3)).toThrow('Wait');
    expect(() => throttle.begin('b', 3_600_003)).not.toThrow();
  });
});
