/** Runs in the worker thread. */
import type { ElementReading } from '@skyberth/orbit';
import { type ElementText, readText } from './element-reader.js';

export default (input: ElementText): ElementReading => readText(input);
