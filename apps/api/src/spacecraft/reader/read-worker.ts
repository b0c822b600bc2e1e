/** Runs in the worker thread. */
import type { ElementReading } from '@skyberth/orbit';
import { type EphemerisReading, readEphemeris } from '../ephemeris-file.js';
import { type ElementText, readText } from './element-reader.js';

export interface ReadTask {
  readonly kind: 'elements' | 'ephemeris';
  readonly input: ElementText;
}

export default ({ kind, input }: ReadTask): ElementReading | EphemerisReading =>
  kind === 'elements' ? readText(input) : readEphemeris(input.text);
