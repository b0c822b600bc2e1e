import { readFileSync } from 'node:fs';
import Stripe from 'stripe';
import { describe, expect, it } from 'vitest';
import { bench, pay, type Receiver, receiver, refusal } from './testing.js';
import { signatureHeader } from './webhooks/signature.js';

interface VectorCase {
  name: string;
  nowUnix: number;
  header: string;
  accept: boolean;
}

// Published source: the signature scheme of the SDK's own Webhooks module; digest computed independently with Python's hmac.
const VECTOR = JSON.parse(
  readFileSync(new URL('../../../tests/reference/data/money/stripe-signature-vector.json', import.meta.url), 'utf8'),
) as {
  secret: string;
  body: string;
  timestamp: number;
  header: string;
  toleranceSeconds: number;
  cases: VectorCase[];
};

const typesOf = (target: Receiver): string[] =>
  target.received.map(({ body }) => (JSON.parse(body) as Stripe.Event).type);

describe('webhook signatures', () => {
  it('match the reference vector to the letter', () => {
    expect(signatureHeader(VECTOR.secret, VECTOR.timestamp, VECTOR.body)).toBe(VECTOR.header);
  });

  it.each(VECTOR.cases)('are judged by the SDK as the vector says: $name', ({ nowUnix, header, accept }) => {
    const judge = () =>
      Stripe.webhooks.constructEvent(
        VECTOR.body,
        header,
        VECTOR.secret,
        VECTOR.toleranceSeconds,
        undefined,
        nowUnix * 1000,
      );
    if (accept) expect(judge().id).toBe('evt_lantern_0001');
    else expect(judge).toThrow(Stripe.errors.StripeSignatureVerificationError);
  });
});

describe('webhook deliveries', () => {
  it('reach the endpoint in order, signed so that the SDK accepts them', async () => {
    const { stripe, service } = await bench();
    const target = await receiver();
    const endpoint = await stripe.webhookEndpoints.create({ url: target.url, enabled_events: ['*'] });
    expect(endpoint.secret).toMatch(/^whsec_/);
    expect((await stripe.webhookEndpoints.retrieve(endpoint.id)).secret).toBeUndefined();
    const held = await pay(stripe, { amount: 900, capture_method: 'manual' });
    await stripe.paymentIntents.capture(held.id);
    await service.deliveriesSettled();
    expect(typesOf(target)).toEqual([
      'payment_intent.created',
      'charge.succeeded',
      'payment_intent.amount_capturable_updated',
      'charge.captured',
      'payment_intent.succeeded',
    ]);
    for (const { body, signature } of target.received) {
      expect(stripe.webhooks.constructEvent(body, signature, endpoint.secret ?? '').object).toBe('event');
      expect(() => stripe.webhooks.constructEvent(`${body} `, signature, endpoint.secret ?? '')).toThrow();
    }
    const last = JSON.parse(target.received.at(-1)?.body ?? '') as Stripe.PaymentIntentSucceededEvent;
    expect(last.data.object).toMatchObject({ id: held.id, status: 'succeeded', amount_received: 900 });
    expect((await stripe.events.retrieve(last.id)).pending_webhooks).toBe(0);
  });

  it('send only the event types that were asked for', async () => {
    const { stripe, service } = await bench();
    const target = await receiver();
    await stripe.webhookEndpoints.create({ url: target.url, enabled_events: ['payment_intent.succeeded'] });
    await pay(stripe, { amount: 900 });
    await service.deliveriesSettled();
    expect(typesOf(target)).toEqual(['payment_intent.succeeded']);
  });

  it('are tried again, later and later, and at last given up', async () => {
    const { stripe, service, hook } = await bench({ retryDelaysMs: [1000, 60_000] });
    const target = await receiver();
    target.answers = [500, 302, 503];
    await stripe.webhookEndpoints.create({ url: target.url, enabled_events: ['customer.created'] });
    await stripe.customers.create({});
    await service.deliveriesSettled();
    expect(target.received).toHaveLength(1);
    await hook('clock', { advanceMs: 1000 });
    expect(target.received).toHaveLength(2);
    await hook('clock', { advanceMs: 59_000 });
    expect(target.received).toHaveLength(2);
    await hook('clock', { advanceMs: 2000 });
    expect(target.received).toHaveLength(3);
    await hook('clock', { advanceMs: 86_400_000 });
    expect(target.received).toHaveLength(3);
    const [event] = (await stripe.events.list({ type: 'customer.created' })).data;
    await hook(`events/${event?.id}/resend`);
    expect(target.received).toHaveLength(4);
    expect(new Set(target.received.map(({ body }) => (JSON.parse(body) as Stripe.Event).id)).size).toBe(1);
  });

  it.each([
    ['duplicate', { times: 1 }, ['a', 'a', 'b', 'c']],
    ['drop', { times: 1 }, ['b', 'c']],
    ['delay', { times: 1, delayMs: 5000 }, ['b', 'c', 'a']],
    ['reorder', { times: 3 }, ['c', 'b', 'a']],
  ] as const)('can be made to %s', async (mode, rule, expected) => {
    const { stripe, hook } = await bench();
    const target = await receiver();
    await stripe.webhookEndpoints.create({ url: target.url, enabled_events: ['customer.created'] });
    await hook('mischief', { mode, ...rule });
    for (const name of ['a', 'b', 'c']) await stripe.customers.create({ name });
    await hook('deliveries/settle');
    await hook('clock', { advanceMs: 6000 });
    const names = target.received.map(({ body }) => (JSON.parse(body) as Stripe.CustomerCreatedEvent).data.object.name);
    expect(names).toEqual(expected);
    // Whatever became of a delivery, the event can be found: that is what a sweep for missed ones relies on.
    expect((await stripe.events.list({ type: 'customer.created' })).data).toHaveLength(3);
  });

  it('never leave this machine', async () => {
    const { stripe } = await bench();
    const away = refusal(
      stripe.webhookEndpoints.create({ url: 'https://hooks.harbour.example/in', enabled_events: ['*'] }),
    );
    expect(await away).toMatchObject({ statusCode: 400, code: 'url_invalid' });
  });

  it('use the endpoint and secret of the settings, kept over a restart', async () => {
    const target = await receiver();
    const secret = 'whsec_harbour_test';
    const { stripe, service } = await bench({ webhook: { url: target.url, secret } });
    await stripe.customers.create({});
    await service.deliveriesSettled();
    const [first] = target.received;
    expect(stripe.webhooks.constructEvent(first?.body ?? '', first?.signature ?? '', secret).type).toBe(
      'customer.created',
    );
    expect(target.received).toHaveLength(1);
  });
});
