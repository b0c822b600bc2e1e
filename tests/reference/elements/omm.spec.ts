import { readFileSync } from 'node:fs';
import { parseElementSets, sgp4Source, toOmmKvn, toOmmXml } from '@skyberth/orbit';
import { describe, expect, it } from 'vitest';

/** Samples and expected outcomes: data/ccsds/README.md, after the NDM/XML 2.0.0 schema and Orekit's OmmParserTest. */
const read = (path: string) => readFileSync(new URL(`../data/${path}`, import.meta.url), 'utf8');

const VANGUARD = {
  catalogNumber: 5,
  objectId: '1958-002B',
  epochUtc: '2020-10-13T04:52:48.472320Z',
  meanMotionRevPerDay: 10.84869164,
  eccentricity: 0.1845686,
  inclinationDeg: 34.2443,
  raanDeg: 225.5254,
  argPerigeeDeg: 162.2516,
  meanAnomalyDeg: 205.2356,
  bstarPerEarthRadius: -0.000022483,
  meanMotionDot: -1.6e-7,
  meanMotionDdot: 0,
  elementSetNumber: 999,
  revolutionAtEpoch: 21814,
  classification: 'U',
};

describe('correct messages', () => {
  it.each([
    'ccsds/valid/omm-lanternfish.kvn',
    'ccsds/valid/omm-lanternfish-dayofyear.kvn',
    'ccsds/valid/omm-lanternfish-units.kvn',
    'ccsds/valid/omm-lanternfish.xml',
    'aiaa-2006-6753/sample_omm.csv',
    'aiaa-2006-6753/sample_omm.xml',
  ])('%s gives the elements that the TLE of the sample has', (path) => {
    const { sets, faults } = parseElementSets(read(path));
    expect(faults).toEqual([]);
    expect(sets).toMatchObject([VANGUARD]);
  });

  it('propagates as python-sgp4 2.15 does from the same message', () => {
    const source = sgp4Source(parseElementSets(read('aiaa-2006-6753/sample_omm.xml')).sets[0]!);
    const state = new Float64Array(6);
    source.stateTeme(source.epochMs, state);
    [-7075.824253706763, -7206.807173328984, 0.003892646183, 3.640436168436, -3.023875589378, 3.211975004665].forEach(
      (expected, index) => {
        expect(Math.abs(state[index]! - expected)).toBeLessThan(5e-6);
      },
    );
    source.stateTeme(source.epochMs + 1440 * 60_000, state);
    [-9297.220227457174, -2202.221483186717, -3163.489687185967].forEach((expected, index) => {
      expect(Math.abs(state[index]! - expected)).toBeLessThan(5e-6);
    });
  });

  it('reads the example message of the standard (as in Orekit OMMExample1)', () => {
    const text = `CCSDS_OMM_VERS = 2.0
CREATION_DATE = 2007-065T16:00:00
ORIGINATOR = NOAA/USA
OBJECT_NAME = GOES 9
OBJECT_ID = 1995-025A
CENTER_NAME = EARTH
REF_FRAME = TEME
TIME_SYSTEM = UTC
MEAN_ELEMENT_THEORY = SGP/SGP4
EPOCH = 2007-064T10:34:41.4264
MEAN_MOTION = 1.00273272
ECCENTRICITY = 0.0005013
INCLINATION = 3.0539
RA_OF_ASC_NODE = 81.7939
ARG_OF_PERICENTER = 249.2363
MEAN_ANOMALY = 150.1602
GM = 398600.8
EPHEMERIS_TYPE = 0
CLASSIFICATION_TYPE = U
NORAD_CAT_ID = 23581
ELEMENT_SET_NO = 0925
REV_AT_EPOCH = 4316
BSTAR = 0.0001
MEAN_MOTION_DOT = -0.00000113
MEAN_MOTION_DDOT = 0.0
`;
    const { sets, faults } = parseElementSets(text);
    expect(faults).toEqual([]);
    expect(sets[0]).toMatchObject({
      epochUtc: '2007-03-05T10:34:41.426400Z',
      meanMotionDot: -0.00000113,
      elementSetNumber: 925,
    });
  });

  it('keeps numbers of nine digits through every form', () => {
    const [set] = parseElementSets(
      read('ccsds/valid/omm-lanternfish.kvn').replace('NORAD_CAT_ID = 5', 'NORAD_CAT_ID = 799501234'),
    ).sets;
    const head = { creationUtc: '2026-12-01T00:00:00', originator: 'TEST' };
    for (const text of [toOmmKvn(set!, head), toOmmXml(set!, head)]) {
      const { sets, faults } = parseElementSets(text);
      expect(faults).toEqual([]);
      expect(sets[0]).toMatchObject({ ...VANGUARD, catalogNumber: 799_501_234 });
    }
  });
});

describe('messages to refuse', () => {
  it.each([
    ['omm-unknown-keyword.kvn', 'HARBOUR_MASTER'],
    ['omm-empty-object-id.kvn', 'OBJECT_ID'],
    ['omm-missing-object-id.xml', 'OBJECT_ID'],
    ['omm-missing-object-name.kvn', 'OBJECT_NAME'],
    ['omm-missing-theory.kvn', 'MEAN_ELEMENT_THEORY'],
    ['omm-missing-epoch.kvn', 'EPOCH'],
    ['omm-missing-version.kvn', 'CCSDS_OMM_VERS'],
    ['omm-missing-bstar.kvn', 'BSTAR'],
    ['omm-not-a-number.kvn', undefined],
    ['omm-eccentricity-out-of-range.kvn', 'ECCENTRICITY'],
    ['omm-inclination-out-of-range.kvn', 'INCLINATION'],
    ['omm-both-mean-motion-and-sma.kvn', 'SEMI_MAJOR_AXIS'],
    ['omm-bad-epoch.kvn', 'EPOCH'],
    ['omm-time-system-not-utc.kvn', 'TIME_SYSTEM'],
    ['omm-frame-not-teme.kvn', 'REF_FRAME'],
    ['omm-unclosed.xml', 'XML'],
    ['omm-doctype-entity.xml', 'XML'],
  ])('%s is refused for its %s', (file, field) => {
    const text = read(`ccsds/invalid/${file}`);
    const { sets, faults } = parseElementSets(text);
    expect(sets).toEqual([]);
    expect(faults).toHaveLength(1);
    const [fault] = faults;
    if (field !== undefined) expect(fault?.field).toBe(field);
    expect(fault?.message).toMatch(/\.$/);
    const keywordLine = text.split('\n').findIndex((line) => line.startsWith(`${fault?.field} =`));
    if (keywordLine >= 0) expect(fault?.line).toBe(keywordLine + 1);
  });
});
