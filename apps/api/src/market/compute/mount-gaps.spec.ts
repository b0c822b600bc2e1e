import { lookAngles, mountCoverage } from '@skyberth/orbit';
import { describe, expect, it } from 'vitest';
import { SAMPLE_NOW_MS, sampleAntenna, sampleFlying } from '../testing/samples.js';
import { Horizons } from './horizons.js';
import { gapsNotSold, gapsWithin, MountGaps } from './mount-gaps.js';
import { mountOf } from './mounts.js';
import { PassBlocks } from './pass-blocks.js';
import { TrackTables } from './track-table.js';

const tables = new TrackTables();
const horizons = new Horizons();
const [span] = sampleFlying({ inclinationDeg: 60 }).spans;
if (span === undefined) throw new Error('There are no elements.');

function judged(changes: Parameters<typeof sampleAntenna>[0]) {
  const antenna = sampleAntenna({ site: { latitudeDeg: 48, longitudeDeg: 11, altitudeM: 0 }, ...changes });
  const { stays } = new PassBlocks(horizons, tables).touching({
    span: span as NonNullable<typeof span>,
    antennas: [{ antenna, floorDeg: 5 }],
    fromMs: SAMPLE_NOW_MS,
    toMs: SAMPLE_NOW_MS + 14 * 86_400_000,
  });
  const gaps = new MountGaps(tables);
  return (stays[0] ?? []).map((stay) => {
    const found = gaps.of({ stay, span: span as NonNullable<typeof span>, antenna, horizon: horizons.of(antenna, 5) });
    return { stay, antenna, gaps: found };
  });
}

describe('what a mount cannot follow', () => {
  it('agrees with an exact look at every pass, second by second, whatever the quick look leaves out', () => {
    const source = tables.source(span);
    let lost = 0;
    for (const slew of [2, 5]) {
      for (const { stay, antenna, gaps } of judged({ slewAzimuthDegPerS: slew })) {
        const steps = Math.ceil((stay.losMs - stay.aosMs) / 1_000);
        const track = Array.from({ length: steps + 1 }, (_, i) =>
          lookAngles(source, antenna.site, stay.aosMs + (i * (stay.losMs - stay.aosMs)) / steps),
        );
        const exact = mountCoverage(track, mountOf(antenna)).gaps;
        expect(gaps.length).toBe(exact.length);
        exact.forEach((gap, index) => {
          // Of several shortest gaps either may be taken; they overlap and are equally long, to a step of the track.
          const own = gaps[index] ?? { fromMs: 0, toMs: 0 };
          expect(Math.abs(own.toMs - own.fromMs - (gap.toMs - gap.fromMs))).toBeLessThan(2_100);
          expect(Math.min(own.toMs, gap.toMs)).toBeGreaterThan(Math.max(own.fromMs, gap.fromMs));
          lost += 1;
        });
      }
    }
    expect(lost).toBeGreaterThan(2);
  });

  it('leaves a short gap in the contact that is sold, and takes a long one out of it', () => {
    const quick = judged({ slewAzimuthDegPerS: 5 }).filter(({ gaps }) => gaps.length > 0);
    const slow = judged({ slewAzimuthDegPerS: 1 }).filter(({ gaps }) => gaps.length > 0);
    expect(slow.length).toBeGreaterThan(quick.length);
    for (const { stay, gaps } of [...quick, ...slow]) {
      for (const gap of gaps) {
        const isLong = gap.toMs - gap.fromMs > 30_000 || gap.fromMs <= stay.aosMs || gap.toMs >= stay.losMs;
        expect(gapsNotSold(stay, gaps).includes(gap)).toBe(isLong);
      }
    }
    expect(slow.some(({ stay, gaps }) => gapsNotSold(stay, gaps).length > 0)).toBe(true);
  });

  it('cuts gaps to the part that is asked for', () => {
    const gap = { fromMs: 10, toMs: 40, code: 'keyhole' as const, sentence: 'Too fast.' };
    expect(gapsWithin([gap], { aosMs: 20, losMs: 100 })).toEqual([{ ...gap, fromMs: 20 }]);
    expect(gapsWithin([gap], { aosMs: 40, losMs: 100 })).toEqual([]);
  });
});
