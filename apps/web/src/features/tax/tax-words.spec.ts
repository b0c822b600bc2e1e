import { describe, expect, it } from 'vitest';
import { rateText, readQuestion, stepsText } from './tax-words.js';

describe('the words about tax', () => {
  it('write a rate with as many decimals as it needs', () => {
    expect([2550, 800, 2125, 0].map(rateText)).toEqual(['25.5\u00a0%', '8\u00a0%', '21.25\u00a0%', '0\u00a0%']);
  });

  it('tell changes of a rate, the newest first', () => {
    expect(
      stepsText([
        { fromDay: '2020-01-01', basisPoints: 2400 },
        { fromDay: '2024-09-01', basisPoints: 2550 },
      ]),
    ).toBe('25.5\u00a0% from 2024-09-01, before 24\u00a0%');
    expect(stepsText([{ fromDay: '2020-01-01', basisPoints: 2000 }])).toBe('20\u00a0%');
  });

  it('leave out of a question what cannot be asked', () => {
    const search = new URLSearchParams('country=xx1&day=tomorrow&vatNumber=');
    expect(readQuestion(search, '2026-12-01')).toEqual({ country: '', vatNumber: undefined, day: '2026-12-01' });
  });
});
