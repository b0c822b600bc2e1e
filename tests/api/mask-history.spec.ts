import { routes } from '@skyberth/shared';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { antennaOnSale } from './harness/stations.js';
import { must, type Person, type Skyberth, startSkyberth } from './harness.js';

let skyberth: Skyberth;
let owner: Person;
let params: { id: string };

beforeAll(async () => {
  skyberth = await startSkyberth();
  owner = await skyberth.people.owner();
  const { antenna } = await antennaOnSale(skyberth, owner);
  params = { id: antenna.id };
});
afterAll(() => skyberth.stop());

const masks = (as: Person) => skyberth.call(routes.listMasks, { params, as });

describe('the masks of an antenna', () => {
  it('are not shown to another owner', async () => {
    expect((await masks(await skyberth.people.owner())).problem?.code).toBe('not-found');
  });

  it('are all kept, the one in force first, each with its reason and who published it', async () => {
    const before = (await must(masks(owner))).items;
    const points: [number, number][] = [
      [0, 3],
      [180, 8],
    ];
    await must(skyberth.call(routes.setMask, { params, body: { points, reason: 'new hangar' }, as: owner }));
    const [newest, ...rest] = (await must(masks(owner))).items;
    expect(newest).toMatchObject({ points, reason: 'new hangar', publishedByName: expect.any(String) });
    expect(rest).toEqual(before);
    expect(newest?.version).toBe((before[0]?.version ?? 0) + 1);
  });
});
