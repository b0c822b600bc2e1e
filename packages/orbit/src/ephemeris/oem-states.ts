/** Gathers the states of one segment and holds them against its metadata. */
import { parseCcsdsTime } from './ccsds-time.js';
import { toUtcMs } from './leap-seconds.js';
import type { FaultList, OemCovariance, OemSegment } from './oem.js';
import type { OemMetadata } from './oem-fields.js';

const NUMBER = /^[+-]?(\d+\.?\d*|\.\d+)([eEdD][+-]?\d+)?$/;
const STATE_NAMES = ['X', 'Y', 'Z', 'X_DOT', 'Y_DOT', 'Z_DOT', 'X_DDOT', 'Y_DDOT', 'Z_DDOT'];

/** A finite number as CCSDS writes it (Fortran's D for an exponent included); undefined for anything else. */
export function parseCcsdsNumber(text: string): number | undefined {
  if (!NUMBER.test(text)) return undefined;
  const value = Number(text.replace(/[dD]/, 'E'));
  return Number.isFinite(value) ? value : undefined;
}

/** The words of one state: a time and 6 numbers, or 9 with accelerations. */
export class StateTable {
  private readonly timesMs: number[] = [];
  private readonly values: number[] = [];
  private width: number | undefined;

  constructor(
    private readonly metadata: OemMetadata,
    private readonly faults: FaultList,
  ) {}

  add(words: readonly string[], line: number): void {
    if (words.length !== 7 && words.length !== 10) {
      this.faults.add({
        line,
        field: 'state',
        found: `${words.length} fields`,
        expected: 'a time and 6 numbers, or 9 with accelerations',
      });
      return;
    }
    this.width ??= words.length - 1;
    if (this.width !== words.length - 1) {
      this.faults.add({
        line,
        field: 'state',
        found: `${words.length} fields`,
        expected: `${this.width + 1} fields as in the first state`,
      });
      return;
    }
    const timeMs = this.time(words[0]!, line);
    const numbers = this.numbers(words.slice(1), line);
    if (timeMs === undefined || numbers === undefined) return;
    this.timesMs.push(timeMs);
    this.values.push(...numbers);
  }

  private time(word: string, line: number): number | undefined {
    const clockMs = parseCcsdsTime(word);
    if (clockMs === undefined) {
      this.faults.add({ line, field: 'EPOCH', found: word, expected: 'a date such as 2026-12-01T00:00:00' });
      return undefined;
    }
    const timeMs = toUtcMs(clockMs, this.metadata.timeSystem);
    const before = this.timesMs.at(-1);
    if (before !== undefined && timeMs <= before) {
      this.faults.add({ line, field: 'EPOCH', found: word, expected: 'a time after the state before it' });
      return undefined;
    }
    if (timeMs < this.metadata.startMs || timeMs > this.metadata.stopMs) {
      this.faults.add({ line, field: 'EPOCH', found: word, expected: 'a time between START_TIME and STOP_TIME' });
      return undefined;
    }
    return timeMs;
  }

  private numbers(words: readonly string[], line: number): number[] | undefined {
    const numbers = words.map(parseCcsdsNumber);
    const wrong = numbers.indexOf(undefined);
    if (wrong >= 0) {
      this.faults.add({ line, field: STATE_NAMES[wrong]!, found: words[wrong]!, expected: 'a number' });
      return undefined;
    }
    const known = numbers as number[];
    if (Math.hypot(known[0]!, known[1]!, known[2]!) < 1) {
      this.faults.add({
        line,
        field: 'X',
        found: words.slice(0, 3).join(' '),
        expected: 'a place away from the centre of the Earth',
      });
      return undefined;
    }
    return known;
  }

  finish(
    blockLine: number,
    comments: readonly string[],
    covariances: readonly OemCovariance[],
  ): OemSegment | undefined {
    if (this.timesMs.length < 2) {
      this.faults.add({
        line: blockLine,
        field: 'state',
        found: `${this.timesMs.length} states`,
        expected: 'at least two',
        message: `Line ${blockLine}: the segment that begins here has ${this.timesMs.length === 0 ? 'no states' : 'one state'}; at least two are needed.`,
      });
      return undefined;
    }
    const { timeSystem: _, ...metadata } = this.metadata;
    const count = this.timesMs.length;
    const width = this.width ?? 6;
    const states = new Float64Array(6 * count);
    const accelerations = width === 9 ? new Float64Array(3 * count) : undefined;
    for (let row = 0; row < count; row += 1) {
      for (let column = 0; column < 6; column += 1) states[6 * row + column] = this.values[width * row + column]!;
      for (let column = 6; column < width; column += 1)
        accelerations![3 * row + column - 6] = this.values[width * row + column]!;
    }
    return { ...metadata, comments, timesMs: Float64Array.from(this.timesMs), states, accelerations, covariances };
  }
}
