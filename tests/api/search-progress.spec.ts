import { randomUUID } from 'node:crypto';
import { routes } from '@skyberth/shared';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { antennaOnSale } from './harness/stations.js';
import { tleText } from './harness/tle.js';
import { must, type Person, type Skyberth, startSkyberth } from './harness.js';

const START_MS = Date.UTC(2026, 11, 1, 12);
const DAY_MS = 86_400_000;
const CRAFT = 12;

let skyberth: Skyberth;
let operator: Person;
let spacecraftIds: string[];

beforeAll(async () => {
  skyberth = await startSkyberth({ environment: { PASS_WORKERS: '1' } });
  skyberth.clock.set(START_MS);
  await antennaOnSale(skyberth, await skyberth.people.owner());
  operator = await skyberth.people.operator();
  const texts = Array.from({ length: CRAFT }, (_, index) =>
    tleText({
      name: `Teal ${index}`,
      catalogNumber: 73_001 + index,
      epochMs: START_MS - 3_600_000,
      raanDeg: index * 30,
    }),
  );
  const saved = await must(skyberth.call(routes.saveElements, { body: { text: texts.join('\n') }, as: operator }));
  spacecraftIds = saved.spacecraft.map((each) => each.id);
});
afterAll(() => skyberth.stop());

const progress = (searchId: string, as: Person) => skyberth.call(routes.searchProgress, { params: { searchId }, as });

describe('the progress of a search', () => {
  it('is not found for a search that nobody makes', async () => {
    expect((await progress(randomUUID(), operator)).problem?.code).toBe('not-found');
  });

  it('is told to its own organisation while it runs, and to nobody afterwards', async () => {
    const stranger = await skyberth.people.operator();
    const searchId = randomUUID();
    let isOver = false;
    const search = skyberth
      .call(routes.searchPasses, {
        body: {
          spacecraftIds,
          searchId,
          fromUtc: new Date(START_MS).toISOString(),
          toUtc: new Date(START_MS + 31 * DAY_MS).toISOString(),
          lowestElevationDeg: 80,
        },
        as: operator,
      })
      .finally(() => {
        isOver = true;
      });
    const seen: { done: number; of: number }[] = [];
    const strange: (string | undefined)[] = [];
    while (!isOver) {
      const answer = await progress(searchId, operator);
      if (answer.body !== undefined) seen.push(answer.body);
      strange.push((await progress(searchId, stranger)).problem?.code);
    }
    expect((await search).status).toBe(200);
    expect(seen.length).toBeGreaterThan(0);
    for (const each of seen) {
      expect(each.of).toBe(CRAFT);
      expect(each.done).toBeLessThanOrEqual(CRAFT);
    }
    expect(seen.map((each) => each.done)).toEqual(seen.map((each) => each.done).sort((a, b) => a - b));
    expect(new Set(strange)).toEqual(new Set(['not-found']));
    expect((await progress(searchId, operator)).problem?.code).toBe('not-found');
  });
});
