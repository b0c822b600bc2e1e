/** Live contacts, the run sheet and drift, over HTTP against the real server. */
import { type Booking, type ContactEvent, ContactEvent as ContactEventSchema, routes } from '@skyberth/shared';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { addressOfStream, listen } from './harness/listen.js';
import { openShop, type Shop } from './harness/shop.js';
import { must } from './harness.js';

let shop: Shop;
let booking: Booking;
const call: Shop['skyberth']['call'] = (route, input) => shop.skyberth.call(route, input);
const report = (body: Parameters<typeof send>[0]) => must(send(body));
const send = (body: { kind: 'acquired' } | { kind: 'lost'; isFinal?: boolean } | { kind: 'bytes'; bytes: number }) =>
  call(routes.reportLive, { params: { id: booking.id }, body, as: shop.owner });
const kinds = (events: readonly ContactEvent[]) =>
  events.filter((each) => each.kind !== 'diary').map((each) => each.kind);

beforeAll(async () => {
  shop = await openShop({ antenna: { minNoticeMin: 0 } });
  const [pass] = shop.passes;
  if (!pass) throw new Error('There is no pass.');
  booking = await shop.buy(pass);
});
afterAll(() => shop?.stop());

describe('a live report', () => {
  it('is refused before set-up, for an instant to come, and from anybody but the station', async () => {
    expect((await send({ kind: 'acquired' })).problem?.code).toBe('wrong-state');
    const body = { kind: 'acquired' } as const;
    const params = { id: booking.id };
    expect((await call(routes.reportLive, { params, body, as: shop.operator })).problem?.code).toBe('not-allowed');
    const other = await shop.skyberth.people.owner();
    expect((await call(routes.reportLive, { params, body, as: other })).problem?.code).toBe('not-found');
  });

  it('cannot begin a contact while somebody is at the dish, or while it is to stay still', async () => {
    await shop.advanceTo(Date.parse(booking.aosUtc) - 1_000);
    const dish = { params: { id: shop.antennaId }, as: shop.owner };
    const visit = await must(call(routes.enterDish, { ...dish, body: { name: 'Priya Nair' } }));
    const again = await call(routes.enterDish, { ...dish, body: { name: 'Priya Nair' } });
    expect(again.problem?.code).toBe('already-exists');
    expect(await send({ kind: 'acquired' })).toMatchObject({ problem: { code: 'dish-not-clear' } });
    const { conflicts } = await must(call(routes.runSheet, { query: {}, as: shop.owner }));
    expect(conflicts).toMatchObject([{ kind: 'people', bookingId: booking.id }]);
    await shop.advanceTo(Date.parse(booking.aosUtc) + 1_000);
    await shop.skyberth.runJobs();
    expect((await shop.booking(booking.id)).state).toBe('confirmed');
    await must(call(routes.leaveDish, { params: { id: visit.id }, as: shop.owner }));
    expect((await call(routes.leaveDish, { params: { id: visit.id }, as: shop.owner })).problem?.code).toBe(
      'wrong-state',
    );
    await must(call(routes.stopDish, { ...dish, body: { reason: 'ice on the feed' } }));
    expect(await send({ kind: 'acquired' })).toMatchObject({ problem: { code: 'dish-not-clear' } });
    await must(call(routes.releaseDish, dish));
  });

  it('begins the contact, is heard by the other side, and a listener that comes back misses and repeats nothing', async () => {
    const url = addressOfStream(shop.skyberth.url, `/api/contacts/${booking.id}/live`);
    const first = await listen(url, shop.operator);
    await report({ kind: 'acquired' });
    const acquired = await first.until((events) => kinds(events).includes('acquired'));
    expect((await shop.booking(booking.id)).state).toBe('under way');
    first.close();
    await report({ kind: 'bytes', bytes: 1_000 });
    await report({ kind: 'bytes', bytes: 2_000 });
    const last = acquired.at(-1)?.seq ?? 0;
    const second = await listen(url, shop.operator, last);
    const missed = await second.until((events) => kinds(events).filter((kind) => kind === 'bytes').length === 2);
    expect(missed.every((event) => event.seq > last)).toBe(true);
    second.close();
    const whole = await must(call(routes.contactEvents, { params: { id: booking.id }, as: shop.operator }));
    const heard = [...acquired, ...missed].map((event) => event.seq);
    expect(heard).toEqual(whole.items.map((event) => event.seq));
    for (const event of whole.items) ContactEventSchema.parse(event);
  });

  it('stands on the run sheet, and the final loss of signal ends the contact', async () => {
    await report({ kind: 'lost', isFinal: true });
    expect((await shop.booking(booking.id)).state).toBe('reporting');
    const { contacts } = await must(call(routes.runSheet, { query: {}, as: shop.owner }));
    expect(contacts.find((one) => one.bookingId === booking.id)?.reported).toMatchObject({ bytes: 2_000 });
    expect((await call(routes.runSheet, { query: {}, as: shop.operator })).problem?.code).toBe('not-allowed');
  });
});

describe('streams', () => {
  it('are opened at most eight times by one person', async () => {
    const url = addressOfStream(shop.skyberth.url, '/api/live');
    const open = [];
    for (let i = 0; i < 8; i += 1) open.push(await listen(url, shop.operator));
    await expect(listen(url, shop.operator)).rejects.toThrow('429');
    const other = await listen(url, shop.owner);
    other.close();
    for (const one of open) one.close();
  });
});
