/** The link over a whole pass: the margin at each instant and the volume that comes down while it is enough. */
import type { LookAngles } from '../types.js';
import { type Polarisation, polarisationTiltDeg } from './antenna.js';
import { type GasColumn, gasColumn } from './atmosphere.js';
import { type LinkBudget, type LinkInputs, linkBudget } from './link-budget.js';
import { gOverTUnderSky } from './noise.js';
import { type RainClimate, rainAttenuationDb } from './rain.js';

export interface PassLink {
  /** Samples of the pass in rising time; a few seconds apart is ample for a margin curve. */
  readonly track: readonly LookAngles[];
  readonly radio: {
    readonly centreFrequencyMhz: number;
    readonly polarisation: Polarisation;
    readonly eirpDbw: number;
    readonly dataRateBps: number;
    readonly requiredEbN0Db: number;
    readonly pointingLossDb: number;
  };
  readonly antenna: {
    readonly gOverTDbPerK: number;
    readonly polarisationLossDb: number;
    readonly pointingLossDb?: number;
    readonly implementationLossDb?: number;
    /** Where the noise behind G/T is known, G/T falls with the sky's noise at low elevation and in rain. */
    readonly systemNoiseK?: number;
  };
  readonly site: { readonly latitudeDeg: number; readonly altitudeM: number };
  /** Rain of the place and the share of the year to be prepared for; none given means clear sky. */
  readonly rain?: RainClimate & { readonly exceedancePercent: number };
  /** The shells above this site at this frequency, where the caller keeps them for many passes. */
  readonly gas?: GasColumn;
  /** Margin that counts as received, dB; 0 if left out. */
  readonly thresholdDb?: number;
}

export interface PassLinkResult {
  readonly marginDb: readonly number[];
  readonly ebN0Db: readonly number[];
  /** Whole bits of information received while the margin is at the threshold or above. */
  readonly volumeBits: number;
  readonly aboveThresholdMs: number;
  /** The written-out budget at the instant of greatest margin; undefined for an empty track. */
  readonly bestBudget: LinkBudget | undefined;
}

/** Computes the link at each sample; between two samples the margin is taken as a straight line. */
export function linkAlongPass(question: PassLink): PassLinkResult {
  const inputsAt = linkInputsAlong(question);
  const budgets = question.track.map((look) => linkBudget(inputsAt(look)));
  const marginDb = budgets.map((budget) => budget.marginDb);
  const timesMs = question.track.map((look) => look.timeMs);
  const aboveThresholdMs = timeAbove(timesMs, marginDb, question.thresholdDb ?? 0);
  const best = marginDb.reduce((bestIndex, margin, index) => (margin > marginDb[bestIndex]! ? index : bestIndex), 0);
  return {
    marginDb,
    ebN0Db: budgets.map((budget) => budget.ebN0Db),
    volumeBits: Math.floor((aboveThresholdMs / 1000) * question.radio.dataRateBps),
    aboveThresholdMs,
    bestBudget: budgets[best],
  };
}

/** One function for a pass: the shells of the atmosphere are prepared once, or given. */
function linkInputsAlong({
  radio,
  antenna,
  site,
  rain,
  gas,
}: Omit<PassLink, 'track'>): (look: LookAngles) => LinkInputs {
  const column = gas ?? gasColumn({ frequencyMhz: radio.centreFrequencyMhz, altitudeM: site.altitudeM });
  const clearZenithDb = column.slantDb(90);
  const sources = {
    gas: 'ITU-R P.676-12 in the reference atmosphere of P.835, straight ray',
    ...(rain && {
      rain: `ITU-R P.618-13, exceeded ${rain.exceedancePercent} % of the year at ${rain.rainRateMmPerH} mm/h`,
    }),
  };
  return (look) => {
    const gasLossDb = column.slantDb(look.elevationDeg);
    const rainLossDb = rain && rainLossAt(look, radio, site, rain);
    return {
      eirpDbw: radio.eirpDbw,
      frequencyMhz: radio.centreFrequencyMhz,
      rangeKm: look.rangeKm,
      pointingLossDb: radio.pointingLossDb + (antenna.pointingLossDb ?? 0),
      polarisationLossDb: antenna.polarisationLossDb,
      gasLossDb,
      ...(rainLossDb !== undefined && { rainLossDb }),
      gOverTDbPerK:
        antenna.systemNoiseK === undefined
          ? antenna.gOverTDbPerK
          : gOverTUnderSky({
              gOverTDbPerK: antenna.gOverTDbPerK,
              systemNoiseK: antenna.systemNoiseK,
              statedAttenuationDb: clearZenithDb,
              attenuationDb: gasLossDb + (rainLossDb ?? 0),
            }),
      dataRateBps: radio.dataRateBps,
      requiredEbN0Db: radio.requiredEbN0Db,
      ...(antenna.implementationLossDb !== undefined && { implementationLossDb: antenna.implementationLossDb }),
      sources,
    };
  };
}

function rainLossAt(
  look: LookAngles,
  radio: PassLink['radio'],
  site: PassLink['site'],
  rain: NonNullable<PassLink['rain']>,
): number {
  return rainAttenuationDb({
    frequencyGhz: radio.centreFrequencyMhz / 1000,
    elevationDeg: Math.max(0, look.elevationDeg),
    polarisationTiltDeg: polarisationTiltDeg(radio.polarisation),
    latitudeDeg: site.latitudeDeg,
    stationHeightKm: site.altitudeM / 1000,
    rainRateMmPerH: rain.rainRateMmPerH,
    rainHeightKm: rain.rainHeightKm,
    exceedancePercent: rain.exceedancePercent,
  });
}

/** Milliseconds during which a broken line lies at or above a level. */
export function timeAbove(timesMs: readonly number[], values: readonly number[], level: number): number {
  let sumMs = 0;
  for (let i = 1; i < timesMs.length; i += 1) {
    const spanMs = timesMs[i]! - timesMs[i - 1]!;
    const from = values[i - 1]! - level;
    const to = values[i]! - level;
    if (from >= 0 && to >= 0) sumMs += spanMs;
    else if (from >= 0 || to >= 0) sumMs += spanMs * (Math.max(from, to) / Math.abs(to - from));
  }
  return sumMs;
}

/**
 * Uplink margin in dB at an instant: EIRP that the station has beyond what the spacecraft asked for, less what is lost
 * on the way. The spacecraft's figure is taken as stated for `statedRangeKm`; nearer than that is a gain.
 */
export function uplinkMarginDb(link: {
  eirpDbw: number;
  requiredEirpDbw: number;
  polarisationLossDb: number;
  rangeKm: number;
  statedRangeKm?: number;
}): number {
  const nearerDb = link.statedRangeKm === undefined ? 0 : 20 * Math.log10(link.statedRangeKm / link.rangeKm);
  return link.eirpDbw - link.requiredEirpDbw - link.polarisationLossDb + nearerDb;
}
