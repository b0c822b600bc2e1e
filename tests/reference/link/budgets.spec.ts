import { describe, expect, it } from 'vitest';
import { dishGainDbi, sidelobeS465Dbi, sidelobeS580Dbi } from '../../../packages/orbit/src/radio/antenna.js';
import { MINUS_BOLTZMANN_DB } from '../../../packages/orbit/src/radio/decibel.js';
import {
  dopplerHz,
  rangeRateFromFrequencyKmPerS,
  uplinkFrequencyHz,
} from '../../../packages/orbit/src/radio/doppler.js';
import { freeSpaceLossDb } from '../../../packages/orbit/src/radio/free-space.js';
import { combinedCn0DbHz, eirpDbw, gOverTDbPerK, linkBudget } from '../../../packages/orbit/src/radio/link-budget.js';

const PRINTED_DIGIT_DB = 0.1;
const near = (got: number, printed: number) => expect(Math.abs(got - printed)).toBeLessThan(PRINTED_DIGIT_DB);

describe('the NOAA budget of EMWIN-N over a GOES at 5 degrees', () => {
  // National Weather Service, page "EMWIN-N link budget"; it counts in dBm, we in dBW.
  const path = { rangeKm: 41127, dataRateBps: 9600, requiredEbN0Db: 2.6 };
  const up = linkBudget({
    ...path,
    frequencyMhz: 2034.7,
    eirpDbw: 76.7 - 30,
    pointingLossDb: 0.5,
    gasLossDb: 0.4,
    polarisationLossDb: 0.2,
    gOverTDbPerK: -14.2,
  });
  const down = linkBudget({
    ...path,
    frequencyMhz: 1692.7,
    eirpDbw: 44.8 - 30,
    gasLossDb: 0.4,
    polarisationLossDb: 0.2,
    gOverTDbPerK: -0.3,
  });

  it('loses 190.9 dB in free space on the way up and 189.3 dB on the way down', () => {
    near(-up.lines.find(({ label }) => label === 'Free-space loss')!.valueDb, 190.9);
    near(-down.lines.find(({ label }) => label === 'Free-space loss')!.valueDb, 189.3);
  });

  it('has C/N0 of 69.1 dBHz up, 53.2 down and 53.1 together', () => {
    near(up.cn0DbHz, 69.1);
    near(down.cn0DbHz, 53.2);
    near(combinedCn0DbHz([up.cn0DbHz, down.cn0DbHz]), 53.1);
  });

  it('receives -144.9 dBm', () => {
    const signal = down.lines.slice(0, 3).reduce((sum, { valueDb }) => sum + valueDb, 30);
    near(signal, -144.9);
  });

  it('ends with Eb/N0 of 13.3 dB and a margin of 7.7 dB', () => {
    const ebN0Db = combinedCn0DbHz([up.cn0DbHz, down.cn0DbHz]) - 10 * Math.log10(9600);
    near(ebN0Db, 13.3);
    near(ebN0Db - (2.6 + 2 + 1), 7.7);
  });
});

describe('the S-band budget of EURASIP J. Wireless Comm. Netw. 2020, Table 1', () => {
  // 10.1186/s13638-020-01674-9. The table prints the free-space loss; the range that makes it stands in for the orbit.
  const frequencyMhz = 2200;
  const rangeKm = 10 ** ((162.2 - freeSpaceLossDb({ frequencyMhz, rangeKm: 1 })) / 20);
  const budget = linkBudget({
    frequencyMhz,
    rangeKm,
    eirpDbw: eirpDbw({ powerW: 1, gainDbi: 8.3, lineLossDb: 0 }),
    pointingLossDb: 10,
    gOverTDbPerK: gOverTDbPerK(38.2, 130),
    dataRateBps: 3.4e6,
    requiredEbN0Db: 7,
    implementationLossDb: 6,
  });

  it('has a dish of 38.2 dBi from 5 m and 50 %', () => {
    expect(Math.abs(dishGainDbi({ diameterM: 5, frequencyMhz, efficiency: 0.5 }) - 38.2)).toBeLessThan(0.05);
  });

  it('gives C/N0 81.8 dBHz, Eb/N0 16.5 dB and a margin of 3.5 dB', () => {
    near(budget.cn0DbHz, 81.8);
    near(budget.ebN0Db, 16.5);
    near(budget.marginDb, 3.5);
  });
});

describe('constants and envelopes', () => {
  it("has Boltzmann's constant at 228.599167 dB", () => {
    // CODATA 2018; NOAA prints -198.6 dBm.
    expect(Math.abs(MINUS_BOLTZMANN_DB - 228.599167)).toBeLessThan(1e-6);
  });

  it('keeps the side lobes of ITU-R S.465-6 and S.580-6', () => {
    // Numbers as coded in the SHARC project (antenna_s465, antenna_s580).
    const dish = { diameterM: 5, frequencyMhz: 8200 };
    expect(sidelobeS465Dbi(dish, 10)).toBeCloseTo(7.0, 2);
    expect(sidelobeS465Dbi(dish, 30)).toBeCloseTo(-4.93, 2);
    expect(sidelobeS465Dbi(dish, 60)).toBe(-10);
    expect(sidelobeS580Dbi(dish, 10)).toBeCloseTo(4.0, 2);
    expect(sidelobeS465Dbi(dish, 0.5)).toBeUndefined();
  });
});

describe('Doppler', () => {
  it('follows the radio convention as astropy documents it after NRAO', () => {
    expect(Math.abs(rangeRateFromFrequencyKmPerS(115.2712e9, 115.2832e9) - -31.209092088877583)).toBeLessThan(1e-9);
  });

  // Skyfield documentation, "Find a satellite's range rate": rates read; shifts at 437.5 MHz computed with satellite.js.
  it.each([
    [-4.74, 6920.4],
    [-3.24, 4724.0],
    [-0.84, 1219.3],
    [1.9, -2766.6],
    [3.95, -5760.9],
    [5.14, -7500.8],
  ])('shifts 437.5 MHz at %d km/s by %d Hz', (rangeRateKmPerS, expectedHz) => {
    expect(Math.abs(dopplerHz(437.5e6, rangeRateKmPerS) - expectedHz)).toBeLessThan(15);
  });

  it('is heard on the wanted frequency after the uplink was corrected', () => {
    const sentHz = uplinkFrequencyHz(2.05e9, 6.5);
    expect(sentHz + dopplerHz(sentHz, 6.5)).toBeCloseTo(2.05e9, 3);
  });
});
