/** A link budget that explains itself: every line a label, a figure and where it comes from. */
import { dataRateDb } from './coding.js';
import { fromDb, MINUS_BOLTZMANN_DB, toDb } from './decibel.js';
import { freeSpaceLossDb } from './free-space.js';

/** One direction of a link at one instant. Losses are written as positive dB. */
export interface LinkInputs {
  readonly eirpDbw: number;
  readonly frequencyMhz: number;
  readonly rangeKm: number;
  /** At both ends together. */
  readonly pointingLossDb?: number;
  readonly polarisationLossDb?: number;
  readonly gasLossDb?: number;
  readonly rainLossDb?: number;
  readonly otherLossDb?: number;
  readonly gOverTDbPerK: number;
  readonly dataRateBps: number;
  readonly requiredEbN0Db: number;
  /** What a real demodulator loses against theory. */
  readonly implementationLossDb?: number;
  /** Where the given figures are from, in place of "as entered". */
  readonly sources?: Partial<Record<LinkFigure, string>>;
}

export type LinkFigure =
  | 'eirp'
  | 'pointing'
  | 'polarisation'
  | 'gas'
  | 'rain'
  | 'other'
  | 'gOverT'
  | 'rate'
  | 'required'
  | 'implementation';

export interface BudgetLine {
  readonly label: string;
  /** Signed: what this line adds to the sum above it; sums themselves have `sum` set. */
  readonly valueDb: number;
  readonly unit: 'dBW' | 'dB' | 'dB/K' | 'dBHz';
  readonly source: string;
  readonly sum: boolean;
}

export interface LinkBudget {
  readonly lines: readonly BudgetLine[];
  readonly cn0DbHz: number;
  readonly ebN0Db: number;
  readonly marginDb: number;
}

const AS_ENTERED = 'as entered';

/**
 * Adds a link up: C/N0 = EIRP - losses + G/T - 10 log k, Eb/N0 = C/N0 - 10 log rate, margin = Eb/N0 - needed - losses of
 * the demodulator. Lines of 0 dB are shown too where the figure was given, since "none" is an answer.
 * Sources: free space ITU-R P.525; the sum itself is common practice.
 */
export function linkBudget(inputs: LinkInputs): LinkBudget {
  const ledger = new Ledger(inputs.sources ?? {});
  ledger.add('Radiated power (EIRP)', inputs.eirpDbw, 'dBW', 'eirp');
  ledger.lose('Pointing loss', inputs.pointingLossDb, 'pointing');
  ledger.line('Free-space loss', -freeSpaceLossDb(inputs), 'dB', `ITU-R P.525, ${describePath(inputs)}`);
  ledger.lose('Absorption by gases', inputs.gasLossDb, 'gas');
  ledger.lose('Rain', inputs.rainLossDb, 'rain');
  ledger.lose('Polarisation loss', inputs.polarisationLossDb, 'polarisation');
  ledger.lose('Other losses', inputs.otherLossDb, 'other');
  ledger.add('Receiver G/T', inputs.gOverTDbPerK, 'dB/K', 'gOverT');
  ledger.line("Boltzmann's constant", MINUS_BOLTZMANN_DB, 'dB', 'CODATA 2018');
  const cn0DbHz = ledger.sum('Carrier to noise density (C/N0)', 'dBHz');
  ledger.add('Data rate', -dataRateDb(inputs.dataRateBps), 'dB', 'rate');
  const ebN0Db = ledger.sum('Energy a bit to noise density (Eb/N0)', 'dB');
  ledger.lose('Needed Eb/N0', inputs.requiredEbN0Db, 'required');
  ledger.lose('Demodulator loss', inputs.implementationLossDb, 'implementation');
  const marginDb = ledger.sum('Margin', 'dB');
  return { lines: ledger.lines, cn0DbHz, ebN0Db, marginDb };
}

class Ledger {
  readonly lines: BudgetLine[] = [];
  private total = 0;

  constructor(private readonly sources: Partial<Record<LinkFigure, string>>) {}

  line(label: string, valueDb: number, unit: BudgetLine['unit'], source: string): void {
    this.total += valueDb;
    this.lines.push({ label, valueDb, unit, source, sum: false });
  }

  add(label: string, valueDb: number, unit: BudgetLine['unit'], figure: LinkFigure): void {
    this.line(label, valueDb, unit, this.sources[figure] ?? AS_ENTERED);
  }

  lose(label: string, lossDb: number | undefined, figure: LinkFigure): void {
    if (lossDb !== undefined) this.add(label, -lossDb, 'dB', figure);
  }

  sum(label: string, unit: BudgetLine['unit']): number {
    this.lines.push({ label, valueDb: this.total, unit, source: 'sum of the lines above', sum: true });
    return this.total;
  }
}

function describePath(link: { frequencyMhz: number; rangeKm: number }): string {
  return `${link.frequencyMhz} MHz over ${Math.round(link.rangeKm)} km`;
}

/** C/N0 of hops in a row (a transponder that repeats noise and all): the inverses of the ratios add. */
export function combinedCn0DbHz(hopsDbHz: readonly number[]): number {
  return -toDb(hopsDbHz.reduce((sum, hop) => sum + fromDb(-hop), 0));
}

/** G/T in dB/K of a gain in dBi and a system noise temperature in K. */
export function gOverTDbPerK(gainDbi: number, systemNoiseK: number): number {
  return gainDbi - toDb(systemNoiseK);
}

/** EIRP in dBW of a transmitter's power in W, its antenna's gain in dBi and the loss of the line between. */
export function eirpDbw(transmitter: { powerW: number; gainDbi: number; lineLossDb: number }): number {
  return toDb(transmitter.powerW) + transmitter.gainDbi - transmitter.lineLossDb;
}
