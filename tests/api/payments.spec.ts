import { routes } from '@skyberth/shared';
import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest';
import { databaseText } from './harness/database.js';
import { signEvent } from './harness/payments.js';
import { openShop, type Shop } from './harness/shop.js';
import { must } from './harness.js';

let shop: Shop;
let used = 0;
beforeAll(async () => {
  shop = await openShop({ antenna: { minNoticeMin: 0 } });
});
afterAll(() => shop?.stop());
afterEach(() => shop.payments.keepBack());

const HOUR_MS = 3_600_000;
const SECURED = 'payment_intent.amount_capturable_updated';
const call: Shop['skyberth']['call'] = (route, input) => shop.skyberth.call(route, input);
const hold = async () => {
  const leastMs = shop.skyberth.clock.nowMs() + HOUR_MS;
  const pass = shop.passes.find((each, index) => index >= used && Date.parse(each.geometry.aosUtc) > leastMs);
  if (!pass) throw new Error('The test has used up its passes.');
  used = shop.passes.indexOf(pass) + 1;
  return shop.hold(pass);
};
const checkout = (id: string, savedCardId: string | null = null) =>
  call(routes.checkout, { params: { id }, body: { savedCardId, saveCard: false }, as: shop.operator });
const customerId = async () => (await shop.payments.stripe.customers.list({ limit: 1 })).data[0]?.id ?? '';
const attach = async (card: string) =>
  (await shop.payments.stripe.paymentMethods.attach(card, { customer: await customerId() })).id;
const intentsOf = async (bookingId: string) => {
  const { data } = await shop.payments.stripe.paymentIntents.list({ limit: 100 });
  return data.filter((intent) => intent.metadata.skyberth_booking === bookingId);
};
const sentOf = (type: string, bookingId: string) =>
  shop.payments.sent.filter((delivery) => delivery.type === type && delivery.body.includes(bookingId));
const nowS = () => Math.floor(shop.skyberth.clock.nowMs() / 1000);

describe('paying on the payment page', () => {
  it('keeps the hold when the card is refused, says why, and takes another card', async () => {
    const { id } = await hold();
    const page = await shop.openPage(id);
    await shop.payments.payOnPage(page, 'pm_card_chargeDeclinedInsufficientFunds');
    await shop.settle();
    expect(await shop.booking(id)).toMatchObject({
      state: 'held',
      payment: { state: 'waiting for the buyer', failure: 'The bank says that there is not enough money on the card.' },
    });
    expect(await shop.openPage(id)).toBe(page);
    const back = await shop.payments.payOnPage(page, 'pm_card_visa');
    expect(back.location).toContain(`/bookings/${id}?paid=1`);
    await shop.settle();
    expect(await shop.booking(id)).toMatchObject({
      state: 'confirmed',
      payment: { state: 'authorised', failure: null },
    });
    expect((await checkout(id)).body).toEqual({ kind: 'processing' });
    expect(await intentsOf(id)).toMatchObject([{ status: 'requires_capture' }]);
  });

  it('confirms nothing before the provider has said so', async () => {
    const { id } = await hold();
    shop.payments.keepBack(SECURED);
    await shop.payments.payOnPage(await shop.openPage(id), 'pm_card_visa');
    await shop.settle();
    expect((await shop.booking(id)).state).toBe('held');
    const [event] = sentOf(SECURED, id);
    if (!event) throw new Error('The provider sent no event.');
    expect(await shop.payments.deliver(event)).toBe(200);
    expect((await shop.booking(id)).state).toBe('confirmed');
  });

  it('lets an abandoned payment go when the hold ends, and nobody can pay on its page any more', async () => {
    const booking = await hold();
    const page = await shop.openPage(booking.id);
    await shop.advance(10 * 60_000);
    expect((await checkout(booking.id)).problem?.code).toBe('hold-ended');
    await shop.skyberth.runJobs();
    await shop.settle();
    expect(await shop.booking(booking.id)).toMatchObject({
      state: 'lapsed',
      actions: [],
      payment: { state: 'released' },
    });
    expect((await shop.payments.payOnPage(page, 'pm_card_visa')).status).toBe(410);
    expect((await checkout(booking.id)).problem?.code).toBe('hold-ended');
    expect(await intentsOf(booking.id)).toEqual([]);
  });

  it('lets money go that comes after the hold has lapsed, and tells the buyer', async () => {
    const { id } = await hold();
    const page = await shop.openPage(id);
    shop.payments.keepBack(SECURED, 'checkout.session.completed');
    await shop.payments.payOnPage(page, 'pm_card_visa');
    await shop.payments.settled();
    // Past the two minutes that a bank is given when a hold runs out.
    await shop.advance(13 * 60_000);
    await shop.skyberth.runJobs();
    expect((await shop.booking(id)).state).toBe('lapsed');
    shop.payments.keepBack();
    const [event] = sentOf(SECURED, id);
    const eventId = (JSON.parse(event?.body ?? '{}') as { id: string }).id;
    await shop.payments.hook(`events/${eventId}/resend`);
    await shop.settle();
    expect(await shop.booking(id)).toMatchObject({ state: 'lapsed', payment: { state: 'released', capturedMinor: 0 } });
    expect(await intentsOf(id)).toMatchObject([{ status: 'canceled' }]);
    const subjects = shop.skyberth.mail.to(shop.operator.email).map((mail) => mail.subject);
    expect(subjects.filter((subject) => subject.startsWith('Not booked, the hold had ended'))).toHaveLength(1);
  });

  it('says that the provider does not answer, and opens one page when it does again', async () => {
    const { id } = await hold();
    const match = 'POST /v1/checkout/sessions';
    await shop.payments.hook('faults', { mode: 'cut_before', match, times: 3 });
    expect((await checkout(id)).problem?.code).toBe('payment-unavailable');
    await shop.payments.hook('faults/clear');
    // The line is cut once more, after the page was made: the library asks again under the same key.
    await shop.payments.hook('faults', { mode: 'cut_after', match, times: 1 });
    await shop.openPage(id);
    const { data } = await shop.payments.stripe.checkout.sessions.list({ limit: 100 });
    expect(data.filter((session) => session.client_reference_id === id)).toHaveLength(1);
  });
});

describe('paying with a saved card', () => {
  it('reserves at once', async () => {
    const first = await hold();
    const page = await shop.openPage(first.id, { saveCard: true });
    await shop.payments.payOnPage(page, 'pm_card_mastercard');
    await shop.settle();
    const cards = (await must(call(routes.savedCards, { as: shop.operator }))).items;
    const card = cards.find((each) => each.brand === 'Mastercard');
    expect(card).toMatchObject({ last4: '4444', expires: expect.stringMatching(/^\d\d\/\d\d$/) });
    const { id } = await hold();
    expect((await must(checkout(id, card?.id))).kind).toBe('processing');
    await shop.settle();
    expect(await shop.booking(id)).toMatchObject({ state: 'confirmed', payment: { card: 'Mastercard ending 4444' } });
  });

  it('is refused by the bank, and another way to pay is open', async () => {
    const { id } = await hold();
    const broke = await attach('pm_card_chargeCustomerFail');
    const refused = await checkout(id, broke);
    expect([refused.status, refused.problem?.code]).toEqual([402, 'card-declined']);
    await shop.settle();
    expect(await shop.booking(id)).toMatchObject({ state: 'held', payment: { state: 'waiting for the buyer' } });
    expect((await checkout(id, broke)).problem?.code).toBe('card-declined');
    await shop.payments.payOnPage(await shop.openPage(id), 'pm_card_visa');
    await shop.settle();
    expect((await shop.booking(id)).state).toBe('confirmed');
    const statuses = (await intentsOf(id)).map((intent) => intent.status).sort();
    expect(statuses).toEqual(['canceled', 'requires_capture']);
  });

  it('goes over the bank where the bank wants to ask', async () => {
    const { id } = await hold();
    const asks = await attach('pm_card_authenticationRequired');
    const answer = await must(checkout(id, asks));
    if (answer.kind !== 'redirect') throw new Error('The bank did not ask.');
    await shop.payments.answerBank(answer.url, 'approve');
    await shop.settle();
    expect((await shop.booking(id)).state).toBe('confirmed');
  });

  it('takes no card of somebody else', async () => {
    const { id } = await hold();
    const other = await shop.payments.stripe.customers.create({ name: 'Someone else' });
    const card = await shop.payments.stripe.paymentMethods.attach('pm_card_visa', { customer: other.id });
    expect((await checkout(id, card.id)).problem?.code).toBe('not-found');
    expect((await must(call(routes.savedCards, { as: await shop.skyberth.people.operator() }))).items).toEqual([]);
  });
});

describe('events of the provider', () => {
  it('have their effect once, however often they come', async () => {
    const { id } = await hold();
    await shop.payments.payOnPage(await shop.openPage(id), 'pm_card_visa');
    await shop.settle();
    const [event] = sentOf(SECURED, id);
    if (!event) throw new Error('The provider sent no event.');
    const mails = shop.skyberth.mail.received.length;
    const before = await shop.booking(id);
    const answers = await Promise.all(Array.from({ length: 8 }, () => shop.payments.deliver(event)));
    expect(new Set(answers)).toEqual(new Set([200]));
    await shop.settle();
    expect(await shop.booking(id)).toEqual(before);
    expect(shop.skyberth.mail.received).toHaveLength(mails);
  });

  it('may come in any order: an old refusal does not undo a payment', async () => {
    const { id } = await hold();
    shop.payments.keepBack('payment_intent.payment_failed');
    const page = await shop.openPage(id);
    await shop.payments.payOnPage(page, 'pm_card_chargeDeclined');
    await shop.payments.payOnPage(page, 'pm_card_visa');
    await shop.settle();
    const [late] = sentOf('payment_intent.payment_failed', id);
    if (!late) throw new Error('The provider sent no refusal.');
    expect(await shop.payments.deliver(late)).toBe(200);
    expect(await shop.booking(id)).toMatchObject({
      state: 'confirmed',
      payment: { state: 'authorised', failure: null },
    });
  });

  it('are missed by nobody: the sweep asks the provider', async () => {
    const { id } = await hold();
    shop.payments.keepBack(SECURED);
    await shop.payments.payOnPage(await shop.openPage(id), 'pm_card_visa');
    await shop.settle();
    await shop.advance(100_000);
    await shop.skyberth.runJobs();
    expect((await shop.booking(id)).state).toBe('confirmed');
  });

  it('are refused when forged, changed, too old, from the future or unsigned, and leave nothing', async () => {
    const { id, toPayMinor, currency } = await hold();
    await shop.openPage(id);
    const object = {
      id: 'pi_forged',
      object: 'payment_intent',
      status: 'requires_capture',
      amount: toPayMinor,
      amount_capturable: toPayMinor,
      amount_received: 0,
      currency: currency.toLowerCase(),
      metadata: { skyberth_booking: id },
      latest_charge: null,
      last_payment_error: null,
      next_action: null,
    };
    const event = { id: 'evt_forged', object: 'event', type: SECURED, data: { object } };
    const good = signEvent(event, nowS());
    const attempts = [
      signEvent(event, nowS(), 'whsec_somebody_elses'),
      { ...good, body: good.body.replace('evt_forged', 'evt_changed') },
      signEvent(event, nowS() - 400),
      signEvent(event, nowS() + 400),
      { ...good, signature: '' },
    ];
    for (const attempt of attempts) expect(await shop.payments.deliver(attempt)).toBe(400);
    expect((await shop.booking(id)).state).toBe('held');
    expect(databaseText(shop.skyberth, 'provider_events')).not.toContain('evt_forged');
  });

  it.each([
    ['another amount', { amount_capturable: 1 }],
    ['another currency', { currency: 'usd' }],
  ])('with %s confirm nothing, and what they reserved is let go', async (_what, change) => {
    const { id, toPayMinor } = await hold();
    await shop.openPage(id);
    const intent = await shop.payments.stripe.paymentIntents.create({
      amount: toPayMinor,
      currency: 'eur',
      capture_method: 'manual',
      allowed_payment_method_types: ['card'],
      metadata: { skyberth_booking: 'none of ours' },
    });
    const object = {
      ...intent,
      status: 'requires_capture',
      amount_capturable: toPayMinor,
      metadata: { skyberth_booking: id },
      ...change,
    };
    const event = { id: `evt_odd_${id}`, object: 'event', type: SECURED, data: { object } };
    expect(await shop.payments.deliver(signEvent(event, nowS()))).toBe(200);
    await shop.settle();
    expect(await shop.booking(id)).toMatchObject({ state: 'held', payment: { state: 'failed' } });
    expect((await shop.payments.stripe.paymentIntents.retrieve(intent.id)).status).toBe('canceled');
    expect(databaseText(shop.skyberth, 'audit_log')).toContain('payment.wrong-amount');
  });

  it('about other things are taken and kept, and a second reservation is let go', async () => {
    expect(
      await shop.payments.deliver(
        signEvent({ id: 'evt_other', type: 'customer.updated', data: { object: {} } }, nowS()),
      ),
    ).toBe(200);
    const { id, toPayMinor } = await hold();
    await shop.payments.payOnPage(await shop.openPage(id), 'pm_card_visa');
    await shop.settle();
    await shop.payments.stripe.paymentIntents.create({
      amount: toPayMinor,
      currency: 'eur',
      capture_method: 'manual',
      allowed_payment_method_types: ['card'],
      payment_method: 'pm_card_visa',
      confirm: true,
      metadata: { skyberth_booking: id },
    });
    await shop.settle();
    expect((await shop.booking(id)).state).toBe('confirmed');
    expect((await intentsOf(id)).map((intent) => intent.status).sort()).toEqual(['canceled', 'requires_capture']);
  });
});
