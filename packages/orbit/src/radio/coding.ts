/**
 * Names of modulations and of the codes of CCSDS 131.0-B, with the Eb/N0 that each needs for one wrong bit in a million.
 * Uncoded figures are worked out from the error formulas of common theory. Those of coded links are read off curves and
 * stand here from memory of CCSDS 130.1-G: good to a few tenths of a dB, meant as a first proposal for an operator who
 * then enters the figure of the own receiver.
 */
import { toDb } from './decibel.js';

export type ModulationName = 'BPSK' | 'QPSK' | 'OQPSK' | 'GMSK' | '8PSK' | 'FSK' | 'PCM/PM';

export interface Modulation {
  readonly name: ModulationName;
  readonly bitsPerSymbol: number;
  /** Coherent binary and quaternary phase shifts share one error curve; the codes' figures are stated for it. */
  readonly antipodal: boolean;
}

export const MODULATIONS: readonly Modulation[] = [
  { name: 'BPSK', bitsPerSymbol: 1, antipodal: true },
  { name: 'QPSK', bitsPerSymbol: 2, antipodal: true },
  { name: 'OQPSK', bitsPerSymbol: 2, antipodal: true },
  { name: 'GMSK', bitsPerSymbol: 1, antipodal: true },
  { name: 'PCM/PM', bitsPerSymbol: 1, antipodal: true },
  { name: '8PSK', bitsPerSymbol: 3, antipodal: false },
  { name: 'FSK', bitsPerSymbol: 1, antipodal: false },
];

export interface Coding {
  readonly name: string;
  /** Information bits a transmitted bit. */
  readonly rate: number;
  /** On a coherent two- or four-phase link; undefined for none, which depends on the modulation. */
  readonly requiredEbN0Db: number | undefined;
}

export const CODINGS: readonly Coding[] = [
  { name: 'none', rate: 1, requiredEbN0Db: undefined },
  { name: 'CCSDS convolutional 1/2', rate: 1 / 2, requiredEbN0Db: 4.8 },
  { name: 'CCSDS convolutional 2/3', rate: 2 / 3, requiredEbN0Db: 5.3 },
  { name: 'CCSDS convolutional 3/4', rate: 3 / 4, requiredEbN0Db: 5.8 },
  { name: 'CCSDS convolutional 7/8', rate: 7 / 8, requiredEbN0Db: 7.2 },
  { name: 'CCSDS Reed-Solomon (255,223)', rate: 223 / 255, requiredEbN0Db: 6.4 },
  { name: 'CCSDS concatenated 1/2 + (255,223)', rate: 223 / 510, requiredEbN0Db: 2.6 },
  { name: 'CCSDS turbo 1/2', rate: 1 / 2, requiredEbN0Db: 1.1 },
  { name: 'CCSDS turbo 1/3', rate: 1 / 3, requiredEbN0Db: 0.4 },
  { name: 'CCSDS turbo 1/4', rate: 1 / 4, requiredEbN0Db: 0.1 },
  { name: 'CCSDS turbo 1/6', rate: 1 / 6, requiredEbN0Db: -0.1 },
  { name: 'CCSDS LDPC 1/2', rate: 1 / 2, requiredEbN0Db: 1.1 },
  { name: 'CCSDS LDPC 2/3', rate: 2 / 3, requiredEbN0Db: 1.8 },
  { name: 'CCSDS LDPC 4/5', rate: 4 / 5, requiredEbN0Db: 2.6 },
  { name: 'CCSDS LDPC 7/8', rate: 223 / 255, requiredEbN0Db: 3.9 },
];

/** The entry of a name as people write it: case, spaces and a leading CCSDS do not matter. */
export function findCoding(name: string): Coding | undefined {
  return CODINGS.find((coding) => bareName(coding.name) === bareName(name));
}

export function findModulation(name: string): Modulation | undefined {
  return MODULATIONS.find((modulation) => bareName(modulation.name) === bareName(name));
}

function bareName(name: string): string {
  return name.toLowerCase().replace(/ccsds|[\s_-]/g, '');
}

export interface SourcedDb {
  readonly valueDb: number;
  readonly source: string;
}

/** Bit error rate that the figures of this file mean. */
export const REFERENCE_BIT_ERROR_RATE = 1e-6;

/**
 * The Eb/N0 to propose for a modulation and coding at one wrong bit in a million, with where it is from;
 * undefined where we know none, so that nobody is given a made-up figure.
 */
export function proposedEbN0Db(modulationName: string, codingName: string): SourcedDb | undefined {
  const modulation = findModulation(modulationName);
  const coding = findCoding(codingName);
  if (modulation === undefined || coding === undefined) return undefined;
  if (coding.requiredEbN0Db === undefined) {
    return {
      valueDb: uncodedEbN0Db(modulation.name, REFERENCE_BIT_ERROR_RATE),
      source: 'error formula of common theory, no implementation loss',
    };
  }
  if (!modulation.antipodal) return undefined;
  return { valueDb: coding.requiredEbN0Db, source: 'from memory of the curves of CCSDS 130.1-G, a few tenths of a dB' };
}

/** Eb/N0 at which an uncoded link makes this share of bit errors, found by halving; for shares of 1e-12 to 0.1. */
export function uncodedEbN0Db(modulation: ModulationName, bitErrorRate: number): number {
  let low = -10;
  let high = 25;
  for (let step = 0; step < 60; step += 1) {
    const middle = (low + high) / 2;
    if (uncodedBitErrorRate(modulation, middle) > bitErrorRate) low = middle;
    else high = middle;
  }
  return (low + high) / 2;
}

/**
 * Share of wrong bits of an uncoded link on white noise. Common theory: coherent phase shift Q(sqrt(2 Eb/N0)), eight
 * phases 2/3 Q(sqrt(6 Eb/N0) sin(pi/8)), frequency shift without phase reference 1/2 exp(-Eb/2N0).
 */
export function uncodedBitErrorRate(modulation: ModulationName, ebN0Db: number): number {
  const ebN0 = 10 ** (ebN0Db / 10);
  if (modulation === 'FSK') return Math.exp(-ebN0 / 2) / 2;
  if (modulation === '8PSK') return (2 / 3) * tailOfGaussian(Math.sqrt(6 * ebN0) * Math.sin(Math.PI / 8));
  return tailOfGaussian(Math.sqrt(2 * ebN0));
}

/**
 * Q(x), the share of a standard normal above x >= 0. Near zero by the series of erf, further out by the continued
 * fraction of Laplace (both: NIST Digital Library of Mathematical Functions 7.6.1 and 7.9.1); relative error under 1e-9.
 */
export function tailOfGaussian(x: number): number {
  if (x < 3) {
    const z = x / Math.SQRT2;
    let term = z;
    let sum = z;
    for (let n = 1; n < 80; n += 1) {
      term *= (-z * z) / n;
      sum += term / (2 * n + 1);
    }
    return (1 - (2 / Math.sqrt(Math.PI)) * sum) / 2;
  }
  let fraction = x;
  for (let n = 80; n >= 1; n -= 1) fraction = x + n / fraction;
  return Math.exp((-x * x) / 2) / (Math.sqrt(2 * Math.PI) * fraction);
}

/** Bandwidth in Hz that a rate fills at one symbol a second a hertz, widened by the filter's roll-off. */
export function occupiedBandwidthHz(link: {
  dataRateBps: number;
  rate: number;
  bitsPerSymbol: number;
  rollOff: number;
}): number {
  return (link.dataRateBps / link.rate / link.bitsPerSymbol) * (1 + link.rollOff);
}

/** 10 log of a data rate, dB(bit/s): what C/N0 loses on the way to Eb/N0. */
export function dataRateDb(dataRateBps: number): number {
  return toDb(dataRateBps);
}
