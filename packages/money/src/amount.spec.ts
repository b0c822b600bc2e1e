import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { addMoney, allocateMinor, money, shareOfMoney, sumMinor, sumMoney } from './amount.js';
import { CURRENCY_CODES } from './currencies.js';
import { formatMoney, formatRate, parseMoney, toDecimalText } from './format.js';
import { divideHalfEven, divideHalfUp, percentOf } from './rounding.js';

describe('amounts', () => {
  it('refuses parts of a minor unit, unknown currencies and amounts too large to keep', () => {
    expect(() => money(0.1, 'EUR')).toThrow('must be a whole number, but is 0.1');
    expect(() => money(1, 'ABC')).toThrow('“ABC” is not a currency code');
    expect(() => money(1, 'XAU')).toThrow('no minor unit');
    expect(() => addMoney(money(Number.MAX_SAFE_INTEGER, 'EUR'), money(1, 'EUR'))).toThrow('kept exactly');
    expect(() => sumMinor([Number.NaN])).toThrow('whole number');
  });

  it('never mixes currencies', () => {
    expect(() => addMoney(money(1, 'EUR'), money(1, 'NOK'))).toThrow('EUR and NOK cannot be put together');
    expect(sumMoney([], 'JPY')).toEqual({ amountMinor: 0, currency: 'JPY' });
  });

  it('knows no minus zero', () => {
    expect(Object.is(money(-0, 'EUR').amountMinor, 0)).toBe(true);
    expect(Object.is(percentOf(-1, 1), 0)).toBe(true);
  });
});

describe('rounding', () => {
  const whole = fc.integer({ min: -1_000_000_000, max: 1_000_000_000 });
  const divisor = fc.integer({ min: 1, max: 100_000 });

  it('is never more than half a unit away, and both rules differ at ties only', () => {
    fc.assert(
      fc.property(whole, divisor, (n, d) => {
        for (const result of [divideHalfUp(n, d), divideHalfEven(n, d)])
          expect(Math.abs(2 * (result * d - n))).toBeLessThanOrEqual(d);
        const tie = Math.abs(2 * (divideHalfUp(n, d) * d - n)) === d;
        if (tie) expect(divideHalfEven(n, d) % 2 === 0).toBe(true);
        else expect(divideHalfEven(n, d)).toBe(divideHalfUp(n, d));
      }),
    );
  });

  it('treats a debt like the same amount owed', () => {
    fc.assert(
      fc.property(whole, divisor, (n, d) => {
        expect(divideHalfUp(-n, d) + divideHalfUp(n, d)).toBe(0);
      }),
    );
  });

  it('gives the shares that floating point gets wrong (1.005 and 8.345 are halves)', () => {
    expect(divideHalfUp(1005, 10)).toBe(101);
    expect(divideHalfUp(8345, 10)).toBe(835);
    expect(percentOf(5, 1000)).toBe(1);
    expect(shareOfMoney(money(Number.MAX_SAFE_INTEGER, 'EUR'), 10_000).amountMinor).toBe(Number.MAX_SAFE_INTEGER);
  });
});

describe('allocation', () => {
  it('gives the odd unit to the largest remainder, then to the first', () => {
    expect(allocateMinor(100, [1, 1, 1])).toEqual([34, 33, 33]);
    expect(allocateMinor(-100, [1, 1, 1])).toEqual([-34, -33, -33]);
    expect(allocateMinor(10, [0, 5, 1])).toEqual([0, 8, 2]);
  });

  it('loses nothing, makes nothing, and stays within one unit of the exact share', () => {
    const weights = fc
      .array(fc.integer({ min: 0, max: 100_000 }), { minLength: 1, maxLength: 12 })
      .filter((all) => all.some((each) => each > 0));
    fc.assert(
      fc.property(fc.integer({ min: -1_000_000, max: 1_000_000 }), weights, (amount, all) => {
        const shares = allocateMinor(amount, all);
        const total = all.reduce((a, b) => a + b, 0);
        expect(shares.reduce((a, b) => a + b, 0)).toBe(amount);
        shares.forEach((share, index) => {
          expect(Math.abs(share - (amount * (all[index] as number)) / total)).toBeLessThan(1);
        });
      }),
    );
  });

  it('refuses weights that share nothing', () => {
    expect(() => allocateMinor(1, [])).toThrow('but are none');
    expect(() => allocateMinor(1, [2, -1])).toThrow('none below zero');
  });
});

describe('money as text', () => {
  it.each([
    [123450, 'EUR', '€1\u202f234.50', '1234.50'],
    [-300, 'GBP', '\u2212£3.00', '-3.00'],
    [120_000_000, 'NOK', 'NOK\u00a01\u202f200\u202f000.00', '1200000.00'],
    [500, 'JPY', 'JPY\u00a0500', '500'],
    [-5, 'KWD', '\u2212KWD\u00a00.005', '-0.005'],
    [0, 'EUR', '€0.00', '0.00'],
  ])('%i of %s', (amountMinor, currency, people, file) => {
    expect(formatMoney(money(amountMinor, currency))).toBe(people);
    expect(toDecimalText(money(amountMinor, currency))).toBe(file);
  });

  it('reads back whatever it writes, in every currency', () => {
    fc.assert(
      fc.property(fc.maxSafeInteger(), fc.constantFrom(...CURRENCY_CODES), (amountMinor, currency) => {
        const amount = money(amountMinor, currency);
        expect(parseMoney(formatMoney(amount))).toEqual(amount);
        expect(parseMoney(toDecimalText(amount), currency)).toEqual(amount);
      }),
    );
  });

  it.each([
    ['12.5 EUR', 1250],
    ['EUR 1 234', 123400],
    ['-€3', -300],
    ['€-3', -300],
  ])('reads %s as people type it', (text, amountMinor) => {
    expect(parseMoney(text)).toEqual({ amountMinor, currency: 'EUR' });
  });

  it.each([
    ['12.50', 'its currency is missing'],
    ['€1,234', 'write a point before the decimals'],
    ['€1.234', 'EUR has 2 decimals'],
    ['JPY 1.5', 'JPY has no decimals'],
    ['€12 34', 'groups of three'],
    ['EUR 1 EUR', 'give the currency once'],
    ['+1 EUR', 'write it like'],
    ['-€-1', 'one minus sign'],
    ['', 'write it like'],
    ['€99999999999999999', 'kept exactly'],
  ])('refuses “%s”', (text, why) => {
    expect(() => parseMoney(text)).toThrow(why);
  });

  it('writes rates', () => {
    expect([2550, 800, 0, -1200, 5].map(formatRate)).toEqual([
      '25.5\u00a0%',
      '8\u00a0%',
      '0\u00a0%',
      '\u221212\u00a0%',
      '0.05\u00a0%',
    ]);
  });
});
