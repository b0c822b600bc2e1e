import { describe, expect, it } from 'vitest';
import { quoteFor } from './quote.js';
import { vatOf } from './tax.js';

const seller = { country: 'FI', vatNumber: 'FI12345671' };
const dateMs = Date.UTC(2026, 11, 1);

describe('vatOf', () => {
  it('charges the rate of the common country once on the total', () => {
    // 25.5 % is Finland's standard rate since September 2024 (from memory).
    const vat = vatOf({ seller, buyer: { country: 'FI', vatNumber: null }, netMinor: 8_188, dateMs });
    expect(vat).toEqual({ ratePercent: 25.5, amountMinor: 2_088, note: 'VAT 25.5\u00a0%, FI' });
  });

  it('leaves the tax to a business in another member state, Directive 2006/112/EC Art. 196', () => {
    // A German number with a correct check digit, computed by ISO 7064 MOD 11,10.
    const vat = vatOf({ seller, buyer: { country: 'DE', vatNumber: 'DE123456788' }, netMinor: 8_188, dateMs });
    expect(vat).toEqual({ ratePercent: 0, amountMinor: 0, note: 'VAT by reverse charge' });
  });

  it('charges none to a buyer outside the EU', () => {
    const vat = vatOf({ seller, buyer: { country: 'NO', vatNumber: null }, netMinor: 8_188, dateMs });
    expect(vat.amountMinor).toBe(0);
    expect(vat.note).toContain('outside');
  });
});

describe('quoteFor', () => {
  it('adds VAT to the total and marks the step of the ladder that holds now', () => {
    const aosMs = dateMs + 3_600_000 * 10;
    const quote = quoteFor({
      price: {
        currency: 'EUR',
        billedSeconds: 570,
        lines: [{ kind: 'time', label: '9 min 30 s', detail: 'at €6.40 a minute', amountMinor: 6_080 }],
        totalMinor: 6_080,
      },
      vat: { ratePercent: 25.5, amountMinor: 1_550, note: 'VAT' },
      ladder: [
        { hoursBeforeAos: 24, refundPercent: 100 },
        { hoursBeforeAos: 4, refundPercent: 60 },
      ],
      aosMs,
      nowMs: dateMs,
    });
    expect(quote.toPayMinor).toBe(7_630);
    expect(quote.lines).toEqual([{ label: '9 min 30 s', detail: 'at €6.40 a minute', amountMinor: 6_080 }]);
    expect(quote.ladder.map(({ refundPercent, now }) => [refundPercent, now])).toEqual([
      [100, false],
      [60, true],
      [0, false],
    ]);
    expect(quote.ladder[1]?.untilUtc).toBe('2026-12-01T06:00:00.000Z');
  });
});
