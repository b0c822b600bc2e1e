import { lookAngles, parseOem, parsePointingCsv, sgp4Source } from '@skyberth/orbit';
import { describe, expect, it } from 'vitest';
import { SAMPLE_NOW_MS, sampleAntenna, sampleElements, sampleFlying, sampleRadio } from '../testing/samples.js';
import type { ContactFileName, FileJob } from '../workers/job-types.js';
import { PassDesk } from './pass-desk.js';

const desk = new PassDesk();
const fromMs = SAMPLE_NOW_MS + 3_600_000;

function make(file: ContactFileName, change: Partial<FileJob> = {}): string {
  const outcome = desk.carryOut<FileJob>({
    kind: 'file',
    file,
    createdMs: SAMPLE_NOW_MS,
    need: 'downlink',
    aosMs: fromMs,
    tcaMs: fromMs + 150_000,
    losMs: fromMs + 300_500,
    spacecraft: sampleFlying(),
    antenna: sampleAntenna(),
    stationName: 'Hollenvik',
    operatorName: 'Saltmarsh Observation',
    ...change,
  });
  if (outcome.kind !== 'file') throw new Error(outcome.sentence);
  return outcome.text;
}

describe('flight files', () => {
  it('points once a second and at LOS, as the look angles say', () => {
    const text = make('pointing.csv');
    const rows = parsePointingCsv(text) ?? [];
    expect(rows).toHaveLength(302);
    expect(rows.at(-1)?.timeMs).toBe(fromMs + 300_500);
    const look = lookAngles(sgp4Source(sampleElements()), sampleAntenna().site, fromMs + 100_000);
    expect(rows[100]?.azimuthDeg).toBeCloseTo(look.azimuthDeg, 5);
    expect(rows[100]?.rangeKm).toBeCloseTo(look.rangeKm, 5);
    // Radio convention, published-values: f0 (1 - v / c).
    expect(rows[100]?.downlinkHz).toBeCloseTo(2_245e6 * (1 - look.rangeRateKmPerS / 299_792.458), 0);
    expect(text).toContain('# Whimbrel 4 over Hollenvik 1, Hollenvik');
    expect(text).toMatch(/^# .*moves without warning/m);
  });

  it('keeps a table of a long contact to a size that can be read', () => {
    const rows = parsePointingCsv(make('pointing.csv', { losMs: fromMs + 3 * 86_400_000 })) ?? [];
    expect(rows.length).toBeLessThanOrEqual(21_602);
    expect(rows.length).toBeGreaterThan(10_000);
  });

  it('tunes every radio, a downlink up and an uplink down while it comes nearer', () => {
    const radios = [
      sampleRadio(),
      sampleRadio({ name: 'Command, "A"', direction: 'uplink', centreFrequencyMhz: 2_067 }),
    ];
    const spacecraft = sampleFlying({}, { radios });
    const text = make('frequency.csv', { spacecraft, need: 'both' });
    const rows = text.split('\r\n').filter((line) => /^20/.test(line));
    expect(rows).toHaveLength(604);
    expect(rows.filter((row) => row.includes('"Command, ""A"""'))).toHaveLength(302);
    const sum = (row: string, nominal: number, tuned: number) =>
      Number(row.split(',').at(tuned)) - Number(row.split(',').at(nominal));
    const [down, up] = [rows[0] ?? '', rows[302] ?? ''];
    expect(Math.sign(sum(down, -4, -3))).toBe(Math.sign(Number(down.split(',').at(-2))));
    expect(Math.sign(sum(up, -4, -3))).toBe(-Math.sign(Number(up.split(',').at(-2))));
  });

  it('writes an ephemeris that reads back and covers the contact', () => {
    const { oem, faults } = parseOem(make('ephemeris.oem'));
    expect(faults).toEqual([]);
    const [segment] = oem?.segments ?? [];
    expect(segment?.frame).toBe('EME2000');
    expect(segment?.startMs).toBeLessThan(fromMs);
    expect(segment?.stopMs).toBeGreaterThan(fromMs + 300_500);
  });

  it('names the elements', () => {
    expect(make('elements.omm')).toContain('WHIMBREL 4');
  });

  it('refuses without elements, and keeps names from adding lines', () => {
    expect(() => make('pointing.csv', { spacecraft: sampleFlying({}, { spans: [] }) })).toThrow('no elements');
    const text = make('pointing.csv', { stationName: 'Bay\r\n2026-12-01T00:00:00.000Z,1,2,3,4,5,6' });
    expect(parsePointingCsv(text)).toHaveLength(302);
  });
});
