/**
 * Plans spacecraft by spacecraft. Where spacecraft seldom want the same antenna at the same time, which is the rule, the sum
 * of the plans that each would make alone is very near to the best plan of all, and much quicker to find. What each costs at
 * least alone, added up, bounds every plan of the fleet.
 */
import { costSum, craftProgram } from './assemble.js';
import { cheapestChain } from './cheapest-chain.js';
import type { CraftBound } from './columns.js';
import type { Candidate, CraftNeed, PlanNeed, Solve } from './types.js';

export interface OneByOne {
  /** No plan of the fleet costs less. */
  readonly bound: number;
  /** Plans that fit together; null where one of the spacecraft found nothing beside the others. Budgets are not looked at. */
  readonly chosen: readonly Candidate[] | null;
}

export interface OneByOneTerms {
  readonly need: PlanNeed;
  readonly solve: Solve;
  readonly targetGap: number;
  readonly secondsLeft: () => number;
  /** By spacecraft: the bound in fractions, and its candidates, most promising first. */
  readonly alone: ReadonlyMap<string, CraftBound>;
  readonly onCraft: (done: number) => void;
}

/** Rooms above the fractional bound in which a plan is looked for, as shares of it. */
const ROOMS = [0.01, 0.02, 0.04, 0.08, 0.16, 0.32] as const;
/** So many labels at once take some tenths of a second to compare. */
const MOST_LABELS = 2_500;
/** Candidates of a spacecraft in the integer program that stands in where there are too many labels. */
const FEW = 120;
/** The share of the time left that an integer program may use which stands in for one spacecraft. */
const TIME_SHARE = 0.1;
/** Planning one by one stops while so many seconds are left for the fleet's own program. */
const KEEP_S = 5;

interface OwnPlan {
  readonly chosen: readonly Candidate[];
  readonly cost: number;
}

export function planOneByOne(terms: OneByOneTerms): OneByOne {
  const { need } = terms;
  const alone = new Map<string, OwnPlan>();
  let bound = 0;
  let stuck = false;
  for (const [place, craft] of need.craft.entries()) {
    const plan = planAlone(terms, craft, { may: () => true, waiting: need.craft.length - place });
    bound += plan.bound;
    if (plan.chosen === null) stuck = true;
    else alone.set(craft.craftId, { chosen: plan.chosen, cost: costSum(need, plan.chosen) });
    terms.onCraft(place + 1);
  }
  if (stuck) return { bound, chosen: null };
  const together = fitTogether(terms, alone);
  if (together === null) return { bound, chosen: null };
  improve(terms, alone, together, bound);
  return { bound, chosen: chosenOf(together) };
}

const chosenOf = (plans: ReadonlyMap<string, OwnPlan>): Candidate[] =>
  [...plans.values()].flatMap((plan) => plan.chosen);
const totalOf = (plans: ReadonlyMap<string, OwnPlan>): number =>
  [...plans.values()].reduce((sum, plan) => sum + plan.cost, 0);

/** Lets each keep its own plan where it can, and plans the others again around them; null where one finds nothing. */
function fitTogether(terms: OneByOneTerms, alone: ReadonlyMap<string, OwnPlan>): Map<string, OwnPlan> | null {
  const together = new Map<string, OwnPlan>();
  const { kept, evicted } = keepers(terms, alone, together);
  for (const [craftId, plan] of kept) together.set(craftId, plan);
  return replan(terms, together, evicted);
}

function keepers(terms: OneByOneTerms, alone: ReadonlyMap<string, OwnPlan>, settled: ReadonlyMap<string, OwnPlan>) {
  const kept = new Map<string, OwnPlan>(settled);
  const evicted: CraftNeed[] = [];
  for (const craft of terms.need.craft) {
    const plan = alone.get(craft.craftId);
    if (plan !== undefined && fits(plan.chosen, [...chosenOf(kept), ...pinnedOfOthers(terms, craft)]))
      kept.set(craft.craftId, plan);
    else evicted.push(craft);
  }
  return { kept, evicted };
}

/** Passes that have to stay in for other spacecraft: nobody may take their place. */
function pinnedOfOthers({ need, alone }: OneByOneTerms, craft: CraftNeed): Candidate[] {
  if (need.pinnedIds.length === 0) return [];
  const must = new Set(need.pinnedIds);
  return [...alone].flatMap(([craftId, { ranked }]) =>
    craftId === craft.craftId ? [] : ranked.flatMap(({ candidate }) => (must.has(candidate.id) ? [candidate] : [])),
  );
}

/** Plans some spacecraft one after the other around what is settled; null where one of them finds nothing. */
function replan(
  terms: OneByOneTerms,
  settled: ReadonlyMap<string, OwnPlan>,
  some: readonly CraftNeed[],
): Map<string, OwnPlan> | null {
  const together = new Map(settled);
  const must = new Set(terms.need.pinnedIds);
  for (const [place, craft] of some.entries()) {
    const others = [...chosenOf(together), ...pinnedOfOthers(terms, craft)];
    const may = (each: Candidate): boolean => each.booked || must.has(each.id) || isFree(each, others);
    const { chosen } = planAlone(terms, craft, { may, waiting: some.length - place });
    if (chosen === null) return null;
    together.set(craft.craftId, { chosen, cost: costSum(terms.need, chosen) });
  }
  return together;
}

/**
 * Gives the spacecraft that lost most its own best plan and plans those anew that stood in its way, for as long as the whole
 * gets cheaper, the target is not reached and there is time.
 */
function improve(
  terms: OneByOneTerms,
  alone: ReadonlyMap<string, OwnPlan>,
  together: Map<string, OwnPlan>,
  bound: number,
): void {
  const { need, targetGap, secondsLeft } = terms;
  const near = (): boolean => totalOf(together) - bound <= targetGap * totalOf(together);
  const lossOf = ({ craftId }: CraftNeed): number =>
    (together.get(craftId)?.cost ?? 0) - (alone.get(craftId)?.cost ?? 0);
  for (let better = true; better && !near(); ) {
    better = false;
    for (const craft of [...need.craft].sort((a, b) => lossOf(b) - lossOf(a))) {
      const own = alone.get(craft.craftId);
      if (own === undefined || lossOf(craft) <= 0 || near()) break;
      if (secondsLeft() < KEEP_S) return;
      const rest = new Map([...together].filter(([craftId]) => craftId !== craft.craftId));
      const inTheWay = need.craft.filter(({ craftId }) => {
        const plan = rest.get(craftId);
        return plan !== undefined && !fits(plan.chosen, own.chosen);
      });
      for (const { craftId } of inTheWay) rest.delete(craftId);
      if (!fits(own.chosen, pinnedOfOthers(terms, craft))) continue;
      const tried = replan(terms, rest.set(craft.craftId, own), inTheWay);
      if (tried === null || totalOf(tried) >= totalOf(together) - 1e-6) continue;
      for (const [craftId, plan] of tried) together.set(craftId, plan);
      better = true;
    }
  }
}

const fits = (plan: readonly Candidate[], settled: readonly Candidate[]): boolean =>
  plan.every((each) => each.booked || isFree(each, settled));

/** Whether the antenna has a beam left beside the contacts that it serves already. */
function isFree(each: Candidate, settled: readonly Candidate[]): boolean {
  const beside = settled.filter(
    (other) =>
      !other.booked &&
      other.antennaId === each.antennaId &&
      other.guardToMs > each.guardFromMs &&
      each.guardToMs > other.guardFromMs,
  );
  return beside.length < each.beams;
}

/** True until a spacecraft has used its even part of the time that it shares with those still `waiting`, itself among them. */
function evenPart(secondsLeft: () => number, waiting: number): () => boolean {
  const left = secondsLeft();
  const until = left - Math.max(0, left - KEEP_S) / waiting;
  return () => secondsLeft() > until;
}

function planAlone(
  { need, solve, targetGap, alone, secondsLeft }: OneByOneTerms,
  craft: CraftNeed,
  { may, waiting }: { readonly may: (each: Candidate) => boolean; readonly waiting: number },
): { bound: number; chosen: readonly Candidate[] | null } {
  const known = alone.get(craft.craftId);
  if (known === undefined) throw new Error(`There is no bound for ${craft.name}.`);
  const ranked = known.ranked.filter((each) => may(each.candidate));
  const must = new Set(need.pinnedIds);
  const hasTime = evenPart(secondsLeft, waiting);
  let bound = known.bound;
  for (const share of ROOMS) {
    const room = Math.max(known.bound, 1) * share;
    const answer = cheapestChain({ ...known, need, craft, ranked, must, room, mostLabels: MOST_LABELS, hasTime });
    if (answer.kind === 'found') return { bound: Math.max(bound, answer.cost), chosen: answer.chosen };
    if (answer.kind === 'given up') break;
    bound = known.bound + room;
  }
  const inside = ranked.flatMap(({ candidate }, place) =>
    place < FEW || candidate.booked || must.has(candidate.id) ? [candidate] : [],
  );
  const program = craftProgram(need, craft, inside);
  const timeLimitS = Math.max(0.05, secondsLeft() * TIME_SHARE);
  const answer = solve({ program, whole: true, relativeGap: targetGap / 2, timeLimitS });
  const chosen = inside.filter((_, place) => (answer.values[place] ?? 0) > 0.5);
  return { bound, chosen: answer.values.length > 0 ? chosen : null };
}
