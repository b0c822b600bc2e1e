/**
 * `npm run bench:planner`: plans for an invented market of the size that the product promises, printed as figures: time to
 * a plan within 1 % of the cheapest, how near it is proven, and what the plan saves against taking the cheapest pass that
 * helps, again and again. One thread, as the product plans. Needs `npm run build` (or `npx tsc -b apps/api`) first.
 */
import { highsSolver } from '../../apps/api/dist/planning/workers/highs-solver.js';
import { inventedOffers, makePlan } from '../../packages/planner/dist/index.js';

const DAY_MS = 86_400_000;
const HOUR_MS = 3_600_000;
const FROM_MS = Date.UTC(2026, 11, 2);
const LIMIT_S = 20;

const CASES = [
  { name: 'six spacecraft, 20 antennas, 7 days', craft: 6, antennas: 20, days: 7, seed: 1 },
  { name: '20 spacecraft, 60 antennas, 7 days', craft: 20, antennas: 60, days: 7, seed: 2 },
  { name: '20 spacecraft, 60 antennas, 7 days, other chance', craft: 20, antennas: 60, days: 7, seed: 3 },
  { name: '20 spacecraft crowding 12 antennas, 7 days', craft: 20, antennas: 12, days: 7, seed: 4 },
];

const solve = await highsSolver();
console.log('case | offers | looked at | seconds | status | gap % | cost | greedy | saving %');
for (const { name, craft, antennas, days, seed } of CASES) {
  const candidates = inventedOffers({ seed, craft, antennas, days, fromMs: FROM_MS });
  const need = {
    fromMs: FROM_MS,
    toMs: FROM_MS + days * DAY_MS,
    craft: Array.from({ length: craft }, (_, number) => ({
      craftId: `c${number}`,
      name: `Craft ${number}`,
      contactsPerDay: 2 + (number % 3),
      // About as much as three middling passes bring down.
      volumeBitsPerDay: volumeOf(candidates, `c${number}`) * 3,
      deliverByMs: null,
      longestGapMs: (6 + (number % 3) * 2) * HOUR_MS,
      uplinkEveryMs: number % 2 === 0 ? 24 * HOUR_MS : null,
    })),
    budgets: [],
    rates: { EUR: 1 },
    bannedStationIds: [],
    preferredStationIds: [],
    preferencePercent: 0,
    pinnedIds: [],
    struckIds: [],
  };
  const began = performance.now();
  const result = makePlan({
    need,
    candidates,
    solve,
    baseCurrency: 'EUR',
    money: (amountMinor, currency) => `${(amountMinor / 100).toFixed(2)} ${currency}`,
    stationName: (id) => id,
    targetGap: 0.01,
    secondsLeft: () => LIMIT_S - (performance.now() - began) / 1000,
    onProgress: process.env.TELL
      ? (p) => console.log(((performance.now() - began) / 1000).toFixed(2), JSON.stringify(p))
      : undefined,
  });
  const seconds = (performance.now() - began) / 1000;
  const saving = result.greedyCost === null ? 'stuck' : (100 * (1 - result.cost / result.greedyCost)).toFixed(1);
  const figures = [
    candidates.length,
    result.considered,
    seconds.toFixed(1),
    result.status,
    (100 * result.gap).toFixed(2),
  ];
  console.log(
    `${name} | ${figures.join(' | ')} | ${result.cost.toFixed(0)} | ${result.greedyCost?.toFixed(0) ?? 'stuck'} | ${saving}`,
  );
}

function volumeOf(candidates, craftId) {
  const mine = candidates
    .filter((each) => each.craftId === craftId)
    .map((each) => each.volumeBits)
    .sort((a, b) => a - b);
  return mine[Math.floor(mine.length / 2)];
}
