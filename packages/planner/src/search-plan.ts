/** The search itself: a bound for the fleet, rounds over the columns that matter, and the elastic solve where none will do. */
import { costSum, dearestOf, elastic, fleetProgram, loweredTo } from './assemble.js';
import { shortfalls, sumsOf } from './check-plan.js';
import { boundOf, couldBeat, type FleetBound, mostPromising, type Selection } from './columns.js';
import { greedyPlan } from './greedy.js';
import { planOneByOne } from './one-by-one.js';
import { PlannerError } from './planner-error.js';
import { stretchOf } from './rows.js';
import type { Candidate, Finding, MoneyWriter, PlanNeed, Program, Solve, SolverAnswer } from './types.js';
import { longestGap } from './windows.js';

export interface PlanProgress {
  readonly stage: 'spacecraft' | 'fleet' | 'giving way' | 'explaining';
  readonly done: number;
  readonly of: number;
  /** How far from proven the plan in hand is, 0 to 1; null where there is none yet. */
  readonly gap: number | null;
}

export interface SearchTerms {
  readonly need: PlanNeed;
  /** Without banned and struck ones. */
  readonly candidates: readonly Candidate[];
  readonly solve: Solve;
  readonly money: MoneyWriter;
  readonly targetGap: number;
  readonly secondsLeft: () => number;
  readonly onProgress: (progress: PlanProgress) => void;
}

export interface Found {
  readonly chosen: readonly Candidate[];
  /** No plan that meets (or gives way on) the same costs less. */
  readonly bound: number;
  /** False where the bound holds only among the columns of the program. */
  readonly proven: boolean;
  readonly program: Program;
  readonly inside: readonly Candidate[];
  readonly unmet: readonly Finding[];
}

/** Candidates of each spacecraft in the first round, and the factor from round to round where they do not suffice. */
const FIRST_PER_CRAFT = 60;
const WIDER = 5;
/** The most columns of a program in which the need may give way. */
const MOST_ELASTIC = 6_000;
/** The solver stops a little nearer than asked, so that rounding does not spoil the proof. */
const NEARER = 0.8;

/** The cheapest plan that meets all; `infeasible` where none does, `no time` where none was found. */
export function strictPlan(terms: SearchTerms): Found | 'infeasible' | 'no time' {
  const { need, candidates, targetGap, secondsLeft } = terms;
  const must = new Set(need.pinnedIds);
  const fleet = boundOf(need, candidates, terms.solve, null, secondsLeft, craftTold(terms));
  if (fleet.hopeless.length > 0) return 'infeasible';
  const quick = planOneByOne({ ...terms, alone: fleet.alone, onCraft: craftTold(terms, 'fleet') });
  // A plan as made by hand is better than none where the time ends before the spacecraft's own plans fit together.
  const plain = quick.chosen ?? greedyPlan(need, candidates);
  let best =
    plain === null || !affordable(need, plain) ? null : settledBy(need, plain, Math.max(fleet.bound, quick.bound));
  let bestCost = best === null ? Number.POSITIVE_INFINITY : costSum(need, best.chosen);
  if (best !== null && (bestCost - best.bound <= targetGap * bestCost || secondsLeft() <= 0)) return best;
  let perCraft = FIRST_PER_CRAFT;
  let selection = mostPromising(fleet, perCraft, must);
  for (;;) {
    const whole = selection.inside.length === candidates.length;
    const program = fleetProgram(need, selection.inside);
    const answer = solveWhole(terms, program, 'fleet');
    if (answer.values.length > 0) {
      const better = answer.objective < bestCost;
      bestCost = Math.min(bestCost, answer.objective);
      best = {
        chosen: better || best === null ? chosenOf(selection.inside, answer) : best.chosen,
        bound: Math.max(boundWith(fleet, quick.bound, selection, answer), best?.bound ?? Number.NEGATIVE_INFINITY),
        proven: true,
        program,
        inside: selection.inside,
        unmet: [],
      };
      if (bestCost - best.bound <= targetGap * bestCost) return best;
      const wider = couldBeat(fleet, bestCost, must);
      if (wider.inside.length <= selection.inside.length || secondsLeft() <= 0) return best;
      selection = wider;
      continue;
    }
    if (secondsLeft() <= 0) return best ?? 'no time';
    if (answer.status === 'infeasible' && whole) return 'infeasible';
    if (whole) return best ?? 'no time';
    perCraft *= WIDER;
    selection = mostPromising(fleet, perCraft, must);
  }
}

/** Of the whole market: columns left out can give no plan below the fleet's bound plus the least reduced cost among them. */
const boundWith = (fleet: FleetBound, floor: number, selection: Selection, answer: SolverAnswer): number =>
  Math.max(floor, fleet.bound, Math.min(answer.bound, fleet.bound + selection.leastOutside));

/** A plan that was put together without a program of the fleet; the one given explains it. */
function settledBy(need: PlanNeed, chosen: readonly Candidate[], bound: number): Found {
  return { chosen, bound, proven: bound > 0, program: fleetProgram(need, chosen), inside: chosen, unmet: [] };
}

const affordable = (need: PlanNeed, chosen: readonly Candidate[]): boolean => {
  const sums = sumsOf(chosen);
  return need.budgets.every(
    ({ currency, amountMinor }) => (sums.find((each) => each.currency === currency)?.amountMinor ?? 0) <= amountMinor,
  );
};

/**
 * The plan that gives way least, then costs least. Longest gaps are first widened to what all the passes on offer would
 * leave, since no plan leaves less; budgets and kept passes never give way. Null where the time did not suffice.
 */
export function planGivingWay(terms: SearchTerms): Found | null {
  const need = widened(terms.need, terms.candidates);
  const { candidates, secondsLeft } = terms;
  const dearest = dearestOf(need, candidates);
  const fleet = boundOf(need, candidates, terms.solve, { dearest }, secondsLeft, craftTold(terms));
  const perCraft = Math.ceil(MOST_ELASTIC / Math.max(1, need.craft.length));
  const { inside } =
    candidates.length <= MOST_ELASTIC
      ? { inside: candidates }
      : mostPromising(fleet, perCraft, new Set(need.pinnedIds));
  const base = fleetProgram(need, inside);
  const first = solveWhole({ ...terms, targetGap: 1e-4 }, elastic(base, dearest), 'giving way', 0.5);
  if (first.status === 'infeasible')
    throw new PlannerError('The passes that you keep in cost more than the budget. Raise it, or let some of them go.');
  if (first.values.length === 0) return null;
  const program = loweredTo(base, first.values);
  const second = solveWhole(terms, program, 'giving way');
  const answer = second.values.length > 0 ? second : first;
  const chosen = chosenOf(inside, answer);
  const unmet = [...shortfalls(terms.need, chosen), ...budgetFindings(terms)];
  const proven = inside.length === candidates.length && second.values.length > 0;
  return { chosen, bound: second.values.length > 0 ? second.bound : 0, proven, program, inside, unmet };
}

/** Longest gaps as wide as the widest hole that all passes on offer leave, where that is wider than allowed. */
function widened(need: PlanNeed, candidates: readonly Candidate[]): PlanNeed {
  const craft = need.craft.map((each) => {
    const mine = candidates.filter((one) => one.craftId === each.craftId);
    const hole = longestGap(mine.map(stretchOf), need).lengthMs;
    const silence = longestGap(mine.filter((one) => one.uplink).map(stretchOf), need).lengthMs;
    return {
      ...each,
      longestGapMs: each.longestGapMs === null ? null : Math.max(each.longestGapMs, hole),
      uplinkEveryMs: each.uplinkEveryMs === null ? null : Math.max(each.uplinkEveryMs, silence),
    };
  });
  return { ...need, craft };
}

/** Where only the budget stands in the way: what the whole need would cost. */
function budgetFindings(terms: SearchTerms): Finding[] {
  const { need, money } = terms;
  if (need.budgets.length === 0 || terms.secondsLeft() <= 0) return [];
  const free = strictPlan({ ...terms, need: { ...need, budgets: [] } });
  if (free === 'infeasible' || free === 'no time') return [];
  const sums = sumsOf(free.chosen);
  return need.budgets.flatMap(({ currency, amountMinor }) => {
    const wanted = sums.find((sum) => sum.currency === currency)?.amountMinor ?? 0;
    if (wanted <= amountMinor) return [];
    const sentence = `All of it can be met for ${money(wanted, currency)}: ${money(wanted - amountMinor, currency)} more than your budget of ${money(amountMinor, currency)}.`;
    return [{ craftId: null, kind: 'budget' as const, sentence }];
  });
}

function solveWhole(terms: SearchTerms, program: Program, stage: PlanProgress['stage'], share = 1): SolverAnswer {
  terms.onProgress({ stage, done: 0, of: 1, gap: null });
  return terms.solve({
    program,
    whole: true,
    relativeGap: terms.targetGap * NEARER,
    timeLimitS: Math.max(0.1, terms.secondsLeft() * share),
    onGap: (gap) => terms.onProgress({ stage, done: 0, of: 1, gap }),
  });
}

const craftTold =
  ({ need, onProgress }: SearchTerms, stage: PlanProgress['stage'] = 'spacecraft') =>
  (done: number): void =>
    onProgress({ stage, done, of: need.craft.length, gap: null });

const chosenOf = (inside: readonly Candidate[], { values }: SolverAnswer): Candidate[] =>
  inside.filter((_, place) => (values[place] ?? 0) > 0.5);
