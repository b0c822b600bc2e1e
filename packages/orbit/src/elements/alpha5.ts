/**
 * Catalogue numbers in the five columns of a TLE. Above 99999 the first column is a letter: A is 10, then on through the
 * alphabet without I and O, Z is 33. Source: Space-Track's rule as tested in python-sgp4.
 */
const LETTERS = 'ABCDEFGHJKLMNPQRSTUVWXYZ';

export const MOST_TLE_NUMBER = 339_999;

/** The number, or undefined where the five columns hold none. Blanks may stand in front. */
export function parseAlpha5(columns: string): number | undefined {
  if (/^ *\d+$/.test(columns)) return Number(columns);
  const letter = LETTERS.indexOf(columns.charAt(0));
  if (letter < 0 || !/^.\d{4}$/.test(columns)) return undefined;
  return (letter + 10) * 10_000 + Number(columns.slice(1));
}

/** Five columns, or undefined above 339999, which no TLE can carry. */
export function formatAlpha5(catalogNumber: number): string | undefined {
  if (!Number.isInteger(catalogNumber) || catalogNumber < 0 || catalogNumber > MOST_TLE_NUMBER) return undefined;
  if (catalogNumber < 100_000) return String(catalogNumber).padStart(5, '0');
  return `${LETTERS.charAt(Math.floor(catalogNumber / 10_000) - 10)}${String(catalogNumber % 10_000).padStart(4, '0')}`;
}
