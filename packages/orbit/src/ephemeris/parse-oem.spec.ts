import { describe, expect, it } from 'vitest';
import { oemToKvn, oemToXml } from '../export/oem-writer.js';
import { formatCcsdsTime, parseCcsdsTime } from './ccsds-time.js';
import { parseOem } from './parse-oem.js';

const kvn = (change: (text: string) => string = (text) => text) =>
  change(`CCSDS_OEM_VERS = 2.0
COMMENT made for a test
CREATION_DATE = 2026-12-01T00:00:00
ORIGINATOR = HARBOUR
META_START
OBJECT_NAME = A & B <1>
OBJECT_ID = 2026-900A
CENTER_NAME = EARTH
REF_FRAME = ITRF2014
TIME_SYSTEM = GPS
START_TIME = 2026-335T00:00:18.000
STOP_TIME = 2026-335T00:02:18.000
META_STOP
2026-335T00:00:18.0000001 7000 0 1e-3 0 7.5 0 1 2 3
2026-335T00:01:18 6990 450 0 -0.5 7.4 0 1 2 3
2026-335T00:02:18 6960.125 890 0 -1 7.3 0 1 2 3
COVARIANCE_START
EPOCH = 2026-335T00:01:18
COV_REF_FRAME = RTN
1
2 3
4 5 6
7 8 9 10
11 12 13 14 15
16 17 18 19 20 2.1D1
COVARIANCE_STOP
`);

describe('reading an ephemeris', () => {
  it('takes GPS time, day-of-year dates, accelerations and covariance', () => {
    const { oem, faults } = parseOem(kvn());
    expect(faults).toEqual([]);
    const segment = oem!.segments[0]!;
    // GPS time was 18 s ahead of UTC in 2026 (TAI - UTC 37 s less 19 s).
    expect(segment.startMs).toBe(Date.UTC(2026, 11, 1));
    expect(segment.frame).toBe('ITRF');
    expect([...segment.accelerations!.subarray(0, 3)]).toEqual([1, 2, 3]);
    expect(segment.covariances[0]).toMatchObject({ frame: 'RTN', epochMs: Date.UTC(2026, 11, 1, 0, 1) });
    expect(segment.covariances[0]!.lowerTriangle.at(-1)).toBe(21);
  });

  it('gives all of it back through either form', () => {
    const { oem } = parseOem(kvn());
    expect(parseOem(oemToKvn(oem!)).oem).toEqual(oem);
    expect(parseOem(oemToXml(oem!)).oem).toEqual(oem);
  });

  it.each([
    ['STOP_TIME = 2026-335T00:02:18.000', 'STOP_TIME = 2026-334T00:02:18.000', 'STOP_TIME'],
    ['CENTER_NAME = EARTH', 'CENTER_NAME = MOON', 'CENTER_NAME'],
    ['REF_FRAME = ITRF2014', 'REF_FRAME = TOD', 'REF_FRAME'],
    ['TIME_SYSTEM = GPS', 'TIME_SYSTEM = UT1', 'TIME_SYSTEM'],
    ['ORIGINATOR = HARBOUR', 'ORIGINATOR = ', 'ORIGINATOR'],
    ['OBJECT_ID = 2026-900A', 'OBJECT_ID = 2026-900A\nOBJECT_ID = 2026-900B', 'OBJECT_ID'],
    ['META_STOP', 'INTERPOLATION_DEGREE = 0\nMETA_STOP', 'INTERPOLATION_DEGREE'],
    ['META_STOP', 'INTERPOLATION = SPLINE\nMETA_STOP', 'INTERPOLATION'],
    ['7000 0 1e-3 0 7.5 0 1 2 3', '0 0 0 0 7.5 0 1 2 3', 'X'],
    ['6990 450 0 -0.5 7.4 0 1 2 3', '6990 450 0 -0.5 7.4 0', 'state'],
    ['2026-335T00:01:18 6990', '2026-366T00:01:18 6990', 'EPOCH'],
    ['16 17 18 19 20 2.1D1', '16 17 18', 'covariance'],
    ['COVARIANCE_STOP', '', 'COVARIANCE_STOP'],
    ['2.0', '9.9', 'CCSDS_OEM_VERS'],
  ])('refuses a message in which %j is %j', (right, wrong, field) => {
    const { oem, faults } = parseOem(kvn((text) => text.replace(right, wrong)));
    expect(oem).toBeUndefined();
    expect(faults.map((fault) => fault.field)).toContain(field);
  });

  it('refuses document types, broken XML and things that are no ephemeris', () => {
    expect(parseOem('<!DOCTYPE oem [<!ENTITY a "b">]><oem/>').faults[0]?.message).toContain('not accepted');
    expect(parseOem('<oem><header></oem>').faults[0]?.field).toBe('XML');
    expect(parseOem('<omm/>').faults[0]?.expected).toBe('an element oem');
    expect(parseOem('').faults.length).toBeGreaterThan(0);
  });

  it('quotes no more than the beginning of what it does not understand', () => {
    for (const text of ['x'.repeat(1e6), `META_START\n${'y'.repeat(1e6)}`]) {
      for (const fault of parseOem(text).faults) expect(fault.message.length + fault.found.length).toBeLessThan(300);
    }
  });

  it('ends the list of a wholly damaged file', () => {
    const { faults } = parseOem(kvn((text) => text.replace('META_STOP\n', `META_STOP\n${'nonsense\n'.repeat(5000)}`)));
    expect(faults).toHaveLength(201);
    expect(faults.at(-1)?.message).toContain('More than 200 faults');
  });
});

describe('dates', () => {
  it('are the same by calendar and by day of year, and come back exactly', () => {
    expect(parseCcsdsTime('2007-065T16:00:00')).toBe(Date.UTC(2007, 2, 6, 16));
    expect(parseCcsdsTime('2021-03-24T23:00:00.000Z')).toBe(Date.UTC(2021, 2, 24, 23));
    for (let i = 0; i < 2000; i += 1) {
      const timeMs = 1_796_083_200_000 + i * 7_919.000244140625;
      expect(parseCcsdsTime(formatCcsdsTime(timeMs))).toBe(timeMs);
    }
  });

  it('that do not exist are none', () => {
    for (const text of [
      '2026-02-30T00:00:00',
      '2026-366T00:00:00',
      '2026-000T00:00:00',
      '2026-01-01T24:00:00',
      '2026-01-01',
    ]) {
      expect(parseCcsdsTime(text)).toBeUndefined();
    }
  });
});
