import { describe, expect, it } from 'vitest';
import { type CompatibilityBand, type CompatibilityRadio, compatibility } from './compatibility.js';

const downlink: CompatibilityRadio = {
  direction: 'downlink',
  centreFrequencyMhz: 2250,
  bandwidthKhz: 4000,
  polarisation: 'right',
};
const receive: CompatibilityBand = {
  direction: 'receive',
  fromMhz: 2200,
  toMhz: 2290,
  polarisations: ['right', 'left'],
};
const uplink: CompatibilityRadio = { ...downlink, direction: 'uplink', centreFrequencyMhz: 2050, requiredEirpDbw: 45 };
const transmit: CompatibilityBand = {
  direction: 'transmit',
  fromMhz: 2025,
  toMhz: 2110,
  polarisations: ['right'],
  eirpDbw: 50,
};

describe('compatibility', () => {
  it('accepts a radio whose whole bandwidth lies in a receive band of its polarisation', () => {
    expect(compatibility({ radio: downlink, bands: [transmit, receive] })).toEqual({
      ok: true,
      bandIndex: 1,
      polarisationLossDb: 0,
      reasons: [],
    });
  });

  it('refuses a radio whose bandwidth sticks out by one kilohertz, with both spans', () => {
    const radio = { ...downlink, centreFrequencyMhz: 2288.001 };
    expect(compatibility({ radio, bands: [receive] }).reasons).toEqual([
      {
        code: 'band',
        sentence: 'The radio fills 2286.001 to 2290.001 MHz and the antenna receives 2200 to 2290 MHz.',
      },
    ]);
    expect(compatibility({ radio: { ...downlink, centreFrequencyMhz: 2288 }, bands: [receive] }).ok).toBe(true);
  });

  it('refuses the opposite polarisation and counts 3 dB between circular and linear', () => {
    const left = compatibility({ radio: downlink, bands: [{ ...receive, polarisations: ['left'] }] });
    expect(left.reasons[0]?.sentence).toBe(
      'The radio is right-hand circular and the antenna offers only left-hand circular there.',
    );
    const linear = compatibility({ radio: downlink, bands: [{ ...receive, polarisations: ['horizontal'] }] });
    expect(linear.ok).toBe(true);
    expect(linear.polarisationLossDb).toBeCloseTo(3.0103, 4);
  });

  it('says that an antenna without a transmitter cannot serve an uplink', () => {
    expect(compatibility({ radio: uplink, bands: [receive] }).reasons).toEqual([
      { code: 'direction', sentence: 'The antenna does not transmit and the radio is an uplink.' },
    ]);
  });

  it('measures power after polarisation loss', () => {
    expect(compatibility({ radio: uplink, bands: [transmit] }).ok).toBe(true);
    const weak = { ...transmit, polarisations: ['vertical'] as const, eirpDbw: 47 };
    expect(compatibility({ radio: uplink, bands: [weak] }).reasons).toEqual([
      {
        code: 'power',
        sentence:
          'The spacecraft needs 45.0 dBW EIRP and the antenna radiates 44.0 dBW after 3.0 dB polarisation loss.',
      },
    ]);
  });

  it('prefers the band with the least loss and explains the nearest one when none serves', () => {
    const linear = { ...receive, polarisations: ['vertical'] as const };
    expect(compatibility({ radio: downlink, bands: [linear, receive] }).bandIndex).toBe(1);
    const elsewhere = { ...receive, fromMhz: 8025, toMhz: 8400 };
    const opposite = { ...receive, polarisations: ['left'] as const };
    expect(compatibility({ radio: downlink, bands: [elsewhere, opposite] }).reasons.map(({ code }) => code)).toEqual([
      'polarisation',
    ]);
  });
});
