/**
 * Which candidates the fleet's program needs. Each spacecraft is first looked at alone, in fractions and without budgets:
 * that costs at most as much as its share of any whole plan, and the sum is a bound for the fleet. A candidate of reduced
 * cost r raises that bound by r wherever it is taken (linear programming duality, textbook knowledge, from memory), so what
 * is left out can cheapen no plan below the bound plus the least r left out. Leaving out loses nothing where that is at
 * least the cost of a plan in hand.
 */
import { craftProgram, elastic } from './assemble.js';
import type { Candidate, PlanNeed, Solve, SolverAnswer } from './types.js';

export interface Ranked {
  readonly candidate: Candidate;
  readonly reducedCost: number;
}

export interface CraftBound {
  readonly bound: number;
  readonly ranked: readonly Ranked[];
  /** Prices of the rows for contacts and for volume, day by day; empty where such rows are not. */
  readonly contactPrices: readonly number[];
  readonly volumePrices: readonly number[];
}

export interface FleetBound {
  /** No plan costs less; in the costs of the objective. */
  readonly bound: number;
  /** Every candidate, most promising first. */
  readonly ranked: readonly Ranked[];
  /** The same by spacecraft, with its own part of the bound. */
  readonly alone: ReadonlyMap<string, CraftBound>;
  /** Spacecraft whose need cannot be met even alone. */
  readonly hopeless: readonly string[];
}

/** What a look comes to for which there was no time. */
const UNFINISHED: SolverAnswer = {
  status: 'stopped',
  objective: Number.POSITIVE_INFINITY,
  bound: Number.NEGATIVE_INFINITY,
  values: [],
  reducedCosts: [],
  rowDuals: [],
};

/**
 * Looks at each spacecraft alone, for at most an even part of the time that is left. `ease` lets the need give way, so that
 * all are ranked even where one is hopeless.
 */
export function boundOf(
  need: PlanNeed,
  candidates: readonly Candidate[],
  solve: Solve,
  ease: { readonly dearest: number } | null,
  secondsLeft: () => number,
  onCraft: (done: number) => void,
): FleetBound {
  const ranked: Ranked[] = [];
  const alone = new Map<string, CraftBound>();
  const hopeless: string[] = [];
  let bound = 0;
  for (const [done, craft] of need.craft.entries()) {
    const mine = candidates.filter((each) => each.craftId === craft.craftId);
    const base = craftProgram(need, craft, mine);
    const program = ease === null ? base : elastic(base, ease.dearest);
    const timeLimitS = secondsLeft() / (need.craft.length - done);
    const answer = timeLimitS > 0 ? solve({ program, whole: false, relativeGap: 0, timeLimitS }) : UNFINISHED;
    const solved = answer.status === 'solved';
    if (answer.status === 'infeasible') hopeless.push(craft.craftId);
    // An unfinished look proves nothing: then all of its candidates stay in, at no reduced cost.
    if (solved) bound += answer.objective;
    const own = mine.map((candidate, place): Ranked => {
      return { candidate, reducedCost: solved ? Math.max(0, answer.reducedCosts[place] ?? 0) : 0 };
    });
    own.sort(promisingFirst);
    ranked.push(...own);
    const pricesOf = (kind: 'contacts' | 'volume'): number[] =>
      solved ? program.rows.flatMap(({ tag }, row) => (tag.kind === kind ? [answer.rowDuals[row] ?? 0] : [])) : [];
    alone.set(craft.craftId, {
      bound: solved ? answer.objective : 0,
      ranked: own,
      contactPrices: pricesOf('contacts'),
      volumePrices: pricesOf('volume'),
    });
    onCraft(done + 1);
  }
  ranked.sort(promisingFirst);
  return { bound, ranked, alone, hopeless };
}

const promisingFirst = (a: Ranked, b: Ranked): number =>
  a.reducedCost - b.reducedCost || a.candidate.priceMinor - b.candidate.priceMinor;

/** A selection of columns, and the least reduced cost among those left out. */
export interface Selection {
  readonly inside: readonly Candidate[];
  readonly leastOutside: number;
}

/** The `perCraft` most promising of each spacecraft, and whatever has to stay in. */
export function mostPromising({ ranked }: FleetBound, perCraft: number, must: ReadonlySet<string>): Selection {
  const taken = new Map<string, number>();
  return select(ranked, ({ candidate }) => {
    const count = taken.get(candidate.craftId) ?? 0;
    taken.set(candidate.craftId, count + 1);
    return count < perCraft || candidate.booked || must.has(candidate.id);
  });
}

/** All that could be part of a plan that costs at most `cost`. */
export function couldBeat({ ranked, bound }: FleetBound, cost: number, must: ReadonlySet<string>): Selection {
  const room = cost - bound;
  return select(ranked, (each) => each.reducedCost <= room || each.candidate.booked || must.has(each.candidate.id));
}

function select(ranked: readonly Ranked[], keep: (each: Ranked) => boolean): Selection {
  const inside: Candidate[] = [];
  let leastOutside = Number.POSITIVE_INFINITY;
  for (const each of ranked) {
    if (keep(each)) inside.push(each.candidate);
    else leastOutside = Math.min(leastOutside, each.reducedCost);
  }
  return { inside, leastOutside };
}
