import { type BodyInput, routes } from '@skyberth/shared';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { antennaOnSale } from './harness/stations.js';
import { tleText } from './harness/tle.js';
import { must, type Person, type Skyberth, startSkyberth } from './harness.js';

const START_MS = Date.UTC(2026, 11, 1, 12);
const DAY_MS = 86_400_000;
const CRAFT = ['Knot 1', 'Knot 2', 'Knot 3', 'Knot 4', 'Knot 5'];

/** The built worker threads (the type check before the tests has built them) against the same search without threads. */
const servers: { skyberth: Skyberth; operator: Person; spacecraftIds: string[] }[] = [];

beforeAll(async () => {
  for (const workers of ['0', '2']) {
    const skyberth = await startSkyberth({ environment: { PASS_WORKERS: workers } });
    skyberth.clock.set(START_MS);
    await antennaOnSale(skyberth, await skyberth.people.owner());
    const operator = await skyberth.people.operator();
    const texts = CRAFT.map((name, index) =>
      tleText({ name, catalogNumber: 72_001 + index, epochMs: START_MS - 3_600_000, raanDeg: index * 60 }),
    );
    const saved = await must(skyberth.call(routes.saveElements, { body: { text: texts.join('\n') }, as: operator }));
    servers.push({ skyberth, operator, spacecraftIds: saved.spacecraft.map((each) => each.id) });
  }
});
afterAll(async () => {
  for (const { skyberth } of servers) await skyberth.stop();
});

describe('pass workers', () => {
  it('find what is found without them', async () => {
    const answers = [];
    for (const { skyberth, operator, spacecraftIds } of servers) {
      const body: BodyInput<typeof routes.searchPasses> = {
        spacecraftIds,
        fromUtc: new Date(START_MS).toISOString(),
        toUtc: new Date(START_MS + 2 * DAY_MS).toISOString(),
      };
      const found = await must(skyberth.call(routes.searchPasses, { body, as: operator }));
      const name = new Map(found.spacecraft.map((each) => [each.id, each.name]));
      expect(found.counts.passes).toBe(found.passes.length);
      answers.push(
        found.passes
          .map(({ spacecraftId, geometry, profile, state, parts }) => ({
            name: name.get(spacecraftId),
            geometry,
            profile,
            state,
            parts,
          }))
          .sort((a, b) => `${a.name}${a.geometry.aosUtc}`.localeCompare(`${b.name}${b.geometry.aosUtc}`)),
      );
    }
    expect(answers[0]?.length).toBeGreaterThan(50);
    expect(answers[1]).toEqual(answers[0]);
  });
});
