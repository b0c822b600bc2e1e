/** From a need and candidates to the cheapest plan, with proof, what binds, and what cannot be met. */
import { costSum } from './assemble.js';
import { bindingFindings } from './binding.js';
import { needFaults } from './check-need.js';
import { type CraftFigures, clash, figuresOf, sumsOf } from './check-plan.js';
import { greedyPlan } from './greedy.js';
import { PlannerError } from './planner-error.js';
import { type Found, type PlanProgress, planGivingWay, strictPlan } from './search-plan.js';
import type { Candidate, Finding, MoneyWriter, PlanNeed, Solve } from './types.js';
import { instantText } from './words.js';

export interface PlanQuestion {
  readonly need: PlanNeed;
  readonly candidates: readonly Candidate[];
  readonly solve: Solve;
  /** The currency in which costs are compared; its rate is 1. */
  readonly baseCurrency: string;
  readonly money: MoneyWriter;
  readonly stationName: (stationId: string) => string;
  /** How near to the cheapest is near enough, such as 0.01. */
  readonly targetGap: number;
  /** Seconds until an answer is wanted; asked again and again. */
  readonly secondsLeft: () => number;
  readonly onProgress?: (progress: PlanProgress) => void;
}

export interface PlanResult {
  /** `partly`: something of the need gave way, and `unmet` says what; `none`: no plan was found in the time. */
  readonly status: 'met' | 'partly' | 'none';
  /** By AOS, with the contacts that were had before. */
  readonly chosen: readonly Candidate[];
  /** Of the new contacts, by currency. */
  readonly sums: readonly { readonly currency: string; readonly amountMinor: number }[];
  readonly figures: readonly CraftFigures[];
  /** Cost and lower bound at planning rates, preferences included, in major units of the base currency. */
  readonly cost: number;
  readonly bound: number;
  /** At most so much of the cost could be saved, 0 to 1; 0 means proven cheapest. */
  readonly gap: number;
  /** Whether the bound holds over everything on offer, and not only over what was looked at. */
  readonly proven: boolean;
  readonly unmet: readonly Finding[];
  readonly binding: readonly Finding[];
  /** Pinned passes that are not for sale any more. */
  readonly lostIds: readonly string[];
  readonly considered: number;
  readonly offered: number;
  /** What taking the cheapest pass that helps, again and again, would cost; null where that gets stuck. */
  readonly greedyCost: number | null;
}

/** Below it a gap is the solver's rounding. */
const PROVEN = 1e-6;
/** Seconds that explaining may take beyond the time for the plan itself. */
const EXPLAIN_S = 3;

/**
 * The cheapest plan that meets the need; where none does, the one that gives way least and then costs least. Throws
 * `PlannerError` for a need that contradicts itself, for pinned passes that exclude one another and for those that cost more
 * than the budget.
 */
export function makePlan(question: PlanQuestion): PlanResult {
  const known = new Set(question.candidates.map((each) => each.id));
  const lostIds = question.need.pinnedIds.filter((id) => !known.has(id));
  const need = { ...question.need, pinnedIds: question.need.pinnedIds.filter((id) => known.has(id)) };
  const [fault] = needFaults(need);
  if (fault !== undefined) throw new PlannerError(fault.sentence);
  const candidates = usable(need, question.candidates);
  refuseClash(need, candidates);
  const onProgress = question.onProgress ?? (() => undefined);
  const terms = { ...question, need, candidates, onProgress };
  const strict = strictPlan(terms);
  const found = strict === 'infeasible' ? planGivingWay(terms) : strict === 'no time' ? null : strict;
  onProgress({ stage: 'explaining', done: 0, of: 1, gap: null });
  const greedy = greedyPlan(need, candidates);
  const chosen = [...(found?.chosen ?? [])].sort((a, b) => a.aosMs - b.aosMs);
  const cost = costSum(need, chosen);
  const bound = found === null ? 0 : Math.min(cost, found.bound);
  return {
    status: found === null ? 'none' : found.unmet.length > 0 ? 'partly' : 'met',
    chosen,
    sums: sumsOf(chosen),
    figures: need.craft.map((craft) => figuresOf(need, craft, chosen)),
    cost,
    bound,
    gap: gapOf(cost, bound),
    proven: found?.proven ?? false,
    unmet: found?.unmet ?? [],
    binding: found === null ? [] : bindingOf(question, need, found),
    lostIds,
    considered: found?.inside.length ?? 0,
    offered: candidates.length,
    greedyCost: greedy === null ? null : costSum(need, greedy),
  };
}

function gapOf(cost: number, bound: number): number {
  const gap = cost > 0 ? (cost - bound) / cost : 0;
  return gap < PROVEN ? 0 : gap;
}

function usable(need: PlanNeed, all: readonly Candidate[]): Candidate[] {
  const banned = new Set(need.bannedStationIds);
  const struck = new Set(need.struckIds);
  const pinned = new Set(need.pinnedIds);
  return all.filter(
    (each) => each.booked || pinned.has(each.id) || (!struck.has(each.id) && !banned.has(each.stationId)),
  );
}

function refuseClash(need: PlanNeed, candidates: readonly Candidate[]): void {
  const pinned = new Set(need.pinnedIds);
  const pair = clash(candidates.filter((each) => pinned.has(each.id)));
  if (pair === null) return;
  const [first, second] = pair.map((each) => instantText(each.aosMs));
  throw new PlannerError(
    `The passes that you keep in at ${first} and ${second} exclude one another. Let one of them go.`,
  );
}

function bindingOf(question: PlanQuestion, need: PlanNeed, found: Found): Finding[] {
  const banned = new Set(need.bannedStationIds);
  const pinned = new Set(need.pinnedIds);
  return bindingFindings({
    need,
    inside: found.inside,
    program: found.program,
    met: found.unmet.length === 0,
    banned: question.candidates.filter((each) => !each.booked && banned.has(each.stationId) && !pinned.has(each.id)),
    solve: question.solve,
    money: (cost) => question.money(Math.round(cost * 100), question.baseCurrency),
    moneyIn: question.money,
    stationName: question.stationName,
    timeLimitS: EXPLAIN_S,
  });
}
