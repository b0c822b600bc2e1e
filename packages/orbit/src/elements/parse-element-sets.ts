/** One door for every form that element sets come in. */

import { elementSetDigest } from './digest.js';
import type { ElementFault, ElementFormat, ElementSet } from './element-set.js';
import { ElementFaults } from './faults.js';
import { readOmmCsv } from './omm-csv.js';
import { type OmmMessage, readOmm } from './omm-fields.js';
import { readOmmJson } from './omm-json.js';
import { readOmmKvn } from './omm-kvn.js';
import { readOmmXml } from './omm-xml.js';
import type { TleOptions } from './tle.js';
import { readTleText } from './tle-text.js';

export interface ElementTextOptions extends TleOptions {
  /** What the text is; found out from the text itself by default. */
  readonly format?: ElementFormat | 'auto';
  /** Named in the sentences, where several files are read at once. */
  readonly fileName?: string;
}

export interface ElementReading {
  readonly format: ElementFormat;
  readonly sets: readonly ElementSet[];
  readonly faults: readonly ElementFault[];
}

/** Beyond this a text is no list of element sets anybody pastes: a whole public catalogue takes under 20 million. */
export const LONGEST_ELEMENT_TEXT = 32_000_000;

/**
 * Reads TLE (two or three lines), or OMM as KVN, XML, JSON or CSV. Never throws for what the text holds: sets that are whole
 * come back in their order, everything wrong as a fault with its line. A set that repeats an earlier one of the same text is
 * a fault as well and comes back once. Document types and entities are refused.
 */
export function parseElementSets(text: string, options: ElementTextOptions = {}): ElementReading {
  const faults = new ElementFaults();
  const clean = text.charCodeAt(0) === 0xfeff ? text.slice(1) : text;
  const format = options.format === undefined || options.format === 'auto' ? formatOf(clean) : options.format;
  let sets: ElementSet[] = [];
  if (clean.length > LONGEST_ELEMENT_TEXT) {
    const expected = `at most ${LONGEST_ELEMENT_TEXT} characters`;
    faults.add({ line: 1, field: 'text', found: `${clean.length} characters`, expected });
  } else if (clean.trim() === '') {
    faults.add({
      line: 1,
      field: 'text',
      found: '',
      expected: 'an element set',
      message: 'There is no element set here.',
    });
  } else {
    sets = withoutRepeats(readText(clean, format, options, faults), faults);
  }
  const inFile = options.fileName === undefined ? '' : `${options.fileName}: `;
  const told = faults.list.map((fault) => ({ ...fault, message: `${inFile}${fault.message}` }));
  return { format, sets, faults: told.sort((a, b) => a.line - b.line) };
}

function formatOf(text: string): ElementFormat {
  const start = text.trimStart();
  if (start.startsWith('<')) return 'omm-xml';
  if (start.startsWith('[') || start.startsWith('{')) return 'omm-json';
  const [firstRow = ''] = start.split(/[\r\n]/, 1);
  if (/^[A-Z_,"\s]*\b(?:OBJECT_NAME|MEAN_MOTION)\b[A-Z_,"\s]*$/.test(firstRow) && firstRow.includes(','))
    return 'omm-csv';
  return /^\s*(?:CCSDS_OMM_VERS|CREATION_DATE|OBJECT_NAME|EPOCH)\s*=/m.test(text) ? 'omm-kvn' : 'tle';
}

function readText(text: string, format: ElementFormat, options: TleOptions, faults: ElementFaults): ElementSet[] {
  if (format === 'tle') return readTleText(text, options, faults);
  return messagesIn(text, format, faults).flatMap((message) => readOmm(message, faults) ?? []);
}

function messagesIn(text: string, format: Exclude<ElementFormat, 'tle'>, faults: ElementFaults): OmmMessage[] {
  switch (format) {
    case 'omm-kvn':
      return readOmmKvn(text, faults);
    case 'omm-xml':
      return readOmmXml(text, faults);
    case 'omm-json':
      return readOmmJson(text, faults);
    case 'omm-csv':
      return readOmmCsv(text, faults);
  }
}

function withoutRepeats(sets: readonly ElementSet[], faults: ElementFaults): ElementSet[] {
  const seen = new Map<string, ElementSet>();
  return sets.filter((set) => {
    const digest = elementSetDigest(set);
    const before = seen.get(digest);
    if (before === undefined) {
      seen.set(digest, set);
      return true;
    }
    faults.add({
      line: set.sourceLine,
      field: 'element set',
      found: set.objectName || String(set.catalogNumber),
      expected: 'each element set once',
      message: `Line ${set.sourceLine}: this element set is the same as that of line ${before.sourceLine}.`,
    });
    return false;
  });
}
