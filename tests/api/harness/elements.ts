/** Element sets by name, number and a few angles. */
import { tleText } from './tle.js';

export interface ElementTextOptions {
  readonly name: string;
  readonly number: number;
  readonly epochMs: number;
  /** Right ascension of the ascending node. */
  readonly nodeDeg?: number;
}

/** A three-line set of a near-circular polar orbit. */
export const elementText = ({ name, number, epochMs, nodeDeg = 60 }: ElementTextOptions): string =>
  tleText({ name, catalogNumber: number, epochMs, raanDeg: nodeDeg });
