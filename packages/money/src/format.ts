/**
 * Money as text and back. The currency always stands with the figure: a sign for euro and pound, which no other currency
 * here shares, the code for the rest. Groups of three are parted by a narrow no-break space, decimals by a point.
 */
import { type Money, money } from './amount.js';
import { currencyExponent } from './currencies.js';
import { MoneyError } from './money-error.js';

const SIGNS: Readonly<Record<string, string>> = { EUR: '€', GBP: '£' };
const GROUP_SPACE = '\u202f';
const MINUS = '\u2212';

function digitsOf({ amountMinor, currency }: Money): { whole: string; fraction: string } {
  const exponent = currencyExponent(currency);
  const digits = String(Math.abs(amountMinor)).padStart(exponent + 1, '0');
  return { whole: digits.slice(0, digits.length - exponent), fraction: exponent === 0 ? '' : digits.slice(-exponent) };
}

/** For people: `€1 234.50`, `−£3.00`, `NOK 1 200.00`, `JPY 500`. */
export function formatMoney(amount: Money): string {
  money(amount.amountMinor, amount.currency);
  const { whole, fraction } = digitsOf(amount);
  const grouped = whole.replace(/\B(?=(\d{3})+$)/g, GROUP_SPACE);
  const figure = fraction === '' ? grouped : `${grouped}.${fraction}`;
  const sign = SIGNS[amount.currency];
  return `${amount.amountMinor < 0 ? MINUS : ''}${sign ?? `${amount.currency}\u00a0`}${figure}`;
}

/** For files: `-1234.50`, no groups and no currency, which then stands in a column of its own. */
export function toDecimalText(amount: Money): string {
  money(amount.amountMinor, amount.currency);
  const { whole, fraction } = digitsOf(amount);
  return `${amount.amountMinor < 0 ? '-' : ''}${whole}${fraction === '' ? '' : `.${fraction}`}`;
}

const CODE_OR_SIGN = '[A-Z]{3}|€|£';
const AMOUNT_TEXT = new RegExp(
  `^([-\u2212]?)(?:(${CODE_OR_SIGN}) ?)?([-\u2212]?)(\\d(?:[\\d ]*\\d)?)(?:\\.(\\d+))?(?: ?(${CODE_OR_SIGN}))?$`,
);

/**
 * Reads what `formatMoney` writes and what people type: `€12.50`, `EUR 1 234.5`, `500 JPY`, `-3 GBP`; with
 * `assumedCurrency` also a bare figure. Refuses, with a sentence, a missing currency, a comma (it means two things),
 * groups that are not of three, and more decimals than the currency has.
 */
export function parseMoney(text: string, assumedCurrency?: string): Money {
  const plain = text.trim().replace(/[\u202f\u00a0\u2009]/g, ' ');
  const refuse = (why: string): never => {
    throw new MoneyError('not an amount', `“${text}” cannot be read as money: ${why}`, { text });
  };
  if (plain.includes(',')) return refuse('write a point before the decimals, and spaces between thousands.');
  const match = AMOUNT_TEXT.exec(plain);
  if (match === null) return refuse('write it like €12.50 or NOK 1 200.00.');
  const [, signBefore = '', before, signInside = '', wholePart = '', fraction = '', after] = match;
  if (signBefore !== '' && signInside !== '') return refuse('one minus sign is enough.');
  if (before !== undefined && after !== undefined) return refuse('give the currency once.');
  const named = before ?? after ?? assumedCurrency;
  if (named === undefined) return refuse('its currency is missing.');
  const currency = Object.keys(SIGNS).find((code) => SIGNS[code] === named) ?? named;
  const exponent = currencyExponent(currency);
  if (wholePart.includes(' ') && !/^\d{1,3}( \d{3})+$/.test(wholePart))
    return refuse('thousands stand in groups of three.');
  if (fraction.length > exponent)
    return refuse(`${currency} has ${exponent === 0 ? 'no decimals' : `${exponent} decimals`}.`);
  const size = Number(wholePart.replaceAll(' ', '') + fraction.padEnd(exponent, '0'));
  return money(signBefore + signInside === '' ? size : -size, currency);
}

/** A rate in basis points as people write it: `25.5 %`, `8 %`. */
export function formatRate(basisPoints: number): string {
  const size = Math.abs(basisPoints);
  const decimals = String(size % 100)
    .padStart(2, '0')
    .replace(/0+$/, '');
  return `${basisPoints < 0 ? MINUS : ''}${Math.trunc(size / 100)}${decimals === '' ? '' : `.${decimals}`}\u00a0%`;
}
