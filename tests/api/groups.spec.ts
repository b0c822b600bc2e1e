/** Several passes together: all of them are held, sold and let go, or none. */
import { routes } from '@skyberth/shared';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { openShop, type Shop, wishFor } from './harness/shop.js';
import { must } from './harness.js';

let shop: Shop;
beforeAll(async () => {
  shop = await openShop({ antenna: { minNoticeMin: 0 } });
});
afterAll(() => shop?.stop());

const call: Shop['skyberth']['call'] = (route, input) => shop.skyberth.call(route, input);
const wishesFor = (...indexes: number[]) =>
  Promise.all(indexes.map((index) => wishFor(shop.skyberth, shop.passes.at(index)!, shop.operator)));
const holdGroup = async (...indexes: number[]) =>
  must(call(routes.holdGroup, { body: { items: await wishesFor(...indexes) }, as: shop.operator }));
const group = (id: string) => must(call(routes.getGroup, { params: { id }, as: shop.operator }));
const pay = (id: string, savedCardId: string | null) =>
  call(routes.checkoutGroup, { params: { id }, body: { savedCardId }, as: shop.operator });

/** A card of the organisation, kept when another contact was bought. */
async function keptCard(index: number): Promise<string> {
  const { id } = await shop.hold(shop.passes.at(index)!);
  await shop.payments.payOnPage(await shop.openPage(id, { saveCard: true }), 'pm_card_visa');
  await shop.settle();
  const { items } = await must(call(routes.savedCards, { as: shop.operator }));
  return items[0]?.id ?? '';
}

describe('a group', () => {
  it('names every pass that cannot be had, and holds none of the others', async () => {
    const taken = await shop.hold(shop.passes.at(-1)!);
    const items = await wishesFor(-2, -3, -4);
    items[0] = { ...items[0]!, expectedToPayMinor: 1 };
    const first = await call(routes.holdGroup, { body: { items }, as: shop.operator });
    expect(first.problem).toMatchObject({ code: 'group-refused', errors: [{ pointer: '/items/0' }] });
    const { aosUtc, losUtc } = taken;
    items[0] = { ...items[1]!, aosUtc, losUtc };
    items[2] = { ...items[2]!, expectedToPayMinor: 1 };
    const second = await call(routes.holdGroup, { body: { items }, as: shop.operator });
    expect(second.problem?.errors?.map(({ pointer }) => pointer)).toEqual(['/items/0', '/items/2']);
    const list = await must(call(routes.listBookings, { query: { state: 'held' }, as: shop.operator }));
    expect(list.items.map(({ id }) => id)).toEqual([taken.id]);
  });

  it('refuses the same pass twice, because the second finds it taken', async () => {
    const [wish] = await wishesFor(-2);
    const answer = await call(routes.holdGroup, { body: { items: [wish!, wish!] }, as: shop.operator });
    expect(answer.problem).toMatchObject({ code: 'group-refused', errors: [{ pointer: '/items/1' }] });
  });

  it('is sold only once the money for all of it is secured', async () => {
    const card = await keptCard(-5);
    const held = await holdGroup(-6, -7);
    const ids = held.bookings.map(({ id }) => id);
    const alone = await call(routes.checkout, { params: { id: ids[0]! }, body: {}, as: shop.operator });
    expect(alone.problem?.code).toBe('wrong-state');
    const page = await must(pay(held.groupId, null));
    if (page.kind !== 'redirect') throw new Error('The payment page did not open.');
    await shop.payments.payOnPage(page.url, 'pm_card_visa');
    await shop.settle();
    const half = await group(held.groupId);
    expect([half.state, ...half.bookings.map(({ state }) => state)]).toEqual(['partly secured', 'held', 'held']);
    await must(pay(held.groupId, card));
    await shop.settle();
    const whole = await group(held.groupId);
    expect([whole.state, ...whole.bookings.map(({ state }) => state)]).toEqual(['bought', 'confirmed', 'confirmed']);
  });

  it('that is paid in part gives all of it back when it is let go', async () => {
    const held = await holdGroup(-8, -9);
    const page = await must(pay(held.groupId, null));
    if (page.kind !== 'redirect') throw new Error('The payment page did not open.');
    await shop.payments.payOnPage(page.url, 'pm_card_visa');
    await shop.settle();
    const single = await call(routes.letGo, { params: { id: held.bookings[0]!.id }, as: shop.operator });
    expect(single.problem?.code).toBe('wrong-state');
    await must(call(routes.letGroupGo, { params: { id: held.groupId }, as: shop.operator }));
    await shop.settle();
    const gone = await group(held.groupId);
    expect(gone.bookings.map(({ state, payment }) => [state, payment.state])).toEqual([
      ['cancelled', 'released'],
      ['cancelled', 'none'],
    ]);
    const again = await call(routes.letGroupGo, { params: { id: held.groupId }, as: shop.operator });
    expect(again.problem?.code).toBe('wrong-state');
  });

  it('that is paid in part sells nothing when its time runs out', async () => {
    const held = await holdGroup(-10, -11);
    const page = await must(pay(held.groupId, null));
    if (page.kind !== 'redirect') throw new Error('The payment page did not open.');
    await shop.payments.payOnPage(page.url, 'pm_card_visa');
    await shop.settle();
    await shop.advance(11 * 60_000);
    await shop.skyberth.runJobs();
    await shop.settle();
    const ended = await group(held.groupId);
    expect([ended.state, ...ended.bookings.map(({ state }) => state)]).toEqual(['ended', 'lapsed', 'lapsed']);
    expect(ended.bookings.filter(({ payment }) => payment.state === 'authorised')).toEqual([]);
  });

  it('belongs to its organisation alone', async () => {
    const held = await holdGroup(-12);
    const as = await shop.skyberth.people.operator();
    const params = { id: held.groupId };
    expect((await call(routes.getGroup, { params, as })).status).toBe(404);
    expect((await call(routes.letGroupGo, { params, as })).status).toBe(404);
    expect((await call(routes.checkoutGroup, { params, body: {}, as })).status).toBe(404);
  });
});
