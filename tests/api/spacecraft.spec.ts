import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { addSoldContact } from './harness/sold-contact.js';
import { antennaOnSale } from './harness/stations.js';
import { tleText } from './harness/tle.js';
import { must, type Person, routes, type Skyberth, startSkyberth } from './harness.js';

const HOUR_MS = 3_600_000;
const DAY_MS = 24 * HOUR_MS;

let skyberth: Skyberth;
let operator: Person;
beforeAll(async () => {
  skyberth = await startSkyberth();
});
afterAll(() => skyberth.stop());

const RADIO = {
  name: 'Payload',
  direction: 'downlink',
  band: 'X',
  centreFrequencyMhz: 8_150,
  bandwidthKhz: 60_000,
  polarisation: 'right',
  modulation: 'OQPSK',
  coding: 'none',
  dataRateBps: 80_000_000,
  eirpDbw: 12,
  requiredEbN0Db: 6,
  requiredEirpDbw: null,
} as const;

let number = 91_000;
/** One set of the next object; of the same one where `again` is given. */
const next = (epochAgoMs = HOUR_MS, name?: string, again?: number) => {
  if (again === undefined) number += 1;
  const catalogNumber = again ?? number;
  return tleText({
    catalogNumber,
    epochMs: skyberth.clock.nowMs() - epochAgoMs,
    ...(name === undefined ? {} : { name }),
  });
};
const read = (text: string, more: object = {}, as = operator) =>
  skyberth.call(routes.readElements, { body: { text, ...more }, as });
const save = (text: string, more: object = {}, as = operator) =>
  skyberth.call(routes.saveElements, { body: { text, ...more }, as });
const get = (id: string, as = operator) => skyberth.call(routes.getSpacecraft, { params: { id }, as });

describe('a spacecraft', () => {
  beforeAll(async () => {
    operator = await skyberth.people.operator();
  });

  it('is kept with its radios, which keep their ids when it changes', async () => {
    const body = { name: 'Whimbrel 1', shortName: 'W1', catalogNumber: 90_001, radios: [RADIO] };
    const made = await must(skyberth.call(routes.createSpacecraft, { body, as: operator }));
    expect(made).toMatchObject({ ...body, freshness: 'none', elements: null, state: 'active' });
    const radios = [
      { ...RADIO, name: 'Beacon', dataRateBps: 9_600 },
      { ...RADIO, eirpDbw: 13 },
    ];
    const params = { id: made.id };
    const changed = await must(
      skyberth.call(routes.updateSpacecraft, { params, body: { ...body, radios }, as: operator }),
    );
    expect(changed.radios.find((radio) => radio.name === 'Payload')).toMatchObject({
      id: made.radios[0]?.id,
      eirpDbw: 13,
    });
    expect(changed.radios).toHaveLength(2);
  });

  it('needs a name and a number of its own within the organisation', async () => {
    const make = (name: string, catalogNumber: number | null, as = operator) =>
      skyberth.call(routes.createSpacecraft, { body: { name, shortName: 'X', catalogNumber }, as });
    await must(make('Only One', 90_100));
    expect((await make('ONLY ONE', 90_101)).problem?.code).toBe('already-exists');
    expect((await make('Another', 90_100)).problem?.code).toBe('already-exists');
    expect((await make('Numberless 1', null)).status).toBe(201);
    expect((await make('Numberless 2', null)).status).toBe(201);
    expect((await make('Only One', 90_100, await skyberth.people.operator())).status).toBe(201);
  });

  it('cannot be retired with a contact to come, and can afterwards', async () => {
    const owner = await skyberth.people.owner();
    const { antenna } = await antennaOnSale(skyberth, owner);
    const [craft] = (await must(save(next()))).spacecraft;
    const id = craft?.id ?? '';
    const aosMs = skyberth.clock.nowMs() + HOUR_MS;
    addSoldContact(skyberth, { operator, owner, antennaId: antenna.id, spacecraftId: id, aosMs });
    const retire = () => skyberth.call(routes.retireSpacecraft, { params: { id }, as: operator });
    expect((await retire()).problem).toMatchObject({ code: 'wrong-state' });
    skyberth.clock.advance(2 * HOUR_MS);
    operator = await skyberth.people.awake(operator);
    expect((await must(retire())).state).toBe('retired');
    const listed = async (state: 'active' | 'retired' | 'all') =>
      (await must(skyberth.call(routes.listSpacecraft, { query: { state }, as: operator }))).items.map(
        (item) => item.id,
      );
    expect(await listed('active')).not.toContain(id);
    expect(await listed('retired')).toEqual([id]);
  });
});

describe('element sets', () => {
  beforeAll(async () => {
    operator = await skyberth.people.operator();
  });

  it('are read without being saved', async () => {
    const { good, faults } = await must(read(next(HOUR_MS, 'GODWIT 7')));
    expect(faults).toEqual([]);
    expect(good).toMatchObject([{ objectName: 'GODWIT 7', fate: 'new-spacecraft', spacecraftId: null, line: 1 }]);
    expect(good[0]?.ageH).toBeCloseTo(1, 3);
    expect((await must(skyberth.call(routes.listSpacecraft, { query: {}, as: operator }))).total).toBe(0);
  });

  it('make a spacecraft each, once', async () => {
    const text = [next(HOUR_MS, 'GODWIT 8'), next(HOUR_MS, 'GODWIT 9')].join('\n');
    const first = await must(save(text));
    expect(first).toMatchObject({ saved: 2, duplicates: 0, faults: [] });
    expect(first.spacecraft.map((each) => [each.name, each.added])).toEqual([
      ['GODWIT 8', true],
      ['GODWIT 9', true],
    ]);
    const again = await must(save(text));
    expect(again).toMatchObject({ saved: 0, duplicates: 2 });
    expect(again.spacecraft.every((each) => !each.added)).toBe(true);
    expect((await must(get(first.spacecraft[0]?.id ?? ''))).shortName).toBe('G8');
  });

  it('are all kept, the newest in force, whatever the order in which they came', async () => {
    const newest = next(2 * HOUR_MS);
    const [craft] = (await must(save(newest))).spacecraft;
    const id = craft?.id ?? '';
    const older = next(30 * HOUR_MS, undefined, number);
    expect((await must(read(older))).good[0]?.fate).toBe('older');
    await must(save(older));
    await must(save(next(3 * HOUR_MS, undefined, number), { fileName: 'orbit.tle' }));
    const { items, total } = await must(
      skyberth.call(routes.listElements, { params: { id }, query: {}, as: operator }),
    );
    expect(total).toBe(3);
    expect(items.map((item) => Math.round(item.ageH))).toEqual([2, 3, 30]);
    expect(items[1]).toMatchObject({ source: 'file orbit.tle', format: 'tle' });
    expect((await must(get(id))).elements?.id).toBe(items[0]?.id);
  });

  it('say how far they can be trusted as they age', async () => {
    const [craft] = (await must(save(next()))).spacecraft;
    const id = craft?.id ?? '';
    const young = await must(get(id));
    expect(young.freshness).toBe('fresh');
    skyberth.clock.advance(40 * DAY_MS);
    operator = await skyberth.people.awake(operator);
    const old = await must(get(id));
    expect(old.freshness).toBe('stale');
    expect(old.elements?.timingErrorS).toBeGreaterThan(young.elements?.timingErrorS ?? Number.POSITIVE_INFINITY);
  });

  it('are not half saved without consent', async () => {
    const broken = next().replace(/.$/, (digit) => String((Number(digit) + 1) % 10));
    const text = [next(), broken, next()].join('\n');
    const { good, faults } = await must(read(text));
    expect(good).toHaveLength(2);
    expect(faults).toHaveLength(1);
    expect(faults[0]).toMatchObject({ line: 4, field: expect.stringContaining('checksum') as string });
    const before = (await must(skyberth.call(routes.listSpacecraft, { query: {}, as: operator }))).total;
    const { problem } = await save(text);
    expect(problem?.code).toBe('elements-unusable');
    expect(problem?.errors?.[0]?.detail).toContain('Line 4');
    expect((await must(skyberth.call(routes.listSpacecraft, { query: {}, as: operator }))).total).toBe(before);
    const kept = await must(save(text, { keepGoodOnes: true }));
    expect(kept).toMatchObject({ saved: 2, faults: [{ line: 4 }] });
  });

  it('are refused where nothing in the text is one', async () => {
    const { problem } = await save('hello, harbour', { keepGoodOnes: true });
    expect(problem?.code).toBe('elements-unusable');
  });

  it('add no spacecraft where none is wanted', async () => {
    const { problem } = await save(next(), { addSpacecraft: false });
    expect(problem).toMatchObject({ code: 'elements-unusable' });
    expect(problem?.detail).toContain('Nothing was saved');
  });

  it('can be attached to a spacecraft that has no number yet', async () => {
    const body = { name: 'Just launched', shortName: 'JL' };
    const { id } = await must(skyberth.call(routes.createSpacecraft, { body, as: operator }));
    await must(save(next(), { spacecraftId: id }));
    expect((await must(get(id))).freshness).toBe('fresh');
    const { problem } = await save([next(), next()].join('\n'), { spacecraftId: id });
    expect(problem).toMatchObject({ code: 'bad-input', errors: [{ pointer: '/text' }] });
    const other = await skyberth.people.operator();
    expect((await save(next(), { spacecraftId: id }, other)).problem?.code).toBe('not-found');
  });

  it('of one object belong to each organisation by itself', async () => {
    const text = next();
    const other = await skyberth.people.operator();
    const [mine] = (await must(save(text))).spacecraft;
    const theirs = await must(save(text, {}, other));
    expect(theirs).toMatchObject({ saved: 1, duplicates: 0 });
    expect(theirs.spacecraft[0]?.id).not.toBe(mine?.id);
    expect((await get(mine?.id ?? '', other)).problem?.code).toBe('not-found');
  });

  it('with a coming epoch serve the days before it', async () => {
    const [craft] = (await must(save(next(-DAY_MS)))).spacecraft;
    expect((await must(get(craft?.id ?? ''))).elements?.ageH).toBeCloseTo(-24, 2);
    const [later] = (await must(save(next(-10 * DAY_MS)))).spacecraft;
    expect((await must(get(later?.id ?? ''))).freshness).toBe('none');
  });

  it('come back from a hostile file of ten thousand lines with every fault named', async () => {
    const lines: string[] = [];
    const damaged: number[] = [];
    for (let n = 0; n < 5_000; n += 1) {
      const set = next().split('\n');
      if (n % 50 === 7) {
        set[1] = `${set[1]?.slice(0, 68)}${(Number(set[1]?.[68]) + 3) % 10}`;
        damaged.push(lines.length + 2);
      }
      lines.push(...set);
    }
    const { good, faults } = await must(read(lines.join('\n')));
    expect(good).toHaveLength(5_000 - damaged.length);
    expect(faults.map((fault) => fault.line)).toEqual(damaged);
    const fleet = await skyberth.people.operator();
    const saved = await must(save(lines.join('\n'), { keepGoodOnes: true }, fleet));
    expect(saved.saved).toBe(5_000 - damaged.length);
  });
});
