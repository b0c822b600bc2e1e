import {
  type Candidate,
  clash,
  costSum,
  greedyPlan,
  inventedOffers,
  makePlan,
  type PlanNeed,
  PlannerError,
  shortfalls,
} from '@skyberth/planner';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { highsSolver } from './highs-solver.js';

const HOUR_MS = 3_600_000;
const FROM_MS = Date.UTC(2026, 11, 2);
const solve = await highsSolver();

function needFor(craft: number, days: number, change: Partial<PlanNeed> = {}): PlanNeed {
  return {
    fromMs: FROM_MS,
    toMs: FROM_MS + days * 24 * HOUR_MS,
    craft: Array.from({ length: craft }, (_, number) => ({
      craftId: `c${number}`,
      name: `Craft ${number}`,
      contactsPerDay: 2,
      volumeBitsPerDay: 0,
      deliverByMs: null,
      longestGapMs: null,
      uplinkEveryMs: null,
    })),
    budgets: [],
    rates: { EUR: 1 },
    bannedStationIds: [],
    preferredStationIds: [],
    preferencePercent: 0,
    pinnedIds: [],
    struckIds: [],
    ...change,
  };
}

const questionOf = (need: PlanNeed, candidates: readonly Candidate[], secondsLeft: () => number) => ({
  need,
  candidates,
  solve,
  baseCurrency: 'EUR',
  money: (amountMinor: number, currency: string) => `${amountMinor / 100} ${currency}`,
  stationName: (id: string) => id,
  targetGap: 0.01,
  secondsLeft,
});

const plan = (need: PlanNeed, candidates: readonly Candidate[], targetGap = 0, secondsLeft = () => 10) =>
  makePlan({ ...questionOf(need, candidates, secondsLeft), targetGap });

/** The least cost over all subsets, or null where none meets the need. */
function bruteForce(need: PlanNeed, candidates: readonly Candidate[]): number | null {
  let best: number | null = null;
  for (let set = 0; set < 2 ** candidates.length; set += 1) {
    const chosen = candidates.filter((_, place) => (set >> place) & 1);
    const cost = costSum(need, chosen);
    if (best !== null && cost >= best) continue;
    const affordable = need.budgets.every((budget) => cost * 100 <= budget.amountMinor);
    if (affordable && clash(chosen) === null && shortfalls(need, chosen).length === 0) best = cost;
  }
  return best;
}

/** Two spacecraft over two antennas on one day, twelve offers: few enough to try every subset. */
const small = fc
  .record({
    seed: fc.integer({ min: 1, max: 100_000 }),
    contactsPerDay: fc.integer({ min: 0, max: 2 }),
    gapH: fc.constantFrom(null, 8, 12, 16),
    share: fc.constantFrom(0, 0.8, 1.7),
    uplinkH: fc.constantFrom(null, 20),
    budgetMinor: fc.constantFrom(null, 20_000, 60_000),
  })
  .map(({ seed, contactsPerDay, gapH, share, uplinkH, budgetMinor }) => {
    const offers = inventedOffers({ seed, craft: 2, antennas: 2, days: 1, fromMs: FROM_MS, served: 1 }).slice(0, 24);
    const candidates = offers.filter((_, place) => place % 2 === 0).slice(0, 12);
    const base = needFor(2, 1, {
      budgets: budgetMinor === null ? [] : [{ currency: 'EUR', amountMinor: budgetMinor }],
    });
    const middling = candidates[0]?.volumeBits ?? 1;
    const craft = base.craft.map((each) => ({
      ...each,
      contactsPerDay: contactsPerDay === 0 && share === 0 ? 1 : contactsPerDay,
      volumeBitsPerDay: middling * share,
      longestGapMs: gapH === null ? null : gapH * HOUR_MS,
      uplinkEveryMs: uplinkH === null ? null : uplinkH * HOUR_MS,
    }));
    return { need: { ...base, craft }, candidates };
  });

/** A clock that runs on by `stepS` whenever it is asked, and how often it was asked after the end. */
function countdown(fromS: number, stepS: number) {
  let leftS = fromS;
  let late = 0;
  const secondsLeft = (): number => {
    leftS -= stepS;
    if (leftS < 0) late += 1;
    return leftS;
  };
  return { secondsLeft, late: () => late };
}

describe('the cheapest plan', () => {
  it('costs what trying every subset finds, and none is claimed where there is none', () => {
    let [met, partly] = [0, 0];
    fc.assert(
      fc.property(small, ({ need, candidates }) => {
        const expected = bruteForce(need, candidates);
        const result = plan(need, candidates);
        expect(clash(result.chosen)).toBeNull();
        if (expected === null) {
          partly += 1;
          expect(result.status).not.toBe('met');
        } else {
          met += 1;
          expect(result.status).toBe('met');
          expect(result.cost).toBeCloseTo(expected, 4);
          expect(result.bound).toBeLessThanOrEqual(expected + 1e-4);
          expect(shortfalls(need, result.chosen)).toEqual([]);
        }
      }),
      { seed: 335, numRuns: 60 },
    );
    expect(met).toBeGreaterThan(5);
    expect(partly).toBeGreaterThan(5);
  });

  it('is cheaper than taking the cheapest helpful pass each time, within a hundredth of its bound', () => {
    const candidates = inventedOffers({ seed: 7, craft: 4, antennas: 12, days: 3, fromMs: FROM_MS });
    const need = needFor(4, 3);
    const hungry = { ...need, craft: need.craft.map((each) => ({ ...each, longestGapMs: 8 * HOUR_MS })) };
    const result = plan(hungry, candidates, 0.01);
    const greedy = greedyPlan(hungry, candidates);
    expect(result.status).toBe('met');
    expect(result.gap).toBeLessThanOrEqual(0.01);
    expect(greedy && costSum(hungry, greedy)).toBeGreaterThan(result.cost);
  });

  it('keeps pinned passes, leaves struck ones and banned stations, and names pins that are gone', () => {
    const candidates = inventedOffers({ seed: 3, craft: 1, antennas: 6, days: 1, fromMs: FROM_MS, served: 1 });
    const first = plan(needFor(1, 1), candidates);
    const dear = [...candidates].sort((a, b) => b.priceMinor - a.priceMinor)[0];
    const struckIds = first.chosen.map((each) => each.id);
    const result = plan(
      needFor(1, 1, { pinnedIds: [dear?.id ?? '', 'gone'], struckIds, bannedStationIds: ['s1'] }),
      candidates,
    );
    const ids = result.chosen.map((each) => each.id);
    expect(ids).toContain(dear?.id);
    expect(ids.some((id) => struckIds.includes(id))).toBe(false);
    expect(result.chosen.every((each) => each.stationId !== 's1' || each.id === dear?.id)).toBe(true);
    expect(result.lostIds).toEqual(['gone']);
  });

  it('refuses pinned passes that exclude one another, and a pinned pass beyond the budget', () => {
    const [one] = inventedOffers({ seed: 3, craft: 1, antennas: 2, days: 1, fromMs: FROM_MS, served: 1 });
    if (one === undefined) throw new Error('There are no offers.');
    const two = { ...one, id: 'two', antennaId: 'elsewhere' };
    expect(() => plan(needFor(1, 1, { pinnedIds: [one.id, 'two'] }), [one, two])).toThrow(PlannerError);
    const poor = needFor(1, 1, { pinnedIds: [one.id], budgets: [{ currency: 'EUR', amountMinor: 1 }] });
    expect(() => plan(poor, [one])).toThrow('more than the budget');
  });

  it('keeps what the spacecraft want alone within the time, and shares it out evenly', () => {
    const candidates = inventedOffers({ seed: 7, craft: 4, antennas: 12, days: 3, fromMs: FROM_MS });
    const need = needFor(4, 3);
    const hungry = { ...need, craft: need.craft.map((each) => ({ ...each, longestGapMs: 8 * HOUR_MS })) };
    const asked: number[] = [];
    const clock = countdown(20, 0.05);
    const result = makePlan({
      ...questionOf(hungry, candidates, clock.secondsLeft),
      solve: (question) => {
        if (!question.whole) asked.push(question.timeLimitS);
        return solve(question);
      },
    });
    expect(result.status).toBe('met');
    expect(asked.slice(0, 4).every((limitS) => limitS > 0 && limitS <= 20)).toBe(true);
    expect(asked[0]).toBeLessThanOrEqual(20 / 4);
    // Fewer than there are candidates: no spacecraft's looking runs on when the time is over.
    expect(clock.late()).toBeLessThan(40);
  });

  it('takes the cheapest pass that helps, each time, where there is no time for more, and claims no proof', () => {
    const candidates = inventedOffers({ seed: 7, craft: 4, antennas: 12, days: 3, fromMs: FROM_MS });
    const need = needFor(4, 3);
    const limits: number[] = [];
    const result = makePlan({
      ...questionOf(need, candidates, () => -1),
      solve: (question) => {
        limits.push(question.timeLimitS);
        return { status: 'stopped', objective: 0, bound: 0, values: [], reducedCosts: [], rowDuals: [] };
      },
    });
    expect(result).toMatchObject({ status: 'met', proven: false, cost: result.greedyCost });
    expect(shortfalls(need, result.chosen)).toEqual([]);
    expect(limits.every((limitS) => limitS > 0)).toBe(true);
    // All but the last, which explains, and has a limit of its own.
    expect(limits.slice(0, -1).reduce((sum, limitS) => sum + limitS, 0)).toBeLessThan(1);
  });
});
