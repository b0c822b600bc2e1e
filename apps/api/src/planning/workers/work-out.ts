/** A whole planning job in one thread: offers, program, plan, and the plan in the form of the wire. */
import { createHash } from 'node:crypto';
import { currencyExponent, formatMoney } from '@skyberth/money';
import { type Candidate, makePlan, type PlanNeed, PlannerError, type PlanResult, type Solve } from '@skyberth/planner';
import type { PlanInput, PlanOutcome, PlanProgress } from '@skyberth/shared';
import { type Offers, offersOf } from './offers.js';
import type { PlanJob } from './plan-job.js';

const HOUR_MS = 3_600_000;
/** Nearer to the cheapest is not worth a person's waiting. */
const TARGET_GAP = 0.01;

/** Throws `PlannerError` for a need that cannot be planned at all. */
export function workOut(job: PlanJob, solve: Solve, onProgress: (progress: PlanProgress) => void): PlanOutcome {
  const beganMs = performance.now();
  const offers = offersOf(job);
  const { rates, base } = ratesOf(job.input, offers.currencies);
  const need = needOf(job, rates);
  refuseWithoutVolume(need, offers);
  const candidates = offers.candidates.filter((each) => each.booked || rates[each.currency] !== undefined);
  const result = makePlan({
    need,
    candidates,
    solve,
    baseCurrency: base,
    money: (amountMinor, currency) => formatMoney({ amountMinor, currency }),
    stationName: (id) => offers.stationNames.get(id) ?? 'A station',
    targetGap: TARGET_GAP,
    secondsLeft: () => job.limitS - (performance.now() - beganMs) / 1000,
    onProgress: ({ stage, done, of, gap }) =>
      onProgress({ stage, done, of, gapPercent: gap === null ? null : gap * 100 }),
  });
  return outcomeOf(job, result, offers, { base, candidates, tookS: (performance.now() - beganMs) / 1000 });
}

/** Costs in several currencies are compared only at rates that the person gave. */
function ratesOf({ currency }: PlanInput, offered: readonly string[]): { rates: Record<string, number>; base: string } {
  if (currency.kind === 'one') return { rates: { [currency.currency]: 1 }, base: currency.currency };
  const rates = Object.fromEntries([
    ...currency.rates.map(
      (each) => [each.currency, each.inBase * minorPerMinor(currency.base, each.currency)] as const,
    ),
    [currency.base, 1] as const,
  ]);
  const missing = offered.filter((code) => rates[code] === undefined);
  if (missing.length > 0)
    throw new PlannerError(
      `Passes are on offer in ${missing.join(' and ')} too. Give a planning rate for ${missing.length === 1 ? 'it' : 'each'}, or plan in one currency only.`,
    );
  return { rates, base: currency.base };
}

/** Rates are given for whole units; costs are counted in minor ones, of which a unit has 1 to 10,000. */
const minorPerMinor = (base: string, other: string): number => 10 ** (currencyExponent(base) - currencyExponent(other));

function needOf(job: PlanJob, rates: Record<string, number>): PlanNeed {
  const { input, fromMs, toMs, pinnedKeys, struckKeys } = job;
  const names = new Map(job.craft.map((each) => [each.id, each.name]));
  return {
    fromMs,
    toMs,
    craft: input.craft.map((each) => ({
      craftId: each.spacecraftId,
      name: names.get(each.spacecraftId) ?? 'The spacecraft',
      contactsPerDay: each.contactsPerDay,
      volumeBitsPerDay: each.bytesPerDay * 8,
      deliverByMs: each.deliverByH === null ? null : each.deliverByH * HOUR_MS,
      longestGapMs: each.longestGapH === null ? null : each.longestGapH * HOUR_MS,
      uplinkEveryMs: each.uplinkEveryH === null ? null : each.uplinkEveryH * HOUR_MS,
    })),
    budgets: input.budgets,
    rates,
    bannedStationIds: input.bannedStationIds,
    preferredStationIds: input.preferredStationIds,
    preferencePercent: input.preferencePercent,
    pinnedIds: pinnedKeys,
    struckIds: struckKeys,
  };
}

function refuseWithoutVolume(need: PlanNeed, offers: Offers): void {
  const blind = need.craft.find((each) => each.volumeBitsPerDay > 0 && offers.withoutVolume.includes(each.craftId));
  if (blind !== undefined)
    throw new PlannerError(
      `No volume can be worked out for ${blind.name}: EIRP or needed Eb/N0 of its downlink, or the G/T of the antennas, is not on file. Add the figures to its radio, or ask for contacts instead.`,
    );
}

function outcomeOf(
  job: PlanJob,
  result: PlanResult,
  offers: Offers,
  { base, candidates, tookS }: { base: string; candidates: readonly Candidate[]; tookS: number },
): PlanOutcome {
  const minor = (cost: number): number => Math.round(cost * 100);
  const finding = ({ craftId, kind, sentence }: PlanResult['unmet'][number]): PlanOutcome['unmet'][number] => ({
    spacecraftId: craftId,
    kind,
    sentence,
  });
  return {
    computedUtc: new Date(job.nowMs).toISOString(),
    tookS: Math.round(tookS * 10) / 10,
    status: result.status,
    passes: result.chosen.flatMap((each) => offers.passes.get(each.id) ?? []),
    sums: result.sums.map((each) => ({ ...each })),
    figures: result.figures.map((each) => ({
      spacecraftId: each.craftId,
      contacts: each.contacts,
      fewestPerDay: each.fewestPerDay,
      leastBytesPerDay: Math.floor(each.leastBitsPerDay / 8),
      longestGapH: each.longestGapMs / HOUR_MS,
      longestUplinkGapH: each.longestUplinkGapMs / HOUR_MS,
    })),
    baseCurrency: base,
    costMinor: minor(result.cost),
    boundMinor: Math.floor(result.bound * 100),
    gapPercent: result.gap * 100,
    proven: result.proven,
    unmet: result.unmet.map(finding),
    binding: result.binding.map(finding),
    lostKeys: [...result.lostIds],
    offered: result.offered,
    greedyMinor: result.greedyCost === null ? null : minor(result.greedyCost),
    snapshot: snapshotOf(candidates),
  };
}

/** The same offers at the same prices have the same name. */
function snapshotOf(candidates: readonly Candidate[]): string {
  const lines = candidates.map((each) => `${each.id} ${each.losMs} ${each.priceMinor} ${each.currency}`).sort();
  return createHash('sha256').update(lines.join('\n')).digest('hex');
}
