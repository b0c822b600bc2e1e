import { describe, expect, it } from 'vitest';
import { sampleAntenna, sampleCraft, sampleRadio } from '../testing/samples.js';
import { fitOf } from './objections.js';

const downlink = { need: 'downlink', bands: [] } as const;
const band = sampleAntenna().bands[0];

describe('fitOf', () => {
  it('objects to nothing where a band serves the radio, and begins at its lowest elevation', () => {
    expect(fitOf(sampleCraft(), sampleAntenna(), downlink)).toEqual({ objections: [], clearance: null, floorDeg: 5 });
    const steeper = sampleAntenna({ bands: band ? [{ ...band, lowestElevationDeg: 8 }] : [] });
    expect(fitOf(sampleCraft(), steeper, downlink).floorDeg).toBe(8);
  });

  it('names both frequencies where the radio lies outside the band', () => {
    const craft = sampleCraft({ radios: [sampleRadio({ band: 'X', centreFrequencyMhz: 8_212.5 })] });
    const [objection, ...more] = fitOf(craft, sampleAntenna(), downlink).objections;
    expect(more).toEqual([]);
    expect(objection?.code).toBe('band');
    expect(objection?.sentence).toMatch(/8211\.5 to 8213\.5 MHz.*2200 to 2300 MHz/);
  });

  it('takes the edge of the occupied bandwidth, not the centre', () => {
    const craft = sampleCraft({ radios: [sampleRadio({ centreFrequencyMhz: 2_299.5 })] });
    expect(fitOf(craft, sampleAntenna(), downlink).objections[0]?.code).toBe('band');
  });

  it('objects to the opposite polarisation', () => {
    const antenna = sampleAntenna({ bands: band ? [{ ...band, polarisations: ['left'] }] : [] });
    expect(fitOf(sampleCraft(), antenna, downlink).objections[0]?.code).toBe('polarisation');
  });

  it('is content with one radio that fits among several', () => {
    const craft = sampleCraft({ radios: [sampleRadio({ band: 'X', centreFrequencyMhz: 8_200 }), sampleRadio()] });
    expect(fitOf(craft, sampleAntenna(), downlink).objections).toEqual([]);
    expect(fitOf(craft, sampleAntenna(), { need: 'downlink', bands: ['X'] }).objections[0]?.code).toBe('band');
  });

  it('says so where the spacecraft has no radio in the bands asked for', () => {
    const [objection] = fitOf(sampleCraft(), sampleAntenna(), { need: 'downlink', bands: ['Ka'] }).objections;
    expect(objection?.sentence).toBe('Whimbrel 4 has no downlink radio in Ka.');
  });

  it('without a radio on file compares only the band that was asked for', () => {
    const craft = sampleCraft({ radios: [] });
    expect(fitOf(craft, sampleAntenna(), downlink).objections).toEqual([]);
    expect(fitOf(craft, sampleAntenna(), { need: 'downlink', bands: ['X'] }).objections[0]?.code).toBe('band');
  });

  it('clears no transmission, and lets a contact in both directions begin with the lower one', () => {
    const transmit = {
      ...band,
      direction: 'transmit',
      fromMhz: 2025,
      toMhz: 2110,
      gOverTDbK: null,
      eirpDbw: 50,
    } as const;
    const antenna = sampleAntenna({ bands: band ? [band, { ...band, ...transmit }] : [] });
    const radios = [
      sampleRadio(),
      sampleRadio({ direction: 'uplink', centreFrequencyMhz: 2_067, requiredEirpDbw: 40 }),
    ];
    const fit = fitOf(sampleCraft({ radios }), antenna, { need: 'both', bands: [] });
    expect(fit.objections).toEqual([]);
    expect(fit.clearance?.valid).toEqual([]);
    expect(fit.floorDeg).toBe(5);
    expect(fitOf(sampleCraft({ radios }), antenna, { need: 'uplink', bands: [] }).floorDeg).toBe(10);
  });
});
