import { describe, expect, it } from 'vitest';
import type { LookAngles } from '../types.js';
import { linkAlongPass, type PassLink, timeAbove, uplinkMarginDb } from './link-along-pass.js';

/** An overhead pass at 500 km above a flat, standing Earth: enough to drive the link up and down again. */
const track: LookAngles[] = Array.from({ length: 121 }, (_, index) => {
  const alongKm = (index - 60) * 35;
  const rangeKm = Math.hypot(500, alongKm);
  return {
    timeMs: index * 5000,
    azimuthDeg: index < 60 ? 0 : 180,
    elevationDeg: (Math.asin(500 / rangeKm) * 180) / Math.PI,
    rangeKm,
    rangeRateKmPerS: (7 * alongKm) / rangeKm,
  };
});

const question: PassLink = {
  track,
  radio: {
    centreFrequencyMhz: 8200,
    polarisation: 'right',
    eirpDbw: 12,
    dataRateBps: 50e6,
    requiredEbN0Db: 4,
    pointingLossDb: 0.5,
  },
  antenna: { gOverTDbPerK: 26, polarisationLossDb: 0, systemNoiseK: 150 },
  site: { latitudeDeg: 50, altitudeM: 100 },
};

describe('the link along a pass', () => {
  it('is best where the spacecraft is nearest and explains itself there', () => {
    const { marginDb, bestBudget } = linkAlongPass(question);
    expect(marginDb.indexOf(Math.max(...marginDb))).toBe(60);
    expect(bestBudget?.marginDb).toBe(marginDb[60]);
    const sum = bestBudget!.lines.filter((line) => !line.sum).reduce((total, { valueDb }) => total + valueDb, 0);
    expect(sum).toBeCloseTo(bestBudget!.marginDb, 9);
  });

  it('is the same going as coming, and worse in rain', () => {
    const dry = linkAlongPass(question);
    expect(dry.marginDb[10]).toBeCloseTo(dry.marginDb[110]!, 9);
    const wet = linkAlongPass({ ...question, rain: { rainRateMmPerH: 42, rainHeightKm: 3, exceedancePercent: 0.1 } });
    for (let i = 0; i < track.length; i += 1) expect(wet.marginDb[i]!).toBeLessThan(dry.marginDb[i]!);
    expect(wet.volumeBits).toBeLessThanOrEqual(dry.volumeBits);
  });

  it('delivers rate times the time above threshold, and nothing out of reach', () => {
    const result = linkAlongPass({ ...question, thresholdDb: 3 });
    expect(result.volumeBits).toBe(Math.floor((result.aboveThresholdMs / 1000) * 50e6));
    expect(linkAlongPass({ ...question, thresholdDb: 90 }).volumeBits).toBe(0);
    expect(linkAlongPass({ ...question, track: [] })).toEqual({
      marginDb: [],
      ebN0Db: [],
      volumeBits: 0,
      aboveThresholdMs: 0,
      bestBudget: undefined,
    });
  });

  it('cuts the time where a straight line crosses the level', () => {
    expect(timeAbove([0, 10, 20], [-1, 1, 1], 0)).toBe(15);
    expect(timeAbove([0, 10, 20], [1, -3, -3], 0)).toBe(2.5);
    expect(timeAbove([0, 10], [0, 0], 0)).toBe(10);
  });

  it('gains 6 dB of uplink margin at half the stated range', () => {
    const link = { eirpDbw: 50, requiredEirpDbw: 45, polarisationLossDb: 0, rangeKm: 1000 };
    expect(uplinkMarginDb(link)).toBe(5);
    expect(uplinkMarginDb({ ...link, statedRangeKm: 2000 })).toBeCloseTo(11.02, 2);
  });
});
