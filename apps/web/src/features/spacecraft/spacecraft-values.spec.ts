import { describe, expect, it } from 'vitest';
import {
  emptyRadio,
  emptySpacecraft,
  type RadioValues,
  radioLike,
  type SpacecraftValues,
  spacecraftInput,
  spacecraftRules,
} from './spacecraft-values.js';

const radio = (part: Partial<RadioValues> = {}): RadioValues => ({
  ...emptyRadio('a', 'downlink'),
  name: 'Payload',
  centreFrequencyMhz: 8_212.5,
  bandwidthKhz: 60_000,
  modulation: 'OQPSK',
  coding: 'none',
  dataRateBps: 150_000_000,
  eirpDbw: 12,
  requiredEirpDbw: 40,
  ...part,
});
const craft = (radios: RadioValues[]): SpacecraftValues => ({
  ...emptySpacecraft(),
  name: 'Whimbrel 4',
  shortName: 'W4',
  radios,
});

describe('the form of a spacecraft', () => {
  it('sends only the figures of the direction, and none for what stands empty', () => {
    const [down, up] = spacecraftInput(craft([radio(), radio({ direction: 'uplink' })])).radios;
    expect(down).toMatchObject({ eirpDbw: 12, requiredEbN0Db: null, requiredEirpDbw: null });
    expect(up).toMatchObject({ eirpDbw: null, requiredEbN0Db: null, requiredEirpDbw: 40 });
  });

  it('leaves out the key of a radio, and sends no number or designator where none was given', () => {
    const input = spacecraftInput(craft([radio()]));
    expect(input).toMatchObject({ catalogNumber: null, internationalDesignator: null });
    expect(input.radios[0]).not.toHaveProperty('key');
  });

  it('points at the field of the radio that is empty', () => {
    const errors = spacecraftRules(craft([radio(), radio({ name: 'Beacon', centreFrequencyMhz: '' })]));
    expect(errors).toEqual({ 'radios.1.centreFrequencyMhz': 'Give a number.' });
  });

  it('refuses two radios of one name and direction, but not of two directions', () => {
    expect(spacecraftRules(craft([radio(), radio()]))).toEqual({ 'radios.1.name': 'Another downlink has this name.' });
    expect(spacecraftRules(craft([radio(), radio({ direction: 'uplink' })]))).toEqual({});
  });

  it('gives the copy of a radio a name of its own', () => {
    expect(radioLike(radio(), 'b')).toMatchObject({ key: 'b', name: 'Payload 2', dataRateBps: 150_000_000 });
  });
});
