/** From a sold contact to its money: answers, flight, reports, the ledger, and what happens when nobody acts. */

import { LedgerService } from '@skyberth/api';
import { type BodyInput, type Booking, routes } from '@skyberth/shared';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { openShop, type Shop } from './harness/shop.js';
import { must } from './harness.js';

let shop: Shop;
beforeAll(async () => {
  shop = await openShop({ antenna: { minNoticeMin: 0, acceptance: 'owner', answerWithinMin: 60 } });
});
afterAll(() => shop?.stop());

const HOUR_MS = 3_600_000;
const call: Shop['skyberth']['call'] = (route, input) => shop.skyberth.call(route, input);
/** The next pass that is still at least so far ahead; contacts of this file are taken in order of time. */
let lastMs = 0;
const buy = async (hours = 2): Promise<Booking> => {
  const leastMs = Math.max(shop.skyberth.clock.nowMs() + hours * HOUR_MS, lastMs + HOUR_MS);
  const pass = shop.passes.find((each) => Date.parse(each.geometry.aosUtc) > leastMs);
  if (!pass) throw new Error('The test has used up its passes.');
  lastMs = Date.parse(pass.geometry.losUtc);
  return shop.buy(pass);
};
const accept = (id: string) => call(routes.acceptBooking, { params: { id }, as: shop.owner });
const decline = (id: string, reason: string) =>
  call(routes.declineBooking, { params: { id }, body: { reason }, as: shop.owner });
type Report = BodyInput<typeof routes.reportContact>;
const report = (id: string, change: Partial<Report> = {}) => {
  const body: Report = {
    outcome: 'good',
    cause: 'none',
    acquiredUtc: null,
    lostUtc: null,
    receivedBytes: null,
    ebN0Db: null,
    note: '',
    ...change,
  };
  return call(routes.reportContact, { params: { id }, body, as: shop.owner });
};
/** Takes a booking to after its LOS. */
const fly = async (booking: Booking, afterLosMs = 1_000) => {
  await shop.advanceTo(Date.parse(booking.losUtc) + afterLosMs);
  await shop.skyberth.runJobs();
  await shop.settle();
};
/** Signed in anew each time, since the clock moves by days here. */
const finance = async () => shop.skyberth.people.signIn((await shop.skyberth.people.staff('finance')).email);
const journal = async (bookingId: string) => {
  const as = await finance();
  const { items } = await must(call(routes.journal, { query: { limit: 200 }, as }));
  return items.filter((entry) => entry.bookingId === bookingId);
};
const sumOf = (entries: Awaited<ReturnType<typeof journal>>, account: string) =>
  entries
    .flatMap((entry) => entry.postings)
    .reduce((sum, each) => (each.account === account ? sum + each.amountMinor : sum), 0);
const sound = () => shop.skyberth.app.get(LedgerService, { strict: false }).selfCheck();

describe("the owner's answer", () => {
  it('is asked for once funds are reserved, and no invoice is written before it', async () => {
    const asked = await buy();
    expect(asked).toMatchObject({
      state: 'awaiting owner',
      invoiceId: null,
      payment: { state: 'authorised' },
      actions: ['cancel'],
    });
    expect((await shop.booking(asked.id, shop.owner)).actions).toEqual(['accept', 'decline']);
    const request = shop.skyberth.mail
      .to(shop.owner.email)
      .find((mail) => mail.subject.startsWith('Please answer by '));
    expect(request?.text).toContain(`${asked.number}`);
    expect((await call(routes.acceptBooking, { params: { id: asked.id }, as: shop.operator })).problem?.code).toBe(
      'not-allowed',
    );
    const other = await shop.skyberth.people.owner();
    expect((await call(routes.acceptBooking, { params: { id: asked.id }, as: other })).problem?.code).toBe('not-found');
    expect(await must(accept(asked.id))).toMatchObject({ state: 'confirmed' });
    expect((await shop.booking(asked.id)).invoiceNumber).toMatch(/^SKB-/);
    expect((await accept(asked.id)).problem?.code).toBe('wrong-state');
    expect((await decline(asked.id, 'Too late.')).problem?.code).toBe('wrong-state');
  });

  it('can be no, with its reason, and everything is let go', async () => {
    const asked = await buy();
    expect((await decline(asked.id, '')).problem?.code).toBe('bad-input');
    await must(decline(asked.id, 'Gale warning.'));
    await shop.settle();
    expect(await shop.booking(asked.id)).toMatchObject({
      state: 'declined',
      invoiceId: null,
      payment: { state: 'released' },
    });
    const mail = shop.skyberth.mail.to(shop.operator.email).find((each) => each.subject.startsWith('Declined: '));
    expect(mail?.text).toContain('Gale warning.');
  });

  it('lapses when it does not come, and can no longer be given', async () => {
    const asked = await buy(3);
    await shop.advanceTo(Date.parse(asked.answerByUtc ?? '') + 1_000);
    expect((await accept(asked.id)).problem?.code).toBe('wrong-state');
    await shop.skyberth.runJobs();
    await shop.settle();
    expect(await shop.booking(asked.id)).toMatchObject({ state: 'lapsed', payment: { state: 'released' } });
  });

  it('is no longer needed when the operator takes the request back, at no cost', async () => {
    const asked = await buy();
    expect(asked.refundNowMinor).toBe(asked.toPayMinor);
    const body = { expectedRefundMinor: asked.toPayMinor };
    await must(call(routes.cancelBooking, { params: { id: asked.id }, body, as: shop.operator }));
    await shop.settle();
    expect(await shop.booking(asked.id)).toMatchObject({
      state: 'cancelled',
      payment: { state: 'released', capturedMinor: 0 },
    });
  });
});

describe('a flown contact', () => {
  const sell = async () => {
    const asked = await buy();
    await must(accept(asked.id));
    return shop.booking(asked.id);
  };

  it('begins at AOS, ends at LOS, and is charged when the report is good', async () => {
    const booking = await sell();
    expect((await report(booking.id)).problem?.code).toBe('wrong-state');
    await shop.advanceTo(Date.parse(booking.aosUtc) + 1_000);
    await shop.skyberth.runJobs();
    expect(await shop.booking(booking.id)).toMatchObject({ state: 'under way', actions: [], refundNowMinor: null });
    expect((await report(booking.id)).problem?.code).toBe('wrong-state');
    await fly(booking);
    expect(await shop.booking(booking.id)).toMatchObject({ state: 'reporting', payment: { state: 'authorised' } });
    expect((await shop.booking(booking.id, shop.owner)).actions).toEqual(['report']);
    await must(report(booking.id, { receivedBytes: 62_000_000, ebN0Db: 9.8 }));
    await shop.settle();
    const settled = await shop.booking(booking.id);
    expect(settled).toMatchObject({
      state: 'settled',
      report: { outcome: 'good', receivedBytes: 62_000_000 },
      payment: { state: 'captured', capturedMinor: booking.toPayMinor },
    });
    const entries = await journal(booking.id);
    expect(sumOf(entries, 'operator receivable')).toBe(0);
    expect(sumOf(entries, 'provider clearing')).toBe(booking.toPayMinor);
    const net = booking.quote.totalMinor;
    // The marketplace keeps 8 % of the net price; halves go up.
    const feeMinor = Math.floor((net * 8 + 50) / 100);
    expect(sumOf(entries, 'marketplace fee')).toBe(-feeMinor);
    expect(sumOf(entries, 'owner payable')).toBe(feeMinor - net);
    expect(sound()).toEqual([]);
    expect((await report(booking.id)).problem?.code).toBe('wrong-state');
  });

  it.each([
    ['nothing is charged when the station was the cause', 'station', 'released'],
    ['nothing is charged for the weather', 'weather', 'released'],
    ['the price is charged when the spacecraft was the cause', 'spacecraft', 'captured'],
  ] as const)('that failed: %s', async (_what, cause, payment) => {
    const booking = await sell();
    await fly(booking);
    expect((await report(booking.id, { outcome: 'failed', cause: 'none' })).problem?.code).toBe('bad-input');
    await must(report(booking.id, { outcome: 'failed', cause }));
    await shop.settle();
    expect(await shop.booking(booking.id)).toMatchObject({ state: 'failed', payment: { state: payment } });
    const entries = await journal(booking.id);
    expect(sumOf(entries, 'provider clearing')).toBe(payment === 'captured' ? booking.toPayMinor : 0);
    const mails = shop.skyberth.mail.received.filter(
      (mail) => mail.subject.startsWith('Credit note SKC-') && mail.text.includes(String(booking.number)),
    );
    expect(mails).toHaveLength(payment === 'captured' ? 0 : 1);
    expect(sound()).toEqual([]);
  });

  it('may be broken off while it is under way', async () => {
    const booking = await sell();
    await shop.advanceTo(Date.parse(booking.aosUtc) + 30_000);
    await shop.skyberth.runJobs();
    await must(report(booking.id, { outcome: 'failed', cause: 'station', note: 'Drive fault.' }));
    expect((await shop.booking(booking.id)).state).toBe('failed');
  });

  it('without a report is reminded of once, and closed by rule a day later, also after downtime', async () => {
    const booking = await sell();
    await fly(booking, 3 * HOUR_MS);
    await shop.skyberth.runJobs();
    const reminders = () =>
      shop.skyberth.mail
        .to(shop.owner.email)
        .filter((mail) => mail.subject.startsWith('Please report: ') && mail.text.includes(String(booking.number)));
    expect(reminders()).toHaveLength(1);
    await fly(booking, 25 * HOUR_MS);
    await shop.settle();
    expect(await shop.booking(booking.id)).toMatchObject({
      state: 'settled',
      report: null,
      payment: { state: 'captured' },
    });
    expect(reminders()).toHaveLength(1);
    expect(sound()).toEqual([]);
  });
});

describe('the ledger', () => {
  it('is shown to finance alone, and its balances are the sums of its entries', async () => {
    const as = await finance();
    const { items } = await must(call(routes.balances, { as }));
    const total = items.reduce((sum, each) => sum + each.balanceMinor, 0);
    expect(total).toBe(0);
    const charges = await shop.payments.stripe.charges.list({ limit: 100 });
    const takenMinor = charges.data.reduce((sum, charge) => sum + charge.amount_captured, 0);
    const balanceOf = (account: string) => items.find((each) => each.account === account)?.balanceMinor ?? 0;
    expect(balanceOf('provider clearing') + balanceOf('provider costs')).toBe(takenMinor);
    const query = { account: 'marketplace fee', currency: 'EUR' };
    const fees = await must(call(routes.ledgerLines, { query, as }));
    expect(fees.postings).toBeGreaterThan(0);
    expect(fees.items.reduce((sum, line) => sum + line.amountMinor, 0)).toBe(balanceOf('marketplace fee'));
    for (const person of [shop.operator, shop.owner]) {
      expect((await call(routes.balances, { as: person })).problem?.code).toBe('not-allowed');
      expect((await call(routes.journal, { query: {}, as: person })).problem?.code).toBe('not-allowed');
    }
  });
});
