/** OMM as keyword = value lines. A new CCSDS_OMM_VERS begins a new message, so that one text may hold many. */
import type { ElementFaults } from './faults.js';
import { isOmmKeyword, OMM_UNITS, type OmmField, type OmmMessage } from './omm-fields.js';

const LINE = /^\s*([A-Z][A-Z0-9_]*)\s*=\s*(.*?)\s*$/;
const UNIT = /^(.*?)\s*\[([^\]]*)\]$/;

/** The messages that can be read on, and how often a fault spoilt one: a spoilt message is not offered at all. */
export function readOmmKvn(text: string, faults: ElementFaults): OmmMessage[] {
  const messages: OmmMessage[] = [];
  let fields = new Map<string, OmmField>();
  let startLine = 0;
  let spoilt = false;
  const close = () => {
    if (startLine > 0 && !spoilt) messages.push({ format: 'omm-kvn', fields, line: startLine });
    fields = new Map();
    spoilt = false;
    startLine = 0;
  };
  for (const [index, raw] of text.split(/\r\n|\n|\r/).entries()) {
    const line = index + 1;
    const trimmed = raw.trim();
    if (trimmed === '' || /^COMMENT(\s|$)/.test(trimmed)) continue;
    const [, keyword, value] = LINE.exec(raw) ?? [];
    if (keyword === 'CCSDS_OMM_VERS') close();
    if (startLine === 0) startLine = line;
    if (keyword === undefined || value === undefined) {
      faults.add({ line, field: 'line', found: trimmed, expected: 'KEYWORD = value' });
      spoilt = true;
    } else {
      const known = takeField({ keyword, value, line }, fields, faults);
      spoilt ||= !known;
    }
  }
  close();
  return messages;
}

interface KvnLine {
  readonly keyword: string;
  readonly value: string;
  readonly line: number;
}

function takeField({ keyword, value, line }: KvnLine, fields: Map<string, OmmField>, faults: ElementFaults): boolean {
  if (!isOmmKeyword(keyword)) {
    faults.add({ line, field: keyword, found: keyword, expected: 'a keyword of an OMM' });
    return false;
  }
  const before = fields.get(keyword);
  if (before) {
    faults.add({
      line,
      field: keyword,
      found: value,
      expected: `this keyword once; it stands in line ${before.line} already`,
    });
    return false;
  }
  const [, bare, unit] = UNIT.exec(value) ?? [];
  const right = OMM_UNITS.get(keyword);
  if (unit !== undefined && bare !== undefined && right !== undefined) {
    if (unit.trim().toLowerCase() !== right.toLowerCase()) {
      faults.add({ line, field: keyword, found: `[${unit}]`, expected: `the unit [${right}]` });
      return false;
    }
    fields.set(keyword, { value: bare, line });
    return true;
  }
  fields.set(keyword, { value, line });
  return true;
}
