import { createHash } from 'node:crypto';
import { readFileSync, statSync } from 'node:fs';
import { type Omm, readOmmList } from './omm.js';

export interface Snapshot {
  elements: readonly Omm[];
  changedMs: number;
}

/** The element sets of the file, read again when the file changes, or those that a test put in their place. */
export class Feed {
  #file: { mtimeMs: number; elements: Omm[] } | undefined;
  #replaced: Snapshot | undefined;

  constructor(private readonly path: string) {}

  /** @throws Error when the file cannot be read or is not a list of OMM objects. */
  read(): Snapshot {
    if (this.#replaced) return this.#replaced;
    const { mtimeMs } = statSync(this.path);
    if (this.#file?.mtimeMs !== mtimeMs)
      this.#file = { mtimeMs, elements: readOmmList(readFileSync(this.path, 'utf8')) };
    return { elements: this.#file.elements, changedMs: mtimeMs };
  }

  replace(elements: readonly Omm[] | undefined): void {
    this.#replaced = elements ? { elements, changedMs: Date.now() } : undefined;
  }
}

/** A strong validator: the same bytes, the same tag. */
export function tagOf(text: string): string {
  return `"${createHash('sha256').update(text).digest('base64url').slice(0, 27)}"`;
}
