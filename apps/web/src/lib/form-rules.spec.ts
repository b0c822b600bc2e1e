import { AntennaInput, StationInput } from '@skyberth/shared';
import { describe, expect, it } from 'vitest';
import { formRules } from './form-rules.js';

describe('checking a form by its contract', () => {
  it('asks for a number where a number field is empty', () => {
    expect(formRules(StationInput)({ name: 'Bay', latitudeDeg: '' })['latitudeDeg']).toBe('Give a number.');
  });

  it('keeps the sentences of the contract', () => {
    expect(formRules(StationInput)({ latitudeDeg: 91 })['latitudeDeg']).toBe('Latitude lies from -90° to 90°.');
  });

  it('says a bound in two words where the contract has no sentence', () => {
    expect(formRules(AntennaInput)({ beams: 9 })['beams']).toBe('At most 8.');
    expect(formRules(AntennaInput)({ beams: 0 })['beams']).toBe('At least 1.');
  });
});
