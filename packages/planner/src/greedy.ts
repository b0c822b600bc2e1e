/** A plan as a careful person makes it by hand: the cheapest pass that helps, again and again. What the planner is compared with. */
import { costOf } from './assemble.js';
import { daysOf, deliversOn, stretchOf } from './rows.js';
import { type Candidate, type CraftNeed, DAY_MS, type PlanNeed } from './types.js';
import { longestGap } from './windows.js';

/** Null where the person would be stuck: some need is left and no pass helps any more. Budgets are not looked at. */
export function greedyPlan(need: PlanNeed, candidates: readonly Candidate[]): Candidate[] | null {
  const chosen = candidates.filter((each) => each.booked || need.pinnedIds.includes(each.id));
  for (const craft of need.craft) {
    const mine = candidates.filter((each) => each.craftId === craft.craftId && !each.booked);
    if (!serveDays(need, craft, mine, chosen)) return null;
    if (!closeGaps(need, craft, mine, chosen, craft.uplinkEveryMs, true)) return null;
    if (!closeGaps(need, craft, mine, chosen, craft.longestGapMs, false)) return null;
  }
  return chosen;
}

const free = (each: Candidate, chosen: readonly Candidate[]): boolean => {
  if (chosen.some((other) => other.craftId === each.craftId && other.losMs > each.aosMs && each.losMs > other.aosMs))
    return false;
  const onDish = chosen.filter(
    (other) =>
      !other.booked &&
      other.antennaId === each.antennaId &&
      other.guardToMs > each.guardFromMs &&
      each.guardToMs > other.guardFromMs,
  );
  return onDish.length < each.beams;
};

/** The first that is least by `worth` among those that can still be had. */
function cheapest(
  among: readonly Candidate[],
  chosen: readonly Candidate[],
  worth: (each: Candidate) => number,
): Candidate | null {
  let best: Candidate | null = null;
  for (const each of among) {
    if ((best === null || worth(each) < worth(best)) && free(each, chosen)) best = each;
  }
  return best;
}

function serveDays(need: PlanNeed, craft: CraftNeed, mine: readonly Candidate[], chosen: Candidate[]): boolean {
  for (const dayMs of daysOf(need)) {
    const inDay = mine.filter((each) => each.aosMs >= dayMs && each.aosMs < dayMs + DAY_MS);
    const had = (): Candidate[] =>
      chosen.filter((each) => each.craftId === craft.craftId && each.aosMs >= dayMs && each.aosMs < dayMs + DAY_MS);
    const bits = (): number =>
      had().reduce((sum, each) => sum + (deliversOn(craft, dayMs, each) ? each.volumeBits : 0), 0);
    while (bits() < craft.volumeBitsPerDay) {
      const useful = inDay.filter((each) => each.volumeBits > 0 && deliversOn(craft, dayMs, each));
      const best = cheapest(useful, chosen, (each) => costOf(need, each) / each.volumeBits);
      if (best === null) return false;
      chosen.push(best);
    }
    while (had().length < craft.contactsPerDay) {
      const best = cheapest(inDay, chosen, (each) => costOf(need, each));
      if (best === null) return false;
      chosen.push(best);
    }
  }
  return true;
}

function closeGaps(
  need: PlanNeed,
  craft: CraftNeed,
  mine: readonly Candidate[],
  chosen: Candidate[],
  longestMs: number | null,
  uplink: boolean,
): boolean {
  if (longestMs === null) return true;
  for (;;) {
    const had = chosen.filter((each) => each.craftId === craft.craftId && (!uplink || each.uplink));
    const gap = longestGap(had.map(stretchOf), need);
    if (gap.lengthMs <= longestMs) return true;
    // The cheapest of the later half of what may follow, so that the next one is not soon needed again.
    const may = mine.filter(
      (each) =>
        (!uplink || each.uplink) &&
        each.aosMs > gap.fromMs + longestMs / 2 &&
        each.aosMs <= gap.fromMs + longestMs &&
        each.losMs <= gap.fromMs + gap.lengthMs,
    );
    const best = cheapest(may, chosen, (each) => costOf(need, each));
    if (best === null) return false;
    chosen.push(best);
  }
}
