/** When an antenna is open: rules and one-off openings together, and blackouts that close it again. */
import { type Interval, mergeIntervals, subtractIntervals } from '../interval.js';
import type { OfferBlackout } from '../offers/offer-types.js';
import { type AvailabilityRule, expandRules, ruleInstances } from './rules.js';

/** A blackout that comes again, such as a weekly greasing of the bearings. */
export interface BlackoutRule extends AvailabilityRule {
  readonly reason: string;
}

const cut = (each: Interval, fromMs: number, toMs: number): Interval => ({
  fromMs: Math.max(each.fromMs, fromMs),
  toMs: Math.min(each.toMs, toMs),
});

/** Open time in `[fromMs, toMs)`, blackouts not yet taken off: offers need them apart, to say why. */
export function openIntervals(input: {
  readonly rules: readonly AvailabilityRule[];
  readonly openings: readonly Interval[];
  readonly fromMs: number;
  readonly toMs: number;
}): Interval[] {
  const { fromMs, toMs } = input;
  return mergeIntervals([
    ...expandRules(input.rules, fromMs, toMs),
    ...input.openings.map((each) => cut(each, fromMs, toMs)),
  ]);
}

/** Every blackout that touches `[fromMs, toMs)`, uncut and with its reason, sorted by beginning. */
export function blackoutIntervals(input: {
  readonly rules: readonly BlackoutRule[];
  readonly once: readonly OfferBlackout[];
  readonly fromMs: number;
  readonly toMs: number;
}): OfferBlackout[] {
  const { fromMs, toMs } = input;
  const repeated = input.rules.flatMap((rule) =>
    ruleInstances(rule, fromMs, toMs).map((each) => ({ ...each, reason: rule.reason })),
  );
  return [...repeated, ...input.once.filter((each) => each.fromMs < toMs && each.toMs > fromMs)].sort(
    (a, b) => a.fromMs - b.fromMs,
  );
}

/** Open and not blacked out: what a calendar shows as free. */
export const sellableIntervals = (open: readonly Interval[], blackouts: readonly Interval[]): Interval[] =>
  subtractIntervals(open, blackouts);
