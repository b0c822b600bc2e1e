import { randomBytes } from 'node:crypto';

const ALPHABET = '0123456789ABCDEFGHIJKLMNOPQRSTUVWXYZabcdefghijklmnopqrstuvwxyz';

/** Random text of letters and digits; bytes that would favour some letters are thrown away. */
export function randomText(length: number): string {
  let text = '';
  while (text.length < length) {
    for (const byte of randomBytes(length)) {
      if (byte < 248 && text.length < length) text += ALPHABET[byte % ALPHABET.length];
    }
  }
  return text;
}

export function newId(prefix: string): string {
  return `${prefix}_${randomText(24)}`;
}
