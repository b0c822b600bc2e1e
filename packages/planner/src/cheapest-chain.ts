/**
 * The cheapest plan of one spacecraft alone, exactly. Its contacts follow one another in time, so a plan is a path, and what
 * a part of it leaves open is little: the end of the last contact and of the last uplink, and what the day has had. Of parts
 * that leave the same or less open the dearer are dropped (label setting for the shortest path with resources, textbook
 * knowledge, from memory). What cannot cost at most the fractional bound plus `room` is dropped too: a contact adds at least
 * its reduced cost to that bound, and more than a day needs adds the price of the day's row.
 */

import { costOf } from './assemble.js';
import type { Ranked } from './columns.js';
import { daysOf, deliversOn } from './rows.js';
import { type Candidate, type CraftNeed, DAY_MS, type PlanNeed } from './types.js';

export interface ChainQuestion {
  readonly need: PlanNeed;
  readonly craft: CraftNeed;
  readonly ranked: readonly Ranked[];
  /** Prices of the fractional program's rows for contacts and for volume, day by day. */
  readonly contactPrices: readonly number[];
  readonly volumePrices: readonly number[];
  /** Passes that have to stay in, besides those booked before. */
  readonly must: ReadonlySet<string>;
  /** How much more than the fractional bound a plan may cost. */
  readonly room: number;
  readonly mostLabels: number;
  /** Asked before each candidate; once false, the looking ends without an answer. */
  readonly hasTime: () => boolean;
}

export type ChainAnswer =
  | { readonly kind: 'found'; readonly chosen: readonly Candidate[]; readonly cost: number }
  /** There is none within the room. */
  | { readonly kind: 'none' }
  /** Too many labels, or no time left: there may be one. */
  | { readonly kind: 'given up' };

interface Step {
  readonly candidate: Candidate;
  readonly reducedCost: number;
  readonly cost: number;
  readonly day: number;
  /** The share of the day's volume that it delivers. */
  readonly share: number;
  readonly mandatory: boolean;
}

interface Label {
  readonly cost: number;
  /** By how much a plan with this part exceeds the fractional bound at least. */
  readonly excess: number;
  readonly lastLosMs: number;
  readonly lastUplinkMs: number;
  readonly day: number;
  /** Up to what the day needs. */
  readonly contacts: number;
  readonly share: number;
  readonly last: Step | null;
  readonly before: Label | null;
}

/** The solver's accuracy; below it a day's volume counts as whole. */
const ROUNDING = 1e-6;

export function cheapestChain(question: ChainQuestion): ChainAnswer {
  const { need, craft, mostLabels, hasTime } = question;
  const days = daysOf(need).length;
  const start = {
    cost: 0,
    excess: 0,
    lastLosMs: need.fromMs,
    lastUplinkMs: need.fromMs,
    day: 0,
    contacts: 0,
    share: 0,
  };
  let labels: Label[] = [{ ...start, last: null, before: null }];
  for (const step of stepsOf(question)) {
    if (!hasTime()) return { kind: 'given up' };
    const next: Label[] = [];
    for (const old of labels) {
      const label = atDay(craft, old, step.day);
      if (label === null || isTooLate(craft, label, step.candidate.aosMs)) continue;
      if (!step.mandatory) next.push(label);
      const taken = take(question, label, step);
      if (taken !== null) next.push(taken);
    }
    labels = undominated(next, step.candidate.aosMs);
    if (labels.length > mostLabels) return { kind: 'given up' };
  }
  let best: Label | null = null;
  for (const old of labels) {
    const label = atDay(craft, old, days);
    if (label === null || isTooLate(craft, label, need.toMs)) continue;
    if (best === null || label.cost < best.cost) best = label;
  }
  return best === null ? { kind: 'none' } : { kind: 'found', chosen: chainOf(best), cost: best.cost };
}

function stepsOf({ need, craft, ranked, must, room }: ChainQuestion): Step[] {
  return ranked
    .map(({ candidate, reducedCost }): Step => {
      const day = Math.floor((candidate.aosMs - need.fromMs) / DAY_MS);
      const delivers = craft.volumeBitsPerDay > 0 && deliversOn(craft, need.fromMs + day * DAY_MS, candidate);
      return {
        candidate,
        reducedCost,
        cost: costOf(need, candidate),
        day,
        share: delivers ? candidate.volumeBits / craft.volumeBitsPerDay : 0,
        mandatory: candidate.booked || must.has(candidate.id),
      };
    })
    .filter((step) => step.mandatory || step.reducedCost <= room)
    .sort((a, b) => a.candidate.aosMs - b.candidate.aosMs);
}

/** The label after the days before `day` are over; null where one of them lacks something. */
function atDay(craft: CraftNeed, label: Label, day: number): Label | null {
  if (label.day >= day) return label;
  const { contactsPerDay, volumeBitsPerDay } = craft;
  if (label.contacts < contactsPerDay) return null;
  if (volumeBitsPerDay > 0 && label.share < 1 - ROUNDING) return null;
  if (label.day + 1 < day && (contactsPerDay > 0 || volumeBitsPerDay > 0)) return null;
  return { ...label, day, contacts: 0, share: 0 };
}

const isTooLate = ({ longestGapMs, uplinkEveryMs }: CraftNeed, label: Label, nowMs: number): boolean =>
  (longestGapMs !== null && nowMs - label.lastLosMs > longestGapMs) ||
  (uplinkEveryMs !== null && nowMs - label.lastUplinkMs > uplinkEveryMs);

function take({ craft, contactPrices, volumePrices, room }: ChainQuestion, label: Label, step: Step): Label | null {
  const { candidate } = step;
  if (candidate.aosMs < label.lastLosMs) return null;
  const contacts = label.contacts + 1;
  const share = label.share + step.share;
  const surplus =
    (contacts > craft.contactsPerDay ? (contactPrices[step.day] ?? 0) : 0) +
    (Math.max(0, share - 1) - Math.max(0, label.share - 1)) * (volumePrices[step.day] ?? 0);
  const excess = label.excess + step.reducedCost + Math.max(0, surplus);
  if (excess > room + ROUNDING && !step.mandatory) return null;
  return {
    cost: label.cost + step.cost,
    excess,
    lastLosMs: candidate.losMs,
    lastUplinkMs: candidate.uplink ? candidate.losMs : label.lastUplinkMs,
    day: label.day,
    contacts: Math.min(contacts, craft.contactsPerDay),
    share: Math.min(share, 1),
    last: step,
    before: label,
  };
}

/** Labels that no other beats in everything that is still open at `nowMs`. */
function undominated(labels: Label[], nowMs: number): Label[] {
  labels.sort((a, b) => a.cost - b.cost || b.share - a.share);
  const kept: Label[] = [];
  for (const label of labels) {
    if (!kept.some((better) => beats(better, label, nowMs))) kept.push(label);
  }
  return kept;
}

/** Given that `a` is not dearer. A contact that still runs keeps others away, so there the ends must be the same. */
const beats = (a: Label, b: Label, nowMs: number): boolean =>
  a.share >= b.share &&
  a.contacts >= b.contacts &&
  a.lastUplinkMs >= b.lastUplinkMs &&
  (a.lastLosMs === b.lastLosMs || (a.lastLosMs > b.lastLosMs && a.lastLosMs <= nowMs)) &&
  a.day === b.day;

function chainOf(end: Label): Candidate[] {
  const chain: Candidate[] = [];
  for (let label: Label | null = end; label !== null; label = label.before) {
    // A label that only passed into a new day shares its last step with none: each step stands in one label of the chain.
    if (label.last !== null && chain.at(-1) !== label.last.candidate) chain.push(label.last.candidate);
  }
  return chain.reverse();
}
