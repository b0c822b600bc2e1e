/** What the form of a spacecraft holds while it is filled in, and what of it is sent. Pure. */
import { type Radio, type Spacecraft, SpacecraftInput } from '@skyberth/shared';
import { formRules, type NumberOrEmpty } from '../../lib/form-rules.js';

export interface RadioValues {
  /** Keeps a radio's fields together while others are added and removed; never sent. */
  key: string;
  name: string;
  direction: Radio['direction'];
  band: Radio['band'];
  centreFrequencyMhz: NumberOrEmpty;
  bandwidthKhz: NumberOrEmpty;
  polarisation: Radio['polarisation'];
  modulation: string;
  coding: string;
  dataRateBps: NumberOrEmpty;
  eirpDbw: NumberOrEmpty;
  requiredEbN0Db: NumberOrEmpty;
  requiredEirpDbw: NumberOrEmpty;
  pointingLossDb: NumberOrEmpty;
}

export interface SpacecraftValues {
  name: string;
  shortName: string;
  catalogNumber: NumberOrEmpty;
  internationalDesignator: string;
  radios: RadioValues[];
}

export type SpacecraftInputValues = ReturnType<typeof SpacecraftInput.parse>;

export const emptySpacecraft = (): SpacecraftValues => ({
  name: '',
  shortName: '',
  catalogNumber: '',
  internationalDesignator: '',
  radios: [],
});

export const emptyRadio = (key: string, direction: Radio['direction']): RadioValues => ({
  key,
  name: '',
  direction,
  band: 'S',
  centreFrequencyMhz: '',
  bandwidthKhz: '',
  polarisation: 'right',
  modulation: '',
  coding: '',
  dataRateBps: '',
  eirpDbw: '',
  requiredEbN0Db: '',
  requiredEirpDbw: '',
  pointingLossDb: 0,
});

export const spacecraftValues = (craft: Spacecraft): SpacecraftValues => ({
  name: craft.name,
  shortName: craft.shortName,
  catalogNumber: craft.catalogNumber ?? '',
  internationalDesignator: craft.internationalDesignator ?? '',
  radios: craft.radios.map(({ id, ...radio }) => ({
    ...radio,
    key: id,
    eirpDbw: radio.eirpDbw ?? '',
    requiredEbN0Db: radio.requiredEbN0Db ?? '',
    requiredEirpDbw: radio.requiredEirpDbw ?? '',
  })),
});

const orNull = (value: NumberOrEmpty): number | null => (value === '' ? null : value);

/** Only the figures that belong to the direction are sent; what stands empty is none. */
function radioInput({ key: _key, ...radio }: RadioValues): unknown {
  const isDown = radio.direction === 'downlink';
  return {
    ...radio,
    eirpDbw: isDown ? orNull(radio.eirpDbw) : null,
    requiredEbN0Db: isDown ? orNull(radio.requiredEbN0Db) : null,
    requiredEirpDbw: isDown ? null : orNull(radio.requiredEirpDbw),
    pointingLossDb: radio.pointingLossDb === '' ? 0 : radio.pointingLossDb,
  };
}

const rawInput = (values: SpacecraftValues): unknown => ({
  ...values,
  catalogNumber: orNull(values.catalogNumber),
  internationalDesignator: values.internationalDesignator.trim() || null,
  radios: values.radios.map(radioInput),
});

/** What is sent. Throws where `spacecraftRules` finds a fault. */
export const spacecraftInput = (values: SpacecraftValues): SpacecraftInputValues =>
  SpacecraftInput.parse(rawInput(values));

const check = formRules(SpacecraftInput);

/** Field errors by dotted path: the contract's, and radios of one name and direction, which a booking could not tell apart. */
export function spacecraftRules(values: SpacecraftValues): Record<string, string> {
  const errors = check(rawInput(values));
  for (const [index, radio] of values.radios.entries()) {
    const isTwin = values.radios
      .slice(0, index)
      .some((other) => other.direction === radio.direction && other.name.trim() === radio.name.trim());
    if (isTwin && radio.name.trim()) errors[`radios.${index}.name`] ??= `Another ${radio.direction} has this name.`;
  }
  return errors;
}

/** A radio like another, to be changed where it differs. */
export const radioLike = (radio: RadioValues, key: string): RadioValues => ({
  ...radio,
  key,
  name: radio.name ? `${radio.name} 2` : '',
});
