/**
 * Check digits of VAT numbers, for the countries whose rule is published. Each takes the number without its country
 * prefix, already of the right form, and says whether its digits agree. The rules were compared with the independent
 * Debian package python3-stdnum 1.18 (see the reference test).
 */

const digitsOf = (text: string): number[] => [...text].map(Number);
const weighted = (text: string, weights: readonly number[]): number =>
  weights.reduce((sum, weight, index) => sum + weight * Number(text[index]), 0);
const last = (text: string): number => Number(text.at(-1));

/** Luhn's rule: from the right, each second digit doubled and its digits added; the sum ends in 0. */
export function luhn(text: string): boolean {
  const sum = digitsOf(text)
    .reverse()
    .map((digit, index) => (index % 2 === 0 ? digit : digit * 2 - (digit > 4 ? 9 : 0)))
    .reduce((total, digit) => total + digit, 0);
  return sum % 10 === 0;
}

/** ISO 7064 MOD 11,10. */
export function iso7064Mod11Mod10(text: string): boolean {
  let rest = 10;
  for (const digit of digitsOf(text.slice(0, -1))) {
    const sum = (rest + digit) % 10 || 10;
    rest = (sum * 2) % 11;
  }
  return (11 - rest) % 10 === last(text);
}

function austria(number: string): boolean {
  const digits = digitsOf(number.slice(1));
  const sum = digits
    .slice(0, 7)
    .reduce((total, digit, index) => total + (index % 2 === 0 ? digit : digit * 2 - (digit > 4 ? 9 : 0)), 0);
  return (10 - ((sum + 4) % 10)) % 10 === digits[7];
}

/** The first two characters are the key; only keys of digits have a published rule for all numbers. */
function france(number: string): boolean {
  const siren = number.slice(2);
  if (!luhn(siren)) return false;
  return !/^\d{2}/.test(number) || Number(number.slice(0, 2)) === Number(BigInt(`${siren}12`) % 97n);
}

function poland(number: string): boolean {
  return weighted(number, [6, 5, 7, 2, 3, 4, 5, 6, 7]) % 11 === last(number);
}

function finland(number: string): boolean {
  return weighted(number, [7, 9, 10, 5, 8, 4, 2, 1]) % 11 === 0;
}

function portugal(number: string): boolean {
  return ((11 - (weighted(number, [9, 8, 7, 6, 5, 4, 3, 2]) % 11)) % 11) % 10 === last(number);
}

function slovenia(number: string): boolean {
  const check = 11 - (weighted(number, [8, 7, 6, 5, 4, 3, 2]) % 11);
  return check < 11 && check % 10 === last(number);
}

function netherlands(number: string): boolean {
  const elevenProof = ((weighted(number, [9, 8, 7, 6, 5, 4, 3, 2]) % 11) - Number(number[8])) % 11 === 0;
  return elevenProof || mod97(`NL${number}`) === 1;
}

/** ISO 7064 MOD 97,10 with letters as 10 to 35. */
function mod97(text: string): number {
  return [...text].reduce((rest, sign) => {
    const value = Number.parseInt(sign, 36);
    return (rest * (value > 9 ? 100 : 10) + value) % 97;
  }, 0);
}

function norway(number: string): boolean {
  return weighted(number, [3, 2, 7, 6, 5, 4, 3, 2, 1]) % 11 === 0;
}

function unitedKingdom(number: string): boolean {
  const rest = weighted(number, [8, 7, 6, 5, 4, 3, 2, 10, 1]) % 97;
  return rest === 0 || rest === 42 || rest === 55;
}

export const CHECK_DIGIT_RULES: Readonly<Record<string, (number: string) => boolean>> = {
  AT: austria,
  BE: (number) => 97 - (Number(number.slice(0, 8)) % 97) === Number(number.slice(8)),
  CH: (number) => (11 - (weighted(number.slice(3), [5, 4, 3, 2, 7, 6, 5, 4]) % 11)) % 11 === Number(number[11]),
  DE: iso7064Mod11Mod10,
  DK: (number) => weighted(number, [2, 7, 6, 5, 4, 3, 2, 1]) % 11 === 0,
  EE: (number) => weighted(number, [3, 7, 1, 3, 7, 1, 3, 7, 1]) % 10 === 0,
  EL: (number) => (weighted(number, [256, 128, 64, 32, 16, 8, 4, 2]) % 11) % 10 === last(number),
  FI: finland,
  FR: france,
  GB: unitedKingdom,
  HR: iso7064Mod11Mod10,
  HU: (number) => weighted(number, [9, 7, 3, 1, 9, 7, 3, 1]) % 10 === 0,
  IT: luhn,
  LU: (number) => Number(number.slice(0, 6)) % 89 === Number(number.slice(6)),
  MT: (number) => weighted(number, [3, 4, 6, 7, 8, 9, 10, 1]) % 37 === 0,
  NL: netherlands,
  NO: norway,
  PL: poland,
  PT: portugal,
  SE: (number) => luhn(number.slice(0, 10)),
  SI: slovenia,
  SK: (number) => Number(number) % 11 === 0,
};
