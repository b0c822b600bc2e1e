import { randomUUID } from 'node:crypto';
import type { BodyInput, FoundPass } from '@skyberth/shared';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { openShop, type Shop, wishFor } from './harness/shop.js';
import { addSoldContact } from './harness/sold-contact.js';
import { ALWAYS, antennaOnSale, PRICE } from './harness/stations.js';
import { must, type Person, routes } from './harness.js';

const DAY_MS = 86_400_000;
const ENTRY = {
  startLocal: '2026-01-01T00:00',
  durationMin: null,
  endLocal: '24:00',
  timeZone: 'Europe/Oslo',
  rrule: 'FREQ=DAILY',
  reason: 'own use',
} as const;
type Entry = BodyInput<typeof routes.addBlackouts>['entries'][number];

let shop: Shop;
let stranger: Person;
beforeAll(async () => {
  shop = await openShop();
  stranger = await shop.skyberth.people.owner();
});
afterAll(() => shop.stop());

const call: Shop['skyberth']['call'] = (...args) => shop.skyberth.call(...args);
const params = () => ({ id: shop.antennaId });
const utc = (timeMs: number) => new Date(timeMs).toISOString();
const block = (entries: Entry[], antennaIds = [shop.antennaId], as = shop.owner) =>
  call(routes.addBlackouts, { body: { antennaIds, entries }, as });
const remove = (ids: string[], as = shop.owner) => call(routes.removeCalendarEntries, { body: { ids }, as });
const calendar = (id = shop.antennaId, as = shop.owner) =>
  must(call(routes.antennaCalendar, { params: { id }, query: {}, as }));
const search = async (): Promise<FoundPass[]> => {
  const nowMs = shop.skyberth.clock.nowMs();
  const body = { spacecraftIds: [shop.spacecraftId], fromUtc: utc(nowMs + 3_600_000), toUtc: utc(nowMs + 2 * DAY_MS) };
  const { passes } = await must(call(routes.searchPasses, { body, as: shop.operator }));
  return passes.filter((pass) => pass.antennaId === shop.antennaId);
};
const preview = (body: BodyInput<typeof routes.previewAntennaChange>, as = shop.owner) =>
  call(routes.previewAntennaChange, { params: params(), body, as });
const sides = async (body: BodyInput<typeof routes.previewAntennaChange>) => {
  const answer = await must(preview(body));
  if (answer.before === null || answer.after === null) throw new Error('The antenna has a price.');
  return { ...answer, before: answer.before, after: answer.after };
};

describe('a blackout that comes again', () => {
  it('closes every pass, says so, and can be undone', async () => {
    expect((await search()).some((pass) => pass.state === 'for sale')).toBe(true);
    const { ids } = await must(block([ENTRY]));
    const passes = await search();
    expect(passes.length).toBeGreaterThan(0);
    expect(new Set(passes.map((pass) => `${pass.state}, ${pass.reasons[0]?.code}`))).toEqual(
      new Set(['not for sale, blackout']),
    );
    expect((await calendar()).blackouts.every((each) => each.repeats)).toBe(true);
    await must(remove(ids));
    expect((await search()).some((pass) => pass.state === 'for sale')).toBe(true);
  });

  it('takes several antennas or none of them, and lists what is sold inside', async () => {
    const other = await antennaOnSale(shop.skyberth, shop.owner, { station: { name: 'Gannet Bay' } });
    const foreign = await antennaOnSale(shop.skyberth, stranger, { station: { name: 'Far Rock' } });
    const both = [shop.antennaId, other.antenna.id];
    const refused = await block([ENTRY], [...both, foreign.antenna.id]);
    expect(refused.problem?.code).toBe('not-found');
    expect((await calendar()).rules).toEqual([]);
    const sold = addSoldContact(shop.skyberth, {
      operator: shop.operator,
      owner: shop.owner,
      antennaId: other.antenna.id,
      spacecraftId: shop.spacecraftId,
      aosMs: shop.skyberth.clock.nowMs() + 5 * DAY_MS,
    });
    const { ids, touches } = await must(block([ENTRY], both));
    expect(ids).toHaveLength(2);
    expect(touches.map((each) => each.bookingId)).toEqual([sold.booking]);
    expect((await remove([...ids, randomUUID()])).problem?.code).toBe('not-found');
    expect((await remove(ids, stranger)).problem?.code).toBe('not-found');
    expect((await calendar()).rules).toHaveLength(1);
    await must(remove(ids));
    expect((await calendar()).rules).toEqual([]);
  });

  it.each([
    ['comes every hour', { rrule: 'FREQ=HOURLY' }, 'FREQ'],
    ['has no such rule', { rrule: 'EVERY DAY' }, 'cannot be used'],
    ['is a day that does not exist', { startLocal: '2026-02-30T08:00' }, '2026-02-30'],
    ['has an exception that does not exist', { exceptLocal: ['2026-02-30T08:00'] }, '2026-02-30'],
    ['stands in a zone that does not exist', { timeZone: 'Sea/Nowhere' }, 'time zone'],
    ['lasts less than nothing', { endLocal: null, durationMin: -5 }, 'end after it begins'],
    ['has two ends', { durationMin: 60 }, 'either a length'],
    ['overlaps itself', { endLocal: null, durationMin: 1_500 }, 'overlaps itself'],
  ] as const)('is refused where it %s, and nothing is changed', async (_why, change, sentence) => {
    const answer = await block([{ ...ENTRY, ...change } as Entry]);
    expect(answer.problem).toMatchObject({ status: 400, code: 'bad-input' });
    expect(JSON.stringify(answer.problem)).toContain(sentence);
    expect((await calendar()).rules).toEqual([]);
  });
});

describe('an opening beyond the weekly hours', () => {
  it('sells what the weekly hours would not', async () => {
    await must(call(routes.setAvailability, { params: params(), body: { rules: [] }, as: shop.owner }));
    await must(
      call(routes.setAvailability, {
        params: params(),
        body: { rules: [{ days: [1], fromLocal: '03:00', toLocal: '03:01' }] },
        as: shop.owner,
      }),
    );
    expect((await search()).every((pass) => pass.state === 'not for sale')).toBe(true);
    const { reason: _reason, ...opening } = ENTRY;
    const added = await must(call(routes.addOpening, { params: params(), body: opening, as: shop.owner }));
    expect((await search()).some((pass) => pass.state === 'for sale')).toBe(true);
    expect((await call(routes.addOpening, { params: params(), body: opening, as: stranger })).problem?.code).toBe(
      'not-found',
    );
    await must(remove([added.id]));
    await must(call(routes.setAvailability, { params: params(), body: { rules: ALWAYS }, as: shop.owner }));
  });
});

describe('a preview', () => {
  it('says what hours, blackouts and a mask would do, and changes nothing', async () => {
    const { passes, skyberth } = shop;
    const [pass] = passes;
    if (!pass) throw new Error('There is no pass.');
    const [aosMs, losMs] = [Date.parse(pass.geometry.aosUtc), Date.parse(pass.geometry.losUtc)];
    const { booking } = addSoldContact(skyberth, {
      operator: shop.operator,
      owner: shop.owner,
      antennaId: shop.antennaId,
      spacecraftId: shop.spacecraftId,
      aosMs: Math.ceil(aosMs),
      losMs: Math.floor(losMs),
    });
    const asItIs = await sides({});
    expect(asItIs.before).toEqual(asItIs.after);
    expect(asItIs.before.openMin).toBeCloseTo(7 * 1_440, 6);
    expect(asItIs.before.sellableMin).toBeGreaterThan(0);
    expect(asItIs.touched).toEqual([]);

    const closed = await sides({ addBlackouts: [ENTRY] });
    expect(closed.after).toMatchObject({ openMin: 0, sellableMin: 0 });
    expect(closed.touched).toMatchObject([{ bookingId: booking, refundMinor: 5_680 }]);
    expect(closed.touched[0]?.buyerGets).toContain('stays sold');

    const fewer = await sides({ hours: [{ days: [1], fromLocal: '03:00', toLocal: '03:01' }] });
    expect(fewer.after.openMin).toBeCloseTo(1, 6);
    expect(fewer.touched[0]?.why).toContain('outside the opening hours');

    const walled = await sides({ mask: [[0, 89]] });
    expect(walled.after).toMatchObject({ openMin: asItIs.before.openMin, sellableMin: 0 });
    expect(walled.touched[0]?.why).toContain('hide all of it');

    const again = await sides({});
    expect(again.before).toEqual(asItIs.before);
  });

  it('works out last month by another price', async () => {
    const sold = { ...shop, antennaId: shop.antennaId, spacecraftId: shop.spacecraftId };
    addSoldContact(shop.skyberth, {
      operator: sold.operator,
      owner: sold.owner,
      antennaId: sold.antennaId,
      spacecraftId: sold.spacecraftId,
      aosMs: shop.skyberth.clock.nowMs() - 5 * DAY_MS,
      state: 'settled',
    });
    const { lastMonth, touched, after, before } = await sides({ price: { ...PRICE, perMinuteMinor: 1_000 } });
    // Eight minutes at 10.00, and a set-up of 12.00, against the 56.80 of the books.
    expect(lastMonth).toEqual({ contacts: 1, thenMinor: 5_680, nowMinor: 9_200 });
    expect(after.expectedMinor).toBe(2_300);
    expect(before.expectedMinor).toBe(1_420);
    expect(touched).toEqual([]);
  });

  it('refuses what saving would refuse, and strangers', async () => {
    expect((await preview({ hours: [{ days: [1], fromLocal: '08:00', toLocal: '25:00' }] })).problem?.status).toBe(400);
    const twice = [...ALWAYS, { days: [1], fromLocal: '08:00', toLocal: '09:00' }];
    expect((await preview({ hours: twice })).problem?.detail).toContain('overlap');
    expect((await preview({ price: { ...PRICE, setupMinor: -1 } })).problem?.status).toBe(400);
    expect(
      (
        await preview({
          mask: [[0, 95]],
        })
      ).problem?.status,
    ).toBe(400);
    expect((await preview({}, stranger)).problem?.code).toBe('not-found');
  });
});

describe('a price from a date on', () => {
  const setPrice = (change: object) =>
    call(routes.setPrice, { params: params(), body: { ...PRICE, ...change }, as: shop.owner });
  const cards = () => must(call(routes.listPriceCards, { params: params(), as: shop.owner }));

  it('holds from then on, while what is held already keeps its price', async () => {
    const [first, second] = (await search()).filter((pass) => pass.state === 'for sale');
    if (!first || !second) throw new Error('There are too few passes.');
    const held = await shop.hold(first);
    const priceOf = async () => (await wishFor(shop.skyberth, second, shop.operator)).expectedToPayMinor;
    const before = await priceOf();
    const validFromMs = shop.skyberth.clock.nowMs() + 60_000;
    await must(setPrice({ perMinuteMinor: 2_000, validFromUtc: utc(validFromMs) }));
    expect(await priceOf()).toBe(before);
    expect((await cards()).items[0]).toMatchObject({ perMinuteMinor: 2_000, validFromUtc: utc(validFromMs) });
    await shop.advanceTo(validFromMs);
    expect(await priceOf()).toBeGreaterThan(before);
    expect((await shop.booking(held.id)).quote).toEqual(held.quote);
  });

  it('is refused for a time gone by, for one too far ahead, and below zero', async () => {
    const { items } = await cards();
    const nowMs = shop.skyberth.clock.nowMs();
    expect((await setPrice({ validFromUtc: utc(nowMs - 60_000) })).problem).toMatchObject({ status: 400 });
    expect((await setPrice({ validFromUtc: utc(nowMs + 900 * DAY_MS) })).problem?.detail).toContain('two years');
    expect((await setPrice({ perMinuteMinor: -1 })).problem).toMatchObject({ status: 400, code: 'bad-input' });
    const crossed = [
      { days: [1], fromLocal: '08:00', toLocal: '12:00', percent: 10 },
      { days: [1], fromLocal: '11:00', toLocal: '13:00', percent: 10 },
    ];
    expect((await setPrice({ busyHours: crossed })).problem?.detail).toContain('overlap');
    expect((await cards()).items).toEqual(items);
  });

  it('is worked out for one contact by the arithmetic that sells', async () => {
    const contact = { lengthS: 480, day: 2, startLocal: '18:10', boughtHoursBefore: 24 };
    const example = (price: object) =>
      call(routes.priceExample, { params: params(), body: { price: { ...PRICE, ...price }, contact }, as: shop.owner });
    const { lines, totalMinor } = await must(example({}));
    expect(lines.map((line) => line.amountMinor)).toEqual([4_480, 1_200]);
    expect(totalMinor).toBe(5_680);
    const busyHours = [{ days: [2], fromLocal: '18:00', toLocal: '18:14', percent: 50 }];
    // Half of the eight minutes are busy: 4 min x 5.60 x 50 %.
    expect((await must(example({ busyHours }))).totalMinor).toBe(5_680 + 1_120);
    expect((await example({ minimumMinor: -1 })).problem).toMatchObject({ status: 400, code: 'bad-input' });
  });
});
