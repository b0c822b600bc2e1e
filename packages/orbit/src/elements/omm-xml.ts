/** OMM as XML, one message or many inside `<ndm>`. Document types and entities are refused, never expanded. */
import { readXmlTree, type XmlElement } from '../ephemeris/xml-tree.js';
import type { ElementFaults } from './faults.js';
import { isOmmKeyword, OMM_UNITS, type OmmField, type OmmMessage } from './omm-fields.js';

/** Elements that only group others. */
const GROUPS = new Set([
  'header',
  'body',
  'segment',
  'metadata',
  'data',
  'meanElements',
  'tleParameters',
  'spacecraftParameters',
  'covarianceMatrix',
  'userDefinedParameters',
]);

export function readOmmXml(text: string, faults: ElementFaults): OmmMessage[] {
  const reading = readXmlTree(text);
  if ('root' in reading) return messagesOf(reading.root, 0, faults);
  const pieces = /<!(?:DOCTYPE|ENTITY)/i.test(text) ? [] : [...text.matchAll(/<omm\b[\s\S]*?<\/omm\s*>/g)];
  if (pieces.length < 2) {
    notXml(reading.line, reading.message, faults);
    return [];
  }
  return messagesOneByOne(text, pieces, faults);
}

/** A damaged catalogue: each message is read by itself, so that one broken element costs one message. */
function messagesOneByOne(text: string, pieces: readonly RegExpExecArray[], faults: ElementFaults): OmmMessage[] {
  const messages: OmmMessage[] = [];
  let counted = 0;
  let linesBefore = 0;
  for (const piece of pieces) {
    linesBefore += text.slice(counted, piece.index).split('\n').length - 1;
    counted = piece.index;
    const reading = readXmlTree(piece[0]);
    if ('root' in reading) messages.push(...messagesOf(reading.root, linesBefore, faults));
    else notXml(reading.line + linesBefore, reading.message, faults);
  }
  return messages;
}

function notXml(line: number, message: string, faults: ElementFaults): void {
  faults.add({
    line,
    field: 'XML',
    found: '',
    expected: 'well-formed XML without a document type',
    message: `Line ${line}: ${message}`,
  });
}

function messagesOf(root: XmlElement, linesBefore: number, faults: ElementFaults): OmmMessage[] {
  const elements = root.name === 'omm' ? [root] : root.children.filter(({ name }) => name === 'omm');
  if (elements.length === 0) {
    const line = root.line + linesBefore;
    faults.add({ line, field: 'XML', found: `<${root.name}>`, expected: 'an <omm> element' });
  }
  return elements.flatMap((element) => {
    const line = element.line + linesBefore;
    const fields = new Map<string, OmmField>();
    const version = element.attributes.get('version');
    if (version !== undefined) fields.set('CCSDS_OMM_VERS', { value: version, line });
    return collect(element, { fields, linesBefore, faults }) ? [{ format: 'omm-xml' as const, fields, line }] : [];
  });
}

interface Collecting {
  readonly fields: Map<string, OmmField>;
  readonly linesBefore: number;
  readonly faults: ElementFaults;
}

function collect(element: XmlElement, into: Collecting): boolean {
  let good = true;
  for (const child of element.children) {
    if (child.name === 'COMMENT' || child.name === 'USER_DEFINED') continue;
    if (GROUPS.has(child.name)) good = collect(child, into) && good;
    else good = takeElement(child, into) && good;
  }
  return good;
}

function takeElement(element: XmlElement, { fields, linesBefore, faults }: Collecting): boolean {
  const { name } = element;
  const line = element.line + linesBefore;
  if (!isOmmKeyword(name)) {
    faults.add({ line, field: name, found: `<${name}>`, expected: 'an element of an OMM' });
    return false;
  }
  const before = fields.get(name);
  if (before) {
    faults.add({
      line,
      field: name,
      found: `<${name}>`,
      expected: `this element once; it stands in line ${before.line} already`,
    });
    return false;
  }
  const unit = element.attributes.get('units');
  const right = OMM_UNITS.get(name);
  if (unit !== undefined && right !== undefined && unit.toLowerCase() !== right.toLowerCase()) {
    faults.add({ line, field: name, found: `units="${unit}"`, expected: `units="${right}"` });
    return false;
  }
  fields.set(name, { value: element.text.trim(), line });
  return true;
}
