import type { FoundPass } from '@skyberth/shared';
import { describe, expect, it } from 'vitest';
import { SAMPLE_NOW_MS, sampleAntenna, sampleFlying } from '../testing/samples.js';
import { Horizons } from './horizons.js';
import { PassBlocks } from './pass-blocks.js';
import { PassTexts, PROFILE_STEPS } from './pass-text.js';
import type { Sale } from './sales.js';
import { geometryOf } from './stay.js';
import { TrackTables } from './track-table.js';

const tables = new TrackTables();
const horizons = new Horizons();
const texts = new PassTexts(tables);
const craft = sampleFlying();
const antenna = sampleAntenna();
const [span] = craft.spans;
if (span === undefined) throw new Error('There are no elements.');
const { stays } = new PassBlocks(horizons, tables).touching({
  span,
  antennas: [{ antenna, floorDeg: 5 }],
  fromMs: SAMPLE_NOW_MS,
  toMs: SAMPLE_NOW_MS + 5 * 86_400_000,
});

const sales: Sale[] = [
  { state: 'for sale', bookingId: null, parts: [], reasons: [] },
  {
    state: 'berth',
    bookingId: '01939f7e-0000-7000-8000-0000000000aa',
    parts: [
      { aosUtc: '2026-12-01T12:00:00.000Z', losUtc: '2026-12-01T12:05:00.250Z', totalMinor: 8_188 },
      { aosUtc: '2026-12-01T12:06:00.000Z', losUtc: '2026-12-01T12:09:00.250Z', totalMinor: 0 },
    ],
    reasons: [{ code: 'turn', word: 'turn', sentence: 'It faces “214.6°”, and 衛星 is high.', remedy: null }],
  },
];

describe('PassTexts', () => {
  it('writes what JSON.stringify would make of the pass', () => {
    const all = stays[0] ?? [];
    expect(all.length).toBeGreaterThan(20);
    all.forEach((stay, index) => {
      const sale = sales[index % sales.length] as Sale;
      const { bytes, from, to } = texts.write({
        stay,
        craft,
        antenna,
        horizon: horizons.of(antenna, 5),
        sale,
        keep: null,
      });
      const text = bytes.toString('utf8', from + 1, to);
      expect(bytes.toString('utf8', from, from + 1)).toBe(',');
      const read: FoundPass = JSON.parse(text);
      const { profile, ...rest } = read;
      expect(rest).toEqual({
        key: `${antenna.id.slice(-12)}-${craft.id.slice(-12)}-${stay.aosMs}`,
        antennaId: antenna.id,
        spacecraftId: craft.id,
        currency: 'EUR',
        ...sale,
        geometry: geometryOf(stay),
      });
      expect(profile.elevationDeg).toHaveLength(PROFILE_STEPS + 1);
      expect(profile.maskDeg).toEqual([5]);
      expect(text).toBe(JSON.stringify(read));
    });
  });
});
