/**
 * How many decimal digits the minor unit of each currency has, by ISO 4217 (list one, February 2026).
 * Never from the engine's own locale data, which gives 0 for HUF, MGA and IQD where the standard has 2, 2 and 3.
 */
import { MoneyError } from './money-error.js';

const CODES_BY_EXPONENT: Readonly<Record<0 | 2 | 3 | 4, string>> = {
  0: 'BIF CLP DJF GNF ISK JPY KMF KRW PYG RWF UGX UYI VND VUV XAF XOF XPF',
  2:
    'AED AFN ALL AMD AOA ARS AUD AWG AZN BAM BBD BDT BMD BND BOB BOV BRL BSD BTN BWP BYN BZD CAD CDF CHE CHF CHW CNY ' +
    'COP COU CRC CUP CVE CZK DKK DOP DZD EGP ERN ETB EUR FJD FKP GBP GEL GHS GIP GMD GTQ GYD HKD HNL HTG HUF IDR ILS ' +
    'INR IRR JMD KES KGS KHR KPW KYD KZT LAK LBP LKR LRD LSL MAD MDL MGA MKD MMK MNT MOP MRU MUR MVR MWK MXN MXV MYR ' +
    'MZN NAD NGN NIO NOK NPR NZD PAB PEN PGK PHP PKR PLN QAR RON RSD RUB SAR SBD SCR SDG SEK SGD SHP SLE SOS SRD SSP ' +
    'STN SVC SYP SZL THB TJS TMT TOP TRY TTD TWD TZS UAH USD USN UYU UZS VED VES WST XAD XCD XCG YER ZAR ZMW ZWG',
  3: 'BHD IQD JOD KWD LYD OMR TND',
  4: 'CLF UYW',
};

/** Listed by the standard without a minor unit (metals, accounting and test codes): nothing can be priced in them. */
const WITHOUT_MINOR_UNIT = 'XAG XAU XBA XBB XBC XBD XDR XPD XPT XSU XTS XUA XXX'.split(' ');

export type CurrencyExponent = 0 | 2 | 3 | 4;

const exponents = new Map<string, CurrencyExponent>(
  ([0, 2, 3, 4] as const).flatMap((exponent) =>
    CODES_BY_EXPONENT[exponent].split(' ').map((code) => [code, exponent] as const),
  ),
);

/** Every code that amounts can be kept in, in alphabetical order. */
export const CURRENCY_CODES: readonly string[] = [...exponents.keys()].sort();

/** Whether amounts can be kept in this code. */
export const isCurrency = (code: string): boolean => exponents.has(code);

/**
 * Decimal digits of the minor unit, such as 2 for EUR and 0 for JPY.
 * Throws `unknown currency`, or `currency without minor units` for codes such as XAU.
 */
export function currencyExponent(code: string): CurrencyExponent {
  const exponent = exponents.get(code);
  if (exponent !== undefined) return exponent;
  if (WITHOUT_MINOR_UNIT.includes(code)) {
    throw new MoneyError(
      'currency without minor units',
      `${code} has no minor unit in ISO 4217, so no amount can be kept in it.`,
      { code },
    );
  }
  throw new MoneyError('unknown currency', `“${code}” is not a currency code of ISO 4217.`, { code });
}
