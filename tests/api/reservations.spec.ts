/** What the bank holds for us does not hold for ever, and what was taken can be given back. */
import { LedgerService } from '@skyberth/api';
import { type Booking, routes } from '@skyberth/shared';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { openShop, type Shop } from './harness/shop.js';
import { must } from './harness.js';

let shop: Shop;
beforeAll(async () => {
  shop = await openShop({ antenna: { minNoticeMin: 0 }, days: 12 });
});
afterAll(() => shop?.stop());

const DAY_MS = 86_400_000;
const call: Shop['skyberth']['call'] = (route, input) => shop.skyberth.call(route, input);
const passAfter = (days: number) => {
  const pass = shop.passes.find(
    (each) => Date.parse(each.geometry.aosUtc) > shop.skyberth.clock.nowMs() + days * DAY_MS,
  );
  if (!pass) throw new Error('There is no such pass.');
  return pass;
};
const intentsOf = async (booking: Booking) => {
  const { data } = await shop.payments.stripe.paymentIntents.list({ limit: 100 });
  return data.filter((intent) => intent.metadata.skyberth_booking === booking.id);
};
const turn = async () => {
  await shop.skyberth.runJobs();
  await shop.settle();
};
const sound = () => shop.skyberth.app.get(LedgerService, { strict: false }).selfCheck();

describe('a contact beyond the life of a reservation', () => {
  it('keeps the card, reserves again a day before the end, and is charged from the new reservation', async () => {
    const early = await shop.buy(passAfter(7.5));
    // The bank wants to ask about this card each time, so that a reservation without the buyer is refused.
    const asked = await shop.hold(passAfter(9));
    const toBank = await shop.payments.payOnPage(await shop.openPage(asked.id), 'pm_card_authenticationRequired');
    await shop.payments.answerBank(toBank.location ?? '', 'approve');
    await shop.settle();
    expect((await shop.booking(asked.id)).state).toBe('confirmed');
    expect((await must(call(routes.savedCards, { as: shop.operator }))).items.length).toBeGreaterThan(0);

    // Reservations last seven days (published-values.md, section j); the stand-in keeps to that.
    await shop.advance(5.9 * DAY_MS);
    await turn();
    expect(await intentsOf(early)).toHaveLength(1);
    await shop.advance(0.2 * DAY_MS);
    await turn();
    expect((await intentsOf(early)).map((intent) => intent.status).sort()).toEqual(['canceled', 'requires_capture']);
    expect(await shop.booking(early.id)).toMatchObject({ state: 'confirmed', payment: { state: 'authorised' } });
    const warned = shop.skyberth.mail
      .to(shop.operator.email)
      .filter((mail) => mail.subject.startsWith('Your card was refused'));
    expect(warned).toHaveLength(1);
    expect(warned[0]?.text).toContain(String(asked.number));

    await shop.advance(1.0 * DAY_MS);
    await turn();
    const lapsed = await shop.booking(asked.id);
    expect(lapsed).toMatchObject({ state: 'lapsed', payment: { state: 'released', capturedMinor: 0 } });
    const { items } = await must(call(routes.listInvoices, { query: {}, as: shop.operator }));
    const papers = items.filter((each) => each.bookingId === asked.id);
    expect(papers.reduce((sum, each) => sum + each.grossMinor, 0)).toBe(0);

    await shop.advanceTo(Date.parse(early.losUtc) + 1_000);
    await turn();
    const report = {
      outcome: 'good',
      cause: 'none',
      acquiredUtc: null,
      lostUtc: null,
      receivedBytes: null,
      ebN0Db: null,
      note: '',
    } as const;
    await must(call(routes.reportContact, { params: { id: early.id }, body: report, as: shop.owner }));
    await shop.settle();
    expect(await shop.booking(early.id)).toMatchObject({
      state: 'settled',
      payment: { state: 'captured', capturedMinor: early.toPayMinor },
    });
    expect(sound()).toEqual([]);
  });

  it('shows in payment and ledger what finance gives back at the provider, in steps, to the cent', async () => {
    const { items } = await must(call(routes.listBookings, { query: { state: 'settled' }, as: shop.operator }));
    const { id } = items[0] ?? { id: '' };
    const { payment } = await shop.booking(id);
    const intent = (await intentsOf(await shop.booking(id))).find((each) => each.status === 'succeeded');
    const refund = (amount: number) =>
      shop.payments.stripe.refunds.create({ payment_intent: intent?.id ?? '', amount });
    await refund(1_001);
    await shop.settle();
    expect((await shop.booking(id)).payment).toMatchObject({ state: 'captured', refundedMinor: 1_001 });
    await refund(payment.capturedMinor - 1_001);
    await shop.settle();
    expect((await shop.booking(id)).payment).toMatchObject({ state: 'refunded', refundedMinor: payment.capturedMinor });
    expect(sound()).toEqual([]);
    const finance = await shop.skyberth.people.staff('finance');
    const { items: balances } = await must(call(routes.balances, { as: finance }));
    expect(balances.filter((each) => each.balanceMinor !== 0)).toEqual([]);
  });
});
