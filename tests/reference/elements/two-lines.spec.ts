import { OrbitError, parseElementSets, tleChecksum, toOmmKvn, toTle } from '@skyberth/orbit';
import { describe, expect, it } from 'vitest';

/** Gives a line the checksum that belongs to it, so that a test speaks of one fault only. */
const sealed = (line: string) => line.slice(0, 68) + tleChecksum(line);

const LINE_1 = '1 25544U 98067A   24127.82853009  .00015698  00000+0  27310-3 0  9995';
const LINE_2 = '2 25544  51.6393 160.4574 0003580 140.6673 205.7250 15.50957674452123';

const faultsOf = (...lines: string[]) => parseElementSets(lines.join('\n')).faults;
const only = (...lines: string[]) => {
  const { sets, faults } = parseElementSets(lines.join('\n'));
  expect(faults).toEqual([]);
  expect(sets).toHaveLength(1);
  return sets[0]!;
};

describe('checksums', () => {
  it('are as printed (Skyfield documentation; Orekit TLETest)', () => {
    expect([tleChecksum(LINE_1), tleChecksum(LINE_2)]).toEqual([5, 3]);
    expect(tleChecksum('1 27421U 02021A   02124.48976499 -.00021470  00000-0 -89879-2 0    2')).toBe(0);
    expect(tleChecksum('1 T7421U 02021A   02124.48976499 -.00021470  00000-0 -89879-2 0    2')).toBe(8);
    expect(tleChecksum('1 00005U 58002B   00179.78495062  .00000023  00000-0  28098-4 0  475')).toBe(3);
  });

  it('are enforced', () => {
    const [fault, ...others] = faultsOf(`${LINE_1.slice(0, 68)}4`, LINE_2);
    expect(others).toEqual([]);
    expect(fault).toMatchObject({ line: 1, field: 'checksum', found: '4', expected: '5 in column 69' });
  });
});

describe('values (CelesTrak format page; python-sgp4 tests)', () => {
  it('reads epoch, drag and counters as the documentation prints them', () => {
    expect(only(LINE_1, LINE_2)).toMatchObject({
      catalogNumber: 25544,
      objectId: '1998-067A',
      epochUtc: '2024-05-06T19:53:04.999776Z',
      bstarPerEarthRadius: 0.0002731,
      meanMotionDot: 0.00015698,
      meanMotionRevPerDay: 15.50957674,
      eccentricity: 0.000358,
      revolutionAtEpoch: 45212,
      elementSetNumber: 999,
    });
  });

  it('reads the same set from OMM JSON (Skyfield documentation, "The TLE format and its rivals")', () => {
    const json = JSON.stringify([
      {
        OBJECT_NAME: 'OBJECT',
        OBJECT_ID: '1998-067A',
        EPOCH: '2024-05-06T19:53:04.999776',
        MEAN_MOTION: 15.50957674,
        ECCENTRICITY: 0.000358,
        INCLINATION: 51.6393,
        RA_OF_ASC_NODE: 160.4574,
        ARG_OF_PERICENTER: 140.6673,
        MEAN_ANOMALY: 205.725,
        EPHEMERIS_TYPE: 0,
        CLASSIFICATION_TYPE: 'U',
        NORAD_CAT_ID: 25544,
        ELEMENT_SET_NO: 999,
        REV_AT_EPOCH: 45212,
        BSTAR: 0.0002731,
        MEAN_MOTION_DOT: 0.00015698,
        MEAN_MOTION_DDOT: 0,
      },
    ]);
    const { tle: lines, format: _a, objectName: _b, ...fromTle } = only(LINE_1, LINE_2);
    const fromOmm = parseElementSets(json).sets[0]!;
    expect(fromOmm).toMatchObject(fromTle);
    expect(toTle(fromOmm)).toEqual(lines);
  });

  it.each([
    [' 28098-4', 2.8098e-5],
    ['-22483-4', -2.2483e-5],
    ['-11606-4', -0.11606e-4],
    [' 00000+0', 0],
  ])('reads the drag term %s', (columns, value) => {
    const line = sealed(LINE_1.slice(0, 53) + columns + LINE_1.slice(61));
    expect(only(line, LINE_2).bstarPerEarthRadius).toBe(value);
  });

  it.each([
    ['57', 1957],
    ['99', 1999],
    ['00', 2000],
    ['56', 2056],
  ])('puts the epoch year %s into %i', (columns, year) => {
    const line = sealed(LINE_1.slice(0, 18) + columns + LINE_1.slice(20));
    expect(only(line, LINE_2).epochUtc.slice(0, 4)).toBe(String(year));
  });

  it.each([
    ['00179.78495062', '2000-06-27T18:50:19.733568Z'],
    ['19366.82137887', '2020-01-01T19:42:47.134368Z'],
  ])('turns the epoch %s into %s', (columns, epochUtc) => {
    const set = only(sealed(LINE_1.slice(0, 18) + columns + LINE_1.slice(32)), LINE_2);
    expect(set.epochUtc).toBe(epochUtc);
    expect(Math.abs(set.epochMs - Date.parse(epochUtc))).toBeLessThan(1);
  });

  it.each([
    ['A0000', 100000],
    ['E8493', 148493],
    ['J2931', 182931],
    ['P4018', 234018],
    ['W1928', 301928],
    ['Z9999', 339999],
    ['T7421', 277421],
  ])('reads the number %s as %i and writes it back (python-sgp4 tests; Orekit TLETest)', (columns, number) => {
    const line1 = sealed(LINE_1.slice(0, 2) + columns + LINE_1.slice(7));
    const line2 = sealed(LINE_2.slice(0, 2) + columns + LINE_2.slice(7));
    const set = only(line1, line2);
    expect(set.catalogNumber).toBe(number);
    const { tle: _, ...withoutLines } = set;
    expect(toTle(withoutLines)).toEqual([line1, line2]);
  });

  it('cannot write 340000 as two lines, and says so (Orekit TLETest)', () => {
    const { tle: _, ...set } = only(LINE_1, LINE_2);
    expect(() => toTle({ ...set, catalogNumber: 340_000 })).toThrowError(OrbitError);
    expect(() => toTle({ ...set, catalogNumber: 340_000 })).toThrowError(/catalogue number 340000/);
  });
});

describe('what Orekit TLETest refuses', () => {
  const at = (line: string, column: number, text: string) =>
    sealed(line.slice(0, column - 1) + text + line.slice(column - 1 + text.length));

  it.each<readonly [string, string, string, { field: string; line: number }]>([
    ['a star in the mean motion', LINE_1, at(LINE_2, 55, '*'), { field: 'mean motion', line: 2 }],
    ['no point in the mean motion', LINE_1, at(LINE_2, 53, '15550957674'), { field: 'mean motion', line: 2 }],
    ['a missing sign of the exponent', at(LINE_1, 54, '-89879 2'), LINE_2, { field: 'BSTAR', line: 1 }],
    ['a missing class', at(LINE_1, 8, ' '), LINE_2, { field: 'classification', line: 1 }],
    ['numbers that differ', LINE_1, at(LINE_2, 3, '27422'), { field: 'catalogue number', line: 2 }],
    ['an inclination above 180', LINE_1, at(LINE_2, 9, '180.0001'), { field: 'inclination', line: 2 }],
    ['day 0', at(LINE_1, 21, '000.00000000'), LINE_2, { field: 'epoch day', line: 1 }],
    ['day 367', at(LINE_1, 21, '367.00000000'), LINE_2, { field: 'epoch day', line: 1 }],
  ])('refuses %s', (_, line1, line2, expected) => {
    const faults = faultsOf(line1, line2);
    expect(faults).toHaveLength(1);
    expect(faults[0]).toMatchObject(expected);
  });

  it('refuses the letter I in a number, in both lines', () => {
    const faults = faultsOf(at(LINE_1, 3, 'I7421'), at(LINE_2, 3, 'I7421'));
    expect(faults.map(({ line, field }) => [line, field])).toEqual([
      [1, 'catalogue number'],
      [2, 'catalogue number'],
    ]);
  });

  it('refuses a line whose class column is left out', () => {
    const fields = faultsOf(LINE_1.slice(0, 7) + LINE_1.slice(8), LINE_2).map(({ field }) => field);
    expect(fields).toContain('classification');
  });
});

describe('texts of many sets', () => {
  it('takes names with and without the leading 0, and blank lines', () => {
    const { sets, faults } = parseElementSets(`0 LANTERN 1\r\n${LINE_1}\r\n${LINE_2}\r\n\r\n`);
    expect(faults).toEqual([]);
    expect(sets).toMatchObject([{ objectName: 'LANTERN 1', sourceLine: 1 }]);
  });

  it('names a set that repeats an earlier one, whatever its name and form', () => {
    const set = only(LINE_1, LINE_2);
    const text = `A\n${LINE_1}\n${LINE_2}\nB\n${LINE_1}\n${LINE_2}\n`;
    const reading = parseElementSets(text, { fileName: 'two.txt' });
    expect(reading.sets).toHaveLength(1);
    expect(reading.faults).toMatchObject([
      { line: 4, message: 'two.txt: Line 4: this element set is the same as that of line 1.' },
    ]);
    const kvn = toOmmKvn(set, { creationUtc: '2026-12-01T00:00:00', originator: 'TEST' });
    expect(parseElementSets(kvn + kvn).faults).toMatchObject([{ field: 'element set', line: 25 }]);
  });

  it('goes on after a lost line, a stray line and a lost first column', () => {
    const other = (line: string) => sealed(`${line.slice(0, 2)}00007${line.slice(7)}`);
    const good = [other(LINE_1), other(LINE_2)];
    const { sets, faults } = parseElementSets(
      ['STRAY', 'ONE', LINE_1, 'TWO', `X${LINE_1.slice(1)}`, LINE_2, ...good].join('\n'),
    );
    expect(sets).toMatchObject([{ catalogNumber: 7, sourceLine: 7 }]);
    expect(faults.map(({ line, field }) => [line, field])).toEqual([
      [1, 'line'],
      [3, 'line'],
      [5, 'line number'],
    ]);
  });
});
