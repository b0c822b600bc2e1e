/** Plans that two operators have made: a draft that meets its need, and one that shows what cannot be met. */
import { setTimeout as pause } from 'node:timers/promises';
import { type BodyInput, routes } from '@skyberth/shared';
import type { Company, PlayOperator } from './settle-in.js';
import type { Stage } from './stage.js';

const DAY_MS = 86_400_000;
const ASK_MS = 250;
/** Far more than the planner's own limit of 20 s and its search of the market. */
const LONGEST_WAIT_MS = 120_000;

type Need = BodyInput<typeof routes.createPlan>;
type Wish = Pick<Need, 'name' | 'days'> & { readonly each: Omit<Need['craft'][number], 'spacecraftId'> };

/** A week's rhythm that the stations on sale can give. */
const ROUTINE: Wish = {
  name: 'Routine downlinks',
  days: 3,
  each: { contactsPerDay: 2, longestGapH: 16, lowestElevationDeg: 10, shortestS: 240 },
};
/** Every orbit has a pass somewhere, but not every one is for sale: some gaps stay longer than this. */
const TOO_MUCH: Wish = {
  name: 'Storm watch, every orbit',
  days: 2,
  each: { contactsPerDay: 4, longestGapH: 1.5, lowestElevationDeg: 10, shortestS: 240 },
};
const CRAFT_IN_PLAN = 3;

/** Called in the present, after everything is on sale and bought: plans begin tomorrow. */
export async function makePlans(stage: Stage, company: Company): Promise<void> {
  const [first, second] = company.operators;
  if (first) await makePlan(stage, first, ROUTINE);
  if (second) await makePlan(stage, second, TOO_MUCH);
}

async function makePlan(stage: Stage, { manager, spacecraft }: PlayOperator, wish: Wish): Promise<void> {
  const { each, ...rest } = wish;
  const firstDay = new Date((Math.floor(stage.nowMs() / DAY_MS) + 1) * DAY_MS).toISOString().slice(0, 10);
  const craft = spacecraft.slice(0, CRAFT_IN_PLAN).map(({ id }) => ({ ...each, spacecraftId: id }));
  const currency = { kind: 'one', currency: 'EUR' } as const;
  const { id } = await stage.call(manager, routes.createPlan, { body: { ...rest, firstDay, craft, currency } });
  const untilMs = performance.now() + LONGEST_WAIT_MS;
  for (;;) {
    const plan = await stage.call(manager, routes.getPlan, { params: { id } });
    if (plan.work === 'done') return;
    if (plan.work !== 'working') throw new Error(`The plan "${wish.name}" was not made: ${plan.failure ?? plan.work}`);
    if (performance.now() > untilMs) throw new Error(`The plan "${wish.name}" was not ready in time.`);
    await pause(ASK_MS);
  }
}
