import { readFileSync } from 'node:fs';
import { OrbitError, parseElementSets, sgp4Source } from '@skyberth/orbit';
import { describe, expect, it } from 'vitest';

/**
 * Source: Vallado, Crawford, Hujsak, Kelso, "Revisiting Spacetrack Report #3", AIAA 2006-6753, with its companion files;
 * see data/aiaa-2006-6753/README.md for columns, traps and error codes.
 */
const folder = new URL('../data/aiaa-2006-6753/', import.meta.url);
const read = (name: string) => readFileSync(new URL(name, folder), 'utf8');

const POSITION_TOLERANCE_KM = 2e-7;
const VELOCITY_TOLERANCE_KM_PER_S = 1e-9;
const MINUTE_MS = 60_000;

interface Case {
  readonly number: string;
  readonly rows: readonly (readonly number[])[];
  readonly line1: string;
  readonly line2: string;
  readonly gridMin: readonly [start: number, stop: number, step: number];
}

function cases(): Case[] {
  const lines = read('SGP4-VER.TLE')
    .split('\n')
    .filter((line) => /^[12] /.test(line));
  const results = read('tcppver.out')
    .split(/\n(?=\d+ xx)/)
    .map((block) => {
      const [head = '', ...rows] = block.trim().split('\n');
      const numbers = rows.map((row) => row.trim().split(/\s+/).slice(0, 7).map(Number));
      return { number: head.split(' ')[0] ?? '', rows: numbers };
    });
  return results.map((result, index) => {
    const line2 = lines[2 * index + 1] ?? '';
    const [start = 0, stop = 0, step = 0] = line2.slice(69).trim().split(/\s+/).map(Number);
    return {
      ...result,
      line1: (lines[2 * index] ?? '').trimEnd(),
      line2: line2.slice(0, 69),
      gridMin: [start, stop, step],
    };
  });
}

/** The exact epoch is kept in the element set, so time from it loses nothing but the last digit of a double. */
function sourceOf({ line1, line2 }: Case) {
  const { sets, faults } = parseElementSets(`${line1}\n${line2}`, { ignoreChecksums: true });
  expect(faults).toEqual([]);
  const source = sgp4Source(sets[0]!);
  const state = new Float64Array(6);
  return (minutes: number) => {
    source.stateTeme(source.epochMs + minutes * MINUTE_MS, state);
    return state;
  };
}

describe('the published verification set of SGP4', () => {
  const all = cases();

  it('has the 33 cases and 667 rows that the paper prints', () => {
    expect(all).toHaveLength(33);
    expect(all.reduce((sum, { rows }) => sum + rows.length, 0)).toBe(667);
  });

  it.each(all.map((one, index) => [one.number, index] as const))(
    'agrees in every row of case %s (number %i)',
    (number, index) => {
      const one = all[index]!;
      const at = sourceOf(one);
      // The single row of 33334 repeats the state of the case before it; the case itself ends in code 3 at once.
      const rows = number === '33334' ? [] : one.rows;
      for (const [minutes = 0, ...expected] of rows) {
        const state = at(minutes);
        // 0.24 microseconds are what a double of UTC milliseconds resolves in this century: 3e-6 km at 11 km/s.
        const timeKm = 3e-6;
        for (let axis = 0; axis < 3; axis += 1) {
          expect(Math.abs(state[axis]! - expected[axis]!)).toBeLessThan(POSITION_TOLERANCE_KM + timeKm);
          expect(Math.abs(state[axis + 3]! - expected[axis + 3]!)).toBeLessThan(VELOCITY_TOLERANCE_KM_PER_S + 3e-9);
        }
      }
    },
  );

  // First failing times on each case's own grid and the codes: python-sgp4's own test asserts this list.
  const FAILURES = [
    ['22312', 494.2028672, 1],
    ['28350', 1560, 1],
    ['28872', 55, 6],
    ['29141', 440, 6],
    ['33333', 25, 4],
    ['33334', 0, 3],
    ['20413', 1_844_345, 6],
  ] as const;

  it('ends in the published error codes, in file order, and nowhere else', () => {
    const found: [string, number, number][] = [];
    for (const one of all) {
      const at = sourceOf(one);
      const [start, stop, step] = one.gridMin;
      const times = [0];
      for (let minutes = start; minutes <= stop + 1e-9; minutes += step) times.push(minutes);
      for (const minutes of times) {
        try {
          at(minutes);
        } catch (error) {
          expect(error).toBeInstanceOf(OrbitError);
          found.push([one.number, minutes, (error as OrbitError).data['sgp4Code'] as number]);
          break;
        }
      }
    }
    expect(found.map(([number, , code]) => [number, code])).toEqual(FAILURES.map(([number, , code]) => [number, code]));
    for (const [index, [, minutes]] of found.entries()) expect(minutes).toBeCloseTo(FAILURES[index]![1], 6);
  });

  it('uses the constants of WGS72 (python-sgp4 tests: WGS84 would be 13 m away)', () => {
    const first = all[0]!;
    const state = sourceOf(first)(309.67110720001529);
    [-3754.2514743216, 7876.3468174391, 4719.2208564786].forEach((expected, axis) => {
      expect(Math.abs(state[axis]! - expected)).toBeLessThan(5e-6);
    });
  });

  it('matches the TEME state of 2000-06-30T18:50:19.733571 (Orekit TEMEProviderTest, after Vallado 2007)', () => {
    const state = sourceOf(all[0]!)(3 * 1440);
    [-9060.47373569, 4658.70952502, 813.68673153].forEach((expected, axis) => {
      expect(Math.abs(state[axis]! - expected)).toBeLessThan(5e-6);
    });
    [-2.232832783, -4.11045349, -3.157345433].forEach((expected, axis) => {
      expect(Math.abs(state[axis + 3]! - expected)).toBeLessThan(5e-9);
    });
  });
});

describe('elements past their life (Skyfield documentation, "Detecting Propagation Errors")', () => {
  const goce = [
    '1 34602U 09013A   13314.96046236  .14220718  20669-5  50412-4 0   930',
    '2 34602 096.5717 344.5256 0009826 296.2811 064.0942 16.58673376272979',
  ].join('\n');

  it.each([
    ['2013-11-09T00:00:00Z', 1],
    ['2013-11-10T00:00:00Z', undefined],
    ['2013-11-11T00:00:00Z', undefined],
    ['2013-11-12T00:00:00Z', undefined],
    ['2013-11-13T00:00:00Z', 6],
  ])('answers %s with code %s', (iso, code) => {
    const source = sgp4Source(parseElementSets(goce).sets[0]!);
    const ask = () => source.stateTeme(Date.parse(iso), new Float64Array(6));
    if (code === undefined) expect(ask).not.toThrow();
    else expect(ask).toThrowError(expect.objectContaining({ data: expect.objectContaining({ sgp4Code: code }) }));
  });
});
