import type Stripe from 'stripe';
import { describe, expect, it } from 'vitest';
import { bench, pay, refusal } from './testing.js';

const DAY_MS = 86_400_000;

describe('payment intents', () => {
  it('holds money and takes it later, for a customer with a saved card', async () => {
    const { stripe } = await bench();
    const customer = await stripe.customers.create({
      name: 'Fjordsat Operations',
      email: 'pay@fjordsat.example',
      metadata: { org: '7' },
    });
    const method = await stripe.paymentMethods.attach('pm_card_visa', { customer: customer.id });
    const held = await pay(stripe, {
      amount: 12_345,
      capture_method: 'manual',
      customer: customer.id,
      payment_method: method.id,
      off_session: true,
    });
    expect(held).toMatchObject({ status: 'requires_capture', amount_capturable: 12_345, amount_received: 0 });

    const taken = await stripe.paymentIntents.capture(held.id);
    expect(taken).toMatchObject({ status: 'succeeded', amount_capturable: 0, amount_received: 12_345 });
    const full = await stripe.paymentIntents.retrieve(held.id, {
      expand: ['latest_charge.balance_transaction', 'payment_method', 'customer'],
    });
    const charge = full.latest_charge as Stripe.Charge;
    // 1.5 % of 12345 is 185.175, plus 25: our own fee table.
    expect(charge.balance_transaction).toMatchObject({
      amount: 12_345,
      fee: 210,
      net: 12_135,
      type: 'charge',
      status: 'pending',
    });
    expect(full.payment_method).toMatchObject({ id: method.id, card: { brand: 'visa', last4: '4242' } });
    expect(full.customer).toMatchObject({ name: 'Fjordsat Operations' });
  });

  it('takes a part and lets the rest go', async () => {
    const { stripe } = await bench();
    const held = await pay(stripe, { amount: 1000, capture_method: 'manual' });
    expect((await refusal(stripe.paymentIntents.capture(held.id, { amount_to_capture: 1001 }))).code).toBe(
      'amount_too_large',
    );
    expect((await refusal(stripe.paymentIntents.capture(held.id, { amount_to_capture: 0 }))).param).toBe(
      'amount_to_capture',
    );
    const taken = await stripe.paymentIntents.capture(held.id, { amount_to_capture: 600 });
    expect(taken).toMatchObject({ status: 'succeeded', amount: 1000, amount_received: 600 });
    const charge = await stripe.charges.retrieve(String(taken.latest_charge));
    expect(charge).toMatchObject({ amount_captured: 600, amount_refunded: 400, captured: true, refunded: false });
    const again = await refusal(stripe.paymentIntents.capture(held.id));
    expect(again).toMatchObject({ statusCode: 400, code: 'payment_intent_unexpected_state' });
  });

  it('cancels what has not been taken, and nothing else', async () => {
    const { stripe } = await bench();
    const held = await pay(stripe, { amount: 1000, capture_method: 'manual' });
    const canceled = await stripe.paymentIntents.cancel(held.id, { cancellation_reason: 'abandoned' });
    expect(canceled).toMatchObject({ status: 'canceled', amount_capturable: 0, cancellation_reason: 'abandoned' });
    for (const call of [
      stripe.paymentIntents.capture(held.id),
      stripe.paymentIntents.cancel(held.id),
      stripe.paymentIntents.confirm(held.id),
    ]) {
      expect((await refusal(call)).code).toBe('payment_intent_unexpected_state');
    }
    const paid = await pay(stripe, { amount: 1000 });
    expect((await refusal(stripe.paymentIntents.cancel(paid.id))).code).toBe('payment_intent_unexpected_state');
    expect(await stripe.balance.retrieve()).toMatchObject({ pending: [{ amount: 1000 - 40, currency: 'eur' }] });
  });

  // Seven days; 4 days 18 hours for a Visa charged without the payer: published-values section j ("Place a hold on a payment method").
  it.each([
    { card: 'pm_card_visa', offSession: false, lifeS: 7 * 86_400 },
    { card: 'pm_card_mastercard', offSession: true, lifeS: 7 * 86_400 },
    { card: 'pm_card_visa', offSession: true, lifeS: 4 * 86_400 + 18 * 3600 },
  ])('lets the hold of $card (off session: $offSession) end after $lifeS s', async ({ card, offSession, lifeS }) => {
    const { stripe, hook } = await bench();
    const held = await pay(stripe, {
      amount: 5000,
      capture_method: 'manual',
      payment_method: card,
      ...(offSession ? { off_session: true } : {}),
    });
    const charge = await stripe.charges.retrieve(String(held.latest_charge));
    expect((charge.payment_method_details?.card?.capture_before ?? 0) - charge.created).toBe(lifeS);
    await hook('clock', { advanceMs: lifeS * 1000 - 60_000 });
    expect((await stripe.paymentIntents.retrieve(held.id)).status).toBe('requires_capture');
    await hook('clock', { advanceMs: 61_000 });
    const ended = await stripe.paymentIntents.retrieve(held.id);
    expect(ended).toMatchObject({ status: 'canceled', cancellation_reason: 'automatic', amount_capturable: 0 });
    expect((await refusal(stripe.paymentIntents.capture(held.id))).code).toBe('payment_intent_unexpected_state');
    const types = (await stripe.events.list({ limit: 2 })).data.map((event) => event.type);
    expect(types).toEqual(['payment_intent.canceled', 'charge.expired']);
  });

  it('does not cancel what was captured in time', async () => {
    const { stripe, hook } = await bench();
    const held = await pay(stripe, { amount: 5000, capture_method: 'manual' });
    await stripe.paymentIntents.capture(held.id);
    await hook('clock', { advanceMs: 30 * DAY_MS });
    expect((await stripe.paymentIntents.retrieve(held.id)).status).toBe('succeeded');
  });

  it('goes step by step: without a method, with one, confirmed', async () => {
    const { stripe } = await bench();
    const intent = await stripe.paymentIntents.create({
      amount: 700,
      currency: 'USD',
      allowed_payment_method_types: ['card'],
    });
    expect(intent).toMatchObject({ status: 'requires_payment_method', currency: 'usd', payment_method: null });
    expect(intent.client_secret).toContain(`${intent.id}_secret_`);
    expect((await refusal(stripe.paymentIntents.confirm(intent.id))).code).toBe('payment_intent_unexpected_state');
    const ready = await stripe.paymentIntents.update(intent.id, {
      payment_method: 'pm_card_visa',
      amount: 800,
      metadata: { booking: '12' },
    });
    expect(ready).toMatchObject({ status: 'requires_confirmation', amount: 800, metadata: { booking: '12' } });
    expect(await stripe.paymentIntents.confirm(intent.id)).toMatchObject({ status: 'succeeded', amount_received: 800 });
    expect((await refusal(stripe.paymentIntents.update(intent.id, { amount: 900 }))).code).toBe(
      'payment_intent_unexpected_state',
    );
    expect((await stripe.paymentIntents.update(intent.id, { metadata: { booking: '' } })).metadata).toEqual({});
  });

  it.each([
    [{ amount: 0 }, 'parameter_invalid_integer'],
    [{ amount: -5 }, 'parameter_invalid_integer'],
    [{ amount: 49, currency: 'usd' }, 'amount_too_small'],
    // "Up to 8 digits": published-values section j.
    [{ amount: 100_000_000 }, 'amount_too_large'],
    [{ amount: 10.5 }, 'parameter_invalid_integer'],
    [{ amount: 1000, currency: 'xxx' }, 'parameter_invalid'],
    [{ amount: 1005, currency: 'kwd' }, 'invalid_charge_amount'],
  ])('refuses %o with %s', async (given, code) => {
    const { stripe } = await bench();
    expect(await refusal(pay(stripe, given))).toMatchObject({
      type: 'StripeInvalidRequestError',
      statusCode: 400,
      code,
    });
    expect((await stripe.paymentIntents.list()).data).toEqual([]);
  });

  // JPY has no minor unit in ISO 4217: 100 means 100 yen (published-values section j).
  it('takes amounts of currencies without minor units as they are', async () => {
    const { stripe } = await bench();
    expect(await pay(stripe, { amount: 100, currency: 'jpy' })).toMatchObject({
      amount_received: 100,
      currency: 'jpy',
    });
  });

  it('says which parameter it does not know or misses', async () => {
    const { stripe } = await bench();
    const unknown = { amount: 500, currency: 'eur', metadta: 'x' } as Stripe.PaymentIntentCreateParams;
    expect(await refusal(stripe.paymentIntents.create(unknown))).toMatchObject({
      code: 'parameter_unknown',
      param: 'metadta',
    });
    const incomplete = { amount: 500 } as Stripe.PaymentIntentCreateParams;
    expect(await refusal(stripe.paymentIntents.create(incomplete))).toMatchObject({
      code: 'parameter_missing',
      param: 'currency',
    });
    expect(await refusal(stripe.paymentIntents.retrieve('pi_nowhere'))).toMatchObject({
      statusCode: 404,
      code: 'resource_missing',
    });
    await stripe.customers.create({});
    expect((await refusal(stripe.customers.list({ expand: ['data.nothing'] }))).param).toBe('expand');
  });

  it('asks for a return address where a payment method might redirect', async () => {
    const { stripe } = await bench();
    const open = { amount: 500, currency: 'eur', payment_method: 'pm_card_visa', confirm: true };
    expect((await refusal(stripe.paymentIntents.create(open))).param).toBe('return_url');
    const paid = await stripe.paymentIntents.create({ ...open, return_url: 'http://127.0.0.1:9/back' });
    expect(paid.status).toBe('succeeded');
  });
});
