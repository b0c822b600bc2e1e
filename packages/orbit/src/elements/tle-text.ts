/** Finds the element sets in a text of two or three lines each, and goes on after damage. */
import type { ElementSet } from './element-set.js';
import { type ElementFaults, plainText } from './faults.js';
import { readTlePair, type TleOptions } from './tle.js';

interface TextLine {
  readonly text: string;
  readonly number: number;
}

const LONGEST_NAME = 80;
/** Shorter than this and a line is no damaged element line but a name or a remark. */
const LEAST_ELEMENT_LINE = 55;

type LineKind = 1 | 2 | 'name' | 'element line without its number';

function kindOf(text: string): LineKind {
  const number = text.charAt(0);
  if (
    (number === '1' || number === '2') &&
    (text.length >= LEAST_ELEMENT_LINE || /^[12] [ \dA-Z]{4}\d[UCS ]? /.test(text))
  ) {
    return number === '1' ? 1 : 2;
  }
  // A name is text; a line that is mostly digits at full length has lost its first column.
  const digits = text.replace(/[^\d]/g, '').length;
  return text.length >= LEAST_ELEMENT_LINE && digits > 30 ? 'element line without its number' : 'name';
}

/** Every readable set, in order; every fault, in order. Blank lines and lines that begin with # are passed over. */
export function readTleText(text: string, options: TleOptions, faults: ElementFaults): ElementSet[] {
  const lines: TextLine[] = [];
  for (const [index, raw] of text.split(/\r\n|\n|\r/).entries()) {
    const trimmed = raw.trimEnd();
    if (trimmed.trim() !== '' && !trimmed.startsWith('#')) lines.push({ text: trimmed, number: index + 1 });
  }
  const sets: ElementSet[] = [];
  let name: TextLine | undefined;
  for (let at = 0; at < lines.length; at += 1) {
    const line = lines[at]!;
    const kind = kindOf(line.text);
    if (kind === 'name') {
      if (name) strayLine(name, faults);
      name = line;
      continue;
    }
    const next = lines[at + 1];
    const nextKind = next === undefined ? 'name' : kindOf(next.text);
    const pairs = kind !== 2 && (nextKind === 2 || (kind === 1 && nextKind === 'element line without its number'));
    if (next === undefined || !pairs) {
      aloneLine(line, kind, faults);
      name = undefined;
      continue;
    }
    if (kind !== 1) wrongNumber(line, 1, faults);
    else if (nextKind !== 2) wrongNumber(next, 2, faults);
    else {
      const pair = {
        name: nameOf(name, faults),
        line1: line.text,
        line2: next.text,
        number1: line.number,
        number2: next.number,
        sourceLine: name?.number ?? line.number,
      };
      const set = readTlePair(pair, options, faults);
      if (set) sets.push(set);
    }
    name = undefined;
    at += 1;
  }
  if (name) strayLine(name, faults);
  return sets;
}

/** The name line of three, its leading `0 ` taken off. */
function nameOf(line: TextLine | undefined, faults: ElementFaults): string {
  if (!line) return '';
  const name = line.text.replace(/^0 /, '').trim();
  if (name.length > LONGEST_NAME) {
    faults.add({ line: line.number, field: 'name', found: name, expected: `at most ${LONGEST_NAME} characters` });
  }
  return plainText(name);
}

function strayLine(line: TextLine, faults: ElementFaults): void {
  faults.add({ line: line.number, field: 'line', found: line.text, expected: 'a name followed by lines 1 and 2' });
}

function aloneLine(line: TextLine, kind: LineKind, faults: ElementFaults): void {
  const [expected, what] =
    kind === 1
      ? ['line 2 of this element set after it', 'line 1 stands without its line 2']
      : kind === 2
        ? ['line 1 of this element set before it', 'line 2 stands without its line 1']
        : ['1 or 2 in column 1', 'an element line begins with neither 1 nor 2'];
  faults.add({
    line: line.number,
    field: 'line',
    found: line.text,
    expected,
    message: `Line ${line.number}: ${what}.`,
  });
}

function wrongNumber(line: TextLine, right: 1 | 2, faults: ElementFaults): void {
  faults.add({ line: line.number, field: 'line number', found: line.text.charAt(0), expected: `${right} in column 1` });
}
