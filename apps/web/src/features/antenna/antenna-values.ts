/** What the form of size, limits and booking rules holds while it is filled in. */
import type { Antenna } from '@skyberth/shared';
import type { NumberOrEmpty } from '../../lib/form-rules.js';

export interface AntennaValues {
  name: string;
  diameterM: NumberOrEmpty;
  mount: Antenna['mount'];
  tiltDeg: NumberOrEmpty;
  slewAzimuthDegPerS: NumberOrEmpty;
  slewElevationDegPerS: NumberOrEmpty;
  lowestReceiveDeg: NumberOrEmpty;
  lowestTransmitDeg: NumberOrEmpty;
  setupS: NumberOrEmpty;
  teardownS: NumberOrEmpty;
  beams: NumberOrEmpty;
  minNoticeMin: NumberOrEmpty;
  horizonDays: NumberOrEmpty;
  minContactS: NumberOrEmpty;
  maxContactS: NumberOrEmpty;
  partsAllowed: boolean;
  acceptance: Antenna['acceptance'];
  answerWithinMin: NumberOrEmpty;
}

/** A usual small dish to begin from; the size and the turning rates are left for the owner to say. */
export const EMPTY_ANTENNA: AntennaValues = {
  name: '',
  diameterM: '',
  mount: 'az-el',
  tiltDeg: 0,
  slewAzimuthDegPerS: '',
  slewElevationDegPerS: '',
  lowestReceiveDeg: 5,
  lowestTransmitDeg: 10,
  setupS: 120,
  teardownS: 60,
  beams: 1,
  minNoticeMin: 60,
  horizonDays: 60,
  minContactS: 120,
  maxContactS: 3_600,
  partsAllowed: true,
  acceptance: 'owner',
  answerWithinMin: 240,
};

export const antennaValues = (antenna: Antenna): AntennaValues => ({
  name: antenna.name,
  diameterM: antenna.diameterM,
  mount: antenna.mount,
  tiltDeg: antenna.tiltDeg,
  slewAzimuthDegPerS: antenna.slewAzimuthDegPerS,
  slewElevationDegPerS: antenna.slewElevationDegPerS,
  lowestReceiveDeg: antenna.lowestReceiveDeg,
  lowestTransmitDeg: antenna.lowestTransmitDeg,
  setupS: antenna.setupS,
  teardownS: antenna.teardownS,
  beams: antenna.beams,
  minNoticeMin: antenna.minNoticeMin,
  horizonDays: antenna.horizonDays,
  minContactS: antenna.minContactS,
  maxContactS: antenna.maxContactS,
  partsAllowed: antenna.partsAllowed,
  acceptance: antenna.acceptance,
  answerWithinMin: antenna.answerWithinMin,
});

export const MOUNT_WORDS: Readonly<Record<Antenna['mount'], string>> = {
  'az-el': 'azimuth over elevation',
  'x-y': 'X over Y',
  'tilted az-el': 'azimuth over elevation, tilted',
};
