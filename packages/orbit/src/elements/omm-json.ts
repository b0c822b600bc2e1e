/** OMM as JSON: one object, or an array of them. Keys that an OMM does not know are passed over, as catalogues add their own. */
import type { ElementFaults } from './faults.js';
import { isOmmKeyword, type OmmField, type OmmMessage } from './omm-fields.js';

interface Piece {
  readonly text: string;
  readonly line: number;
}

export function readOmmJson(text: string, faults: ElementFaults): OmmMessage[] {
  try {
    JSON.parse(text);
  } catch {
    return readDamaged(text, faults);
  }
  return objectsIn(text, faults).flatMap((piece) => messageOf(piece, JSON.parse(piece.text), faults));
}

/**
 * A damaged list is cut at its braces, which elements never hold inside, and each piece judged by itself: a broken number
 * then costs one spacecraft, not all.
 */
function readDamaged(text: string, faults: ElementFaults): OmmMessage[] {
  const messages: OmmMessage[] = [];
  let line = 1;
  let end = 0;
  for (const match of text.matchAll(/\{[^{}]*\}/g)) {
    line += checkBetween(text.slice(end, match.index), line, faults);
    const piece = { text: match[0], line };
    try {
      messages.push(...messageOf(piece, JSON.parse(piece.text), faults));
    } catch (error) {
      faults.add({ ...notJson(line + linesUntilFault(match[0], error)), found: match[0].replace(/\s+/g, ' ') });
    }
    line += countLines(match[0]);
    end = match.index + match[0].length;
  }
  checkBetween(text.slice(end), line, faults);
  return messages;
}

/** Between objects only commas and the list's brackets may stand. Returns the lines passed. */
function checkBetween(text: string, line: number, faults: ElementFaults): number {
  const stray = /[^\s,[\]]/.exec(text);
  if (stray) {
    const strayLine = line + countLines(text.slice(0, stray.index));
    faults.add({ ...notJson(strayLine), found: text.slice(stray.index).replace(/\s+/g, ' ') });
  }
  return countLines(text);
}

const notJson = (line: number) => ({ line, field: 'JSON', expected: 'an object of an OMM in well-formed JSON' });

function linesUntilFault(text: string, error: unknown): number {
  const position = error instanceof Error ? /position (\d+)/.exec(error.message)?.[1] : undefined;
  return position === undefined ? 0 : countLines(text.slice(0, Number(position)));
}

const countLines = (text: string): number => text.split('\n').length - 1;

/** The text of each object of a well-formed list, with its line. */
function objectsIn(text: string, faults: ElementFaults): Piece[] {
  const pieces: Piece[] = [];
  let depth = 0;
  let line = 1;
  let start = 0;
  let startLine = 1;
  const listDepth = text.trimStart().startsWith('[') ? 1 : 0;
  for (const match of text.matchAll(/"(?:[^"\\]|\\.)*"|[{}[\]\n]/g)) {
    const sign = match[0];
    if (sign === '\n') line += 1;
    else if (sign === '{' || sign === '[') {
      if (depth === listDepth) [start, startLine] = [match.index, line];
      depth += 1;
    } else if (sign === '}' || sign === ']') {
      depth -= 1;
      if (depth === listDepth && !(listDepth === 0 && sign === ']')) {
        pieces.push({ text: text.slice(start, match.index + 1), line: startLine });
      }
    }
  }
  if (pieces.length === 0) faults.add({ ...notJson(1), found: text.trim().replace(/\s+/g, ' ') });
  return pieces;
}

function messageOf(piece: Piece, value: unknown, faults: ElementFaults): OmmMessage[] {
  const { line } = piece;
  if (typeof value !== 'object' || value === null || Array.isArray(value)) {
    faults.add({ ...notJson(line), found: piece.text });
    return [];
  }
  const fields = new Map<string, OmmField>();
  let good = true;
  for (const [key, entry] of Object.entries(value)) {
    if (!isOmmKeyword(key) || entry === null) continue;
    const fieldLine = lineOfKey(piece, key);
    if (typeof entry === 'string' || typeof entry === 'number') {
      fields.set(key, { value: String(entry).trim(), line: fieldLine });
    } else {
      good = false;
      faults.add({ line: fieldLine, field: key, found: JSON.stringify(entry), expected: 'a text or a number' });
    }
  }
  return good ? [{ format: 'omm-json', fields, line }] : [];
}

function lineOfKey({ text, line }: Piece, key: string): number {
  const at = text.indexOf(`"${key}"`);
  return at < 0 ? line : line + countLines(text.slice(0, at));
}
