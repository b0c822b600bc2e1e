/** Whether an antenna can serve a spacecraft's radio at all, and if not, every reason in words with figures. */
import { bestPolarisation, type Polarisation } from './antenna.js';

export interface CompatibilityRadio {
  readonly direction: 'downlink' | 'uplink';
  readonly centreFrequencyMhz: number;
  readonly bandwidthKhz: number;
  readonly polarisation: Polarisation;
  /** Uplink only: the least EIRP that the spacecraft needs. */
  readonly requiredEirpDbw?: number | null;
}

export interface CompatibilityBand {
  readonly direction: 'receive' | 'transmit';
  readonly fromMhz: number;
  readonly toMhz: number;
  readonly polarisations: readonly Polarisation[];
  readonly eirpDbw?: number | null;
}

export type IncompatibilityCode = 'direction' | 'band' | 'polarisation' | 'power';

export interface Incompatibility {
  readonly code: IncompatibilityCode;
  readonly sentence: string;
}

export interface Compatibility {
  readonly ok: boolean;
  /** Place in the given bands of the one that serves, or undefined. */
  readonly bandIndex: number | undefined;
  /** Polarisation loss with the chosen band, dB. */
  readonly polarisationLossDb: number | undefined;
  readonly reasons: readonly Incompatibility[];
}

/**
 * Looks for the band that serves a radio: right direction, the whole occupied bandwidth inside, a polarisation that is
 * not the opposite one, and for an uplink enough EIRP after polarisation loss. Of several the one with least loss.
 * If none serves, the reasons are those of the band that fails least.
 */
export function compatibility(question: {
  radio: CompatibilityRadio;
  bands: readonly CompatibilityBand[];
}): Compatibility {
  const { radio, bands } = question;
  const wanted = radio.direction === 'downlink' ? 'receive' : 'transmit';
  const tried = bands
    .map((band, bandIndex) => ({ band, bandIndex, ...trial(radio, band) }))
    .filter(({ band }) => band.direction === wanted);
  if (tried.length === 0) {
    return { ok: false, bandIndex: undefined, polarisationLossDb: undefined, reasons: [noDirection(radio)] };
  }
  tried.sort((a, b) => severity(a) - severity(b) || (a.lossDb ?? 0) - (b.lossDb ?? 0) || a.bandIndex - b.bandIndex);
  const best = tried[0]!;
  const ok = best.reasons.length === 0;
  return {
    ok,
    bandIndex: ok ? best.bandIndex : undefined,
    polarisationLossDb: ok ? best.lossDb : undefined,
    reasons: best.reasons,
  };
}

/** A wrong frequency is further from serving than a wrong polarisation, and that than missing power. */
function severity(outcome: { reasons: readonly Incompatibility[] }): number {
  const weight: Record<IncompatibilityCode, number> = { direction: 8, band: 4, polarisation: 2, power: 1 };
  return outcome.reasons.reduce((sum, { code }) => sum + weight[code], 0);
}

function trial(
  radio: CompatibilityRadio,
  band: CompatibilityBand,
): { reasons: Incompatibility[]; lossDb: number | undefined } {
  const reasons: Incompatibility[] = [];
  const halfMhz = radio.bandwidthKhz / 2000;
  const lowMhz = radio.centreFrequencyMhz - halfMhz;
  const highMhz = radio.centreFrequencyMhz + halfMhz;
  const verb = band.direction === 'receive' ? 'receives' : 'transmits';
  if (lowMhz < band.fromMhz || highMhz > band.toMhz) {
    reasons.push({
      code: 'band',
      sentence: `The radio fills ${mhz(lowMhz)} to ${mhz(highMhz)} MHz and the antenna ${verb} ${mhz(band.fromMhz)} to ${mhz(band.toMhz)} MHz.`,
    });
  }
  const match = bestPolarisation(radio.polarisation, band.polarisations);
  if (match === undefined) {
    reasons.push({
      code: 'polarisation',
      sentence: `The radio is ${named(radio.polarisation)} and the antenna offers ${list(band.polarisations.map(named))} there.`,
    });
  }
  const power = band.direction === 'transmit' ? missingPower(radio, band, match?.lossDb ?? 0) : undefined;
  if (power !== undefined) reasons.push(power);
  return { reasons, lossDb: match?.lossDb };
}

function missingPower(
  radio: CompatibilityRadio,
  band: CompatibilityBand,
  polarisationLossDb: number,
): Incompatibility | undefined {
  if (radio.requiredEirpDbw == null || band.eirpDbw == null) return undefined;
  const reachedDbw = band.eirpDbw - polarisationLossDb;
  if (reachedDbw >= radio.requiredEirpDbw) return undefined;
  const loss = polarisationLossDb > 0 ? ` after ${polarisationLossDb.toFixed(1)} dB polarisation loss` : '';
  return {
    code: 'power',
    sentence: `The spacecraft needs ${radio.requiredEirpDbw.toFixed(1)} dBW EIRP and the antenna radiates ${reachedDbw.toFixed(1)} dBW${loss}.`,
  };
}

function noDirection(radio: CompatibilityRadio): Incompatibility {
  const [does, wants] = radio.direction === 'downlink' ? ['receive', 'a downlink'] : ['transmit', 'an uplink'];
  return { code: 'direction', sentence: `The antenna does not ${does} and the radio is ${wants}.` };
}

function named(polarisation: Polarisation): string {
  if (polarisation === 'right') return 'right-hand circular';
  return polarisation === 'left' ? 'left-hand circular' : polarisation;
}

function list(words: readonly string[]): string {
  if (words.length === 0) return 'none';
  return words.length === 1 ? `only ${words[0]!}` : `only ${words.slice(0, -1).join(', ')} and ${words.at(-1)!}`;
}

/** Frequencies to the hertz, without trailing zeros. */
function mhz(value: number): string {
  return String(Number(value.toFixed(6)));
}
