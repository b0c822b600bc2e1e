/** Looks at a chosen set of contacts by itself, without the program that found it: sums, gaps, and what it breaks. */
import { daysOf, deliversOn, stretchOf } from './rows.js';
import { type Candidate, type CraftNeed, DAY_MS, type Finding, type PlanNeed } from './types.js';
import { longestGap } from './windows.js';
import { hoursText, instantText, volumeText } from './words.js';

/** What a plan gives one spacecraft. */
export interface CraftFigures {
  readonly craftId: string;
  readonly contacts: number;
  readonly fewestPerDay: number;
  readonly leastBitsPerDay: number;
  readonly longestGapMs: number;
  readonly longestUplinkGapMs: number;
}

export function figuresOf(need: PlanNeed, craft: CraftNeed, chosen: readonly Candidate[]): CraftFigures {
  const mine = chosen.filter((each) => each.craftId === craft.craftId);
  const days = daysOf(need).map((dayMs) => dayFigures(craft, dayMs, mine));
  return {
    craftId: craft.craftId,
    contacts: mine.length,
    fewestPerDay: Math.min(...days.map((day) => day.contacts)),
    leastBitsPerDay: Math.min(...days.map((day) => day.bits)),
    longestGapMs: longestGap(mine.map(stretchOf), need).lengthMs,
    longestUplinkGapMs: longestGap(mine.filter((each) => each.uplink).map(stretchOf), need).lengthMs,
  };
}

function dayFigures(craft: CraftNeed, dayMs: number, mine: readonly Candidate[]): { contacts: number; bits: number } {
  const inDay = mine.filter((each) => each.aosMs >= dayMs && each.aosMs < dayMs + DAY_MS);
  const bits = inDay.filter((each) => deliversOn(craft, dayMs, each)).reduce((sum, each) => sum + each.volumeBits, 0);
  return { contacts: inDay.length, bits };
}

/** A share of a day's volume below which a shortfall is the solver's rounding. */
const ROUNDING = 1e-6;

/** What of the need a plan does not meet, each with the smallest figure that it would meet. */
export function shortfalls(need: PlanNeed, chosen: readonly Candidate[]): Finding[] {
  return need.craft.flatMap((craft) => {
    const { craftId, name } = craft;
    const mine = chosen.filter((each) => each.craftId === craftId);
    const findings: Finding[] = [];
    const days = daysOf(need).map((dayMs) => ({ dayMs, ...dayFigures(craft, dayMs, mine) }));
    const few = days.filter((day) => day.contacts < craft.contactsPerDay);
    if (few.length > 0) {
      const least = Math.min(...few.map((day) => day.contacts));
      const sentence = `${name} gets ${least} of ${craft.contactsPerDay} contacts on ${dayList(few)}. Ask for ${least} a day there.`;
      findings.push({ craftId, kind: 'contacts', sentence });
    }
    const low = days.filter((day) => day.bits < craft.volumeBitsPerDay * (1 - ROUNDING));
    if (low.length > 0) {
      const least = Math.min(...low.map((day) => day.bits));
      const by = craft.deliverByMs === null ? '' : ` by ${hoursText(craft.deliverByMs)} into the day`;
      const sentence = `${name} gets ${volumeText(least)} of ${volumeText(craft.volumeBitsPerDay)}${by} on ${dayList(low)}. Ask for ${volumeText(least)} a day there.`;
      findings.push({ craftId, kind: 'volume', sentence });
    }
    return [...findings, ...gapFindings(need, craft, mine)];
  });
}

function gapFindings(need: PlanNeed, craft: CraftNeed, mine: readonly Candidate[]): Finding[] {
  const { craftId, name, longestGapMs, uplinkEveryMs } = craft;
  const findings: Finding[] = [];
  const gap = longestGap(mine.map(stretchOf), need);
  if (longestGapMs !== null && gap.lengthMs > longestGapMs) {
    const sentence = `${name} is without a contact for ${hoursText(gap.lengthMs)} from ${instantText(gap.fromMs)}; you allow ${hoursText(longestGapMs)}. Allow ${hoursText(gap.lengthMs)}.`;
    findings.push({ craftId, kind: 'gap', sentence });
  }
  const silence = longestGap(mine.filter((each) => each.uplink).map(stretchOf), need);
  if (uplinkEveryMs !== null && silence.lengthMs > uplinkEveryMs) {
    const sentence = `${name} cannot be commanded for ${hoursText(silence.lengthMs)} from ${instantText(silence.fromMs)}; you allow ${hoursText(uplinkEveryMs)}. Allow ${hoursText(silence.lengthMs)}, or get a clearance to transmit at another station.`;
    findings.push({ craftId, kind: 'uplink', sentence });
  }
  return findings;
}

const dayList = (days: readonly { dayMs: number }[]): string => {
  const [first, ...rest] = days.map((day) => instantText(day.dayMs).slice(0, 10));
  return rest.length === 0 ? `${first}` : `${first} and ${rest.length} more ${rest.length === 1 ? 'day' : 'days'}`;
};

/** What the new contacts cost, by currency, in the order of the codes. */
export function sumsOf(chosen: readonly Candidate[]): { currency: string; amountMinor: number }[] {
  const sums = new Map<string, number>();
  for (const each of chosen) {
    if (!each.booked) sums.set(each.currency, (sums.get(each.currency) ?? 0) + each.priceMinor);
  }
  return [...sums]
    .map(([currency, amountMinor]) => ({ currency, amountMinor }))
    .sort((a, b) => (a.currency < b.currency ? -1 : 1));
}

/** Two contacts of a plan that exclude one another, or null. The check of the planner's own answers, and of pinned passes. */
export function clash(chosen: readonly Candidate[]): readonly [Candidate, Candidate] | null {
  const fresh = chosen.filter((each) => !each.booked).sort((a, b) => a.guardFromMs - b.guardFromMs);
  for (const [place, each] of fresh.entries()) {
    const before = fresh.slice(0, place);
    const own = before.find(
      (other) => other.craftId === each.craftId && other.losMs > each.aosMs && each.losMs > other.aosMs,
    );
    if (own !== undefined) return [own, each];
    const onDish = before.filter((other) => other.antennaId === each.antennaId && other.guardToMs > each.guardFromMs);
    if (onDish.length >= each.beams) return [onDish[0] as Candidate, each];
  }
  return null;
}
