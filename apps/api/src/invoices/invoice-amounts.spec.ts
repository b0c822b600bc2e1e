import type { Quote } from '@skyberth/shared';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { amountsOf, creditOf, invoiceLines, refundOf } from './invoice-amounts.js';

const quote = (amounts: readonly number[], ratePercent: number): Quote => {
  const totalMinor = amounts.reduce((sum, amount) => sum + amount, 0);
  const vatMinor = Math.floor((totalMinor * ratePercent * 100 + 5_000) / 10_000);
  return {
    currency: 'EUR',
    lines: amounts.map((amountMinor, index) => ({ label: `Line ${index}`, detail: '', amountMinor })),
    totalMinor,
    vat: { ratePercent, amountMinor: vatMinor, note: 'note' },
    toPayMinor: totalMinor + vatMinor,
    ladder: [],
  };
};

describe('an invoice of a price', () => {
  it('takes reductions off the lines before them instead of showing negative lines', () => {
    expect(invoiceLines(quote([6080, 1500, -700, 608], 0))).toMatchObject([
      { description: 'Line 0', netMinor: 5380, discountMinor: 700 },
      { description: 'Line 1', netMinor: 1500, discountMinor: 0 },
      { description: 'Line 3', netMinor: 608, discountMinor: 0 },
    ]);
    expect(invoiceLines(quote([100, 500, -350], 0)).map((line) => line.netMinor)).toEqual([0, 250]);
  });

  it('refuses a price whose VAT is not what its rate gives', () => {
    const wrong = quote([1000], 25.5);
    expect(() => amountsOf({ ...wrong, vat: { ...wrong.vat, amountMinor: 254 } })).toThrow('would not be the price');
  });

  it('can be of nothing', () => {
    expect(amountsOf(quote([0], 25.5))).toMatchObject({ netMinor: 0, vatMinor: 0, grossMinor: 0 });
    expect(refundOf(quote([0], 25.5), 50)).toEqual({ netMinor: 0, vatMinor: 0, grossMinor: 0 });
  });
});

const prices = fc.record({
  amounts: fc.array(fc.integer({ min: 1, max: 5_000_000 }), { minLength: 1, maxLength: 6 }),
  reductionPercent: fc.integer({ min: 0, max: 100 }),
  ratePercent: fc.constantFrom(0, 19, 24, 25.5, 8.1),
  refundPercent: fc.integer({ min: 0, max: 100 }),
});

describe('a refund', () => {
  it('and what is kept are the price, to the cent, and neither is ever negative', () => {
    fc.assert(
      fc.property(prices, ({ amounts, reductionPercent, ratePercent, refundPercent }) => {
        const reduction = Math.floor((amounts.reduce((sum, each) => sum + each, 0) * reductionPercent) / 100);
        const price = quote(reduction === 0 ? amounts : [...amounts, -reduction], ratePercent);
        const invoice = amountsOf(price);
        const credit = creditOf(invoice, refundPercent);
        const back = refundOf(price, refundPercent);
        expect(back.grossMinor).toBe(back.netMinor + back.vatMinor);
        expect(-(credit?.grossMinor ?? 0)).toEqual(back.grossMinor === 0 ? -0 : back.grossMinor);
        expect(back.netMinor).toBeGreaterThanOrEqual(0);
        expect(back.vatMinor).toBeGreaterThanOrEqual(0);
        expect(back.netMinor).toBeLessThanOrEqual(invoice.netMinor);
        expect(back.vatMinor).toBeLessThanOrEqual(invoice.vatMinor);
        const exact = (price.toPayMinor * refundPercent) / 100;
        expect(Math.abs(back.grossMinor - exact)).toBeLessThanOrEqual(1.5);
      }),
    );
  });

  it('of everything is everything, and of nothing is no credit note', () => {
    fc.assert(
      fc.property(prices, ({ amounts, ratePercent }) => {
        const price = quote(amounts, ratePercent);
        expect(refundOf(price, 100).grossMinor).toBe(price.toPayMinor);
        expect(creditOf(amountsOf(price), 0)).toBeNull();
      }),
    );
  });
});
