import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { ALWAYS, ANTENNA, antennaOnSale, BANDS, PRICE, STATION } from './harness/stations.js';
import { must, type Person, routes, type Skyberth, startSkyberth } from './harness.js';

let skyberth: Skyberth;
let owner: Person;
let admin: Person;
beforeAll(async () => {
  skyberth = await startSkyberth();
  owner = await skyberth.people.owner();
  admin = await skyberth.people.staff('admin');
});
afterAll(() => skyberth.stop());

let count = 0;
const freshName = () => {
  count += 1;
  return `Station ${count}`;
};
const station = (as = owner, change: Partial<typeof STATION> = {}) =>
  must(skyberth.call(routes.createStation, { body: { ...STATION, name: freshName(), ...change }, as }));
const antenna = async (as = owner) => {
  const { id } = await station(as);
  return must(skyberth.call(routes.createAntenna, { params: { id }, body: ANTENNA, as }));
};
const decide = (id: string, decision: 'approve' | 'refuse' | 'suspend', as = admin) =>
  skyberth.call(routes.decideStation, { params: { id }, body: { decision, note: 'Because.' }, as });
const submit = (id: string) => skyberth.call(routes.submitStation, { params: { id }, as: owner });

describe('a station', () => {
  it('goes from draft over waiting to approved, and its owner hears of it', async () => {
    const { id, name } = await station();
    expect((await decide(id, 'approve')).problem?.code).toBe('wrong-state');
    expect((await must(submit(id))).state).toBe('waiting');
    expect((await submit(id)).problem?.code).toBe('wrong-state');
    expect((await must(decide(id, 'approve'))).state).toBe('approved');
    await skyberth.drain();
    const mail = skyberth.mail.to(owner.email).at(-1);
    expect(mail?.subject).toBe(`${name} was approved`);
    expect(mail?.text).toContain('Because.');
  });

  it('can ask again after a refusal', async () => {
    const { id } = await station();
    await must(submit(id));
    expect(await must(decide(id, 'refuse'))).toMatchObject({ state: 'refused', stateNote: 'Because.' });
    expect((await must(submit(id))).state).toBe('waiting');
  });

  it('goes back to approval when it moves, not when it is described better', async () => {
    const { id, name } = await station();
    await must(submit(id));
    await must(decide(id, 'approve'));
    const update = (change: object) =>
      must(skyberth.call(routes.updateStation, { params: { id }, body: { ...STATION, name, ...change }, as: owner }));
    expect((await update({ description: 'On a plateau.' })).state).toBe('approved');
    expect((await update({ longitudeDeg: 18.95 })).state).toBe('waiting');
  });

  it('stays as it is while suspended, and comes back by a new approval', async () => {
    const { id, name } = await station();
    await must(submit(id));
    await must(decide(id, 'approve'));
    await must(decide(id, 'suspend'));
    const answer = await skyberth.call(routes.updateStation, { params: { id }, body: { ...STATION, name }, as: owner });
    expect(answer.problem?.code).toBe('wrong-state');
    expect((await must(decide(id, 'approve'))).state).toBe('approved');
  });

  it('needs a name of its own among the stations of its owner only', async () => {
    const { name } = await station();
    const body = { ...STATION, name: name.toUpperCase() };
    expect((await skyberth.call(routes.createStation, { body, as: owner })).problem?.code).toBe('already-exists');
    const other = await skyberth.people.owner();
    expect((await skyberth.call(routes.createStation, { body, as: other })).status).toBe(201);
  });

  it('is refused with a place or a time zone that does not exist', async () => {
    for (const change of [
      { latitudeDeg: 90.1 },
      { longitudeDeg: -180.5 },
      { timeZone: 'Europe/Nowhere' },
      { currency: 'eur' },
    ]) {
      const body = { ...STATION, name: freshName(), ...change };
      const { problem } = await skyberth.call(routes.createStation, { body, as: owner });
      expect(problem).toMatchObject({ code: 'bad-input', errors: [{ pointer: `/${Object.keys(change)[0]}` }] });
    }
  });

  it('is seen by its owner and by admins, not by others', async () => {
    const { id } = await station();
    const other = await skyberth.people.owner();
    expect((await skyberth.call(routes.getStation, { params: { id }, as: other })).problem?.code).toBe('not-found');
    expect((await skyberth.call(routes.getStation, { params: { id }, as: admin })).status).toBe(200);
    expect((await must(skyberth.call(routes.listStations, { query: {}, as: other }))).total).toBe(0);
    const waiting = await must(
      skyberth.call(routes.listStations, { query: { state: 'draft', pageSize: 200 }, as: admin }),
    );
    expect(waiting.items.map((item) => item.id)).toContain(id);
  });

  it('is listed in pages', async () => {
    const many = await skyberth.people.owner();
    for (let n = 0; n < 5; n += 1) await station(many, { name: `Row ${n}` });
    const page = await must(skyberth.call(routes.listStations, { query: { page: 2, pageSize: 2 }, as: many }));
    expect(page).toMatchObject({ total: 5, page: 2, pageSize: 2 });
    expect(page.items.map((item) => item.name)).toEqual(['Row 2', 'Row 3']);
  });
});

describe('an antenna', () => {
  it('says what it still lacks, and cannot be sold before', async () => {
    const { id, missing } = await antenna();
    expect(missing).toHaveLength(5);
    const sell = () => skyberth.call(routes.putOnSale, { params: { id }, body: { onSale: true }, as: owner });
    const { problem } = await sell();
    expect(problem?.code).toBe('wrong-state');
    expect(problem?.detail).toContain('Publish the horizon mask');
  });

  it('is on sale once everything is there, and can be paused', async () => {
    const { antenna: sold } = await antennaOnSale(skyberth, owner, { station: { name: freshName() } });
    expect(sold).toMatchObject({ state: 'on sale', missing: [] });
    const params = { id: sold.id };
    const paused = await must(skyberth.call(routes.putOnSale, { params, body: { onSale: false }, as: owner }));
    expect(paused.state).toBe('paused');
  });

  it('raises its version with what moves passes, and only then', async () => {
    const { id, stationId, version } = await antenna();
    const params = { id };
    const now = async () => (await must(skyberth.call(routes.getAntenna, { params, as: owner }))).version;
    await must(skyberth.call(routes.setPrice, { params, body: PRICE, as: owner }));
    await must(skyberth.call(routes.setAvailability, { params, body: { rules: ALWAYS }, as: owner }));
    expect(await now()).toBe(version);
    await must(skyberth.call(routes.setMask, { params, body: { points: [[0, 3]] }, as: owner }));
    expect(await now()).toBe(version + 1);
    await must(skyberth.call(routes.updateAntenna, { params, body: { ...ANTENNA, lowestReceiveDeg: 7 }, as: owner }));
    expect(await now()).toBe(version + 2);
    const body = { ...STATION, name: freshName(), altitudeM: 200 };
    await must(skyberth.call(routes.updateStation, { params: { id: stationId }, body, as: owner }));
    expect(await now()).toBe(version + 3);
  });

  it('keeps what it was told', async () => {
    const { id } = await antenna();
    const params = { id };
    const mask: [number, number][] = [
      [10, 2],
      [120, 15.5],
      [120, 4],
      [300, 3],
    ];
    const rules = [
      { days: [1, 2, 3, 4, 5], fromLocal: '08:00', toLocal: '17:30' },
      { days: [6], fromLocal: '22:00', toLocal: '02:00' },
    ];
    await must(skyberth.call(routes.setBands, { params, body: { bands: BANDS }, as: owner }));
    await must(skyberth.call(routes.setMask, { params, body: { points: mask, reason: 'new hangar' }, as: owner }));
    await must(skyberth.call(routes.setAvailability, { params, body: { rules }, as: owner }));
    await must(skyberth.call(routes.setPrice, { params, body: PRICE, as: owner }));
    const whole = await must(skyberth.call(routes.getAntenna, { params, as: owner }));
    expect(whole).toMatchObject({ ...ANTENNA, maskReason: 'new hangar', mask, availability: rules });
    expect(whole.price).toMatchObject({ ...PRICE, currency: 'EUR' });
    expect(whole.bands.map((band) => [band.band, band.direction])).toEqual([
      ['S', 'transmit'],
      ['S', 'receive'],
      ['X', 'receive'],
    ]);
  });

  it('publishes a newer price without touching the older one', async () => {
    const { id } = await antenna();
    const params = { id };
    const first = await must(skyberth.call(routes.setPrice, { params, body: PRICE, as: owner }));
    skyberth.clock.advance(1_000);
    const body = { ...PRICE, perMinuteMinor: 700 };
    const second = await must(skyberth.call(routes.setPrice, { params, body, as: owner }));
    expect(second.price?.perMinuteMinor).toBe(700);
    expect(second.price?.id).not.toBe(first.price?.id);
  });

  it('is refused hours that overlap, with a sentence for the rule', async () => {
    const { id } = await antenna();
    const rules = [
      { days: [1], fromLocal: '08:00', toLocal: '12:00' },
      { days: [1], fromLocal: '11:00', toLocal: '13:00' },
    ];
    const { problem } = await skyberth.call(routes.setAvailability, { params: { id }, body: { rules }, as: owner });
    expect(problem).toMatchObject({ code: 'bad-input', errors: [{ pointer: '/rules/1' }] });
    expect(problem?.detail).toContain('overlap');
  });

  it('is refused refund steps that rise', async () => {
    const { id } = await antenna();
    const ladder = [
      { hoursBeforeAos: 24, refundPercent: 50 },
      { hoursBeforeAos: 2, refundPercent: 80 },
    ];
    const body = { ...PRICE, ladder };
    const { problem } = await skyberth.call(routes.setPrice, { params: { id }, body, as: owner });
    expect(problem).toMatchObject({ code: 'bad-input', errors: [{ pointer: '/ladder/1' }] });
  });

  it('reads a mask from CSV, with a fault for each bad line', async () => {
    const text = 'azimuth,elevation\n0,5\n90,x\n180,12\n400,3\n';
    const { points, faults } = await must(skyberth.call(routes.readMaskCsv, { body: { text }, as: owner }));
    expect(points).toEqual([
      [0, 5],
      [180, 12],
    ]);
    expect(faults.map((fault) => fault.line)).toEqual([3, 5]);
  });

  it('is refused a mask that is none', async () => {
    const { id } = await antenna();
    const body = { points: [[0, 95]] as [number, number][] };
    expect((await skyberth.call(routes.setMask, { params: { id }, body, as: owner })).problem?.code).toBe('bad-input');
  });

  it('can be closed for a while and opened again', async () => {
    const { id } = await antenna();
    const fromUtc = new Date(skyberth.clock.nowMs() + 3_600_000).toISOString();
    const toUtc = new Date(skyberth.clock.nowMs() + 7_200_000).toISOString();
    const body = { fromUtc, toUtc, reason: 'maintenance', note: 'feed change' } as const;
    const { blackout, touches } = await must(skyberth.call(routes.addBlackout, { params: { id }, body, as: owner }));
    expect(touches).toEqual([]);
    const shown = await must(skyberth.call(routes.getAntenna, { params: { id }, as: owner }));
    expect(shown.blackouts).toEqual([blackout]);
    const other = await skyberth.people.owner();
    const params = { id: blackout.id };
    expect((await skyberth.call(routes.removeBlackout, { params, as: other })).problem?.code).toBe('not-found');
    await must(skyberth.call(routes.removeBlackout, { params, as: owner }));
    expect((await skyberth.call(routes.removeBlackout, { params, as: owner })).problem?.code).toBe('not-found');
    const backwards = { ...body, fromUtc: toUtc, toUtc: fromUtc };
    expect(
      (await skyberth.call(routes.addBlackout, { params: { id }, body: backwards, as: owner })).problem?.code,
    ).toBe('bad-input');
  });
});
