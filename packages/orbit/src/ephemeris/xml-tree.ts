/**
 * A small reading of XML that keeps line numbers, for messages of a few known elements. Well-formedness is checked by
 * fast-xml-parser first; document types and entity declarations are refused outright and never expanded.
 */
import { XMLValidator } from 'fast-xml-parser';

export interface XmlElement {
  readonly name: string;
  readonly attributes: ReadonlyMap<string, string>;
  readonly line: number;
  readonly children: XmlElement[];
  text: string;
}

export type XmlReading = { readonly root: XmlElement } | { readonly line: number; readonly message: string };

const TOKEN =
  /<!--[\s\S]*?-->|<!\[CDATA\[([\s\S]*?)\]\]>|<\?[\s\S]*?\?>|<(\/?)([^\s/>]+)((?:"[^"]*"|'[^']*'|[^"'>])*?)(\/?)>/g;
const ATTRIBUTE = /([^\s=]+)\s*=\s*(?:"([^"]*)"|'([^']*)')/g;

/** The tree of a document, or the first thing that is wrong with it and its line. Prefixes of names are dropped. */
export function readXmlTree(text: string): XmlReading {
  const declared = /<!(DOCTYPE|ENTITY)/i.exec(text);
  if (declared) return { line: lineAt(text, declared.index), message: 'Document types and entities are not accepted.' };
  const verdict = XMLValidator.validate(text);
  if (verdict !== true) return { line: verdict.err.line, message: `This is not well-formed XML: ${verdict.err.msg}` };
  const root = buildTree(text);
  return root === undefined ? { line: 1, message: 'There is no XML element here.' } : { root };
}

function buildTree(text: string): XmlElement | undefined {
  let root: XmlElement | undefined;
  const open: XmlElement[] = [];
  let line = 1;
  let counted = 0;
  let textFrom = 0;
  for (const token of text.matchAll(TOKEN)) {
    const inside = open.at(-1);
    if (inside) inside.text += decodeEntities(text.slice(textFrom, token.index));
    textFrom = token.index + token[0].length;
    const [, cdata, closing, name, attributes, selfClosing] = token;
    if (cdata !== undefined && inside) inside.text += cdata;
    if (name === undefined) continue;
    line += countLines(text, counted, token.index);
    counted = token.index;
    if (closing === '/') {
      open.pop();
      continue;
    }
    const element: XmlElement = {
      name: localName(name),
      attributes: readAttributes(attributes ?? ''),
      line,
      children: [],
      text: '',
    };
    inside?.children.push(element);
    root ??= element;
    if (selfClosing !== '/') open.push(element);
  }
  return root;
}

function localName(name: string): string {
  return name.slice(name.indexOf(':') + 1);
}

function readAttributes(text: string): Map<string, string> {
  return new Map(
    [...text.matchAll(ATTRIBUTE)].map(([, name = '', double, single]) => [
      name,
      decodeEntities(double ?? single ?? ''),
    ]),
  );
}

const ENTITIES: Readonly<Record<string, string>> = { lt: '<', gt: '>', amp: '&', quot: '"', apos: "'" };

/** Only the five names that XML itself has, and numbers; anything else stays as it stands. */
function decodeEntities(text: string): string {
  return text.replace(/&(?:#(\d{1,7})|#x([0-9a-fA-F]{1,6})|([a-z]+));/g, (whole, decimal, hex, name) => {
    if (name !== undefined) return ENTITIES[name] ?? whole;
    const code = decimal !== undefined ? Number(decimal) : Number.parseInt(hex, 16);
    return code <= 0x10ffff ? String.fromCodePoint(code) : whole;
  });
}

/** Writes text so that it stands in an element or a quoted attribute. */
export function escapeXml(text: string): string {
  return text.replace(/[<>&"]/g, (sign) => ({ '<': '&lt;', '>': '&gt;', '&': '&amp;', '"': '&quot;' })[sign] ?? sign);
}

function lineAt(text: string, index: number): number {
  return 1 + countLines(text, 0, index);
}

function countLines(text: string, from: number, to: number): number {
  let count = 0;
  for (let at = text.indexOf('\n', from); at !== -1 && at < to; at = text.indexOf('\n', at + 1)) count += 1;
  return count;
}
