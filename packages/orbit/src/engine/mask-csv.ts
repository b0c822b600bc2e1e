/** A horizon mask from a survey's table: azimuth and elevation in degrees, one corner a row. */
import type { MaskPoint } from '../types.js';
import { MOST_MASK_POINTS } from './mask.js';

export interface MaskCsvFault {
  readonly line: number;
  readonly field: string;
  readonly found: string;
  readonly expected: string;
  readonly message: string;
}

export interface MaskCsvReading {
  readonly points: readonly MaskPoint[];
  readonly faults: readonly MaskCsvFault[];
}

const LONGEST_TEXT = 200_000;
const NUMBER = /^[+-]?(?:\d+\.?\d*|\.\d+)$/;

/**
 * Comma, semicolon or tab between the two numbers; a decimal comma where the semicolon or tab separates. A first row of words
 * is taken for a heading, blank rows and rows that begin with # are passed over. Points come back in the order written.
 */
export function parseMaskCsv(text: string): MaskCsvReading {
  const faults: MaskCsvFault[] = [];
  const points: MaskPoint[] = [];
  const add = (line: number, field: string, found: string, expected: string) => {
    const shown = found.slice(0, 40);
    const message = `Line ${line}, ${field}: found ${shown === '' ? 'nothing' : `"${shown}"`}, expected ${expected}.`;
    faults.push({ line, field, found: shown, expected, message });
  };
  if (text.length > LONGEST_TEXT) {
    add(1, 'file', `${text.length} characters`, `at most ${LONGEST_TEXT} characters`);
    return { points, faults };
  }
  let headingAllowed = true;
  for (const [index, raw] of text
    .replace(/^\ufeff/, '')
    .split(/\r\n|\n|\r/)
    .entries()) {
    const row = raw.trim();
    if (row === '' || row.startsWith('#')) continue;
    const cells = cellsOf(row);
    const heading = headingAllowed && cells.every((cell) => /^[A-Za-z_(]/.test(cell));
    headingAllowed = false;
    if (heading) continue;
    const line = index + 1;
    if (cells.length !== 2) {
      add(line, 'row', row, 'an azimuth and an elevation');
      continue;
    }
    const azimuthDeg = numberIn(cells[0] ?? '', 0, 360);
    const elevationDeg = numberIn(cells[1] ?? '', -10, 90);
    if (azimuthDeg === undefined) add(line, 'azimuth', cells[0] ?? '', 'degrees from 0 to 360');
    if (elevationDeg === undefined) add(line, 'elevation', cells[1] ?? '', 'degrees from -10 to 90');
    if (azimuthDeg !== undefined && elevationDeg !== undefined) points.push([azimuthDeg, elevationDeg]);
  }
  if (points.length === 0 && faults.length === 0) add(1, 'file', '', 'at least one azimuth and elevation');
  if (points.length > MOST_MASK_POINTS) add(1, 'file', `${points.length} points`, `at most ${MOST_MASK_POINTS}`);
  return { points, faults };
}

function cellsOf(row: string): string[] {
  const separator = row.includes(';') ? ';' : row.includes('\t') ? '\t' : ',';
  const cells = row.split(separator).map((cell) =>
    cell
      .trim()
      .replace(/^"(.*)"$/, '$1')
      .trim(),
  );
  return separator === ',' ? cells : cells.map((cell) => cell.replace(',', '.'));
}

function numberIn(text: string, min: number, max: number): number | undefined {
  const value = NUMBER.test(text) ? Number(text) : Number.NaN;
  return value >= min && value <= max ? value : undefined;
}
