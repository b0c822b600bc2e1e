/** Reads an OEM in XML. Source: the NDM/XML schema of CCSDS 505.0-B, message `oem`. */
import { parseCcsdsTime } from './ccsds-time.js';
import { toUtcMs } from './leap-seconds.js';
import type { FaultList, Oem, OemCovariance, OemSegment } from './oem.js';
import {
  type Field,
  HEADER_KEYWORDS,
  METADATA_KEYWORDS,
  type OemMetadata,
  readHeader,
  readMetadata,
} from './oem-fields.js';
import { parseCcsdsNumber, StateTable } from './oem-states.js';
import { readXmlTree, type XmlElement } from './xml-tree.js';

const STATE_FIELDS = ['EPOCH', 'X', 'Y', 'Z', 'X_DOT', 'Y_DOT', 'Z_DOT', 'X_DDOT', 'Y_DDOT', 'Z_DDOT'];
const AXES = ['X', 'Y', 'Z', 'X_DOT', 'Y_DOT', 'Z_DOT'];
/** Names of the lower triangle, row by row: CX_X, CY_X, CY_Y and so on. */
export const COVARIANCE_FIELDS: readonly string[] = AXES.flatMap((row, index) =>
  AXES.slice(0, index + 1).map((column) => `C${row}_${column}`),
);

/** The message, or undefined with every fault in the list. */
export function readOemXml(text: string, faults: FaultList): Oem | undefined {
  const tree = readXmlTree(text);
  if (!('root' in tree)) {
    faults.add({
      line: tree.line,
      field: 'XML',
      found: '',
      expected: 'well-formed XML',
      message: `Line ${tree.line}: ${tree.message}`,
    });
    return undefined;
  }
  const oem = tree.root.name === 'ndm' ? tree.root.children.find(({ name }) => name === 'oem') : tree.root;
  if (oem?.name !== 'oem') {
    faults.add({ line: tree.root.line, field: tree.root.name, found: tree.root.name, expected: 'an element oem' });
    return undefined;
  }
  return readMessage(oem, faults);
}

function readMessage(oem: XmlElement, faults: FaultList): Oem | undefined {
  const headerElement = only(oem, 'header', faults);
  const fields = headerElement ? readFields(headerElement, HEADER_KEYWORDS, faults) : new Map<string, Field>();
  const version = oem.attributes.get('version');
  if (version !== undefined) fields.set('CCSDS_OEM_VERS', { value: version, line: oem.line });
  const header = readHeader(fields, faults);
  const body = only(oem, 'body', faults);
  const systems = new Set<string>();
  const segments: OemSegment[] = [];
  for (const element of body?.children ?? []) {
    if (element.name !== 'segment') unexpected(element, 'segment', faults);
    else {
      const segment = readSegment(element, systems, faults);
      if (segment) segments.push(segment);
    }
  }
  if (segments.length === 0 && !faults.any)
    faults.add({ line: oem.line, field: 'segment', found: '', expected: 'at least one segment' });
  const comments = headerElement ? commentsOf(headerElement) : [];
  return faults.any ? undefined : { ...header, comments, segments };
}

function readSegment(element: XmlElement, systems: Set<string>, faults: FaultList): OemSegment | undefined {
  const metadataElement = only(element, 'metadata', faults);
  const data = only(element, 'data', faults);
  if (metadataElement === undefined || data === undefined) return undefined;
  const fields = readFields(metadataElement, METADATA_KEYWORDS, faults);
  const metadata = readMetadata(fields, metadataElement.line, faults);
  const system = fields.get('TIME_SYSTEM');
  if (system) {
    const first = systems.values().next().value ?? system.value;
    systems.add(system.value);
    if (first !== system.value) {
      faults.add({
        line: system.line,
        field: 'TIME_SYSTEM',
        found: system.value,
        expected: `${first} as in the first segment`,
      });
    }
  }
  if (metadata === undefined) return undefined;
  const table = new StateTable(metadata, faults);
  const covariances: OemCovariance[] = [];
  for (const child of data.children) {
    if (child.name === 'stateVector') addState(child, table, faults);
    else if (child.name === 'covarianceMatrix') addCovariance(child, metadata, covariances, faults);
    else if (child.name !== 'COMMENT') unexpected(child, 'stateVector or covarianceMatrix', faults);
  }
  return table.finish(element.line, [...commentsOf(metadataElement), ...commentsOf(data)], covariances);
}

function addState(element: XmlElement, table: StateTable, faults: FaultList): void {
  const words: string[] = [];
  for (const child of element.children) {
    if (child.name !== STATE_FIELDS[words.length]) {
      unexpected(child, STATE_FIELDS[words.length] ?? 'no more fields', faults);
      return;
    }
    words.push(child.text.trim());
  }
  table.add(words, element.line);
}

function addCovariance(element: XmlElement, metadata: OemMetadata, into: OemCovariance[], faults: FaultList): void {
  const byName = new Map(element.children.map((child) => [child.name, child.text.trim()]));
  const clockMs = parseCcsdsTime(byName.get('EPOCH') ?? '');
  const numbers = COVARIANCE_FIELDS.map((name) => parseCcsdsNumber(byName.get(name) ?? ''));
  const wrong = numbers.indexOf(undefined);
  if (clockMs === undefined || wrong >= 0) {
    const field = clockMs === undefined ? 'EPOCH' : COVARIANCE_FIELDS[wrong]!;
    faults.add({
      line: element.line,
      field,
      found: byName.get(field) ?? '',
      expected: field === 'EPOCH' ? 'a date' : 'a number',
    });
    return;
  }
  into.push({
    epochMs: toUtcMs(clockMs, metadata.timeSystem),
    frame: byName.get('COV_REF_FRAME'),
    lowerTriangle: numbers as number[],
  });
}

function readFields(element: XmlElement, known: readonly string[], faults: FaultList): Map<string, Field> {
  const fields = new Map<string, Field>();
  for (const child of element.children) {
    if (child.name === 'COMMENT') continue;
    if (!known.includes(child.name)) unexpected(child, `a keyword of the ${element.name}`, faults);
    else if (fields.has(child.name))
      faults.add({ line: child.line, field: child.name, found: child.text, expected: 'each keyword once' });
    else fields.set(child.name, { value: child.text.trim(), line: child.line });
  }
  return fields;
}

function commentsOf(element: XmlElement): string[] {
  return element.children.filter(({ name }) => name === 'COMMENT').map(({ text }) => text.trim());
}

function only(parent: XmlElement, name: string, faults: FaultList): XmlElement | undefined {
  const [first, second] = parent.children.filter((child) => child.name === name);
  if (first === undefined || second !== undefined) {
    const line = second?.line ?? parent.line;
    faults.add({ line, field: name, found: second ? 'two of them' : '', expected: `one element ${name}` });
  }
  return first;
}

function unexpected(element: XmlElement, expected: string, faults: FaultList): void {
  const message = `Line ${element.line}: ${element.name} is not expected here; expected ${expected}.`;
  faults.add({ line: element.line, field: element.name, found: element.name, expected, message });
}
