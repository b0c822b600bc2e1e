/** The columns of a two-line element set and what may stand in each. Source: CelesTrak, "NORAD Two-Line Element Set Format". */
import type { ElementFaults } from './faults.js';

/** First and last column count from 1, as the published table does. */
export interface TleColumn {
  readonly field: string;
  readonly first: number;
  readonly last: number;
  readonly pattern: RegExp;
  readonly expected: string;
}

const blank = (column: number): TleColumn => ({
  field: `column ${column}`,
  first: column,
  last: column,
  pattern: /^ $/,
  expected: 'a blank',
});

const ANGLE = /^(?: {0,2}\d{1,3})\.\d{4}$/;
const POWER = /^[ +-]\d{5}[+-]\d$/;
const COUNT = /^ *\d+$/;
const NUMBER = /^(?: *\d+|[A-HJ-NP-Z]\d{4})$/;

const angle = (field: string, first: number, highest: number): TleColumn => ({
  field,
  first,
  last: first + 7,
  pattern: ANGLE,
  expected: `an angle such as " 51.6393", 0 to ${highest} degrees`,
});

const number: TleColumn = {
  field: 'catalogue number',
  first: 3,
  last: 7,
  pattern: NUMBER,
  expected: 'five digits, or a letter other than I and O and four digits',
};

export const LINE_1: readonly TleColumn[] = [
  blank(2),
  number,
  { field: 'classification', first: 8, last: 8, pattern: /^[UCS]$/, expected: 'U, C or S' },
  blank(9),
  {
    field: 'international designator',
    first: 10,
    last: 17,
    pattern: /^(?: {8}|\d{5}[A-Z]{1,3} {0,2})$/,
    expected: 'a designator such as "98067A  ", or blanks',
  },
  blank(18),
  { field: 'epoch year', first: 19, last: 20, pattern: /^\d\d$/, expected: 'two digits' },
  {
    field: 'epoch day',
    first: 21,
    last: 32,
    pattern: /^[ \d]{2}\d\.\d{8}$/,
    expected: 'a day of the year such as "127.82853009"',
  },
  blank(33),
  {
    field: 'first derivative of mean motion',
    first: 34,
    last: 43,
    pattern: /^[ +-]\.\d{8}$/,
    expected: 'a number such as " .00015698"',
  },
  blank(44),
  {
    field: 'second derivative of mean motion',
    first: 45,
    last: 52,
    pattern: POWER,
    expected: 'a number such as " 00000+0"',
  },
  blank(53),
  { field: 'BSTAR', first: 54, last: 61, pattern: POWER, expected: 'a number such as " 27310-3"' },
  blank(62),
  { field: 'ephemeris type', first: 63, last: 63, pattern: /^[ 02]$/, expected: '0: other types are not for SGP4' },
  blank(64),
  { field: 'element set number', first: 65, last: 68, pattern: COUNT, expected: 'a whole number' },
];

export const LINE_2: readonly TleColumn[] = [
  blank(2),
  number,
  blank(8),
  angle('inclination', 9, 180),
  blank(17),
  angle('right ascension of the node', 18, 360),
  blank(26),
  { field: 'eccentricity', first: 27, last: 33, pattern: /^\d{7}$/, expected: 'seven digits' },
  blank(34),
  angle('argument of perigee', 35, 360),
  blank(43),
  angle('mean anomaly', 44, 360),
  blank(52),
  {
    field: 'mean motion',
    first: 53,
    last: 63,
    pattern: /^[ \d]\d\.\d{8}$/,
    expected: 'a number such as "15.50957674"',
  },
  { field: 'revolution number', first: 64, last: 68, pattern: COUNT, expected: 'a whole number' },
];

/**
 * Sum of the digits of columns 1 to 68, a minus counting one and everything else nothing, modulo ten. Source: the same page.
 */
export function tleChecksum(line: string): number {
  let sum = 0;
  for (let column = 0; column < 68; column += 1) {
    const code = line.charCodeAt(column);
    if (code >= 48 && code <= 57) sum += code - 48;
    else if (code === 45) sum += 1;
  }
  return sum % 10;
}

/** Checks length, form of each column and checksum; returns whether the line can be read. */
export function checkTleLine(
  text: string,
  line: number,
  which: 1 | 2,
  options: { readonly ignoreChecksum: boolean; readonly faults: ElementFaults },
): boolean {
  const { faults } = options;
  if (text.length < 68 || text.length > 69) {
    faults.add({
      line,
      field: 'length',
      found: `${text.length} characters`,
      expected: '69 characters',
    });
    return false;
  }
  let good = true;
  for (const { field, first, last, pattern, expected } of which === 1 ? LINE_1 : LINE_2) {
    const found = text.slice(first - 1, last);
    if (pattern.test(found)) continue;
    good = false;
    faults.add({ line, field, found, expected: `${expected} in ${columnsOf(first, last)}` });
  }
  if (options.ignoreChecksum) return good;
  const right = String(tleChecksum(text));
  const found = text.charAt(68);
  if (found !== right) {
    good = false;
    faults.add({ line, field: 'checksum', found, expected: `${right} in column 69` });
  }
  return good;
}

function columnsOf(first: number, last: number): string {
  return first === last ? `column ${first}` : `columns ${first} to ${last}`;
}
