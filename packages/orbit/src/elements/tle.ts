/** One two-line element set, both lines known. */
import { parseAlpha5 } from './alpha5.js';
import type { ElementSet } from './element-set.js';
import { tleEpoch } from './epoch.js';
import type { ElementFaults } from './faults.js';
import { checkTleLine } from './tle-columns.js';

export interface TlePair {
  readonly name: string;
  readonly line1: string;
  readonly line2: string;
  /** Lines of the text, from 1. */
  readonly number1: number;
  readonly number2: number;
  readonly sourceLine: number;
}

export interface TleOptions {
  /** For published test files that carry wrong checksums on purpose. */
  readonly ignoreChecksums?: boolean;
}

/** Above this an orbit would run under ground: 17 rev/day is 60 km high. */
const MOST_REV_PER_DAY = 18;

/** The element set, or undefined with every fault of both lines named. */
export function readTlePair(pair: TlePair, options: TleOptions, faults: ElementFaults): ElementSet | undefined {
  const { line1, line2, number1, number2 } = pair;
  const check = { ignoreChecksum: options.ignoreChecksums === true, faults };
  const good1 = checkTleLine(line1, number1, 1, check);
  const good2 = checkTleLine(line2, number2, 2, check);
  if (!good1 || !good2) return undefined;
  const catalogNumber = parseAlpha5(line1.slice(2, 7)) ?? Number.NaN;
  if (parseAlpha5(line2.slice(2, 7)) !== catalogNumber) {
    faults.add({
      line: number2,
      field: 'catalogue number',
      found: line2.slice(2, 7),
      expected: `${line1.slice(2, 7).trim()}, as in line ${number1}`,
    });
    return undefined;
  }
  const before = faults.list.length;
  const day = Number(line1.slice(20, 23));
  if (day < 1 || day > 366) {
    faults.add({
      line: number1,
      field: 'epoch day',
      found: line1.slice(20, 32),
      expected: '1 up to 367 in columns 21 to 32',
    });
  }
  const ranged = (field: string, from: number, to: number, highest: number, most: string): number => {
    const value = Number(line2.slice(from, to));
    if (value > highest) faults.add({ line: number2, field, found: line2.slice(from, to), expected: most });
    return value;
  };
  const inclinationDeg = ranged('inclination', 8, 16, 180, '0 to 180 degrees');
  const raanDeg = ranged('right ascension of the node', 17, 25, 360, '0 to 360 degrees');
  const argPerigeeDeg = ranged('argument of perigee', 34, 42, 360, '0 to 360 degrees');
  const meanAnomalyDeg = ranged('mean anomaly', 43, 51, 360, '0 to 360 degrees');
  const motion = `more than 0 and at most ${MOST_REV_PER_DAY} revolutions a day`;
  const meanMotionRevPerDay = ranged('mean motion', 52, 63, MOST_REV_PER_DAY, motion);
  if (meanMotionRevPerDay === 0) {
    faults.add({ line: number2, field: 'mean motion', found: line2.slice(52, 63), expected: motion });
  }
  if (faults.list.length > before) return undefined;
  return {
    format: 'tle',
    objectName: pair.name,
    objectId: designatorOf(line1.slice(9, 17)),
    catalogNumber,
    ...tleEpoch(Number(line1.slice(18, 20)), day, Number(line1.slice(24, 32))),
    meanMotionRevPerDay,
    eccentricity: Number(`0.${line2.slice(26, 33)}`),
    inclinationDeg,
    raanDeg,
    argPerigeeDeg,
    meanAnomalyDeg,
    bstarPerEarthRadius: powerOf(line1.slice(53, 61)),
    meanMotionDot: Number(line1.slice(33, 43)),
    meanMotionDdot: powerOf(line1.slice(44, 52)),
    elementSetNumber: Number(line1.slice(64, 68)),
    revolutionAtEpoch: Number(line2.slice(63, 68)),
    classification: line1.charAt(7),
    tle: [line1, line2],
    sourceLine: pair.sourceLine,
  };
}

/** `-11606-4` is -0.11606e-4: a decimal point before the five digits, a power of ten after them. */
function powerOf(columns: string): number {
  const value = Number(`${columns.charAt(0).trim()}.${columns.slice(1, 6)}e${columns.slice(6)}`);
  return value === 0 ? 0 : value;
}

function designatorOf(columns: string): string {
  const text = columns.trim();
  if (text === '') return '';
  const year = Number(text.slice(0, 2));
  return `${year < 57 ? 2000 + year : 1900 + year}-${text.slice(2)}`;
}
