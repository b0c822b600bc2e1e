/** What a booked contact becomes by newer elements: the same pass found by both sets, and the booked stretch carried over. */
import { Inject, Injectable } from '@nestjs/common';
import type { PassGeometry } from '@skyberth/shared';
import type { BookingRow } from '../bookings/bookings.repository.js';
import { MarketInputs } from '../market/market-inputs.js';
import type { AntennaInput, CraftInput, PassOutcome } from '../market/workers/job-types.js';
import { PASS_ENGINE, type PassEngine } from '../market/workers/pass-engine.js';
import type { KeptElements } from '../spacecraft/elements.service.js';

/** A pass that newer elements move further than this is another pass; a low orbit's next one is 90 minutes off. */
export const MOST_SHIFT_MS = 20 * 60_000;
/** Ends on the wire are whole milliseconds, so an end that lies this near the pass's own end is that end. */
const SAME_END_MS = 5;

export interface Carried {
  readonly aosMs: number;
  readonly tcaMs: number;
  readonly losMs: number;
  readonly pass: PassGeometry;
}

interface Ends {
  readonly aosMs: number;
  readonly losMs: number;
}

type Booked = Pick<BookingRow, 'operatorId' | 'spacecraftId' | 'antennaId' | 'need' | 'aosMs' | 'losMs'>;

@Injectable()
export class DriftGeometry {
  constructor(
    private readonly inputs: MarketInputs,
    @Inject(PASS_ENGINE) private readonly engine: PassEngine,
  ) {}

  /**
   * The booked stretch by `newer` elements, where it was sold by `sold`: an end that was the pass's own end is its end
   * again, one inside the pass moves with its highest point. Null where the pass is lost. Throws where elements can't be used.
   */
  async carry(booking: Booked, sold: KeptElements, newer: KeptElements): Promise<Carried | null> {
    const before = await this.passBy(booking, sold, booking);
    const after = (await this.passBy(booking, newer, booking)) ?? (await this.passBy(booking, newer, widened(booking)));
    if (after === null) return null;
    const ends = carriedEnds(booking, before, after);
    if (ends === null) return null;
    const outcome = await this.ask(booking, newer, ends);
    if (outcome.kind !== 'pass') return null;
    const { aosMs, tcaMs, losMs, part } = outcome;
    return { aosMs: Math.ceil(aosMs), tcaMs: Math.round(tcaMs), losMs: Math.floor(losMs), pass: part };
  }

  private async passBy(booking: Booked, elements: KeptElements, ends: Ends): Promise<WholePass | null> {
    const outcome = await this.ask(booking, elements, ends);
    if (outcome.kind === 'elements unusable') throw new Error(outcome.sentence);
    if (outcome.kind === 'no pass') return null;
    const { aosUtc, tcaUtc, losUtc } = outcome.pass;
    return { aosMs: Date.parse(aosUtc), tcaMs: Date.parse(tcaUtc), losMs: Date.parse(losUtc) };
  }

  private ask(booking: Booked, elements: KeptElements, ends: Ends): Promise<PassOutcome> {
    const period = { fromMs: ends.aosMs, toMs: ends.losMs };
    const [craft] = this.inputs.craft(booking.operatorId, [booking.spacecraftId], period);
    const [antenna] = this.inputs.forEngine(
      booking.operatorId,
      [this.inputs.antenna(booking.antennaId, period)],
      period,
    );
    if (craft === undefined || antenna === undefined) throw new Error('What is booked must be among the answers.');
    return this.engine.run(jobFor({ booking, craft: flownBy(craft, elements), antenna, ends }), antenna.id);
  }
}

interface WholePass extends Ends {
  readonly tcaMs: number;
}

/** The booked ends by the newer pass, cut to it; null where nothing of them is left. */
export function carriedEnds(booked: Ends, before: WholePass | null, after: WholePass): Ends | null {
  const whole = before ?? { ...booked, tcaMs: (booked.aosMs + booked.losMs) / 2 };
  const byMs = after.tcaMs - whole.tcaMs;
  const isAos = Math.abs(booked.aosMs - whole.aosMs) <= SAME_END_MS;
  const isLos = Math.abs(booked.losMs - whole.losMs) <= SAME_END_MS;
  const aosMs = isAos ? after.aosMs : Math.max(after.aosMs, booked.aosMs + byMs);
  const losMs = isLos ? after.losMs : Math.min(after.losMs, booked.losMs + byMs);
  return losMs > aosMs ? { aosMs: Math.ceil(aosMs), losMs: Math.floor(losMs) } : null;
}

const widened = ({ aosMs, losMs }: Ends): Ends => ({ aosMs: aosMs - MOST_SHIFT_MS, losMs: losMs + MOST_SHIFT_MS });

/** The spacecraft with this one element set, whenever the pass is, and with none of the operator's own ephemerides. */
const flownBy = (craft: CraftInput, { id, digest, elementSet }: KeptElements): CraftInput => ({
  ...craft,
  spans: [
    {
      fromMs: Number.NEGATIVE_INFINITY,
      toMs: Number.POSITIVE_INFINITY,
      elementSetId: id,
      digest,
      elementSet,
      ephemerides: [],
    },
  ],
});

const jobFor = (of: { booking: Booked; craft: CraftInput; antenna: AntennaInput; ends: Ends }) => ({
  kind: 'pass' as const,
  nowMs: of.ends.aosMs,
  need: of.booking.need,
  bands: [],
  aosMs: of.ends.aosMs,
  losMs: of.ends.losMs,
  spacecraft: of.craft,
  antenna: of.antenna,
  withTrack: false,
  booked: true,
});
