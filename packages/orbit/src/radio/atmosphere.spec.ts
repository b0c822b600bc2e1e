import { describe, expect, it } from 'vitest';
import { bestPolarisation, halfPowerBeamwidthDeg, pointingLossDb, polarisationTiltDeg } from './antenna.js';
import { gasColumn, referenceAir } from './atmosphere.js';
import { gOverTUnderSky, noiseFigureToK, skyNoiseK } from './noise.js';
import { rainAttenuationDb } from './rain.js';

describe('the reference atmosphere', () => {
  // U.S. Standard Atmosphere 1976, main table (from memory): 5 km 540.2 hPa 255.68 K, 11 km 227.0 hPa 216.77 K,
  // 20 km 55.29 hPa, 30 km 11.97 hPa 226.51 K.
  it.each([
    [0, 1013.25, 288.15],
    [5, 540.2, 255.68],
    [11, 227.0, 216.77],
    [20, 55.29, 216.65],
    [30, 11.97, 226.51],
  ])('at %d km has %d hPa and %d K', (heightKm, hpa, kelvin) => {
    const air = referenceAir(heightKm);
    expect(Math.abs(air.totalHpa / hpa - 1)).toBeLessThan(1e-3);
    expect(Math.abs(air.temperatureK - kelvin)).toBeLessThan(0.02);
  });
});

describe('gases along a slanted ray', () => {
  it('follow the cosecant well above the horizon and stay finite on it', () => {
    const column = gasColumn({ frequencyMhz: 8200, altitudeM: 0 });
    expect(column.slantDb(30) / column.slantDb(90)).toBeCloseTo(2, 2);
    expect(column.slantDb(0)).toBeGreaterThan(column.slantDb(5));
    expect(column.slantDb(0)).toBeLessThan(5);
  });

  it('are less from a mountain, and every elevation is worse than the one above it', () => {
    const sea = gasColumn({ frequencyMhz: 26000, altitudeM: 0 });
    const mountain = gasColumn({ frequencyMhz: 26000, altitudeM: 3000 });
    for (let elevationDeg = 0; elevationDeg < 90; elevationDeg += 1) {
      expect(mountain.slantDb(elevationDeg)).toBeLessThan(sea.slantDb(elevationDeg));
      expect(sea.slantDb(elevationDeg + 1)).toBeLessThan(sea.slantDb(elevationDeg));
    }
  });
});

describe('noise and antenna', () => {
  it('sees the cold sky through clear air and the warm medium through thick rain', () => {
    expect(skyNoiseK(0)).toBeCloseTo(2.7, 9);
    expect(skyNoiseK(60)).toBeCloseTo(275, 3);
  });

  it('keeps G/T at the sky it was stated for and loses some under a wetter one', () => {
    const figure = { gOverTDbPerK: 30, systemNoiseK: 100, statedAttenuationDb: 0.2 };
    expect(gOverTUnderSky({ ...figure, attenuationDb: 0.2 })).toBe(30);
    expect(gOverTUnderSky({ ...figure, attenuationDb: 3 })).toBeLessThan(28.5);
  });

  it('takes a noise figure of 3.01 dB for 290 K', () => {
    expect(noiseFigureToK(10 * Math.log10(2))).toBeCloseTo(290, 9);
  });

  it('loses 3 dB at half the beam width', () => {
    const width = halfPowerBeamwidthDeg({ diameterM: 5, frequencyMhz: 8200 });
    expect(pointingLossDb({ errorDeg: width / 2, halfPowerBeamwidthDeg: width })).toBeCloseTo(3, 9);
  });

  it('picks the equal polarisation before the linear one, and none from opposites', () => {
    expect(bestPolarisation('left', ['vertical', 'left'])).toEqual({ polarisation: 'left', lossDb: 0 });
    expect(bestPolarisation('left', ['right'])).toBeUndefined();
    expect(['right', 'horizontal', 'vertical'].map((name) => polarisationTiltDeg(name as 'right'))).toEqual([
      45, 0, 90,
    ]);
  });

  it('has no rain above the rain', () => {
    const path = {
      frequencyGhz: 20,
      elevationDeg: 30,
      polarisationTiltDeg: 45,
      latitudeDeg: 10,
      stationHeightKm: 5.2,
      rainHeightKm: 5,
      rainRateMmPerH: 80,
      exceedancePercent: 0.01,
    };
    expect(rainAttenuationDb(path)).toBe(0);
    expect(rainAttenuationDb({ ...path, stationHeightKm: 0 })).toBeGreaterThan(10);
  });
});
