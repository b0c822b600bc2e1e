/** Collecting what is wrong with a text of element sets, each fault with a sentence of its own. */
import type { ElementFault } from './element-set.js';

/** Nobody reads more; a damaged catalogue of 10,000 lines stays far below. The list ends with a line that says so. */
export const MOST_ELEMENT_FAULTS = 5_000;

const LONGEST_QUOTE = 40;

export class ElementFaults {
  readonly list: ElementFault[] = [];

  /** Adds one; without a sentence of its own it gets one made of its parts. */
  add(fault: Omit<ElementFault, 'message'> & { readonly message?: string }): void {
    if (this.list.length > MOST_ELEMENT_FAULTS) return;
    const found = quoted(fault.found);
    if (this.list.length === MOST_ELEMENT_FAULTS) {
      const message = `More than ${MOST_ELEMENT_FAULTS} faults; the rest is not listed.`;
      this.list.push({ line: fault.line, field: '', found: '', expected: '', message });
      return;
    }
    const message =
      fault.message ??
      `Line ${fault.line}, ${fault.field}: found ${found === '' ? 'nothing' : `"${found}"`}, expected ${fault.expected}.`;
    this.list.push({ line: fault.line, field: fault.field, found, expected: fault.expected, message });
  }
}

/** Text without signs that a terminal or a page would act upon. */
export function plainText(text: string): string {
  return text.replace(/[^\x20-\x7e\u00a0-\u200d\u2010-\u2027\u202f-\u2065\u206a-\ud7ff\ue000-\ufefe]/g, '?');
}

/** The same, and short enough for a sentence. */
export function quoted(text: string): string {
  const plain = plainText(text);
  return plain.length > LONGEST_QUOTE ? `${plain.slice(0, LONGEST_QUOTE)}...` : plain;
}
