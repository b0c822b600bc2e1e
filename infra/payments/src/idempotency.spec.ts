import Stripe from 'stripe';
import { describe, expect, it } from 'vitest';
import { bench, pay, refusal, sdk } from './testing.js';

// Rules from published-values section j: the payment API's documentation, "Idempotent requests".
describe('idempotency keys', () => {
  it('repeat the first answer, and say so', async () => {
    const { stripe } = await bench();
    const params = {
      amount: 900,
      currency: 'eur',
      allowed_payment_method_types: ['card'],
      metadata: { a: '1', b: '2' },
    };
    const first = await stripe.paymentIntents.create(params, { idempotencyKey: 'berth-1' });
    const turned = {
      metadata: { b: '2', a: '1' },
      currency: 'eur',
      amount: 900,
      allowed_payment_method_types: ['card'],
    };
    const second = await stripe.paymentIntents.create(turned, { idempotencyKey: 'berth-1' });
    expect(second).toEqual(first);
    const { headers } = second.lastResponse as unknown as { headers: Record<string, string> };
    expect(headers['idempotent-replayed']).toBe('true');
    expect(headers['original-request']).toBe(first.lastResponse.requestId);
    expect((await stripe.paymentIntents.list()).data).toHaveLength(1);
  });

  it('refuse another request', async () => {
    const { stripe } = await bench();
    const create = (amount: number) =>
      stripe.paymentIntents.create({ amount, currency: 'eur' }, { idempotencyKey: 'berth-2' });
    await create(900);
    expect(await refusal(create(901))).toMatchObject({
      statusCode: 400,
      type: 'StripeIdempotencyError',
      rawType: 'idempotency_error',
    });
    const elsewhere = stripe.customers.create({}, { idempotencyKey: 'berth-2' });
    expect(await refusal(elsewhere)).toBeInstanceOf(Stripe.errors.StripeIdempotencyError);
  });

  it('repeat a refusal too, and charge nothing twice', async () => {
    const { stripe } = await bench();
    const intent = await stripe.paymentIntents.create({
      amount: 900,
      currency: 'eur',
      allowed_payment_method_types: ['card'],
    });
    const confirm = () =>
      stripe.paymentIntents.confirm(
        intent.id,
        { payment_method: 'pm_card_chargeDeclined' },
        { idempotencyKey: 'berth-3' },
      );
    const [first, second] = [await refusal(confirm()), await refusal(confirm())];
    expect(second.charge).toBe(first.charge);
    expect((await stripe.charges.list()).data).toHaveLength(1);
  });

  it('are not used up by a request that could not be read', async () => {
    const { stripe } = await bench();
    const create = (amount: number) =>
      stripe.paymentIntents.create({ amount, currency: 'eur' }, { idempotencyKey: 'berth-4' });
    await refusal(create(0));
    expect((await create(900)).amount).toBe(900);
  });

  it('answer 409 while the first request is still being worked on, and are kept when the caller gives up', async () => {
    const { stripe, service } = await bench({ slowAnswerMs: 60_000 });
    const params = {
      amount: 900,
      currency: 'eur',
      payment_method: 'pm_card_slowAnswer',
      allowed_payment_method_types: ['card'],
      confirm: true,
    };
    const impatient = sdk(service.url, undefined, { timeout: 400 });
    const first = refusal(impatient.paymentIntents.create(params, { idempotencyKey: 'berth-5' }));
    await expect.poll(async () => (await stripe.charges.list()).data.length).toBe(1);
    const meanwhile = await refusal(stripe.paymentIntents.create(params, { idempotencyKey: 'berth-5' }));
    expect(meanwhile).toMatchObject({ statusCode: 409, code: 'idempotency_key_in_use' });
    expect(await first).toBeInstanceOf(Stripe.errors.StripeConnectionError);
    // The service may take a moment to notice that the line was cut, so this client tries again as the product's does.
    const patient = sdk(service.url, undefined, { maxNetworkRetries: 3 });
    const repeated = await patient.paymentIntents.create(params, { idempotencyKey: 'berth-5' });
    expect(repeated.status).toBe('succeeded');
    expect((await stripe.charges.list()).data).toHaveLength(1);
  });

  it('are forgotten after a day, and belong to one account', async () => {
    const { stripe, hook } = await bench();
    const create = () => stripe.customers.create({ name: 'Fjordsat' }, { idempotencyKey: 'berth-6' });
    const first = await create();
    await hook('clock', { advanceMs: 23 * 3_600_000 });
    expect((await create()).id).toBe(first.id);
    await hook('clock', { advanceMs: 2 * 3_600_000 });
    expect((await create()).id).not.toBe(first.id);
  });

  it('are at most 255 characters long', async () => {
    const { stripe } = await bench();
    await stripe.customers.create({}, { idempotencyKey: 'k'.repeat(255) });
    expect((await refusal(stripe.customers.create({}, { idempotencyKey: 'k'.repeat(256) }))).statusCode).toBe(400);
  });
});

describe('outages on demand', () => {
  it('can be an error of the service, which the SDK gets over by itself', async () => {
    const { service, hook } = await bench();
    await hook('faults', { mode: 'answer', match: 'POST /v1/customers', times: 1 });
    const patient = sdk(service.url, undefined, { maxNetworkRetries: 2 });
    expect((await patient.customers.create({ name: 'once' })).name).toBe('once');
    expect((await patient.customers.list()).data).toHaveLength(1);
  });

  it('can cut the line after the work is done, and the retry pays once', async () => {
    const { service, stripe, hook } = await bench();
    await hook('faults', { mode: 'cut_after', match: 'POST /v1/payment_intents', times: 1 });
    const patient = sdk(service.url, undefined, { maxNetworkRetries: 2 });
    expect((await pay(patient, { amount: 900 })).status).toBe('succeeded');
    expect((await stripe.charges.list()).data).toHaveLength(1);
  });

  it('can keep a 500 under its key, as the service does', async () => {
    const { stripe, hook } = await bench();
    await hook('faults', { mode: 'answer', match: 'POST /v1/customers', times: 1, kept: true });
    const create = () => stripe.customers.create({}, { idempotencyKey: 'berth-7' });
    expect([(await refusal(create())).statusCode, (await refusal(create())).statusCode]).toEqual([500, 500]);
  });
});

describe('keys', () => {
  it('are needed, must be right, and the publishable one opens little', async () => {
    const { service } = await bench();
    expect(await refusal(sdk(service.url, 'sk_test_wrong').balance.retrieve())).toBeInstanceOf(
      Stripe.errors.StripeAuthenticationError,
    );
    const browser = sdk(service.url, 'pk_test_skyberth_local');
    expect(await refusal(browser.balance.retrieve())).toMatchObject({ statusCode: 403, code: 'secret_key_required' });
    expect((await fetch(`${service.url}/v1/balance`)).status).toBe(401);
  });
});
