import { type Booking, routes } from '@skyberth/shared';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { openShop, type Shop, wishFor } from './harness/shop.js';
import { must, type Person } from './harness.js';

let shop: Shop;
let used = 0;
beforeAll(async () => {
  shop = await openShop({ antenna: { minNoticeMin: 0 } });
});
afterAll(() => shop?.stop());

/** A pass that no other test of this file has touched, at least `hours` ahead. */
const nextPass = (hours = 12) => {
  const leastMs = shop.skyberth.clock.nowMs() + hours * 3_600_000;
  const open = shop.passes.slice(used).findIndex((pass) => Date.parse(pass.geometry.aosUtc) > leastMs);
  const pass = shop.passes[used + open];
  if (open < 0 || !pass) throw new Error('The test has used up its passes.');
  used += open + 1;
  return pass;
};
const call: Shop['skyberth']['call'] = (route, input) => shop.skyberth.call(route, input);
const kinds = (booking: Booking) => booking.events.map((event) => event.kind);

describe('holding a pass', () => {
  it('freezes the price for ten minutes and shows it to both sides and to staff', async () => {
    const pass = nextPass();
    const held = await shop.hold(pass);
    expect(held).toMatchObject({
      state: 'held',
      aosUtc: pass.parts[0]?.aosUtc,
      payment: { state: 'none' },
      actions: ['pay', 'let go'],
      refundNowMinor: null,
      invoiceId: null,
    });
    expect(held.toPayMinor).toBe(held.quote.toPayMinor);
    const minutes = (Date.parse(held.holdEndsUtc ?? '') - shop.skyberth.clock.nowMs()) / 60_000;
    expect(minutes).toBeGreaterThan(9.8);
    expect(minutes).toBeLessThanOrEqual(10);
    expect((await shop.booking(held.id, shop.owner)).actions).toEqual([]);
    expect((await shop.booking(held.id, await shop.skyberth.people.staff('admin'))).actions).toEqual([]);
    expect(kinds(held)).toEqual(['hold']);
  });

  it('is refused for a pass that is taken, for a spacecraft that is busy, and at another price', async () => {
    const pass = nextPass();
    const wish = await wishFor(shop.skyberth, pass, shop.operator);
    const cheaper = { ...wish, expectedToPayMinor: wish.expectedToPayMinor - 1 };
    expect((await call(routes.holdBerth, { body: cheaper, as: shop.operator })).problem?.code).toBe('price-changed');
    await must(call(routes.holdBerth, { body: wish, as: shop.operator }));
    const again = await call(routes.holdBerth, { body: wish, as: shop.operator });
    expect(['berth-taken', 'spacecraft-busy']).toContain(again.problem?.code);
  });

  it('answers a repeated request with the same hold', async () => {
    const body = await wishFor(shop.skyberth, nextPass(), shop.operator);
    const key = 'the same wish, sent twice';
    const first = await must(call(routes.holdBerth, { body, as: shop.operator, key }));
    const second = await must(call(routes.holdBerth, { body, as: shop.operator, key }));
    expect(second.id).toBe(first.id);
  });

  it('can be given back, which frees the time', async () => {
    const pass = nextPass();
    const { id } = await shop.hold(pass);
    const gone = await must(call(routes.letGo, { params: { id }, as: shop.operator }));
    expect(gone).toMatchObject({ state: 'cancelled', actions: [] });
    expect((await call(routes.letGo, { params: { id }, as: shop.operator })).problem?.code).toBe('wrong-state');
    expect((await shop.hold(pass)).state).toBe('held');
  });

  it('belongs to one organisation: nobody else sees it, and only those who work there may act', async () => {
    const { id } = await shop.hold(nextPass());
    const { people } = shop.skyberth;
    const [stranger, otherOwner] = [await people.operator(), await people.owner()];
    for (const as of [stranger, otherOwner]) {
      expect((await call(routes.getBooking, { params: { id }, as })).problem?.code).toBe('not-found');
    }
    expect((await call(routes.letGo, { params: { id }, as: stranger })).problem?.code).toBe('not-found');
    const pay = { savedCardId: null, saveCard: false };
    expect((await call(routes.checkout, { params: { id }, body: pay, as: stranger })).problem?.code).toBe('not-found');
    const viewer = await people.member(shop.operator, 'viewer');
    expect((await must(call(routes.getBooking, { params: { id }, as: viewer }))).actions).toEqual([]);
    for (const as of [viewer, shop.owner, await people.staff('finance')]) {
      expect((await call(routes.letGo, { params: { id }, as })).problem?.code).toBe('not-allowed');
    }
    expect((await call(routes.getBooking, { params: { id } })).problem?.code).toBe('not-signed-in');
  });
});

describe('the list of bookings', () => {
  it('is of either side, filtered, sorted and paged', async () => {
    const mine = await must(call(routes.listBookings, { query: {}, as: shop.operator }));
    const theirs = await must(call(routes.listBookings, { query: {}, as: shop.owner }));
    expect(mine.total).toBeGreaterThan(3);
    expect(theirs.items.map((each) => each.id)).toEqual(mine.items.map((each) => each.id));
    const stranger = await shop.skyberth.people.operator();
    expect((await must(call(routes.listBookings, { query: {}, as: stranger }))).total).toBe(0);
    const query = { state: 'cancelled', sort: '-number', pageSize: 1 } as const;
    const page = await must(call(routes.listBookings, { query, as: shop.operator }));
    expect(page.items).toMatchObject([{ state: 'cancelled' }]);
    expect((await call(routes.listBookings, { query: { state: 'sold' }, as: shop.operator })).problem?.code).toBe(
      'bad-input',
    );
    const [first] = mine.items;
    const period = { fromUtc: first?.aosUtc, toUtc: first?.losUtc };
    const within = await must(call(routes.listBookings, { query: period, as: shop.operator }));
    expect(within.items.map((each) => each.id)).toEqual([first?.id]);
  });
});

describe('the list as a file', () => {
  const file = async (query: string, as: Person) => {
    const path = `${routes.exportBookings.path}${query}`;
    const answer = await fetch(shop.skyberth.url + path, { headers: { Cookie: as.jar.header(path) } });
    return { answer, lines: (await answer.text()).trim().split('\r\n') };
  };

  it('has every booking of the list once, under the same filter, and nothing for a stranger', async () => {
    const { answer, lines } = await file('', shop.operator);
    expect(answer.headers.get('content-type')).toContain('text/csv');
    expect(lines[0]).toMatch(/^berth,state,spacecraft,/);
    const { items, total } = await must(call(routes.listBookings, { query: { pageSize: 200 }, as: shop.operator }));
    expect(lines.slice(1).map((text) => Number(text.split(',')[0]))).toEqual(items.map(({ number }) => number));
    expect(lines.length).toBe(total + 1);
    const [first] = items;
    expect(lines[1]).toContain(`,${first?.aosUtc},`);
    expect(lines[1]?.endsWith(`,EUR,${((first?.toPayMinor ?? 0) / 100).toFixed(2)}`)).toBe(true);
    const cancelled = await file('?state=cancelled', shop.operator);
    expect(cancelled.lines.slice(1).every((text) => text.split(',')[1] === 'cancelled')).toBe(true);
    expect((await file('', await shop.skyberth.people.operator())).lines.length).toBe(1);
    expect((await file('?state=sold', shop.operator)).answer.status).toBe(400);
  });
});

describe('a contact that is paid for', () => {
  it('is confirmed, told to both sides, and shows its track and files to both', async () => {
    const booking = await shop.buy(nextPass());
    expect(booking).toMatchObject({
      state: 'confirmed',
      payment: { state: 'authorised', capturedMinor: 0 },
      actions: ['cancel'],
    });
    expect(booking.payment.card).toMatch(/^Visa ending \d{4}$/);
    expect(booking.invoiceNumber).toMatch(/^SKB-\d{4}-\d{6}$/);
    const subjects = shop.skyberth.mail.to(shop.operator.email).map((mail) => mail.subject);
    expect(subjects.some((subject) => subject.startsWith('Confirmed: '))).toBe(true);
    const sold = shop.skyberth.mail.to(shop.owner.email).find((mail) => mail.subject.startsWith('Sold: '));
    expect(sold?.text).toContain('A dish moves without warning');
    expect(sold?.attachments[0]?.content.toString()).toContain('BEGIN:VEVENT');
    const params = { id: booking.id };
    for (const as of [shop.operator, shop.owner]) {
      const geometry = await must(call(routes.bookingGeometry, { params, as }));
      expect(geometry.track.length).toBeGreaterThan(10);
      const file = await call(routes.bookingFile, { params: { ...params, file: 'contact.ics' }, as });
      expect(file.headers.get('content-disposition')).toContain('.ics');
    }
    const seen = await shop.booking(booking.id, shop.owner);
    expect(seen).toMatchObject({ payment: { card: null }, invoiceId: null });
  });

  it('is given back by the steps when the operator cancels, and the rest is charged', async () => {
    const booking = await shop.buy(nextPass(30));
    const expectedRefundMinor = booking.refundNowMinor ?? -1;
    expect(expectedRefundMinor).toBeGreaterThan(0);
    expect(expectedRefundMinor).toBeLessThan(booking.toPayMinor);
    const params = { id: booking.id };
    const cancel = (body: { expectedRefundMinor: number }, as: Person) =>
      call(routes.cancelBooking, { params, body, as });
    expect((await cancel({ expectedRefundMinor: booking.toPayMinor }, shop.operator)).problem?.code).toBe(
      'price-changed',
    );
    const viewer = await shop.skyberth.people.member(shop.operator, 'viewer');
    expect((await cancel({ expectedRefundMinor }, viewer)).problem?.code).toBe('not-allowed');
    expect((await cancel({ expectedRefundMinor }, await shop.skyberth.people.staff('finance'))).problem?.code).toBe(
      'not-allowed',
    );
    await must(cancel({ expectedRefundMinor }, shop.operator));
    await shop.settle();
    const keptMinor = booking.toPayMinor - expectedRefundMinor;
    expect(await shop.booking(booking.id)).toMatchObject({
      state: 'cancelled',
      payment: { state: 'captured', capturedMinor: keptMinor },
    });
    expect((await cancel({ expectedRefundMinor }, shop.operator)).problem?.code).toBe('wrong-state');
  });

  it('is given back in full when the station cancels', async () => {
    const booking = await shop.buy(nextPass());
    const body = { reason: 'Storm.', expectedRefundMinor: booking.toPayMinor };
    await must(call(routes.cancelBooking, { params: { id: booking.id }, body, as: shop.owner }));
    await shop.settle();
    const after = await shop.booking(booking.id);
    expect(after).toMatchObject({ state: 'cancelled', payment: { state: 'released', capturedMinor: 0 } });
    expect(after.events.at(-1)?.sentence ?? '').toContain('Storm.');
  });
});
