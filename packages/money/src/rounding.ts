/**
 * Every way this project rounds, each under the name of its rule. Numerator and denominator are whole, so a quotient is
 * never rounded twice on its way through a binary fraction.
 */
import { MoneyError } from './money-error.js';

/** Refuses anything that is not a whole number that arithmetic keeps exact. `what` stands in the sentence. */
export function checkedWhole(value: number, what: string): number {
  if (!Number.isInteger(value))
    throw new MoneyError('not whole', `${what} must be a whole number, but is ${value}.`, { value });
  if (!Number.isSafeInteger(value)) {
    throw new MoneyError('too large', `${what} is ${value}; at most ${Number.MAX_SAFE_INTEGER} is kept exactly.`, {
      value,
    });
  }
  return value === 0 ? 0 : value;
}

type Tie = (quotientIsOdd: boolean) => boolean;

function divide(numerator: number | bigint, denominator: number | bigint, tieGoesAway: Tie): number {
  const n = typeof numerator === 'bigint' ? numerator : BigInt(checkedWhole(numerator, 'The numerator'));
  const d = typeof denominator === 'bigint' ? denominator : BigInt(checkedWhole(denominator, 'The denominator'));
  if (d === 0n) throw new MoneyError('not an amount', 'An amount cannot be divided by zero.');
  const negative = n < 0n !== d < 0n;
  const size = n < 0n ? -n : n;
  const by = d < 0n ? -d : d;
  let quotient = size / by;
  const twiceRest = (size % by) * 2n;
  if (twiceRest > by || (twiceRest === by && tieGoesAway(quotient % 2n === 1n))) quotient += 1n;
  return checkedWhole(Number(negative ? -quotient : quotient), 'The result');
}

/** Nearest whole number; halves away from zero (2.5 to 3, -2.5 to -3). The rule for prices, VAT, fees and refunds. */
export const divideHalfUp = (numerator: number | bigint, denominator: number | bigint): number =>
  divide(numerator, denominator, () => true);

/** Nearest whole number; halves to the even neighbour (2.5 to 2, 3.5 to 4). For averages and reports over many amounts. */
export const divideHalfEven = (numerator: number | bigint, denominator: number | bigint): number =>
  divide(numerator, denominator, (odd) => odd);

/** One hundredth of one per cent is the unit of every rate here: 2000 basis points are 20 %. */
export const BASIS_POINTS_PER_WHOLE = 10_000;

/** A share of an amount in minor units, by basis points, halves away from zero. */
export function percentOf(amountMinor: number, basisPoints: number): number {
  const product =
    BigInt(checkedWhole(amountMinor, 'The amount')) * BigInt(checkedWhole(basisPoints, 'The rate in basis points'));
  return divideHalfUp(product, BigInt(BASIS_POINTS_PER_WHOLE));
}
