/** Waiting for a taken pass: who comes first is offered it first, whatever becomes of the one who has it. */
import { routes } from '@skyberth/shared';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { elementsAt, openShop, RADIO, type Shop, wishFor } from './harness/shop.js';
import { must, type Person } from './harness.js';

let shop: Shop;
let second: Buyer;
let third: Buyer;
beforeAll(async () => {
  shop = await openShop({ antenna: { minNoticeMin: 0 } });
  [second, third] = [await formationFlyer(), await formationFlyer()];
});
afterAll(() => shop?.stop());

interface Buyer {
  readonly as: Person;
  readonly spacecraftId: string;
}
const call: Shop['skyberth']['call'] = (route, input) => shop.skyberth.call(route, input);

/** Another operator whose spacecraft has the same passes. */
async function formationFlyer(): Promise<Buyer> {
  const as = await shop.skyberth.people.operator();
  const body = { name: 'Twin', shortName: 'TW', catalogNumber: 70_001, radios: [RADIO] };
  const { id } = await must(call(routes.createSpacecraft, { body, as }));
  const { items } = await must(
    call(routes.listElements, { params: { id: shop.spacecraftId }, query: {}, as: shop.operator }),
  );
  const text = elementsAt(Date.parse(items[0]?.epochUtc ?? ''), 70_001, 70_001 % 360);
  await must(call(routes.saveElements, { body: { text, spacecraftId: id }, as }));
  return { as, spacecraftId: id };
}

const berthFor = (index: number, buyer: Buyer) => {
  const { antennaId, parts } = shop.passes.at(index)!;
  const { aosUtc, losUtc } = parts[0]!;
  return { antennaId, spacecraftId: buyer.spacecraftId, aosUtc, losUtc };
};
const join = (index: number, buyer: Buyer) => call(routes.joinStandby, { body: berthFor(index, buyer), as: buyer.as });
const latest = async (buyer: Buyer) => (await must(call(routes.listStandby, { as: buyer.as }))).items[0]!;
const letGo = (id: string, as: Person) => must(call(routes.letGo, { params: { id }, as }));

describe('standby', () => {
  it('is refused for a pass that is for sale, and for one that nobody could buy', async () => {
    expect((await join(-1, second)).problem?.code).toBe('wrong-state');
    const berth = berthFor(-1, second);
    const params = { id: shop.antennaId };
    const blackout = { fromUtc: berth.aosUtc, toUtc: berth.losUtc, reason: 'weather' } as const;
    await must(call(routes.addBlackout, { params, body: blackout, as: shop.owner }));
    expect((await join(-1, second)).problem?.code).toBe('not-for-sale');
  });

  it('offers what is let go to the first in line, then to the next, and to nobody past them', async () => {
    const wish = await wishFor(shop.skyberth, shop.passes.at(-2)!, shop.operator);
    const taken = await shop.hold(shop.passes.at(-2)!);
    expect((await must(join(-2, second))).place).toBe(1);
    expect((await must(join(-2, third))).place).toBe(2);
    expect((await join(-2, second)).problem?.code).toBe('already-exists');
    await letGo(taken.id, shop.operator);
    const past = await call(routes.holdBerth, { body: wish, as: shop.operator });
    expect(past.problem?.code).toBe('berth-taken');
    await shop.skyberth.runJobs();
    const offer = await latest(second);
    expect(offer).toMatchObject({ state: 'offered', place: null });
    expect((await latest(third)).place).toBe(1);
    expect(shop.skyberth.mail.received.some(({ subject }) => subject.startsWith('Free now'))).toBe(true);
    await letGo(offer.bookingId ?? '', second.as);
    await shop.skyberth.runJobs();
    await shop.skyberth.runJobs();
    expect((await latest(second)).state).toBe('passed');
    expect((await latest(third)).state).toBe('offered');
  });

  it('goes on to the next when an offer runs out, and ends bought when it is paid for', async () => {
    const offered = await latest(third);
    await must(call(routes.leaveStandby, { params: { id: offered.id }, as: third.as }));
    const taken = await shop.hold(shop.passes.at(-3)!);
    await must(join(-3, second));
    await must(join(-3, third));
    await letGo(taken.id, shop.operator);
    await shop.skyberth.runJobs();
    await shop.advance(31 * 60_000);
    for (const { as } of [second, third]) await must(call(routes.refresh, { as }));
    await shop.skyberth.runJobs();
    await shop.skyberth.runJobs();
    const offer = await latest(third);
    expect([(await latest(second)).state, offer.state]).toEqual(['passed', 'offered']);
    const url = await shop.openPage(offer.bookingId ?? '', { as: third.as });
    await shop.payments.payOnPage(url, 'pm_card_visa');
    await shop.settle();
    await shop.skyberth.runJobs();
    expect((await latest(third)).state).toBe('bought');
    const left = await call(routes.leaveStandby, { params: { id: offer.id }, as: third.as });
    expect(left.problem?.code).toBe('wrong-state');
  });
});
