/** Asks the engine about one pass, for offers, details and booked contacts alike. */
import { Inject, Injectable } from '@nestjs/common';
import type { Need } from '@skyberth/shared';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import { DomainError } from '../platform/domain-error.js';
import type { SaleAntenna } from '../stations/antenna-catalogue.js';
import { MarketInputs, type Period } from './market-inputs.js';
import type { AntennaInput, CraftInput, ElementsSpan, PassOutcome } from './workers/job-types.js';
import { PASS_ENGINE, type PassEngine } from './workers/pass-engine.js';

export interface PassQuestion {
  readonly operatorId: string;
  readonly spacecraftId: string;
  readonly antennaId: string;
  readonly need: Need;
  readonly bands: readonly string[];
  readonly aosMs: number;
  readonly losMs: number;
  readonly withTrack: boolean;
  readonly booked: boolean;
}

/** What was asked of the engine, and its answer. */
export interface PassAnswer {
  readonly outcome: Extract<PassOutcome, { kind: 'pass' }>;
  readonly span: ElementsSpan;
  readonly craft: CraftInput;
  readonly sale: SaleAntenna;
  readonly antenna: AntennaInput;
  readonly nowMs: number;
}

/** Everything within a day of the pass may bear on it, and the pass may begin or end a day outside the request. */
const ABOUT_MS = 2 * 86_400_000;
/** The longest request: a contact is never longer (the table of bookings checks it). */
const LONGEST_MS = 700_000_000;

@Injectable()
export class PassFinder {
  constructor(
    private readonly inputs: MarketInputs,
    @Inject(PASS_ENGINE) private readonly engine: PassEngine,
    @Inject(CLOCK) private readonly clock: ClockPort,
  ) {}

  /**
   * Throws `bad-input` for a stretch that cannot be, `not-found` for someone else's spacecraft or an unknown antenna,
   * `elements-unusable`, and `not-for-sale` where there is no such pass at all.
   */
  async find(question: PassQuestion): Promise<PassAnswer> {
    const { operatorId, spacecraftId, antennaId, aosMs, losMs } = question;
    if (!(losMs > aosMs)) throw new DomainError('bad-input', 'A contact must end after it begins.');
    if (losMs - aosMs > LONGEST_MS) throw new DomainError('bad-input', 'A contact lasts at most eight days.');
    const period: Period = { fromMs: aosMs - ABOUT_MS, toMs: losMs + ABOUT_MS };
    const [craft] = this.inputs.craft(operatorId, [spacecraftId], period);
    if (craft === undefined) throw new Error('A spacecraft that was found must be among the answers.');
    const sale = this.inputs.antenna(antennaId, period);
    const [antenna] = this.inputs.forEngine(operatorId, [sale], period);
    if (antenna === undefined) throw new Error('An antenna that was found must be among the answers.');
    if (craft.spans.length === 0)
      throw new DomainError('elements-unusable', `${craft.name} has no elements yet. Paste or upload a set first.`);
    const nowMs = this.clock.nowMs();
    const { need, bands, withTrack, booked } = question;
    const outcome = await this.engine.run(
      { kind: 'pass', nowMs, need, bands, aosMs, losMs, spacecraft: craft, antenna, withTrack, booked },
      antenna.id,
    );
    if (outcome.kind === 'elements unusable') throw new DomainError('elements-unusable', outcome.sentence);
    if (outcome.kind === 'no pass')
      throw new DomainError(
        'not-for-sale',
        outcome.reasons.map((reason) => `${reason.sentence} ${reason.remedy ?? ''}`.trim()).join(' '),
      );
    const span = craft.spans.find((each) => each.elementSetId === outcome.elementSetId);
    if (span === undefined) throw new Error('The engine used elements that it was not given.');
    return { outcome, span, craft, sale, antenna, nowMs };
  }
}
