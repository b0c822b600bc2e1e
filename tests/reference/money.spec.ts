import { readFileSync } from 'node:fs';
import {
  CURRENCY_CODES,
  checkVatNumber,
  currencyExponent,
  divideHalfEven,
  divideHalfUp,
  isCurrency,
  MoneyError,
  standardRateBasisPoints,
} from '@skyberth/money';
import { describe, expect, it } from 'vitest';
import { currencyDecimals } from '../../apps/web/src/ui/format.js';

const rowsOf = (name: string): string[][] =>
  readFileSync(new URL(`data/money/${name}`, import.meta.url), 'utf8')
    .trim()
    .split('\n')
    .slice(1)
    .map((line) => line.split(','));

describe('currency exponents against ISO 4217 list one, February 2026', () => {
  const rows = rowsOf('iso4217-minor-units.csv');

  it('has every one of the 178 codes with its exponent, and no other', () => {
    expect(rows).toHaveLength(178);
    const priced = rows.filter((row) => row[2] !== '');
    expect(CURRENCY_CODES).toEqual(priced.map((row) => row[0]).sort());
    for (const [code, , exponent] of priced)
      expect([code, currencyExponent(code as string)]).toEqual([code, Number(exponent)]);
  });

  it('are the same in the page, which has a table of its own', () => {
    for (const [code, , exponent] of rows.filter((row) => row[2] !== ''))
      expect([code, currencyDecimals(code as string)]).toEqual([code, Number(exponent)]);
  });

  it('keeps no amount in a code without a minor unit', () => {
    for (const [code] of rows.filter((row) => row[2] === '')) {
      expect(isCurrency(code as string)).toBe(false);
      expect(() => currencyExponent(code as string)).toThrow(MoneyError);
    }
  });
});

describe('rounding against the table of Python’s decimal module (half even, half up) and the ICU user guide', () => {
  it.each([
    [5, 0, 1],
    [15, 2, 2],
    [25, 2, 3],
    [-25, -2, -3],
    [-15, -2, -2],
    [-5, 0, -1],
    [14, 1, 1],
    [-14, -1, -1],
    [16, 2, 2],
  ])('%i tenths', (tenths, halfEven, halfUp) => {
    expect(divideHalfEven(tenths, 10)).toBe(halfEven);
    expect(divideHalfUp(tenths, 10)).toBe(halfUp);
  });
});

describe('check digits of VAT numbers against python3-stdnum 1.18', () => {
  const rows = rowsOf('vat-number-check-digits.csv');

  it.each(rows.map(([number, verdict]) => [number as string, verdict as string] as const))(
    '%s is %s',
    (number, verdict) => {
      expect(checkVatNumber(number).ok).toBe(verdict === 'valid');
    },
  );

  it('judges numbers of 22 countries', () => {
    expect(new Set(rows.map(([number]) => number?.slice(0, 2))).size).toBe(22);
  });
});

describe('standard VAT rates against two public tables for 2025 (tax advisers’ pages, not an authority)', () => {
  it.each([
    ['AT', 20],
    ['BE', 21],
    ['BG', 20],
    ['HR', 25],
    ['CY', 19],
    ['CZ', 21],
    ['DK', 25],
    ['EE', 24],
    ['FI', 25.5],
    ['FR', 20],
    ['DE', 19],
    ['GR', 24],
    ['HU', 27],
    ['IE', 23],
    ['IT', 22],
    ['LV', 21],
    ['LT', 21],
    ['LU', 17],
    ['MT', 18],
    ['NL', 21],
    ['PL', 23],
    ['PT', 23],
    ['RO', 21],
    ['SK', 23],
    ['SI', 22],
    ['ES', 21],
    ['SE', 25],
  ])('%s %d %%', (country, percent) => {
    expect(standardRateBasisPoints(country, Date.UTC(2025, 11, 1))).toBe(percent * 100);
  });

  it('changes on the published day (Finland 1 September 2024, Slovakia 1 January 2025)', () => {
    expect(standardRateBasisPoints('FI', Date.UTC(2024, 7, 31, 23, 59))).toBe(2400);
    expect(standardRateBasisPoints('FI', Date.UTC(2024, 8, 1))).toBe(2550);
    expect(standardRateBasisPoints('SK', Date.UTC(2024, 11, 31))).toBe(2000);
    expect(standardRateBasisPoints('SK', Date.UTC(2025, 0, 1))).toBe(2300);
  });
});
