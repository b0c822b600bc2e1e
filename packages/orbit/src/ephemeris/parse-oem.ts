import { FaultList, type Oem, type OemFault } from './oem.js';
import { readOemKvn } from './oem-kvn.js';
import { readOemXml } from './oem-xml.js';

/** A month of one-second states; larger files are refused before they are read. */
const MOST_CHARACTERS = 64 * 1024 * 1024;

export interface OemReading {
  /** There only if nothing was wrong: an ephemeris with a damaged line is not to be flown by. */
  readonly oem: Oem | undefined;
  readonly faults: readonly OemFault[];
}

/** Reads a CCSDS OEM, KVN or XML by its first sign. Never throws; every fault has its line, field, and what is expected. */
export function parseOem(text: string): OemReading {
  const faults = new FaultList();
  const body = text.replace(/^\uFEFF/, '');
  if (body.length > MOST_CHARACTERS) {
    const message = `The file has ${body.length} characters; at most ${MOST_CHARACTERS} are read.`;
    faults.add({ line: 1, field: 'file', found: '', expected: '', message });
    return { oem: undefined, faults: faults.faults };
  }
  const oem = body.trimStart().startsWith('<') ? readOemXml(body, faults) : readOemKvn(body, faults);
  return { oem, faults: faults.faults };
}
