/** Newer elements and booked contacts, over HTTP against the real server. */
import { openDatabase } from '@skyberth/drizzle';
import { type Booking, type Drift, routes } from '@skyberth/shared';
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { elementsAt, openShop, passesForSale, type Shop, spacecraftWithElements } from './harness/shop.js';
import { addSoldContact } from './harness/sold-contact.js';
import { must } from './harness.js';

/** Its elements stand at this mean anomaly; a degree more brings every pass about 16 s earlier. */
const CATALOG_NUMBER = 70_001;
const ANOMALY_DEG = CATALOG_NUMBER % 360;
const HOUR_MS = 3_600_000;

let shop: Shop;
let epochMs: number;
let booking: Booking;
let lastMs = 0;
let sets = 0;
const call: Shop['skyberth']['call'] = (route, input) => shop.skyberth.call(route, input);
const drift = (id: string): Promise<Drift> => must(call(routes.bookingDrift, { params: { id }, as: shop.operator }));
const answer = (route: typeof routes.acceptDrift | typeof routes.refuseDrift, questionId: string, as = shop.operator) =>
  call(route, { params: { id: booking.id }, body: { questionId }, as });
const mailed = (subject: string) =>
  shop.skyberth.mail.to(shop.owner.email).filter((mail) => mail.subject.startsWith(subject));

/** SEQUENCE of the calendar file: RFC 5545 3.8.7.4, a larger one replaces the event. */
async function sequence(): Promise<number> {
  const path = `/api/bookings/${booking.id}/files/contact.ics`;
  const headers = { Cookie: shop.operator.jar.header(path) };
  const text = await (await fetch(shop.skyberth.url + path, { headers })).text();
  return Number(/^SEQUENCE:(\d+)/m.exec(text)?.[1]);
}

/** Newer elements, further along the orbit by so many degrees than those that were sold on. */
async function renew(byDeg: number): Promise<void> {
  // A set that is known already would be left out, so each differs from all before by less than anybody sees.
  sets += 1;
  const anomalyDeg = (ANOMALY_DEG + byDeg + sets * 0.0001 + 360) % 360;
  const text = elementsAt(epochMs, CATALOG_NUMBER, anomalyDeg);
  await must(call(routes.saveElements, { body: { text, spacecraftId: shop.spacecraftId }, as: shop.operator }));
  await shop.skyberth.runJobs();
  await shop.settle();
}

beforeAll(async () => {
  shop = await openShop({ antenna: { minNoticeMin: 0 } });
  const { items } = await must(
    call(routes.listElements, { params: { id: shop.spacecraftId }, query: {}, as: shop.operator }),
  );
  epochMs = Date.parse(items[0]?.epochUtc ?? '');
});
afterAll(() => shop?.stop());

/** Back to about the elements of the beginning, and a new contact after those of the tests before. */
beforeEach(async () => {
  await renew(0);
  const wish = { as: shop.operator, spacecraftId: shop.spacecraftId, days: 6 };
  const passes = await passesForSale(shop.skyberth, wish);
  const pass = passes.find((each) => Date.parse(each.geometry.aosUtc) > lastMs + 3 * HOUR_MS);
  if (!pass) throw new Error('The test has used up its passes.');
  lastMs = Date.parse(pass.geometry.losUtc);
  booking = await shop.buy(pass);
});

describe('a shift inside the set-up guard', () => {
  it('re-times the contact to what the newer elements say, and tells both sides with a newer calendar', async () => {
    const before = mailed('New times').length;
    const oldSequence = await sequence();
    await shop.advance(2_000);
    await renew(0.6);
    expect(await sequence()).toBeGreaterThan(oldSequence);
    const moved = await shop.booking(booking.id);
    const shiftS = (Date.parse(moved.aosUtc) - Date.parse(booking.aosUtc)) / 1000;
    expect(shiftS).toBeLessThan(-5);
    expect(shiftS).toBeGreaterThan(-15);
    const seen = await drift(booking.id);
    expect(seen).toMatchObject({ question: null, retimes: [{ cause: 'inside the guard', aosShiftS: shiftS }] });
    // The same pass, searched for by the newer elements.
    const geometry = await must(call(routes.bookingGeometry, { params: { id: booking.id }, as: shop.operator }));
    expect(Math.abs(Date.parse(geometry.geometry.aosUtc) - Date.parse(moved.aosUtc))).toBeLessThanOrEqual(2);
    expect(Math.abs(Date.parse(geometry.geometry.losUtc) - Date.parse(moved.losUtc))).toBeLessThanOrEqual(2);
    expect(moved.toPayMinor).toBe(booking.toPayMinor);
    expect(mailed('New times').length).toBe(before + 1);
    const buyer = shop.skyberth.mail.to(shop.operator.email).findLast((mail) => mail.subject.startsWith('New times'));
    expect(buyer?.text).toContain('Re-timed by newer elements');
    // Nothing more happens where nothing newer came.
    await shop.skyberth.runJobs();
    expect((await drift(booking.id)).retimes).toHaveLength(1);
  });

  it('is asked about where the new time would touch another contact, which keeps its time', async () => {
    const craft = await spacecraftWithElements(shop.skyberth, shop.operator, 70_045);
    const besideMs = Date.parse(booking.teardownEndsUtc);
    const { booking: besideId } = addSoldContact(shop.skyberth, {
      operator: shop.operator,
      owner: shop.owner,
      antennaId: shop.antennaId,
      spacecraftId: craft.id,
      aosMs: besideMs + 60_000,
      losMs: besideMs + 120_000,
    });
    await renew(-0.6);
    const same = await shop.booking(booking.id);
    expect(same).toMatchObject({ aosUtc: booking.aosUtc, losUtc: booking.losUtc, state: 'confirmed' });
    const { question, retimes } = await drift(booking.id);
    expect(retimes).toEqual([]);
    expect(question?.sentence).toContain('touch another contact');
    expect((await answer(routes.acceptDrift, question?.id ?? '')).problem?.code).toBe('berth-taken');
    expect((await drift(booking.id)).question?.id).toBe(question?.id);
    expect((await shop.booking(besideId)).state).toBe('confirmed');
  });
});

describe('a larger shift', () => {
  it('is asked about; only the operator answers, and only the newest question', async () => {
    await renew(8);
    const first = (await drift(booking.id)).question;
    expect(first?.aosShiftS).toBeLessThan(-60);
    expect((await shop.booking(booking.id)).aosUtc).toBe(booking.aosUtc);
    expect((await answer(routes.acceptDrift, first?.id ?? '', shop.owner)).problem?.code).toBe('not-allowed');
    await renew(9);
    const second = (await drift(booking.id)).question;
    expect(second?.id).not.toBe(first?.id);
    expect((await answer(routes.acceptDrift, first?.id ?? '')).problem?.code).toBe('changed-meanwhile');
    const moved = await must(answer(routes.acceptDrift, second?.id ?? ''));
    expect(moved.aosUtc).toBe(second?.to.aosUtc);
    expect((await drift(booking.id)).retimes).toMatchObject([{ cause: 'accepted' }]);
    expect((await answer(routes.acceptDrift, second?.id ?? '')).problem?.code).toBe('wrong-state');
  });

  it('may be refused, which gives all of the price back', async () => {
    await renew(8);
    const { question } = await drift(booking.id);
    const cancelled = await must(answer(routes.refuseDrift, question?.id ?? ''));
    expect(cancelled.state).toBe('cancelled');
    await shop.settle();
    expect((await shop.booking(booking.id)).payment).toMatchObject({ state: 'released', capturedMinor: 0 });
  });
});

describe('a pass that is gone', () => {
  it('is cancelled and given back, and both sides are told', async () => {
    await renew(180);
    const lost = await shop.booking(booking.id);
    expect(lost.state).toBe('cancelled');
    expect(lost.events.map((event) => event.kind)).toContain('pass lost');
    expect(lost.payment).toMatchObject({ state: 'released', capturedMinor: 0 });
    expect(mailed('Pass lost').length).toBeGreaterThan(0);
  });
});

describe('the database', () => {
  it('changes the times of a booking only by a recorded re-time', () => {
    const { $client: client } = openDatabase(shop.skyberth.databaseFile);
    try {
      const move = client.prepare('UPDATE bookings SET aos_ms = aos_ms + 1000 WHERE id = ?');
      expect(() => move.run(booking.id)).toThrow('only by a recorded re-time');
      expect(() => client.prepare('UPDATE booking_retimes SET to_aos_ms = 0').run()).toThrow('never change');
      expect(() => client.prepare('DELETE FROM booking_retimes').run()).toThrow('are kept');
    } finally {
      client.close();
    }
  });
});
