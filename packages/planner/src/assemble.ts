/** Programs for the solver: the whole fleet, one spacecraft alone, and the elastic form in which the need may give way. */
import { antennaRows, budgetRows, needRows, ownRows } from './rows.js';
import type { Candidate, CraftNeed, PlanNeed, Program, Row } from './types.js';

/** What a candidate counts for in the objective: major units at the planning rate, dearer away from preferred stations. */
export function costOf(need: PlanNeed, each: Candidate): number {
  if (each.booked) return 0;
  const rate = need.rates[each.currency];
  if (rate === undefined) throw new Error(`There is no planning rate for ${each.currency}.`);
  const away = need.preferredStationIds.length > 0 && !need.preferredStationIds.includes(each.stationId);
  return ((each.priceMinor * rate) / 100) * (away ? 1 + need.preferencePercent / 100 : 1);
}

export const costSum = (need: PlanNeed, some: readonly Candidate[]): number =>
  some.reduce((sum, each) => sum + costOf(need, each), 0);

const placesOf = (all: readonly Candidate[], craftId: string): number[] =>
  all.flatMap((each, place) => (each.craftId === craftId ? [place] : []));

/** Everything at once. */
export function fleetProgram(need: PlanNeed, all: readonly Candidate[]): Program {
  const rows = need.craft.flatMap((craft) => {
    const mine = placesOf(all, craft.craftId);
    return [...needRows(need, craft, all, mine), ...ownRows(craft.craftId, all, mine)];
  });
  return program(need, all, [...rows, ...antennaRows(all), ...budgetRows(need, all)]);
}

/** One spacecraft as if it had the market to itself and no budget bound it: never dearer than its share of the whole. */
export function craftProgram(need: PlanNeed, craft: CraftNeed, all: readonly Candidate[]): Program {
  const mine = placesOf(all, craft.craftId);
  return program(need, all, [...needRows(need, craft, all, mine), ...ownRows(craft.craftId, all, mine)]);
}

function program(need: PlanNeed, all: readonly Candidate[], rows: readonly Row[]): Program {
  const pinned = new Set(need.pinnedIds);
  return {
    costs: all.map((each) => costOf(need, each)),
    lower: all.map((each) => (each.booked || pinned.has(each.id) ? 1 : 0)),
    upper: all.map(() => 1),
    integers: all.length,
    rows,
  };
}

/** How many times the dearest pass may be paid before a unit of the need gives way. */
const WORTH = 50;

/** The cost of the dearest pass, by which giving way is measured. */
export const dearestOf = (need: PlanNeed, all: readonly Candidate[]): number =>
  all.reduce((most, each) => Math.max(most, costOf(need, each)), 1);

/**
 * The same program in which each part of the need may fall short, at a price high enough that it does so only where it
 * must: `WORTH` times the dearest pass for a contact, twice that for a window, four times for a whole day's volume.
 */
export function elastic(base: Program, dearest: number): Program {
  const costs = [...base.costs];
  const lower = [...base.lower];
  const upper = [...base.upper];
  const rows = base.rows.map((row) => {
    if (!givesWay(row)) return row;
    costs.push((row.giveWay ?? 0) * WORTH * dearest);
    lower.push(0);
    upper.push(row.lower);
    return { ...row, columns: [...row.columns, costs.length - 1], values: [...row.values, 1] };
  });
  return { costs, lower, upper, integers: base.integers, rows };
}

const givesWay = (row: Row): boolean => row.giveWay !== null && row.lower > 0;

/** The program asking only for what an answer to its elastic form reached. */
export function loweredTo(base: Program, values: ArrayLike<number>): Program {
  let slack = base.integers;
  const rows = base.rows.map((row) => {
    if (!givesWay(row)) return row;
    const short = values[slack++] ?? 0;
    return short > ROUNDING ? { ...row, lower: Math.max(0, row.lower - short - ROUNDING) } : row;
  });
  return { ...base, rows };
}

/** Below it a shortfall is the solver's rounding. */
const ROUNDING = 1e-6;
