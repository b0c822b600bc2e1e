import { oemToKvn, parseElementSets, sampleOem, sgp4Source } from '@skyberth/orbit';
import { type FoundPass, routes } from '@skyberth/shared';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { antennaOnSale } from './harness/stations.js';
import { tleText } from './harness/tle.js';
import { must, type Person, type Skyberth, startSkyberth } from './harness.js';

const START_MS = Date.UTC(2026, 11, 1, 12);
const HOUR_MS = 3_600_000;
/** The ephemeris reaches from six to thirty hours after the start. */
const [FROM_MS, TO_MS] = [START_MS + 6 * HOUR_MS, START_MS + 30 * HOUR_MS];
/** The operator knows better than the element set: the spacecraft is a minute ahead. */
const AHEAD_MS = 60_000;

const OBJECT_ID = '2026-033A';
const tle = tleText({ name: 'Dunlin 2', catalogNumber: 74_001, epochMs: START_MS - HOUR_MS });
const [elements] = parseElementSets(tle).sets;
if (elements === undefined) throw new Error('The sample has no elements.');
const path = sgp4Source(elements);

function oemText(objectId = OBJECT_ID): string {
  const ahead = { ...path, stateTeme: (timeMs: number, out: Float64Array) => path.stateTeme(timeMs + AHEAD_MS, out) };
  return oemToKvn(
    sampleOem(ahead, {
      objectName: 'Dunlin 2',
      objectId,
      originator: 'SHORE OPERATOR',
      creationMs: START_MS,
      fromMs: FROM_MS,
      toMs: TO_MS,
      stepS: 60,
      frame: 'EME2000',
      comments: [],
    }),
  );
}

let skyberth: Skyberth;
let operator: Person;
let id: string;

beforeAll(async () => {
  skyberth = await startSkyberth();
  skyberth.clock.set(START_MS);
  await antennaOnSale(skyberth, await skyberth.people.owner());
  operator = await skyberth.people.operator();
  const saved = await must(skyberth.call(routes.saveElements, { body: { text: tle }, as: operator }));
  id = saved.spacecraft[0]?.id ?? '';
});
afterAll(() => skyberth.stop());

const add = (text: string, as = operator) =>
  skyberth.call(routes.addEphemeris, { params: { id }, body: { text, fileName: 'dunlin.oem' }, as });

async function search(): Promise<FoundPass[]> {
  const body = {
    spacecraftIds: [id],
    fromUtc: new Date(START_MS).toISOString(),
    toUtc: new Date(START_MS + 48 * HOUR_MS).toISOString(),
  };
  return (await must(skyberth.call(routes.searchPasses, { body, as: operator }))).passes;
}

const tcaMs = (pass: FoundPass) => Date.parse(pass.geometry.tcaUtc);
const times = ({ geometry, source }: FoundPass) => [geometry.aosUtc, geometry.tcaUtc, geometry.losUtc, source];
const isInside = (pass: FoundPass) =>
  Date.parse(pass.geometry.aosUtc) > FROM_MS && Date.parse(pass.geometry.losUtc) < TO_MS;

describe('an operator’s own ephemeris', () => {
  it('is refused as a whole, with file, line and reason', async () => {
    const lines = oemText().split('\n');
    const at = lines.findIndex((line) => line.startsWith('META_STOP')) + 3;
    lines[at] = (lines[at] ?? '').replace(/ \S+$/, ' 7.5x');
    const refused = await add(lines.join('\n'));
    expect(refused.problem?.code).toBe('elements-unusable');
    expect(refused.problem?.detail).toContain('dunlin.oem');
    expect(refused.problem?.errors?.[0]?.detail).toContain(`Line ${at + 1}`);
    expect(refused.problem?.errors?.[0]?.detail).toContain('7.5x');
    const metres = oemText().replaceAll(/^(\d{4}-\S+) (.*)$/gm, (_, time: string, numbers: string) =>
      [
        time,
        ...numbers
          .trim()
          .split(/\s+/)
          .map((each) => String(Number(each) * 1000)),
      ].join(' '),
    );
    expect((await add(metres)).problem?.errors?.[0]?.detail).toContain('km and km/s');
    expect((await add('not an ephemeris')).problem?.code).toBe('elements-unusable');
    const list = await must(skyberth.call(routes.listEphemerides, { params: { id }, as: operator }));
    expect(list.items).toEqual([]);
  });

  it('is not taken from or shown to another organisation', async () => {
    const stranger = await skyberth.people.operator();
    expect((await add(oemText(), stranger)).problem?.code).toBe('not-found');
    const list = await skyberth.call(routes.listEphemerides, { params: { id }, as: stranger });
    expect(list.problem?.code).toBe('not-found');
  });

  it('is refused where it is about another object', async () => {
    const one = await must(skyberth.call(routes.getSpacecraft, { params: { id }, as: operator }));
    const { name, shortName, catalogNumber } = one;
    const body = { name, shortName, catalogNumber, internationalDesignator: OBJECT_ID, radios: [] };
    await must(skyberth.call(routes.updateSpacecraft, { params: { id }, body, as: operator }));
    const refused = await add(oemText('2025-001B'));
    expect(refused.problem?.code).toBe('bad-input');
    expect(refused.problem?.detail).toContain('2025-001B');
  });

  it('moves the passes inside its span, is named in pass and contact, and gives way when withdrawn', async () => {
    const before = await search();
    const kept = await must(add(oemText()));
    expect(kept).toMatchObject({ states: 1_441, segments: 1, frame: 'EME2000', source: 'file dunlin.oem' });
    expect((await add(oemText())).problem?.code).toBe('already-exists');

    const after = await search();
    const moved = after.filter(isInside);
    expect(moved.length).toBeGreaterThan(2);
    for (const pass of moved) {
      expect(pass.source).toBe('ephemeris');
      // The Earth turns under the path by a quarter of a degree in that minute, which moves the highest point a little.
      const nearest = Math.min(...before.map((each) => Math.abs(tcaMs(each) - AHEAD_MS - tcaMs(pass))));
      expect(nearest).toBeLessThan(15_000);
    }
    const outside = (pass: FoundPass) =>
      Date.parse(pass.geometry.losUtc) < FROM_MS || Date.parse(pass.geometry.aosUtc) > TO_MS + AHEAD_MS;
    expect(after.filter(outside).map(times)).toEqual(before.filter(outside).map(times));

    const [pass] = moved.filter((each) => each.state === 'for sale');
    if (pass === undefined) throw new Error('No pass inside the ephemeris is for sale.');
    const { antennaId, geometry, parts } = pass;
    const body = { antennaId, spacecraftId: id, aosUtc: geometry.aosUtc, losUtc: geometry.losUtc };
    const detail = await must(skyberth.call(routes.passDetail, { body, as: operator }));
    expect(detail).toMatchObject({ source: 'ephemeris', ephemeris: { id: kept.id }, elements: { timingErrorS: null } });
    expect(parts[0]?.aosUtc).toBe(geometry.aosUtc);
    const expectedToPayMinor = detail.quote?.toPayMinor ?? 0;
    const held = await must(skyberth.call(routes.holdBerth, { body: { ...body, expectedToPayMinor }, as: operator }));
    expect(held.soldOn).toBe('ephemeris');

    const params = { id, ephemerisId: kept.id };
    const viewer = await skyberth.people.member(operator, 'viewer');
    expect((await skyberth.call(routes.withdrawEphemeris, { params, as: viewer })).problem?.code).toBe('not-allowed');
    const withdrawn = await must(skyberth.call(routes.withdrawEphemeris, { params, as: operator }));
    expect(withdrawn).toMatchObject({
      id: kept.id,
      withdrawnByName: expect.any(String),
      withdrawnUtc: expect.any(String),
    });
    expect((await skyberth.call(routes.withdrawEphemeris, { params, as: operator })).problem?.code).toBe('wrong-state');
    expect((await search()).map((each) => each.geometry)).toEqual(before.map((each) => each.geometry));
    const booked = await must(skyberth.call(routes.getBooking, { params: { id: held.id }, as: operator }));
    expect(booked.soldOn).toBe('ephemeris');
  });
});
