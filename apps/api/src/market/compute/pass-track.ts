/** A pass in detail: its track, the Sun along it, light on the spacecraft, and the link of each radio. */
import {
  dopplerHz,
  illumination,
  type LightInterval,
  type LookAngles,
  lightIntervals,
  linkAlongPass,
  lookAngles,
  type Polarisation,
  sunDirection,
  sunInterference,
  sunPositionTemeKm,
  type TrajectorySource,
  uplinkMarginDb,
} from '@skyberth/orbit';
import type { AntennaBand, Need, PassDetail, Radio } from '@skyberth/shared';
import type { AntennaInput, CraftInput, PassTrack } from '../workers/job-types.js';
import { radiosFor, serving } from './objections.js';
import type { Stay } from './stay.js';

/** Instants of the track besides its beginning; a curve of a page's width needs no more. */
const TRACK_STEPS = 160;
/** Nearer than this to the Sun a receive chain may be damaged. Common practice, no source. */
export const SUN_KEEP_OFF_DEG = 5;

type Link = PassDetail['links'][number];

export interface TrackQuestion {
  readonly craft: CraftInput;
  readonly antenna: AntennaInput;
  readonly source: TrajectorySource;
  readonly part: Stay;
  readonly need: Need;
  readonly bands: readonly string[];
}

export function trackOf(question: TrackQuestion): PassTrack {
  const { craft, antenna, source, part, need, bands } = question;
  const looks = looksAlong(source, antenna, part, (part.losMs - part.aosMs) / TRACK_STEPS);
  const highest = lookAngles(source, antenna.site, part.tcaMs);
  const sun = sunDirection(antenna.site, part.tcaMs);
  const interference = sunInterference(looks, antenna.site, SUN_KEEP_OFF_DEG);
  return {
    track: looks.map((look) => ({
      timeUtc: utc(look.timeMs),
      azimuthDeg: rounded(look.azimuthDeg, 4) % 360,
      elevationDeg: rounded(look.elevationDeg, 4),
      rangeKm: rounded(look.rangeKm, 3),
      rangeRateKmPerS: rounded(look.rangeRateKmPerS, 6),
      sunlit: rounded(lightAt(source, look.timeMs), 3),
    })),
    sun: {
      azimuthDeg: rounded(sun.azimuthDeg, 2),
      elevationDeg: rounded(sun.elevationDeg, 2),
      closestDeg: interference.closestDeg === undefined ? null : rounded(interference.closestDeg, 2),
      keepOffDeg: SUN_KEEP_OFF_DEG,
    },
    illumination: lightPhrase(lightIntervals(source, part.aosMs, part.losMs)),
    links: radiosFor(craft, need, bands).map((radio) => linkOf(radio, antenna, looks, highest)),
  };
}

const utc = (timeMs: number): string => new Date(Math.round(timeMs)).toISOString();

const rounded = (value: number, decimals: number): number => Math.round(value * 10 ** decimals) / 10 ** decimals;

export function looksAlong(source: TrajectorySource, antenna: AntennaInput, part: Stay, stepMs: number): LookAngles[] {
  const steps = Math.max(1, Math.round((part.losMs - part.aosMs) / stepMs));
  return Array.from({ length: steps + 1 }, (_, i) =>
    lookAngles(source, antenna.site, Math.round(part.aosMs + (i * (part.losMs - part.aosMs)) / steps)),
  );
}

const state = new Float64Array(6);
function lightAt(source: TrajectorySource, timeMs: number): number {
  source.stateTeme(timeMs, state);
  return illumination(state, sunPositionTemeKm(timeMs)).sunlitFraction;
}

/** `sunlit`, `eclipsed`, or when it changes. The minute of penumbra counts as eclipsed: the power is already falling. */
export function lightPhrase(intervals: readonly LightInterval[]): string {
  const lit: { readonly fromMs: number; readonly sunlit: boolean }[] = [];
  for (const each of intervals) {
    const sunlit = each.state === 'sunlit';
    if (lit.at(-1)?.sunlit !== sunlit) lit.push({ fromMs: each.fromMs, sunlit });
  }
  const word = (sunlit: boolean): string => (sunlit ? 'sunlit' : 'eclipsed');
  const clock = (timeMs: number): string => utc(timeMs).slice(11, 19);
  const [first, second] = lit;
  if (first === undefined) return 'not known';
  if (second === undefined) return word(first.sunlit);
  return lit
    .slice(1)
    .map((each) => `${word(each.sunlit)} from ${clock(each.fromMs)}`)
    .join(', ');
}

function linkOf(radio: Radio, antenna: AntennaInput, looks: readonly LookAngles[], highest: LookAngles): Link {
  const { verdict, band } = serving(radio, antenna);
  const base = {
    radioName: radio.name,
    direction: radio.direction,
    band: radio.band,
    frequencyMhz: radio.centreFrequencyMhz,
    dopplerHz: looks.map((look) => rounded(dopplerHz(radio.centreFrequencyMhz * 1e6, look.rangeRateKmPerS), 1)),
  };
  const nothing = { ...base, marginDb: [], volumeBits: null, budgetAtHighest: [] };
  if (band === null) return { ...nothing, note: verdict.reasons.map((reason) => reason.sentence).join(' ') };
  const lossDb = verdict.polarisationLossDb ?? 0;
  return radio.direction === 'downlink'
    ? downlink(radio, antenna, band, lossDb, looks, highest, base)
    : uplink(radio, band, lossDb, looks, base);
}

type Base = Pick<Link, 'radioName' | 'direction' | 'band' | 'frequencyMhz' | 'dopplerHz'>;

function downlink(
  radio: Radio,
  antenna: AntennaInput,
  band: AntennaBand,
  polarisationLossDb: number,
  looks: readonly LookAngles[],
  highest: LookAngles,
  base: Base,
): Link {
  const { eirpDbw, requiredEbN0Db } = radio;
  if (eirpDbw === null || requiredEbN0Db === null || band.gOverTDbK === null) {
    const missing = eirpDbw === null ? 'EIRP' : requiredEbN0Db === null ? 'needed Eb/N0' : 'G/T';
    return {
      ...base,
      marginDb: [],
      volumeBits: null,
      budgetAtHighest: [],
      note: `No margin: ${missing} is not on file.`,
    };
  }
  const link = {
    radio: { ...radio, polarisation: radio.polarisation as Polarisation, eirpDbw, requiredEbN0Db },
    antenna: { gOverTDbPerK: band.gOverTDbK, polarisationLossDb },
    site: antenna.site,
  };
  const along = linkAlongPass({ ...link, track: looks });
  const atHighest = linkAlongPass({ ...link, track: [highest] }).bestBudget;
  return {
    ...base,
    marginDb: along.marginDb.map((margin) => rounded(margin, 2)),
    volumeBits: along.volumeBits,
    budgetAtHighest: (atHighest?.lines ?? []).map(({ label, valueDb, source }) => ({
      label,
      valueDb: rounded(valueDb, 2),
      source,
    })),
    note: 'Clear sky: rain is not reckoned in. Volume while the margin is above 0 dB.',
  };
}

function uplink(
  radio: Radio,
  band: AntennaBand,
  polarisationLossDb: number,
  looks: readonly LookAngles[],
  base: Base,
): Link {
  const { requiredEirpDbw } = radio;
  const none = { ...base, marginDb: [], volumeBits: null, budgetAtHighest: [] };
  if (requiredEirpDbw === null || band.eirpDbw === null)
    return { ...none, note: 'No margin: the EIRP that the spacecraft needs is not on file.' };
  const eirpDbw = band.eirpDbw;
  const margin = (look: LookAngles): number =>
    uplinkMarginDb({ eirpDbw, requiredEirpDbw, polarisationLossDb, rangeKm: look.rangeKm });
  return {
    ...none,
    marginDb: looks.map((look) => rounded(margin(look), 2)),
    note: 'EIRP of the station beyond what the spacecraft asks for at any range of its orbit.',
  };
}
