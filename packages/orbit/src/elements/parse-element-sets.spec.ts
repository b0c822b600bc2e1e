import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { ElementSet } from './element-set.js';
import { parseElementSets } from './parse-element-sets.js';
import { tleChecksum } from './tle-columns.js';
import { toOmmKvn, toTle } from './write-elements.js';

const decimals = (min: number, max: number, places: number) =>
  fc
    .integer({ min: min * 10 ** places, max: max * 10 ** places })
    .map((value) => Number((value / 10 ** places).toFixed(places)));

const power = fc
  .tuple(fc.integer({ min: 10_000, max: 99_999 }), fc.integer({ min: -9, max: 0 }), fc.boolean())
  .map(([mantissa, exponent, minus]) => Number(`${minus ? '-' : ''}.${mantissa}e${exponent}`));

/** Element sets that two lines can hold. */
const expressible: fc.Arbitrary<ElementSet> = fc
  .record({
    catalogNumber: fc.integer({ min: 1, max: 339_999 }),
    dayFraction8: fc.integer({ min: 0, max: 99_999_999 }),
    day: fc.integer({ min: 0, max: 36_000 }),
    meanMotionRevPerDay: decimals(1, 16, 8),
    eccentricity: decimals(0, 0.9, 7),
    inclinationDeg: decimals(0, 180, 4),
    raanDeg: decimals(0, 359, 4),
    argPerigeeDeg: decimals(0, 359, 4),
    meanAnomalyDeg: decimals(0, 359, 4),
    bstarPerEarthRadius: power,
    meanMotionDot: decimals(-0.9, 0.9, 8),
    meanMotionDdot: power,
    elementSetNumber: fc.integer({ min: 0, max: 9_999 }),
    revolutionAtEpoch: fc.integer({ min: 0, max: 99_999 }),
  })
  .map(({ day, dayFraction8, ...rest }) => {
    const micros = dayFraction8 * 864;
    const midnightMs = Date.UTC(1957, 0, 1) + day * 86_400_000;
    const second = new Date(midnightMs + Math.floor(micros / 1_000_000) * 1000).toISOString().slice(0, 19);
    return {
      ...rest,
      format: 'tle',
      objectName: 'LANTERN',
      objectId: '2026-900AB',
      classification: 'U',
      epochMs: midnightMs + micros / 1000,
      epochUtc: `${second}.${String(micros % 1_000_000).padStart(6, '0')}Z`,
      sourceLine: 1,
    };
  });

const values = ({ format: _, sourceLine: _line, tle: _tle, ...rest }: ElementSet) => rest;

describe('writing and reading back', () => {
  it('loses nothing through two lines', () => {
    fc.assert(
      fc.property(expressible, (set) => {
        const { sets, faults } = parseElementSets(['0 LANTERN', ...toTle(set)].join('\n'));
        expect(faults).toEqual([]);
        expect(values(sets[0]!)).toEqual(values(set));
      }),
    );
  });

  it('loses nothing through KVN', () => {
    fc.assert(
      fc.property(expressible, (set) => {
        const { sets, faults } = parseElementSets(
          toOmmKvn(set, { creationUtc: '2026-12-01T00:00:00', originator: 'TEST' }),
        );
        expect(faults).toEqual([]);
        expect({ ...values(sets[0]!), epochMs: 0 }).toEqual({ ...values(set), epochMs: 0 });
        expect(Math.abs(sets[0]!.epochMs - set.epochMs)).toBeLessThan(0.001);
      }),
    );
  });

  it('refuses to round what two lines cannot hold', () => {
    fc.assert(
      fc.property(expressible, (set) => {
        expect(() => toTle({ ...set, inclinationDeg: 12.345678 })).toThrowError(/inclination 12.345678/);
        expect(() => toTle({ ...set, raanDeg: -1 })).toThrowError(/node -1/);
        expect(() => toTle({ ...set, epochUtc: '2026-12-01T00:00:00.000001Z' })).toThrowError(/epoch/);
      }),
    );
  });
});

/** The same as a catalogue of many, each with its own number. */
function catalogue(count: number): string[] {
  const lines: string[] = [];
  for (let index = 0; index < count; index += 1) {
    const number = String(10_000 + index);
    const line1 = `1 ${number}U 26900A   26334.25000000  .00000000  00000-0  40000-4 0  999`;
    const line2 = `2 ${number}  97.4800  12.0000 0012000  80.0000  10.0000 15.15323725  100`;
    lines.push(`LANTERN ${index}`, line1 + tleChecksum(line1), line2 + tleChecksum(line2));
  }
  return lines;
}

describe('damage', () => {
  it('costs only the damaged sets, and names the line of each', () => {
    const count = 3_333;
    const damaged = fc.uniqueArray(fc.integer({ min: 0, max: count - 1 }), { minLength: 30, maxLength: 30 });
    fc.assert(
      fc.property(
        damaged,
        fc.integer({ min: 2, max: 68 }),
        fc.constantFrom('X', '%', '\u0007'),
        (hurt, column, sign) => {
          const lines = catalogue(count);
          for (const index of hurt) {
            const at = 3 * index + 2;
            lines[at] = lines[at]!.slice(0, column) + sign + lines[at]!.slice(column + 1);
          }
          const { sets, faults } = parseElementSets(lines.join('\n'));
          expect(sets).toHaveLength(count - hurt.length);
          const named = new Set(faults.map(({ line }) => line));
          expect(named).toEqual(new Set(hurt.map((index) => 3 * index + 3)));
        },
      ),
      { numRuns: 10 },
    );
  });

  it('never throws and never hangs, whatever the text is', () => {
    fc.assert(
      fc.property(
        fc.string({ unit: 'binary', maxLength: 400 }),
        fc.constantFrom('tle', 'omm-kvn', 'omm-xml', 'omm-json', 'omm-csv', 'auto'),
        (text, format) => {
          const { sets } = parseElementSets(text, { format });
          expect(sets).toEqual([]);
        },
      ),
      { numRuns: 500 },
    );
  });

  it('costs one object of a JSON list', () => {
    const object = (number: number) =>
      `{"OBJECT_NAME":"LANTERN","NORAD_CAT_ID":${number},"EPOCH":"2026-12-01T06:00:00","MEAN_MOTION":15.1,"ECCENTRICITY":0.001,\n` +
      '"INCLINATION":97.4,"RA_OF_ASC_NODE":1,"ARG_OF_PERICENTER":2,"MEAN_ANOMALY":3,"BSTAR":0}';
    const { sets, faults } = parseElementSets(
      `[${object(1)},\n${object(2).replace(':15.1,', ':15,1,')},\n${object(3)}]`,
    );
    expect(sets.map(({ catalogNumber }) => catalogNumber)).toEqual([1, 3]);
    expect(faults).toMatchObject([{ line: 3, field: 'JSON' }]);
  });

  it('never reaches into the prototype of what it reads', () => {
    const { sets, faults } = parseElementSets('[{"__proto__": {"OBJECT_NAME": "X"}, "OBJECT_ID": "2026-900A"}]');
    expect(sets).toEqual([]);
    expect(faults.map(({ field }) => field)).toContain('OBJECT_NAME');
  });
});
