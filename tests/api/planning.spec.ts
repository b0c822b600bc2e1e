import { randomUUID } from 'node:crypto';
import type { BodyInput, Plan } from '@skyberth/shared';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { elementsAt, RADIO } from './harness/shop.js';
import { antennaOnSale } from './harness/stations.js';
import { must, type Person, routes, type Skyberth, startSkyberth } from './harness.js';

const START_MS = Date.UTC(2026, 11, 1, 12);
const HOUR_MS = 3_600_000;
type Need = BodyInput<typeof routes.createPlan>;

let skyberth: Skyberth;
let owner: Person;
let operator: Person;
let other: Person;
let pipit: string;

beforeAll(async () => {
  skyberth = await startSkyberth();
  skyberth.clock.set(START_MS);
  owner = await skyberth.people.owner();
  operator = await skyberth.people.operator();
  other = await skyberth.people.operator();
  await antennaOnSale(skyberth, owner);
  const text = elementsAt(START_MS - 6 * HOUR_MS, 71_201);
  const saved = await must(skyberth.call(routes.saveElements, { body: { text }, as: operator }));
  pipit = saved.spacecraft[0]?.id ?? '';
  const body = { name: 'Pipit 1', shortName: 'P1', catalogNumber: 71_201, radios: [RADIO] };
  await must(skyberth.call(routes.updateSpacecraft, { params: { id: pipit }, body, as: operator }));
});
afterAll(() => skyberth.stop());

const need = (change: Partial<Need> = {}): Need => ({
  name: 'Two days',
  firstDay: '2026-12-02',
  days: 2,
  craft: [{ spacecraftId: pipit, contactsPerDay: 2 }],
  currency: { kind: 'one', currency: 'EUR' },
  ...change,
});

async function ready(id: string): Promise<Plan> {
  for (let tries = 0; tries < 400; tries += 1) {
    const plan = await must(skyberth.call(routes.getPlan, { params: { id }, as: operator }));
    if (plan.work !== 'working') return plan;
    await new Promise((resolve) => setTimeout(resolve, 50));
  }
  throw new Error('The plan was not ready in time.');
}

const made = async (wish: Need): Promise<Plan> =>
  ready((await must(skyberth.call(routes.createPlan, { body: wish, as: operator }))).id);

async function refusal(wish: Need, as = operator) {
  const answer = await skyberth.call(routes.createPlan, { body: wish, as });
  if (answer.ok) throw new Error('It was not refused.');
  return answer.problem;
}

describe('a plan is refused', () => {
  it("for someone else's spacecraft", async () => {
    expect((await refusal(need(), other)).code).toBe('not-found');
  });

  it('for days that have begun', async () => {
    const problem = await refusal(need({ firstDay: '2026-12-01' }));
    expect(problem).toMatchObject({ code: 'bad-input', errors: [{ pointer: '/firstDay' }] });
  });

  it('where a station is both preferred and banned', async () => {
    const station = randomUUID();
    const problem = await refusal(need({ preferredStationIds: [station], bannedStationIds: [station] }));
    expect(problem.detail).toBe('A station cannot be both preferred and banned.');
  });

  it('where nothing is asked', async () => {
    const problem = await refusal(need({ craft: [{ spacecraftId: pipit }] }));
    expect(problem.detail).toContain('Nothing is asked for Pipit 1.');
  });

  it('to people of other organisations, who cannot read, stop, change, hold or give it up', async () => {
    const { id } = await made(need());
    const params = { id };
    const codes = [
      await skyberth.call(routes.getPlan, { params, as: other }),
      await skyberth.call(routes.stopPlan, { params, as: other }),
      await skyberth.call(routes.replan, { params, body: { need: need() }, as: other }),
      await skyberth.call(routes.holdPlan, { params, body: {}, as: other }),
      await skyberth.call(routes.giveUpPlan, { params, as: other }),
    ].map((answer) => (answer.ok ? 'done' : answer.problem.code));
    expect(codes.slice(0, 2)).toEqual(['not-found', 'not-found']);
    expect(codes).not.toContain('done');
  });
});

describe('a plan', () => {
  it('meets the need, costs what its passes cost, and is the cheapest of the day', async () => {
    const plan = await made(need());
    const { outcome } = plan;
    expect(plan.failure).toBeNull();
    expect(outcome).toMatchObject({ status: 'met', gapPercent: 0, proven: true, unmet: [] });
    expect(outcome?.passes).toHaveLength(4);
    const sum = (outcome?.passes ?? []).reduce((total, pass) => total + pass.toPayMinor, 0);
    expect(outcome?.sums).toEqual([{ amountMinor: sum, currency: 'EUR' }]);
    expect(outcome?.passes.every((pass) => pass.bytes > 0)).toBe(true);
  });

  it('keeps in and strikes out passes when it is made again', async () => {
    const first = await made(need());
    const [struck, kept] = first.outcome?.passes ?? [];
    const body = { need: need(), pinnedKeys: [kept?.key ?? ''], struckKeys: [struck?.key ?? ''] };
    await must(skyberth.call(routes.replan, { params: { id: first.id }, body, as: operator }));
    const keys = (await ready(first.id)).outcome?.passes.map((pass) => pass.key);
    expect(keys).toContain(kept?.key);
    expect(keys).not.toContain(struck?.key);
  });

  it('says what cannot be met and the smallest figure that could', async () => {
    const { outcome } = await made(need({ craft: [{ spacecraftId: pipit, contactsPerDay: 1, longestGapH: 1 }] }));
    expect(outcome?.status).toBe('partly');
    expect(outcome?.unmet.map((each) => each.kind)).toContain('gap');
    expect(outcome?.unmet.find((each) => each.kind === 'gap')?.sentence).toMatch(/you allow 1 h\. Allow \d+ h/);
  });

  it('says what a budget lacks', async () => {
    const { outcome } = await made(need({ budgets: [{ amountMinor: 100, currency: 'EUR' }] }));
    expect(outcome?.status).toBe('partly');
    expect(outcome?.unmet.some((each) => each.kind === 'budget')).toBe(true);
    expect(outcome?.sums.every((each) => each.amountMinor <= 100)).toBe(true);
  });

  it('can be stopped while it is being made, once, keeps its need, and can be made again', async () => {
    const { id } = await must(skyberth.call(routes.createPlan, { body: need(), as: operator }));
    const params = { id };
    const stopped = await must(skyberth.call(routes.stopPlan, { params, as: operator }));
    expect(stopped).toMatchObject({ state: 'draft', work: 'stopped', outcome: null, progress: null });
    const again = await skyberth.call(routes.stopPlan, { params, as: operator });
    expect(again.ok ? '' : again.problem.code).toBe('wrong-state');
    const body = { need: stopped.need };
    await must(skyberth.call(routes.replan, { params, body, as: operator }));
    expect((await ready(id)).outcome?.status).toBe('met');
  });

  it('keeps what was found before where making it again is stopped', async () => {
    const first = await made(need());
    const params = { id: first.id };
    await must(skyberth.call(routes.replan, { params, body: { need: need() }, as: operator }));
    const stopped = await must(skyberth.call(routes.stopPlan, { params, as: operator }));
    expect(stopped.work).toBe('stopped');
    expect(stopped.outcome).toEqual(first.outcome);
  });

  it('can be given up, once', async () => {
    const { id } = await made(need());
    const gone = await must(skyberth.call(routes.giveUpPlan, { params: { id }, as: operator }));
    expect(gone.state).toBe('given up');
    const again = await skyberth.call(routes.giveUpPlan, { params: { id }, as: operator });
    expect(again.ok ? '' : again.problem.code).toBe('wrong-state');
  });

  it('holds all of its contacts at the planned price, and is a draft again when they are let go', async () => {
    const { id, outcome } = await made(need());
    const held = await must(skyberth.call(routes.holdPlan, { params: { id }, body: {}, as: operator }));
    expect(held.state).toBe('held');
    const params = { id: held.groupId ?? '' };
    const group = await must(skyberth.call(routes.getGroup, { params, as: operator }));
    expect(group.totals).toEqual([{ currency: 'EUR', toPayMinor: outcome?.sums[0]?.amountMinor }]);
    await must(skyberth.call(routes.letGroupGo, { params, as: operator }));
    expect((await must(skyberth.call(routes.getPlan, { params: { id }, as: operator }))).state).toBe('draft');
  });
});
