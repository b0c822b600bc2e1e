import type Stripe from 'stripe';
import { describe, expect, it } from 'vitest';
import { type Bench, bench, receiver, refusal } from './testing.js';

const SHOP = 'http://127.0.0.1:9/bookings/7?paid=1';

const order = (change: Partial<Stripe.Checkout.SessionCreateParams> = {}): Stripe.Checkout.SessionCreateParams => ({
  mode: 'payment',
  line_items: [
    { quantity: 1, price_data: { currency: 'eur', unit_amount: 8188, product_data: { name: 'Berth <7>' } } },
  ],
  payment_intent_data: { capture_method: 'manual', metadata: { booking: '7' }, description: 'Berth 7' },
  success_url: SHOP,
  cancel_url: 'http://127.0.0.1:9/bookings/7',
  metadata: { booking: '7' },
  ...change,
});

function submit({ service }: Bench, id: string, token: string): Promise<Response> {
  return fetch(`${service.url}/checkout/${id}`, {
    method: 'POST',
    body: new URLSearchParams({ token }),
    redirect: 'manual',
  });
}

describe('a checkout session', () => {
  it('is open without an intent, and its page says what is bought', async () => {
    const tools = await bench();
    const session = await tools.stripe.checkout.sessions.create(order());
    expect(session).toMatchObject({
      status: 'open',
      payment_status: 'unpaid',
      payment_intent: null,
      amount_total: 8188,
    });
    const page = await (await fetch(session.url ?? '')).text();
    expect(page).toContain('81.88 EUR');
    expect(page).toContain('Berth &#60;7&#62;');
    expect(page).toContain('No real money moves here');
  });

  it('reserves the amount once, with what was said about the intent, and leads back to the shop', async () => {
    const tools = await bench();
    const hook = await receiver();
    await tools.stripe.webhookEndpoints.create({ url: hook.url, enabled_events: ['*'] });
    const customer = await tools.stripe.customers.create({});
    const paid = order({ customer: customer.id });
    const session = await tools.stripe.checkout.sessions.create({
      ...paid,
      payment_intent_data: { ...paid.payment_intent_data, setup_future_usage: 'off_session' },
    });
    const answer = await submit(tools, session.id, 'pm_card_visa');
    expect([answer.status, answer.headers.get('location')]).toEqual([303, SHOP]);
    const after = await tools.stripe.checkout.sessions.retrieve(session.id, { expand: ['payment_intent'] });
    expect(after).toMatchObject({
      status: 'complete',
      payment_status: 'unpaid',
      url: null,
      payment_intent: { status: 'requires_capture', amount_capturable: 8188, metadata: { booking: '7' } },
    });
    expect((await tools.stripe.customers.listPaymentMethods(customer.id)).data).toHaveLength(1);
    expect((await submit(tools, session.id, 'pm_card_visa')).headers.get('location')).toBe(SHOP);
    expect((await tools.stripe.paymentIntents.list({})).data).toHaveLength(1);
    await tools.service.deliveriesSettled();
    const types = hook.received.map(({ body }) => (JSON.parse(body) as Stripe.Event).type);
    expect(types).toContain('payment_intent.amount_capturable_updated');
    expect(types).toContain('checkout.session.completed');
  });

  it('stays open after a refusal and uses the same intent for the next card', async () => {
    const tools = await bench();
    const session = await tools.stripe.checkout.sessions.create(order());
    expect(await (await submit(tools, session.id, 'pm_card_chargeDeclinedInsufficientFunds')).text()).toContain(
      'insufficient funds',
    );
    expect((await tools.stripe.checkout.sessions.retrieve(session.id)).status).toBe('open');
    expect((await submit(tools, session.id, 'pm_card_visa')).status).toBe(303);
    expect((await tools.stripe.paymentIntents.list({})).data).toMatchObject([{ status: 'requires_capture' }]);
  });

  it('is complete once the bank agreed, though the browser never comes back', async () => {
    const tools = await bench();
    const session = await tools.stripe.checkout.sessions.create(order());
    const toBank = (await submit(tools, session.id, 'pm_card_authenticationRequired')).headers.get('location') ?? '';
    expect(toBank).toContain('/confirm/');
    expect((await tools.stripe.checkout.sessions.retrieve(session.id)).status).toBe('open');
    const back = await fetch(toBank, {
      method: 'POST',
      body: new URLSearchParams({ answer: 'approve' }),
      redirect: 'manual',
    });
    expect((await tools.stripe.checkout.sessions.retrieve(session.id)).status).toBe('complete');
    const home = await fetch(back.headers.get('location') ?? '', { redirect: 'manual' });
    expect(home.headers.get('location')).toBe(SHOP);
  });

  it('can be closed once, and then nothing can be paid', async () => {
    const tools = await bench();
    const session = await tools.stripe.checkout.sessions.create(order());
    await submit(tools, session.id, 'pm_card_chargeDeclined');
    expect(await tools.stripe.checkout.sessions.expire(session.id)).toMatchObject({ status: 'expired', url: null });
    expect((await refusal(tools.stripe.checkout.sessions.expire(session.id))).statusCode).toBe(400);
    expect((await submit(tools, session.id, 'pm_card_visa')).status).toBe(410);
    expect((await tools.stripe.paymentIntents.list({})).data).toMatchObject([{ status: 'canceled' }]);
  });

  it('cannot be closed any more once it is paid', async () => {
    const tools = await bench();
    const session = await tools.stripe.checkout.sessions.create(order());
    await submit(tools, session.id, 'pm_card_visa');
    expect((await refusal(tools.stripe.checkout.sessions.expire(session.id))).message).toContain('complete');
  });

  it('ends by itself after a day', async () => {
    const tools = await bench();
    const session = await tools.stripe.checkout.sessions.create(order());
    await tools.hook('clock', { advanceMs: 24 * 3600 * 1000 + 1000 });
    expect((await tools.stripe.checkout.sessions.retrieve(session.id)).status).toBe('expired');
  });

  it.each([
    ['no items', { line_items: [] }],
    [
      'an amount of nothing',
      { line_items: [{ quantity: 1, price_data: { currency: 'eur', unit_amount: 0, product_data: { name: 'x' } } }] },
    ],
    ['an end too soon', { expires_at: Math.floor(Date.now() / 1000) + 60 }],
    ['an address that is none', { success_url: 'javascript:alert(1)' }],
    ['a customer that is not there', { customer: 'cus_none' }],
  ] satisfies [string, Partial<Stripe.Checkout.SessionCreateParams>][])('is refused with %s', async (_what, change) => {
    const tools = await bench();
    await refusal(tools.stripe.checkout.sessions.create(order(change)));
  });

  it('leads nobody to another machine', async () => {
    const tools = await bench();
    const session = await tools.stripe.checkout.sessions.create(
      order({ success_url: 'https://elsewhere.example/x', cancel_url: 'https://elsewhere.example/y' }),
    );
    expect(await (await fetch(session.url ?? '')).text()).not.toContain('elsewhere.example');
    expect((await submit(tools, session.id, 'pm_card_visa')).headers.get('location')).toBeNull();
  });
});
