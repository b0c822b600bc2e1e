/** Where texts of element sets are read: in this thread, or in one that keeps the event loop free. */
import { type ElementReading, parseElementSets } from '@skyberth/orbit';
import { type EphemerisReading, readEphemeris } from '../ephemeris-file.js';

export interface ElementText {
  readonly text: string;
  /** Named in the faults. */
  readonly fileName: string | null;
}

export interface ElementReader {
  /** Never rejects for what the text holds; that is told as faults. */
  read(input: ElementText): Promise<ElementReading>;
  /** Likewise for an orbit ephemeris message. */
  readEphemeris(text: string): Promise<EphemerisReading>;
  close(): Promise<void>;
}
export const ELEMENT_READER = Symbol('ElementReader');

/** The reading itself, wherever it runs. */
export const readText = ({ text, fileName }: ElementText): ElementReading =>
  parseElementSets(text, fileName === null ? {} : { fileName });

/** Reads in the calling thread: for tests, and for a machine where one core is all there is. */
export class InProcessReader implements ElementReader {
  async read(input: ElementText): Promise<ElementReading> {
    return readText(input);
  }

  async readEphemeris(text: string): Promise<EphemerisReading> {
    return readEphemeris(text);
  }

  async close(): Promise<void> {}
}
