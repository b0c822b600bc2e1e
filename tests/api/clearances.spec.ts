/** Leave to transmit: refusals first, then from the request to a flown uplink, and what happens when it is taken back. */
import { openDatabase } from '@skyberth/drizzle';
import { type BodyInput, CLEARANCE_MOVES, type FoundPass } from '@skyberth/shared';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { openShop, RADIO, type Shop } from './harness/shop.js';
import { must, type Person, routes } from './harness.js';

const DAY_MS = 86_400_000;
let shop: Shop;
let admin: Person;
let stationId: string;
beforeAll(async () => {
  shop = await openShop();
  admin = await shop.skyberth.people.staff('admin');
  const { call } = shop.skyberth;
  const craft = await must(call(routes.getSpacecraft, { params: { id: shop.spacecraftId }, as: shop.operator }));
  const uplink = { ...RADIO, name: 'S commands', direction: 'uplink' as const, centreFrequencyMhz: 2_067 };
  const figures = { eirpDbw: null, requiredEbN0Db: null, requiredEirpDbw: 40 };
  const { name, shortName, catalogNumber } = craft;
  const body = { name, shortName, catalogNumber, radios: [RADIO, { ...uplink, ...figures }] };
  await must(call(routes.updateSpacecraft, { params: { id: craft.id }, body, as: shop.operator }));
  stationId = (await must(call(routes.getAntenna, { params: { id: shop.antennaId }, as: shop.owner }))).stationId;
});
afterAll(() => shop.stop());

type Wish = BodyInput<typeof routes.requestClearance>;
const utc = (timeMs: number) => new Date(timeMs).toISOString();
const paper = async (as = shop.operator) =>
  (
    await must(
      shop.skyberth.call(routes.uploadFile, { query: { name: 'licence.pdf' }, body: Buffer.from('%PDF-1.7 a'), as }),
    )
  ).id;
const request = async (changes: Partial<Wish> = {}, as = shop.operator) => {
  const nowMs = shop.skyberth.clock.nowMs();
  const body: Wish = {
    spacecraftId: shop.spacecraftId,
    stationId,
    band: 'S',
    validFromUtc: utc(nowMs - DAY_MS),
    validToUtc: utc(nowMs + 60 * DAY_MS),
    purpose: 'Commands and time updates.',
    fileIds: [await paper()],
    ...changes,
  };
  return shop.skyberth.call(routes.requestClearance, { body, as });
};
const answer = (id: string, body: BodyInput<typeof routes.answerClearance>, as = shop.owner) =>
  shop.skyberth.call(routes.answerClearance, { params: { id }, body, as });
const check = (id: string, body: BodyInput<typeof routes.checkClearance> = { answer: 'put in force' }) =>
  shop.skyberth.call(routes.checkClearance, { params: { id }, body, as: admin });
const withdraw = (id: string, as = shop.owner) =>
  shop.skyberth.call(routes.withdrawClearance, { params: { id }, body: { reason: 'The licence was changed.' }, as });
const inForce = async (changes: Partial<Wish> = {}) => {
  const { id } = await must(request(changes));
  await must(answer(id, { answer: 'grant', conditions: 'At most 46 dBW.' }));
  admin = await shop.skyberth.people.awake(admin);
  return await must(check(id));
};
const uplink = async (pass: FoundPass) => {
  const body = {
    antennaId: pass.antennaId,
    spacecraftId: pass.spacecraftId,
    need: 'both' as const,
    aosUtc: pass.parts[0]?.aosUtc ?? '',
    losUtc: pass.parts[0]?.losUtc ?? '',
  };
  return { body, detail: await must(shop.skyberth.call(routes.passDetail, { body, as: shop.operator })) };
};
const hold = async (pass: FoundPass) => {
  const { body, detail } = await uplink(pass);
  const expectedToPayMinor = detail.quote?.toPayMinor ?? 0;
  const wish = { ...body, expectedToPayMinor, oldElementsAcknowledged: true };
  return shop.skyberth.call(routes.holdBerth, { body: wish, as: shop.operator });
};
const pay = async (bookingId: string) => {
  await shop.payments.payOnPage(await shop.openPage(bookingId), 'pm_card_visa');
  await shop.settle();
  return shop.booking(bookingId);
};
const passAfter = (hours: number): FoundPass => {
  const fromMs = shop.skyberth.clock.nowMs() + hours * 3_600_000;
  const found = shop.passes.find((pass) => Date.parse(pass.geometry.aosUtc) > fromMs);
  if (!found) throw new Error('The shop has no such pass.');
  return found;
};

describe('a request', () => {
  it('is refused for another’s spacecraft or papers, for a band nobody uses, and for dates that cannot be', async () => {
    const stranger = await shop.skyberth.people.operator();
    expect((await request({}, stranger)).problem?.code).toBe('not-found');
    expect((await request({ fileIds: [await paper(stranger)] })).problem?.code).toBe('not-found');
    expect((await request({ fileIds: [] })).problem?.code).toBe('bad-input');
    expect((await request({ band: 'Ka' })).problem?.detail).toContain('transmits in S');
    const nowMs = shop.skyberth.clock.nowMs();
    expect((await request({ validToUtc: utc(nowMs - 2 * DAY_MS) })).problem?.code).toBe('bad-input');
    expect((await request({ validToUtc: utc(nowMs + 2_000 * DAY_MS) })).problem?.code).toBe('bad-input');
  });

  it('goes through station and staff only in the order of the table, and its papers only to them', async () => {
    const validFromUtc = utc(shop.skyberth.clock.nowMs());
    const asked = await must(request({ validFromUtc }));
    expect(asked).toMatchObject({ state: 'requested', acts: ['withdraw'], papers: [{ name: 'licence.pdf' }] });
    expect((await request({ validFromUtc })).problem?.code).toBe('already-exists');
    expect((await check(asked.id)).problem?.code).toBe('wrong-state');
    const home = await must(shop.skyberth.call(routes.home, { as: shop.owner }));
    expect(home.waiting).toContainEqual(
      expect.objectContaining({ kind: 'clearance', path: `/clearances/${asked.id}` }),
    );
    const otherOwner = await shop.skyberth.people.owner();
    expect((await answer(asked.id, { answer: 'grant' }, otherOwner)).problem?.code).toBe('not-found');
    const file = { params: { id: asked.papers[0]?.id ?? '' } };
    const finance = await shop.skyberth.people.staff('finance');
    for (const as of [otherOwner, finance]) {
      expect((await shop.skyberth.call(routes.downloadFile, { ...file, as })).problem?.code).toBe('not-found');
    }
    for (const as of [shop.owner, admin]) {
      expect((await shop.skyberth.call(routes.downloadFile, { ...file, as })).ok).toBe(true);
    }
    const refused = await must(answer(asked.id, { answer: 'refuse', reason: 'No coordination for this site.' }));
    expect(refused).toMatchObject({ state: 'refused', acts: [] });
    expect(refused.history.at(-1)?.sentence).toContain('No coordination for this site.');
    expect((await withdraw(asked.id)).problem?.code).toBe('wrong-state');
  });
});

describe('uplink', () => {
  it('is not sold without a clearance in force through LOS, and it is said what is missing', async () => {
    const { detail } = await uplink(passAfter(12));
    expect(detail.reasons[0]).toMatchObject({ code: 'clearance' });
    expect(detail.reasons[0]?.remedy).toContain('Ask the station for a clearance');
    const asked = await must(request());
    expect((await uplink(passAfter(12))).detail.reasons[0]?.sentence).toContain('the station has not answered yet');
    await must(answer(asked.id, { answer: 'grant', conditions: '' }));
    expect((await uplink(passAfter(12))).detail.reasons[0]?.sentence).toContain('the papers are being checked');
    expect((await hold(passAfter(12))).problem?.code).toBe('not-for-sale');
    await must(withdraw(asked.id));
    const pass = passAfter(12);
    const early = await inForce({ validToUtc: utc(Date.parse(pass.geometry.losUtc) - 60_000) });
    expect((await hold(pass)).problem?.code).toBe('not-for-sale');
    await must(withdraw(early.id));
  });

  it('is sold, flown and reported under a clearance', async () => {
    const clearance = await inForce();
    const held = await must(hold(passAfter(2)));
    const sold = await pay(held.id);
    expect(sold.events.map((event) => event.sentence)).toContainEqual(expect.stringContaining('At most 46 dBW.'));
    expect(sold.state).toBe('confirmed');
    const view = { params: { id: clearance.id }, as: shop.owner };
    expect(await must(shop.skyberth.call(routes.getClearance, view))).toMatchObject({ contactsToCome: 1 });
    await shop.advanceTo(Date.parse(sold.aosUtc) + 1_000);
    await shop.skyberth.runJobs();
    expect((await shop.booking(held.id)).state).toBe('under way');
    await must(withdraw(clearance.id));
    await shop.settle();
    expect((await shop.booking(held.id)).state).toBe('under way');
    const subjects = shop.skyberth.mail.to(shop.owner.email).map((mail) => mail.subject);
    expect(subjects).toContainEqual(expect.stringContaining('Stop transmitting'));
  });

  it('is cancelled with all money back when the only clearance is withdrawn, and stays under another', async () => {
    const first = await inForce();
    const second = await inForce({ validFromUtc: utc(shop.skyberth.clock.nowMs() - 3 * DAY_MS) });
    const { id } = await pay((await must(hold(passAfter(20)))).id);
    await must(withdraw(first.id));
    expect((await shop.booking(id)).state).toBe('confirmed');
    await must(withdraw(second.id, shop.operator));
    await shop.settle();
    const cancelled = await shop.booking(id);
    expect(cancelled).toMatchObject({ state: 'cancelled', payment: { state: 'released', capturedMinor: 0 } });
    for (const { email } of [shop.operator, shop.owner]) {
      const subjects = shop.skyberth.mail.to(email).map((mail) => mail.subject);
      expect(subjects).toContainEqual(expect.stringContaining('Pass lost'));
    }
  });

  it('held but not yet paid is lost with its clearance', async () => {
    const clearance = await inForce();
    const { id } = await must(hold(passAfter(30)));
    await must(withdraw(clearance.id));
    expect((await shop.booking(id)).state).toBe('cancelled');
  });
});

describe('the database', () => {
  it('has the same table of moves, and sells or begins nothing that transmits without leave', async () => {
    const file = openDatabase(shop.skyberth.databaseFile).$client;
    const moves = file.prepare('SELECT from_state || $s || to_state AS move FROM clearance_moves').pluck();
    const expected = CLEARANCE_MOVES.filter((move) => move.from !== null).map(({ from, to }) => `${from} > ${to}`);
    expect((moves.all({ s: ' > ' }) as string[]).sort()).toEqual([...new Set(expected)].sort());
    const held = await must(shop.skyberth.call(routes.listBookings, { query: {}, as: shop.operator }));
    const plain = held.items[0]?.id ?? '';
    expect(() => file.prepare(`UPDATE bookings SET need = 'downlink' WHERE need <> 'downlink'`).run()).toThrow('terms');
    expect(() => file.prepare(`INSERT INTO booking_clearances SELECT ?, id FROM clearances`).run(plain)).toThrow(
      'not-cleared',
    );
    const row = file.prepare('SELECT * FROM bookings WHERE id = ?').get(plain) as Record<string, unknown>;
    const copy = { ...row, id: 'copy', number: 99_999, state: 'confirmed', need: 'uplink' };
    const columns = Object.keys(copy);
    const insert = `INSERT INTO bookings (${columns.join()}) VALUES (${columns.map((name) => `@${name}`).join()})`;
    expect(() => file.prepare(insert).run(copy)).toThrow('not-cleared');
    file.close();
  });
});

describe('time', () => {
  it('warns thirty, seven and one day before the end, once each, and then ends the clearance', async () => {
    const nowMs = shop.skyberth.clock.nowMs();
    const { id } = await inForce({ validToUtc: utc(nowMs + 40 * DAY_MS) });
    const warnings = () =>
      shop.skyberth.mail.to(shop.operator.email).filter(({ subject }) => subject.startsWith('Ends in')).length;
    const before = warnings();
    for (const [days, told] of [
      [5, 0],
      [6, 1],
      [6, 1],
      [6, 1],
      [6, 1],
      [5, 2],
      [4, 2],
      [1.5, 3],
    ] as const) {
      await shop.advance(days * DAY_MS);
      await shop.skyberth.runJobs();
      await shop.skyberth.runJobs();
      expect(warnings() - before).toBe(told);
    }
    await shop.advance(DAY_MS);
    await shop.skyberth.runJobs();
    const view = { params: { id }, as: shop.operator };
    expect(await must(shop.skyberth.call(routes.getClearance, view))).toMatchObject({ state: 'expired', acts: [] });
  });
});
