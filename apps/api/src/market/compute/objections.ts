/** Whether an antenna can serve what is wished of a spacecraft, and above which elevation. */
import type { ClearanceVerdict, Objection } from '@skyberth/market';
import { type Compatibility, compatibility } from '@skyberth/orbit';
import type { AntennaBand, Need, Polarisation, Radio } from '@skyberth/shared';
import type { AntennaInput, CraftInput } from '../workers/job-types.js';
import { clearanceOf } from './clearance.js';

export interface Fit {
  readonly objections: readonly Objection[];
  /** `null` where nothing is to be transmitted. */
  readonly clearance: ClearanceVerdict | null;
  /** Nothing below it is used, whatever the mask says. */
  readonly floorDeg: number;
}

type Direction = Radio['direction'];

const DIRECTIONS: Readonly<Record<Need, readonly Direction[]>> = {
  downlink: ['downlink'],
  uplink: ['uplink'],
  both: ['downlink', 'uplink'],
};
const BAND_SIDE = { downlink: 'receive', uplink: 'transmit' } as const;

/** Radios that the wish is about: of its directions and bands. */
export function radiosFor(craft: CraftInput, need: Need, bands: readonly string[]): Radio[] {
  return craft.radios.filter(
    (radio) => DIRECTIONS[need].includes(radio.direction) && (bands.length === 0 || bands.includes(radio.band)),
  );
}

/** The band of the antenna that serves a radio, or why none does. */
export function serving(radio: Radio, antenna: AntennaInput): { verdict: Compatibility; band: AntennaBand | null } {
  const verdict = compatibility({
    radio: { ...radio, polarisation: radio.polarisation as Polarisation },
    bands: antenna.bands,
  });
  return { verdict, band: verdict.bandIndex === undefined ? null : (antenna.bands[verdict.bandIndex] ?? null) };
}

/** Judges one antenna for one spacecraft; the answer holds for every pass. */
export function fitOf(craft: CraftInput, antenna: AntennaInput, wish: { need: Need; bands: readonly string[] }): Fit {
  const sides = DIRECTIONS[wish.need].map((direction) => sideOf(craft, antenna, direction, wish.bands));
  return {
    objections: sides.flatMap((side) => (side.objection === null ? [] : [side.objection])),
    clearance: wish.need === 'downlink' ? null : clearanceOf(craft, antenna, transmitBands(craft, antenna, wish.bands)),
    // Both directions together begin where the first of them does.
    floorDeg: Math.min(...sides.map((side) => side.floorDeg)),
  };
}

/**
 * Bands in which this antenna would transmit to the spacecraft: of its uplink radios that the antenna serves, or, without
 * such a radio on file, of the antenna itself.
 */
export function transmitBands(craft: CraftInput, antenna: AntennaInput, bands: readonly string[]): string[] {
  const radios = craft.radios.filter((radio) => radio.direction === 'uplink');
  const all =
    radios.length > 0
      ? radios.filter((radio) => serving(radio, antenna).band !== null).map((radio) => radio.band)
      : antenna.bands.filter((band) => band.direction === 'transmit').map((band) => band.band);
  return [...new Set(all)].filter((band) => bands.length === 0 || bands.includes(band));
}

interface Side {
  readonly objection: Objection | null;
  readonly floorDeg: number;
}

function sideOf(craft: CraftInput, antenna: AntennaInput, direction: Direction, bands: readonly string[]): Side {
  const ofAntenna = direction === 'downlink' ? antenna.lowestReceiveDeg : antenna.lowestTransmitDeg;
  const all = craft.radios.filter((radio) => radio.direction === direction);
  if (all.length === 0) return { objection: withoutRadio(antenna, direction, bands), floorDeg: ofAntenna };
  const wanted = bands.length === 0 ? all : all.filter((radio) => bands.includes(radio.band));
  if (wanted.length === 0) return { objection: noSuchRadio(craft, direction, bands), floorDeg: ofAntenna };
  const tried = wanted.map((radio) => ({ radio, ...serving(radio, antenna) }));
  const served = tried.flatMap(({ band }) => (band === null ? [] : [band]));
  if (served.length > 0) {
    return { objection: null, floorDeg: Math.min(...served.map((band) => band.lowestElevationDeg ?? ofAntenna)) };
  }
  return { objection: objectionOf(tried), floorDeg: ofAntenna };
}

/** Without a radio on file only the band itself can be looked at; the page says that nothing more was checked. */
function withoutRadio(antenna: AntennaInput, direction: Direction, bands: readonly string[]): Objection | null {
  const side = BAND_SIDE[direction];
  const has = antenna.bands.filter((band) => band.direction === side);
  if (has.some((band) => bands.length === 0 || bands.includes(band.band))) return null;
  const verb = side === 'receive' ? 'receives' : 'transmits';
  const offered = [...new Set(has.map((band) => band.band))];
  return {
    code: 'band',
    sentence:
      offered.length === 0
        ? `${antenna.name} ${verb} in no band.`
        : `${antenna.name} ${verb} in ${offered.join(' and ')}, and you asked for ${bands.join(' or ')}.`,
    remedy: 'Choose another band or another antenna.',
  };
}

function noSuchRadio(craft: CraftInput, direction: Direction, bands: readonly string[]): Objection {
  return {
    code: 'incompatible',
    sentence: `${craft.name} has no ${direction} radio in ${bands.join(' or ')}.`,
    remedy: 'Choose another band, or add the radio to the spacecraft.',
  };
}

const REMEDIES = {
  direction: 'Choose an antenna that has the other direction.',
  band: 'Choose an antenna that covers the frequency.',
  polarisation: 'Choose an antenna with a matching polarisation.',
  power: 'Choose an antenna that radiates more.',
} as const;
const OBJECTION_CODES = {
  direction: 'incompatible',
  band: 'band',
  polarisation: 'polarisation',
  power: 'power',
} as const;

/** The nearest miss speaks for all radios, since it is the one worth mending. */
function objectionOf(tried: readonly { radio: Radio; verdict: Compatibility }[]): Objection {
  const nearest = tried.reduce((best, each) =>
    each.verdict.reasons.length < best.verdict.reasons.length ? each : best,
  );
  const first = nearest.verdict.reasons[0];
  if (first === undefined) throw new Error('A radio that no band serves must have a reason.');
  return {
    code: OBJECTION_CODES[first.code],
    sentence: nearest.verdict.reasons.map((reason) => reason.sentence).join(' '),
    remedy: REMEDIES[first.code],
  };
}
