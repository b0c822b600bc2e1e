import type { DisputeEvidence } from '@skyberth/shared';
import { describe, expect, it } from 'vitest';
import { gapOf } from './evidence.service.js';
import { type FindingInput, findingsOf } from './findings.js';

const AOS = Date.UTC(2026, 10, 24, 14, 3, 40);
const utc = (afterS: number) => new Date(AOS + afterS * 1000).toISOString();
const track: DisputeEvidence['track'] = Array.from({ length: 55 }, (_none, index) => ({
  timeUtc: utc(index * 10),
  azimuthDeg: index * 3,
  elevationDeg: 5 + 40 * Math.sin((index / 54) * Math.PI),
  maskDeg: 4,
  marginDb: 6,
}));
const input: FindingInput = {
  aosUtc: utc(0),
  losUtc: utc(540),
  track,
  gap: { fromUtc: utc(200), toUtc: utc(400), from: 'the operator' },
  later: { epochUtc: utc(0), aosUtc: utc(1), losUtc: utc(541), aosShiftS: 1, losShiftS: 1 },
  sunClosestDeg: 80,
  station: [
    { atUtc: utc(3), kind: 'acquired', words: 'Acquired.' },
    { atUtc: utc(200), kind: 'lost', words: 'Lost.' },
    { atUtc: utc(250), kind: 'note', words: 'receiver alarm' },
  ],
  predictedBytes: 100e6,
  reportedBytes: 60e6,
  guardS: 60,
  sunKeepOffDeg: 3,
  reported: { outcome: 'degraded', cause: 'station' },
};
const weights = (change: Partial<FindingInput>) =>
  Object.fromEntries(findingsOf({ ...input, ...change }).map(({ title, weight }) => [title, weight]));

describe('findings', () => {
  it('clear the spacecraft where geometry, elements and link were good, and name what the station itself logged', () => {
    expect(weights({})).toEqual({
      'Visible throughout.': 'clear',
      'Elements agree.': 'clear',
      'Margin was ample.': 'clear',
      'No Sun in the beam.': 'clear',
      'Lost at 14:07:00.': 'fault',
      'Note at 14:07:50.': 'neutral',
      'Reported cause: station.': 'fault',
      'Volume is short.': 'neutral',
    });
  });

  it('say what would explain a silence otherwise: horizon, elements, margin, Sun', () => {
    const low = track.map((point) => ({ ...point, maskDeg: point.elevationDeg - 0.2 }));
    expect(weights({ track: low })).toMatchObject({ 'Close to the horizon.': 'neutral' });
    const off = { epochUtc: utc(0), aosUtc: utc(90), losUtc: utc(630), aosShiftS: 90, losShiftS: 90 };
    expect(weights({ later: off })).toMatchObject({ 'The elements were off.': 'fault' });
    const gone = { epochUtc: utc(0), aosUtc: null, losUtc: null, aosShiftS: null, losShiftS: null };
    expect(weights({ later: gone })).toMatchObject({ 'Later elements do not find the pass.': 'fault' });
    const weak = track.map((point) => ({ ...point, marginDb: -1 }));
    expect(weights({ track: weak })).toMatchObject({ 'The link did not close all along.': 'neutral' });
    expect(weights({ sunClosestDeg: 1 })).toMatchObject({ 'Sun near the beam.': 'neutral' });
  });

  it('say what is not known', () => {
    const unknown = track.map((point) => ({ ...point, marginDb: null }));
    const found = weights({ track: unknown, later: null, station: [], predictedBytes: null, reported: null });
    expect(found).toMatchObject({
      'Margin unknown.': 'neutral',
      'No better elements.': 'neutral',
      'No acquisition reported.': 'fault',
    });
    expect(Object.keys(found)).not.toContain('Volume is short.');
  });
});

describe('the gap by the station’s own log', () => {
  const booking = { aosMs: AOS, losMs: AOS + 540_000 };
  const at = (afterS: number, kind: string) => ({ atMs: AOS + afterS * 1000, kind, words: '' });

  it('is the longest time from a loss to the next acquisition, or to LOS', () => {
    const log = [at(3, 'acquired'), at(100, 'lost'), at(130, 'acquired'), at(300, 'lost')];
    expect(gapOf(booking, log)).toMatchObject({ fromMs: AOS + 300_000, toMs: AOS + 540_000 });
  });

  it('begins at AOS where the spacecraft was acquired late', () => {
    expect(gapOf(booking, [at(200, 'acquired'), at(538, 'lost')])).toMatchObject({ fromMs: AOS, toMs: AOS + 200_000 });
  });

  it('is none where the station heard it all along, or said nothing', () => {
    expect(gapOf(booking, [at(4, 'acquired'), at(536, 'lost')])).toBeNull();
    expect(gapOf(booking, [])).toBeNull();
  });
});
