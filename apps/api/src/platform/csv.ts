/** Comma tables by RFC 4180 for people's spreadsheets and accounting software. */
import { currencyExponent } from '@skyberth/money';

export type Cell = string | number | null;

/** `1234.50`, with as many decimals as the currency has. */
export function decimals(minor: number, currency: string): string {
  const exponent = currencyExponent(currency);
  const digits = String(Math.abs(minor)).padStart(exponent + 1, '0');
  const whole = digits.slice(0, digits.length - exponent);
  return `${minor < 0 ? '-' : ''}${whole}${exponent === 0 ? '' : `.${digits.slice(-exponent)}`}`;
}

/** A text that begins like a formula is kept from being one when a spreadsheet opens the file. */
export function line(cells: readonly Cell[]): string {
  const texts = cells.map((cell) => {
    if (typeof cell === 'number') return String(cell);
    const text = cell ?? '';
    const safe = /^[=+@\t\r]|^-(?!\d)/.test(text) ? `'${text}` : text;
    return /[",\r\n]/.test(safe) ? `"${safe.replaceAll('"', '""')}"` : safe;
  });
  return `${texts.join(',')}\r\n`;
}
