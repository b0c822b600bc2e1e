import { readdirSync, readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { parseOem } from '../../../packages/orbit/src/ephemeris/parse-oem.js';
import { oemToKvn, oemToXml } from '../../../packages/orbit/src/export/oem-writer.js';

const data = new URL('../data/', import.meta.url);
const read = (path: string) => readFileSync(new URL(path, data), 'utf8');

/** What each damaged sample must be refused for: kinds of fault after Orekit's OemParserTest and the 2.0 schema. */
const REFUSALS: readonly (readonly [file: string, field: string, line: number])[] = [
  ['oem-five-numbers.kvn', 'state', 23],
  ['oem-keyword-inside-ephemeris.kvn', 'REF_FRAME', 24],
  ['oem-meta-not-closed.kvn', 'META_STOP', 19],
  ['oem-missing-stop-time.kvn', 'STOP_TIME', 5],
  ['oem-mixed-time-systems.kvn', 'TIME_SYSTEM', 42],
  ['oem-no-states.kvn', 'state', 5],
  ['oem-not-a-number.kvn', 'Y', 23],
  ['oem-outside-start-stop.kvn', 'USEABLE_STOP_TIME', 13],
  ['oem-times-not-increasing.kvn', 'EPOCH', 26],
  ['oem-unknown-keyword.kvn', 'HARBOUR_MASTER', 17],
];

describe('reading CCSDS 502.0-B ephemerides', () => {
  it('has a verdict for every damaged sample', () => {
    const files = readdirSync(new URL('ccsds/invalid/', data)).filter((file) => file.startsWith('oem'));
    expect(files.sort()).toEqual(REFUSALS.map(([file]) => file).sort());
  });

  it.each(REFUSALS)('refuses %s for %s in line %i', (file, field, line) => {
    const { oem, faults } = parseOem(read(`ccsds/invalid/${file}`));
    expect(oem).toBeUndefined();
    expect(faults[0]).toMatchObject({ field, line });
    expect(faults[0]?.message).toContain(`Line ${line}`);
  });

  it('reads the correct sample with its span, method and states', () => {
    const { oem, faults } = parseOem(read('ccsds/valid/oem-lanternfish.kvn'));
    expect(faults).toEqual([]);
    const segment = oem!.segments[0]!;
    expect(segment).toMatchObject({
      objectName: 'LANTERNFISH 1',
      frame: 'TEME',
      interpolation: 'HERMITE',
      interpolationDegree: 7,
      startMs: Date.UTC(2020, 9, 13, 5),
      useableStartMs: Date.UTC(2020, 9, 13, 5, 2),
      useableStopMs: Date.UTC(2020, 9, 13, 5, 13),
    });
    expect(segment.timesMs).toHaveLength(16);
    expect([...segment.states.subarray(0, 6)]).toEqual([
      -5265.580204, -8232.0189, 1369.350606, 4.709810676, -1.682691616, 3.09143402,
    ]);
  });

  it.each([
    'oem/lantern-1-icrf.kvn',
    'oem/lantern-1-itrf.kvn',
    'oem/long-watch-eme2000.kvn',
    'ccsds/valid/oem-lanternfish.kvn',
  ])('gives %s back from KVN and from XML without a difference', (path) => {
    const { oem } = parseOem(read(path));
    expect(parseOem(oemToKvn(oem!))).toEqual({ oem, faults: [] });
    expect(parseOem(oemToXml(oem!))).toEqual({ oem, faults: [] });
  });
});
