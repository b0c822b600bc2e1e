/** Whether a VAT number can be one: its form in every country known here, its check digits where the rule is published. */
import { CHECK_DIGIT_RULES } from './check-digits.js';

interface VatNumberForm {
  /** Without the prefix. */
  readonly pattern: RegExp;
  readonly example: string;
}

/** By VAT prefix: ISO 3166, but EL for Greece. Forms as the EU publishes them for its members (from memory). */
const FORMS: Readonly<Record<string, VatNumberForm>> = {
  AT: { pattern: /^U\d{8}$/, example: 'ATU and 8 digits' },
  BE: { pattern: /^[01]\d{9}$/, example: 'BE and 10 digits, the first 0 or 1' },
  BG: { pattern: /^\d{9,10}$/, example: 'BG and 9 or 10 digits' },
  CH: { pattern: /^CHE\d{9}(MWST|TVA|IVA)$/, example: 'CHE, 9 digits and MWST, TVA or IVA' },
  CY: { pattern: /^\d{8}[A-Z]$/, example: 'CY, 8 digits and a letter' },
  CZ: { pattern: /^\d{8,10}$/, example: 'CZ and 8 to 10 digits' },
  DE: { pattern: /^[1-9]\d{8}$/, example: 'DE and 9 digits' },
  DK: { pattern: /^[1-9]\d{7}$/, example: 'DK and 8 digits' },
  EE: { pattern: /^\d{9}$/, example: 'EE and 9 digits' },
  EL: { pattern: /^\d{9}$/, example: 'EL and 9 digits' },
  ES: { pattern: /^([A-Z]\d{7}[A-Z0-9]|\d{8}[A-Z])$/, example: 'ES and 9 characters, a letter first or last' },
  FI: { pattern: /^\d{8}$/, example: 'FI and 8 digits' },
  FR: { pattern: /^[0-9A-HJ-NP-Z]{2}\d{9}$/, example: 'FR, 2 characters and 9 digits' },
  GB: { pattern: /^\d{9}$/, example: 'GB and 9 digits' },
  HR: { pattern: /^\d{11}$/, example: 'HR and 11 digits' },
  HU: { pattern: /^\d{8}$/, example: 'HU and 8 digits' },
  IE: { pattern: /^(\d{7}[A-W][A-I]?|\d[A-Z+*]\d{5}[A-W])$/, example: 'IE, 7 digits and 1 or 2 letters' },
  IT: { pattern: /^\d{11}$/, example: 'IT and 11 digits' },
  LT: { pattern: /^(\d{9}|\d{12})$/, example: 'LT and 9 or 12 digits' },
  LU: { pattern: /^\d{8}$/, example: 'LU and 8 digits' },
  LV: { pattern: /^\d{11}$/, example: 'LV and 11 digits' },
  MT: { pattern: /^[1-9]\d{7}$/, example: 'MT and 8 digits' },
  NL: { pattern: /^\d{9}B\d{2}$/, example: 'NL, 9 digits, B and 2 digits' },
  NO: { pattern: /^\d{9}(MVA)?$/, example: 'NO, 9 digits and MVA' },
  PL: { pattern: /^\d{10}$/, example: 'PL and 10 digits' },
  PT: { pattern: /^[1-9]\d{8}$/, example: 'PT and 9 digits' },
  RO: { pattern: /^[1-9]\d{1,9}$/, example: 'RO and 2 to 10 digits' },
  SE: { pattern: /^\d{10}01$/, example: 'SE and 12 digits ending in 01' },
  SI: { pattern: /^[1-9]\d{7}$/, example: 'SI and 8 digits' },
  SK: { pattern: /^[1-9]\d{9}$/, example: 'SK and 10 digits' },
};

export type VatNumberCheck =
  | {
      readonly ok: true /** ISO 3166. */;
      readonly country: string /** No spaces, capitals, with prefix. */;
      readonly number: string;
      readonly checked: 'check digits' | 'form only';
    }
  | { readonly ok: false; readonly sentence: string };

/** Which VAT numbers are known here: prefix, form in words, and whether check digits are looked at too. */
export const vatNumberForms = (): readonly { prefix: string; form: string; checksDigits: boolean }[] =>
  Object.entries(FORMS).map(([prefix, { example }]) => ({
    prefix,
    form: example,
    checksDigits: CHECK_DIGIT_RULES[prefix] !== undefined,
  }));

/**
 * Reads a VAT number with its country prefix; spaces, points and hyphens don't matter. A number that passes may still not
 * be registered: only the tax office knows that.
 */
export function checkVatNumber(text: string): VatNumberCheck {
  const plain = text.toUpperCase().replace(/[\s.\-/]/g, '');
  const prefix = plain.startsWith('GR') ? 'EL' : plain.slice(0, 2);
  const form = Object.hasOwn(FORMS, prefix) ? FORMS[prefix] : undefined;
  if (form === undefined)
    return { ok: false, sentence: `“${text}” does not begin with a country whose VAT numbers are known here.` };
  const number = prefix === 'CH' ? plain : plain.slice(2);
  if (!form.pattern.test(number))
    return { ok: false, sentence: `“${text}” does not have the form of a VAT number there: ${form.example}.` };
  const agrees = CHECK_DIGIT_RULES[prefix];
  if (agrees !== undefined && !agrees(number))
    return { ok: false, sentence: `The check digits of “${text}” do not agree; one digit is probably wrong.` };
  return {
    ok: true,
    country: prefix === 'EL' ? 'GR' : prefix,
    number: prefix === 'CH' ? number : prefix + number,
    checked: agrees === undefined ? 'form only' : 'check digits',
  };
}
