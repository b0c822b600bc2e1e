/** Amounts of money: whole minor units beside a currency code, and the arithmetic that never leaves whole numbers. */
import { currencyExponent } from './currencies.js';
import { MoneyError } from './money-error.js';
import { checkedWhole, percentOf } from './rounding.js';

export interface Money {
  /** Whole minor units: 1234 of EUR is €12.34, of JPY it is 1,234 yen. May be negative. */
  readonly amountMinor: number;
  /** ISO 4217. */
  readonly currency: string;
}

/** An amount that is checked: a known currency, a whole number that is kept exactly. Minus zero becomes zero. */
export function money(amountMinor: number, currency: string): Money {
  currencyExponent(currency);
  return { amountMinor: checkedWhole(amountMinor, 'An amount'), currency };
}

/** Throws `different currencies` unless both are the same; nothing is ever converted in silence. */
export function requireSameCurrency(a: Money, b: Money): void {
  if (a.currency !== b.currency) {
    throw new MoneyError(
      'different currencies',
      `${a.currency} and ${b.currency} cannot be put together without a rate.`,
      { a: a.currency, b: b.currency },
    );
  }
}

export function addMoney(a: Money, b: Money): Money {
  requireSameCurrency(a, b);
  return money(a.amountMinor + b.amountMinor, a.currency);
}

export function subtractMoney(a: Money, b: Money): Money {
  requireSameCurrency(a, b);
  return money(a.amountMinor - b.amountMinor, a.currency);
}

export const negateMoney = (a: Money): Money => money(-a.amountMinor, a.currency);

/** Sum in the named currency; zero of it for an empty list. */
export const sumMoney = (amounts: readonly Money[], currency: string): Money =>
  amounts.reduce(addMoney, money(0, currency));

/** Negative, zero or positive as `a` is less than, equal to or more than `b`. */
export function compareMoney(a: Money, b: Money): number {
  requireSameCurrency(a, b);
  return a.amountMinor - b.amountMinor;
}

/** A share by basis points (2000 is 20 %), halves away from zero. */
export const shareOfMoney = (a: Money, basisPoints: number): Money =>
  money(percentOf(a.amountMinor, basisPoints), a.currency);

/** Sums whole minor units and refuses to pass what is kept exactly, even on the way. */
export const sumMinor = (amounts: readonly number[]): number =>
  amounts.reduce((sum, each) => checkedWhole(sum + checkedWhole(each, 'An amount'), 'A sum'), 0);

/**
 * Splits an amount in proportion to `weights` (whole, none negative, not all zero) without losing or making a minor unit.
 * Largest remainders get the units left over; equal remainders in the order given. A negative amount is split like its
 * opposite. Answers one share for each weight, in the same order.
 */
export function allocateMinor(amountMinor: number, weights: readonly number[]): number[] {
  const total = sumMinor(weights);
  if (total <= 0 || weights.some((weight) => weight < 0)) {
    throw new MoneyError(
      'bad allocation',
      `Weights must be whole, none below zero and not all zero, but are ${weights.join(', ') || 'none'}.`,
      { weights },
    );
  }
  const size = BigInt(Math.abs(checkedWhole(amountMinor, 'The amount')));
  const shares = weights.map((weight, index) => {
    const product = size * BigInt(weight);
    return { index, whole: product / BigInt(total), rest: product % BigInt(total) };
  });
  let left = Number(size - shares.reduce((sum, share) => sum + share.whole, 0n));
  const sign = amountMinor < 0 ? -1 : 1;
  const result = shares.map((share) => Number(share.whole));
  const byRest = [...shares].sort((a, b) => (a.rest === b.rest ? a.index - b.index : a.rest > b.rest ? -1 : 1));
  for (const share of byRest) {
    if (left === 0) break;
    result[share.index] = (result[share.index] as number) + 1;
    left -= 1;
  }
  return result.map((share) => (share === 0 ? 0 : sign * share));
}
