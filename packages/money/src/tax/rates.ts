/**
 * Standard VAT rates of the EU members and the days they changed. Rates: agreed with two public tables of 2025
 * (general tax advisers' pages); the days of change and every rate before 2024 are from memory. A rate decides real
 * money: finance checks the table against the tax office of each country before relying on it.
 */
import { MoneyError } from '../money-error.js';

export interface RateFrom {
  /** First day, UTC, on which it holds. */
  readonly fromDay: string;
  readonly basisPoints: number;
}

const always = (basisPoints: number): readonly RateFrom[] => [{ fromDay: FIRST_DAY, basisPoints }];
/** Before this day nothing is sold, so nothing is kept. */
const FIRST_DAY = '2020-01-01';

/** By ISO 3166 code (Greece is GR here, EL in front of its VAT numbers). */
const EU_STANDARD_RATES: Readonly<Record<string, readonly RateFrom[]>> = {
  AT: always(2000),
  BE: always(2100),
  BG: always(2000),
  CY: always(1900),
  CZ: always(2100),
  DE: [
    { fromDay: FIRST_DAY, basisPoints: 1900 },
    { fromDay: '2020-07-01', basisPoints: 1600 },
    { fromDay: '2021-01-01', basisPoints: 1900 },
  ],
  DK: always(2500),
  EE: [
    { fromDay: FIRST_DAY, basisPoints: 2000 },
    { fromDay: '2024-01-01', basisPoints: 2200 },
    { fromDay: '2025-07-01', basisPoints: 2400 },
  ],
  ES: always(2100),
  FI: [
    { fromDay: FIRST_DAY, basisPoints: 2400 },
    { fromDay: '2024-09-01', basisPoints: 2550 },
  ],
  FR: always(2000),
  GR: always(2400),
  HR: always(2500),
  HU: always(2700),
  IE: [
    { fromDay: FIRST_DAY, basisPoints: 2300 },
    { fromDay: '2020-09-01', basisPoints: 2100 },
    { fromDay: '2021-03-01', basisPoints: 2300 },
  ],
  IT: always(2200),
  LT: always(2100),
  LU: [
    { fromDay: FIRST_DAY, basisPoints: 1700 },
    { fromDay: '2023-01-01', basisPoints: 1600 },
    { fromDay: '2024-01-01', basisPoints: 1700 },
  ],
  LV: always(2100),
  MT: always(1800),
  NL: always(2100),
  PL: always(2300),
  PT: always(2300),
  RO: [
    { fromDay: FIRST_DAY, basisPoints: 1900 },
    { fromDay: '2025-08-01', basisPoints: 2100 },
  ],
  SE: always(2500),
  SI: always(2200),
  SK: [
    { fromDay: FIRST_DAY, basisPoints: 2000 },
    { fromDay: '2025-01-01', basisPoints: 2300 },
  ],
};

/** Every rate that is kept with the day from which it holds, by ISO 3166 code; oldest first. */
export const standardRates = (): readonly (readonly [country: string, steps: readonly RateFrom[]])[] =>
  Object.entries(EU_STANDARD_RATES);

/** ISO 3166 codes of the members, alphabetical. */
export const EU_COUNTRIES: readonly string[] = Object.keys(EU_STANDARD_RATES);

export const isEuCountry = (country: string): boolean => Object.hasOwn(EU_STANDARD_RATES, country);

/**
 * Standard rate in basis points on the UTC day of `dateMs`, the day of supply. Throws `no rate` for a country outside the EU or a
 * day before 2020.
 */
export function standardRateBasisPoints(country: string, dateMs: number): number {
  const day = new Date(dateMs).toISOString().slice(0, 10);
  const rate = (isEuCountry(country) ? (EU_STANDARD_RATES[country] ?? []) : []).findLast((each) => each.fromDay <= day);
  if (rate === undefined)
    throw new MoneyError('no rate', `No standard VAT rate is kept for ${country} on ${day}.`, { country, day });
  return rate.basisPoints;
}
