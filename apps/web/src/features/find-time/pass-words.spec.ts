import { describe, expect, it } from 'vitest';
import {
  dopplerWords,
  followedMs,
  gapWords,
  nearTime,
  refundNowWords,
  refundSteps,
  spanWords,
  standing,
} from './pass-words.js';

const NOW = Date.UTC(2026, 11, 1, 14, 5, 9);
const plain = (text: string | null) => text?.replace(/[\u00a0\u202f]/g, ' ');

describe('words of a pass', () => {
  it('says what the mount can follow of it, and what is lost when', () => {
    const detail = {
      aosUtc: '2026-12-01T15:00:00.000Z',
      losUtc: '2026-12-01T15:10:00.000Z',
      mountGaps: [
        {
          fromUtc: '2026-12-01T15:04:10.000Z',
          toUtc: '2026-12-01T15:04:32.000Z',
          code: 'keyhole' as const,
          sentence: 'Too fast.',
        },
      ],
    };
    expect(followedMs(detail)).toBe(578_000);
    expect(plain(gapWords(detail))).toBe('keyhole 15:04:10, 22 s');
  });

  it('says when it rises, sets or has set', () => {
    const [aos, los] = [NOW + 3_296_000, NOW + 3_866_000];
    expect(plain(standing('for sale', aos, los, NOW))).toBe('For sale. Rises in 54 min 56 s.');
    expect(plain(standing('under way', NOW - 1000, los, NOW))).toBe('Under way. Sets in 1 h 4 min.');
    expect(plain(standing('done', NOW - 9000, NOW - 5000, NOW))).toBe('Done. Set 5 s ago.');
  });

  it('writes a span once where both ends read the same, and nothing where nothing is known', () => {
    expect(plain(spanWords([2214, 569, 2190]))).toBe('569 to 2 214');
    expect(spanWords([12.34, 12.31], 1)).toBe('12.3');
    expect(spanWords([Number.NaN])).toBeNull();
    expect(dopplerWords([191_840, -191_000])).toBe('±191.8');
    expect(dopplerWords([])).toBeNull();
  });

  it('gives a day to what is over a day away', () => {
    expect(nearTime(NOW + 3_600_000, NOW)).toBe('15:05:09');
    expect(nearTime(NOW + 90_000_000, NOW)).toBe('2026-336 15:05:09');
  });
});

describe('refund steps', () => {
  const ladder = [
    { refundPercent: 100, hoursBeforeAos: 24, untilUtc: '2026-11-30T15:00:05Z', now: false },
    { refundPercent: 25, hoursBeforeAos: 0.5, untilUtc: '2026-12-01T14:30:05Z', now: true },
    { refundPercent: 0, hoursBeforeAos: 0, untilUtc: null, now: false },
  ];
  it('ends the present step at a time and the last one never', () => {
    expect(refundSteps(ladder, NOW).map((one) => one.untilText)).toEqual(['till 24 h', 'till 14:30:05', 'after that']);
    expect(refundNowWords(ladder)).toBe('25 % back');
    expect(refundNowWords([])).toBe('nothing back');
  });
});
