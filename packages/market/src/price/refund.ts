/** The cancellation ladder: what an operator gets back, and the steps as they are drawn. */
import { MarketError } from '../market-error.js';
import { HOUR_MS } from '../time/local-time.js';
import type { LadderStep } from './price-types.js';
import { validateLadder } from './validate-price-card.js';

export interface RefundStepAt {
  readonly refundPercent: number;
  readonly hoursBeforeAos: number;
  /** The last instant at which it still holds; `null` for what holds after the last step. */
  readonly untilMs: number | null;
  readonly now: boolean;
}

export interface Refund {
  readonly refundPercent: number;
  /** Nearest minor unit, halves up: the odd half goes to the operator. */
  readonly amountMinor: number;
  /** What the operator pays all the same. */
  readonly keptMinor: number;
  /** The next instant after which less comes back; `null` when nothing is left to lose. */
  readonly nextStepMs: number | null;
  /** From most to least, closing with the zero that holds after the last step unless the ladder itself ends at AOS. */
  readonly steps: readonly RefundStepAt[];
}

/**
 * A cancellation at `cancelMs` of a contact that begins at `aosMs` and cost `paidMinor`. A step holds to its very instant:
 * exactly 24 h before AOS still counts as 24 h. From AOS on nothing comes back by cancelling. Throws `bad ladder`.
 */
export function refund(input: {
  readonly ladder: readonly LadderStep[];
  readonly aosMs: number;
  readonly cancelMs: number;
  readonly paidMinor: number;
}): Refund {
  const { ladder, aosMs, cancelMs, paidMinor } = input;
  const fault = validateLadder(ladder)[0];
  if (fault !== undefined) throw new MarketError('bad ladder', fault.sentence);
  if (!Number.isSafeInteger(paidMinor) || paidMinor < 0)
    throw new MarketError(
      'bad ladder',
      `The amount paid is ${paidMinor}; it must be whole minor units, not below zero.`,
      { paidMinor },
    );
  const dated = ladder.map((step) => ({ ...step, untilMs: aosMs - step.hoursBeforeAos * HOUR_MS }));
  // A step of 0 h would still hold at AOS itself, when the contact has begun and can no longer be cancelled.
  const current = cancelMs >= aosMs ? -1 : dated.findIndex((step) => cancelMs <= step.untilMs);
  const refundPercent = dated[current]?.refundPercent ?? 0;
  const steps: RefundStepAt[] = dated.map((step, index) => ({ ...step, now: index === current }));
  if ((dated.at(-1)?.refundPercent ?? 0) > 0)
    steps.push({ refundPercent: 0, hoursBeforeAos: 0, untilMs: null, now: current < 0 });
  else if (current < 0 && steps.length > 0) steps[steps.length - 1] = { ...(steps.at(-1) as RefundStepAt), now: true };
  const amountMinor = Number((BigInt(paidMinor) * BigInt(Math.round(refundPercent * 100)) + 5_000n) / 10_000n);
  return {
    refundPercent,
    amountMinor,
    keptMinor: paidMinor - amountMinor,
    nextStepMs: refundPercent > 0 ? Math.min(dated[current]?.untilMs ?? aosMs, aosMs) : null,
    steps,
  };
}
