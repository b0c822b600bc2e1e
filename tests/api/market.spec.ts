import { randomUUID } from 'node:crypto';
import { compileMask, findPasses, parseElementSets, sgp4Source } from '@skyberth/orbit';
import type { BodyInput, FoundPass, Reason, SearchResult } from '@skyberth/shared';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { occupy } from './harness/bookings.js';
import { antennaOnSale, BANDS, PRICE, STATION } from './harness/stations.js';
import { type OrbitOptions, tleText } from './harness/tle.js';
import { must, type Person, routes, type Skyberth, startSkyberth } from './harness.js';

const START_MS = Date.UTC(2026, 11, 1, 12);
const HOUR_MS = 3_600_000;
const DAY_MS = 24 * HOUR_MS;
const EPOCH_MS = START_MS - 6 * HOUR_MS;
/** Day by day or all at once: the engine rounds within this. */
const SAME_MS = 2;

const FLAT: [number, number][] = [[0, 5]];
/** A cliff in the south: nothing below 40° between 100° and 260°. */
const CLIFF: [number, number][] = [
  [0, 5],
  [100, 5],
  [100, 40],
  [260, 40],
  [260, 5],
];

let skyberth: Skyberth;
let owner: Person;
let operator: Person;
let other: Person;
let whimbrel: string;
let curlew: string;

beforeAll(async () => {
  skyberth = await startSkyberth();
  skyberth.clock.set(START_MS);
  owner = await skyberth.people.owner();
  operator = await skyberth.people.operator();
  other = await skyberth.people.operator();
  whimbrel = await craft(operator, 'Whimbrel 1', 71_001, {}, 'S');
  curlew = await craft(other, 'Curlew 1', 71_002, { raanDeg: 120 }, 'S');
});
afterAll(() => skyberth.stop());

async function craft(
  as: Person,
  name: string,
  number: number,
  orbit: Partial<OrbitOptions>,
  band: 'S' | 'X' | null,
): Promise<string> {
  const text = tleText({ name, catalogNumber: number, epochMs: EPOCH_MS, ...orbit });
  const saved = await must(skyberth.call(routes.saveElements, { body: { text }, as }));
  const id = saved.spacecraft[0]?.id ?? '';
  const radio = {
    name: `${band} telemetry`,
    direction: 'downlink',
    band: band ?? 'S',
    centreFrequencyMhz: band === 'X' ? 8_212.5 : 2_245,
    bandwidthKhz: 2_000,
    polarisation: 'right',
    modulation: 'QPSK',
    coding: 'CCSDS convolutional 1/2',
    dataRateBps: 2_000_000,
    eirpDbw: 4,
    requiredEbN0Db: 4.8,
    requiredEirpDbw: null,
  } as const;
  const body = {
    name,
    shortName: name.slice(0, 1) + name.slice(-1),
    catalogNumber: number,
    radios: band === null ? [] : [radio],
  };
  await must(skyberth.call(routes.updateSpacecraft, { params: { id }, body, as }));
  return id;
}

let places = 0;
/** An antenna of its own for a test, at a station of its own. */
async function antenna(options: Parameters<typeof antennaOnSale>[2] = {}) {
  places += 1;
  const station = { name: `Place ${places}`, ...options.station };
  const made = await antennaOnSale(skyberth, owner, { mask: FLAT, ...options, station });
  return { antennaId: made.antenna.id, stationId: made.station.id };
}

const utc = (timeMs: number) => new Date(timeMs).toISOString();
type Search = Partial<BodyInput<typeof routes.searchPasses>>;
const ask = (stationIds: string[], change: Search = {}, as = operator) =>
  skyberth.call(routes.searchPasses, {
    body: {
      spacecraftIds: [whimbrel],
      fromUtc: utc(START_MS),
      toUtc: utc(START_MS + 2 * DAY_MS),
      stationIds,
      ...change,
    },
    as,
  });
const search = (stationIds: string[], change: Search = {}, as = operator): Promise<SearchResult> =>
  must(ask(stationIds, change, as));

const lengthMs = (pass: FoundPass) => Date.parse(pass.geometry.losUtc) - Date.parse(pass.geometry.aosUtc);
const first = <T>(items: readonly T[]): T => {
  const [item] = items;
  if (item === undefined) throw new Error('There is none.');
  return item;
};
/** What does not depend on when it was asked; a sentence may hold the earliest time to buy for. */
const lasting = ({ key, geometry, profile, state, parts }: FoundPass) => ({ key, geometry, profile, state, parts });
const codes = (reasons: readonly Reason[]) => reasons.map((reason) => reason.code);

describe('a search', () => {
  it("finds exactly the engine's own passes", async () => {
    const { stationId } = await antenna();
    const { passes } = await search([stationId], { lowestElevationDeg: 0 });
    const set = first(parseElementSets(tleText({ name: 'Whimbrel 1', catalogNumber: 71_001, epochMs: EPOCH_MS })).sets);
    const expected = findPasses({
      source: sgp4Source(set),
      site: STATION,
      mask: compileMask(FLAT),
      minElevationDeg: 5,
      fromMs: START_MS,
      toMs: START_MS + 2 * DAY_MS,
    });
    expect(passes.length).toBeGreaterThan(10);
    expect(passes).toHaveLength(expected.length);
    passes.forEach((pass, index) => {
      const own = expected[index];
      if (!own?.clippedStart)
        expect(Math.abs(Date.parse(pass.geometry.aosUtc) - (own?.aosMs ?? 0))).toBeLessThan(SAME_MS);
      if (!own?.clippedEnd)
        expect(Math.abs(Date.parse(pass.geometry.losUtc) - (own?.losMs ?? 0))).toBeLessThan(SAME_MS);
      expect(pass.geometry.maxElevationDeg).toBeCloseTo(own?.maxElevationDeg ?? 0, 2);
    });
  });

  it('cuts passes at a cliff and draws mask and elevation along them', async () => {
    const [open, cut] = [await antenna(), await antenna({ mask: CLIFF })];
    const { passes } = await search([open.stationId, cut.stationId], { lowestElevationDeg: 0 });
    const over = (id: string) => passes.filter((pass) => pass.antennaId === id);
    const sum = (some: FoundPass[]) => some.reduce((total, pass) => total + lengthMs(pass), 0);
    expect(sum(over(cut.antennaId))).toBeLessThan(sum(over(open.antennaId)));
    expect(sum(over(cut.antennaId))).toBeGreaterThan(0);
    for (const { profile, geometry } of passes) {
      expect(profile.elevationDeg).toHaveLength(29);
      expect([1, 29]).toContain(profile.maskDeg.length);
      expect(Math.abs((profile.elevationDeg[0] ?? 0) - geometry.elevationDeg[0])).toBeLessThan(0.06);
      expect(Math.abs((profile.elevationDeg[28] ?? 0) - geometry.elevationDeg[2])).toBeLessThan(0.06);
      profile.elevationDeg.slice(1, 28).forEach((elevation, i) => {
        expect(elevation).toBeGreaterThan((profile.maskDeg[profile.maskDeg.length === 1 ? 0 : i + 1] ?? 90) - 0.11);
      });
    }
  });

  it('answers the same again, and the same for a shifted period', async () => {
    const { stationId } = await antenna({ mask: CLIFF });
    const again = await search([stationId]);
    expect((await search([stationId])).passes.map(lasting)).toEqual(again.passes.map(lasting));
    const later = await search([stationId], {
      fromUtc: utc(START_MS + 7 * HOUR_MS),
      toUtc: utc(START_MS + 3 * DAY_MS),
    });
    const keys = new Set(later.passes.map((pass) => pass.key));
    const common = again.passes.filter((pass) => Date.parse(pass.geometry.aosUtc) > START_MS + 7 * HOUR_MS);
    expect(common.length).toBeGreaterThan(5);
    for (const pass of common) expect(keys).toContain(pass.key);
  });

  it('sells what is free, at a price that a person can check', async () => {
    const { stationId } = await antenna();
    const { passes, counts, stations } = await search([stationId]);
    const pass = first(passes.filter((each) => each.state === 'for sale'));
    expect(pass.reasons).toEqual([]);
    const part = first(pass.parts);
    expect([part.aosUtc, part.losUtc]).toEqual([pass.geometry.aosUtc, pass.geometry.losUtc]);
    const seconds = Math.round(lengthMs(pass) / 1000);
    const minutes = Math.round((PRICE.perMinuteMinor * seconds) / 60);
    expect(part.totalMinor).toBe(Math.max(PRICE.minimumMinor, minutes + PRICE.setupMinor));
    expect(counts).toEqual({ passes: passes.length, forSale: passes.filter((each) => each.parts.length > 0).length });
    expect(first(stations).nights.length).toBeGreaterThan(0);
  });

  it('says notice for a pass that comes too soon, and too late for one that is over', async () => {
    const { antennaId, stationId } = await antenna({ antenna: { minNoticeMin: 1_440 } });
    const { passes } = await search([stationId], { fromUtc: utc(START_MS - DAY_MS) });
    expect(passes.every((pass) => pass.antennaId === antennaId)).toBe(true);
    const reasonAt = (wanted: (aosMs: number) => boolean) =>
      first(passes.filter((pass) => wanted(Date.parse(pass.geometry.aosUtc)))).reasons[0]?.code;
    expect(reasonAt((aosMs) => aosMs > START_MS + HOUR_MS && aosMs < START_MS + 20 * HOUR_MS)).toBe('notice');
    expect(reasonAt((aosMs) => aosMs < START_MS - HOUR_MS)).toBe('too late');
  });

  it('sells nothing beyond the furthest booking date', async () => {
    const { stationId } = await antenna({ antenna: { horizonDays: 1 } });
    const { passes } = await search([stationId]);
    const last = passes.at(-1);
    expect(last?.state).toBe('not for sale');
    expect(codes(last?.reasons ?? [])).toEqual(['horizon']);
  });

  it('gives the band with both figures where the radio does not fit', async () => {
    const gull = await craft(operator, 'Gull 1', 71_010, { raanDeg: 200 }, 'X');
    const { stationId } = await antenna({ bands: BANDS.filter((band) => band.band === 'S') });
    const { passes } = await search([stationId], { spacecraftIds: [gull] });
    expect(passes.length).toBeGreaterThan(0);
    for (const pass of passes) {
      expect(pass.state).toBe('not for sale');
      expect(codes(pass.reasons)).toEqual(['band']);
      expect(pass.reasons[0]?.sentence).toContain('8211.5 to 8213.5 MHz');
      expect(pass.reasons[0]?.sentence).toContain('2200 to 2300 MHz');
    }
  });

  it('sells no uplink without a clearance', async () => {
    const { stationId } = await antenna();
    const { passes, counts } = await search([stationId], { need: 'both' });
    expect(counts.forSale).toBe(0);
    const coming = first(passes.filter((pass) => Date.parse(pass.geometry.aosUtc) > START_MS + HOUR_MS));
    expect(codes(coming.reasons)).toContain('clearance');
  });

  it('takes out a blackout, and offers the part that is left', async () => {
    const { antennaId, stationId } = await antenna();
    const free = first(
      (await search([stationId], { lowestElevationDeg: 30 })).passes.filter((p) => p.state === 'for sale'),
    );
    const [aosMs, losMs] = [Date.parse(free.geometry.aosUtc), Date.parse(free.geometry.losUtc)];
    const body = { fromUtc: utc(losMs - 60_000), toUtc: utc(losMs + HOUR_MS), reason: 'maintenance' } as const;
    await must(skyberth.call(routes.addBlackout, { params: { id: antennaId }, body, as: owner }));
    const { passes, stations } = await search([stationId]);
    const cut = first(passes.filter((pass) => pass.geometry.aosUtc === free.geometry.aosUtc));
    expect(cut.state).toBe('part for sale');
    expect(codes(cut.reasons)).toEqual(['blackout']);
    // The teardown of 60 s is over before the blackout begins.
    expect(first(cut.parts)).toMatchObject({ aosUtc: utc(aosMs), losUtc: utc(losMs - 120_000) });
    expect(first(first(stations).antennas).blackouts).toEqual([
      { fromUtc: body.fromUtc, toUtc: body.toUtc, reason: 'maintenance' },
    ]);
  });

  it('knows the opening hours at the station', async () => {
    const { stationId } = await antenna({ rules: [{ days: [4], fromLocal: '08:00', toLocal: '09:00' }] });
    const { passes } = await search([stationId]);
    expect(
      new Set(
        passes.filter((p) => Date.parse(p.geometry.aosUtc) > START_MS + HOUR_MS).flatMap((p) => codes(p.reasons)),
      ),
    ).toEqual(new Set(['closed']));
  });

  it("keeps off other people's contacts with their guards, and does not say whose they are", async () => {
    const { antennaId, stationId } = await antenna();
    const free = first(
      (await search([stationId], { lowestElevationDeg: 30 })).passes.filter((p) => p.state === 'for sale'),
    );
    const aosMs = Date.parse(free.geometry.aosUtc);
    const guard = { guardFromMs: aosMs - 600_000, guardToMs: aosMs + 90_000 };
    const bookingId = occupy(skyberth, { operator: other, owner, spacecraftId: curlew, antennaId, ...guard });
    const answer = await search([stationId]);
    const cut = first(answer.passes.filter((pass) => pass.geometry.aosUtc === free.geometry.aosUtc));
    expect(cut.state).toBe('part for sale');
    expect(codes(cut.reasons)[0]).toMatch(/taken|turn/);
    // Set-up of 120 s, and a turn before it, follow the other contact's guard.
    expect(Date.parse(first(cut.parts).aosUtc)).toBeGreaterThanOrEqual(guard.guardToMs + 120_000);
    expect(first(first(answer.stations).antennas).taken).toEqual([
      { fromUtc: utc(guard.guardFromMs), toUtc: utc(guard.guardToMs) },
    ]);
    const text = JSON.stringify(answer);
    for (const secret of [bookingId, other.organisationId, curlew, 'Curlew']) expect(text).not.toContain(secret);
  });

  it("shows the caller's own contact as theirs, and the spacecraft as busy elsewhere", async () => {
    const [here, there] = [await antenna(), await antenna()];
    const plover = await craft(operator, 'Plover 1', 71_030, { raanDeg: 280 }, 'S');
    const spacecraftIds = [plover];
    const free = first(
      (await search([here.stationId], { spacecraftIds })).passes.filter((pass) => pass.state === 'for sale'),
    );
    const [aosMs, losMs] = [Date.parse(free.geometry.aosUtc), Date.parse(free.geometry.losUtc)];
    const bookingId = occupy(skyberth, {
      operator,
      owner,
      spacecraftId: plover,
      antennaId: here.antennaId,
      guardFromMs: aosMs - 120_000,
      guardToMs: losMs + 60_000,
      setupMs: 120_000,
      teardownMs: 60_000,
    });
    const { passes, stations } = await search([here.stationId, there.stationId], { spacecraftIds });
    const at = (id: string) =>
      first(passes.filter((p) => p.antennaId === id && p.geometry.aosUtc === free.geometry.aosUtc));
    expect(at(here.antennaId)).toMatchObject({ state: 'berth', bookingId, reasons: [] });
    expect(at(there.antennaId)).toMatchObject({ state: 'not for sale', bookingId: null });
    expect(codes(at(there.antennaId).reasons)).toEqual(['spacecraft busy']);
    expect(stations.flatMap((station) => station.antennas.flatMap((each) => each.taken))).toEqual([]);
  });

  it('keeps passes over the highest price in view, with the reason', async () => {
    const { stationId } = await antenna();
    const { passes, counts } = await search([stationId], { highestPriceMinor: 100 });
    expect(counts.forSale).toBe(0);
    const coming = first(passes.filter((pass) => Date.parse(pass.geometry.aosUtc) > START_MS + HOUR_MS));
    expect(codes(coming.reasons)).toEqual(['price']);
  });

  it('goes on with the others where the elements of one cannot be used', async () => {
    // Drag that no satellite survives for a day.
    const doomed = await craft(operator, 'Doomed 1', 71_020, { bstar: '99999+1', meanMotionRevPerDay: 16.3 }, 'S');
    const { stationId } = await antenna();
    const both = await search([stationId], { spacecraftIds: [doomed, whimbrel] });
    const alone = await search([stationId]);
    expect(both.passes.filter((pass) => pass.spacecraftId === whimbrel).map(lasting)).toEqual(
      alone.passes.map(lasting),
    );
    expect(both.spacecraft.find((each) => each.id === doomed)?.fault).toBeTruthy();
    expect(both.spacecraft.find((each) => each.id === whimbrel)?.fault).toBeNull();
  });

  it('says so for a spacecraft without elements', async () => {
    const body = { name: 'Bare 1', shortName: 'B1' };
    const { id } = await must(skyberth.call(routes.createSpacecraft, { body, as: operator }));
    const { stationId } = await antenna();
    const { spacecraft, passes } = await search([stationId], { spacecraftIds: [id] });
    expect(passes).toEqual([]);
    expect(first(spacecraft)).toMatchObject({ freshness: 'none', elementsId: null });
    expect(first(spacecraft).fault).toContain('no elements');
  });

  it('refuses what cannot be, and other people’s spacecraft', async () => {
    const { stationId } = await antenna();
    expect((await ask([stationId], { spacecraftIds: [curlew] })).problem?.code).toBe('not-found');
    expect((await ask([stationId], { spacecraftIds: [randomUUID()] })).problem?.code).toBe('not-found');
    expect((await ask([stationId], { toUtc: utc(START_MS) })).problem?.code).toBe('bad-input');
    expect((await ask([stationId], { toUtc: utc(START_MS + 32 * DAY_MS) })).problem?.code).toBe('bad-input');
    expect((await ask([stationId], { spacecraftIds: [] })).problem?.code).toBe('bad-input');
    expect((await ask([stationId], {}, owner)).problem?.code).toBe('not-allowed');
    expect((await search([randomUUID()])).passes).toEqual([]);
  });

  it('does not list antennas that are paused', async () => {
    const { antennaId, stationId } = await antenna();
    await must(skyberth.call(routes.putOnSale, { params: { id: antennaId }, body: { onSale: false }, as: owner }));
    expect((await search([stationId])).stations).toEqual([]);
    const listed = await must(skyberth.call(routes.listMarketStations, { as: operator }));
    expect(listed.items.map((item) => item.id)).not.toContain(stationId);
    expect(listed.items.length).toBeGreaterThan(0);
  });
});

describe('one pass in full', () => {
  const detail = (pass: FoundPass, change: object = {}, as = operator) => {
    const { antennaId, spacecraftId, geometry } = pass;
    const body = { antennaId, spacecraftId, aosUtc: geometry.aosUtc, losUtc: geometry.losUtc, ...change };
    return skyberth.call(routes.passDetail, { body, as });
  };

  it('has track, link, Doppler, Sun, price with VAT and refund steps', async () => {
    const { stationId } = await antenna();
    const pass = first((await search([stationId])).passes.filter((each) => each.state === 'for sale'));
    const card = await must(detail(pass));
    expect([card.aosUtc, card.losUtc]).toEqual([pass.geometry.aosUtc, pass.geometry.losUtc]);
    expect(card.geometry).toEqual(pass.geometry);
    expect(card.reasons).toEqual([]);
    expect(card.quote?.totalMinor).toBe(first(pass.parts).totalMinor);
    expect(card.quote?.toPayMinor).toBe((card.quote?.totalMinor ?? 0) + (card.quote?.vat.amountMinor ?? 0));
    expect(card.quote?.ladder.filter((step) => step.now)).toHaveLength(1);
    const link = first(card.links);
    expect(link.marginDb).toHaveLength(card.track.length);
    expect(link.dopplerHz).toHaveLength(card.track.length);
    // Coming nearer raises the frequency; f0 v / c, by definition of Doppler shift.
    expect(first(link.dopplerHz)).toBeGreaterThan(0);
    expect(first(link.dopplerHz)).toBeCloseTo((-2_245e6 * first(card.track).rangeRateKmPerS) / 299_792.458, -1);
    expect(link.volumeBits).toBeLessThanOrEqual((2_000_000 * lengthMs(pass)) / 1000);
    expect(link.volumeBits).toBeGreaterThan(0);
    const margin = first(link.budgetAtHighest.filter((line) => line.label === 'Margin')).valueDb;
    expect(Math.abs(margin - Math.max(...link.marginDb))).toBeLessThan(0.5);
    expect(card.illumination).toMatch(/sunlit|eclipsed/);
    // In the polar night the Sun is down, and there is no angle to keep off from.
    expect(card.sun.closestDeg === null).toBe(card.sun.elevationDeg < -1);
  });

  it('prices a part as a part', async () => {
    const { stationId } = await antenna();
    const pass = first(
      (await search([stationId], { lowestElevationDeg: 20 })).passes.filter((p) => p.state === 'for sale'),
    );
    const aosMs = Date.parse(pass.geometry.aosUtc) + 60_000;
    const card = await must(detail(pass, { aosUtc: utc(aosMs), losUtc: utc(aosMs + 180_000) }));
    expect(card.quote?.lines[0]?.label).toBe('3 min 00 s');
    expect(card.geometry).toEqual(pass.geometry);
    expect(Date.parse(first(card.track).timeUtc)).toBe(aosMs);
  });

  it('says why where the stretch is not for sale, and finds no pass where there is none', async () => {
    const { stationId } = await antenna();
    const pass = first(
      (await search([stationId], { lowestElevationDeg: 20 })).passes.filter((p) => p.state === 'for sale'),
    );
    const aosMs = Date.parse(pass.geometry.aosUtc);
    const early = await must(detail(pass, { aosUtc: utc(aosMs - 5_000) }));
    expect(early.quote).toBeNull();
    expect(codes(early.reasons)).toEqual(['not as asked']);
    const none = await detail(pass, { aosUtc: utc(aosMs - 1_200_000), losUtc: utc(aosMs - 600_000) });
    expect(none.problem?.code).toBe('not-for-sale');
    expect((await detail(pass, {}, other)).problem?.code).toBe('not-found');
    expect((await detail(pass, { antennaId: randomUUID() })).problem?.code).toBe('not-found');
    expect((await detail(pass, { losUtc: pass.geometry.aosUtc })).problem?.code).toBe('bad-input');
  });

  it('shows the caution of transmitting with an uplink', async () => {
    const { stationId } = await antenna();
    const pass = first(
      (await search([stationId], { lowestElevationDeg: 20 })).passes.filter((p) => p.state === 'for sale'),
    );
    const card = await must(detail(pass, { need: 'uplink' }));
    expect(card.quote).toBeNull();
    expect(codes(card.reasons)).toContain('clearance');
    expect(card.cautions[0]?.title).toMatch(/licence/);
  });
});
