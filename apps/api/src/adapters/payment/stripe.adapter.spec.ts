import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import type { Config } from '../../platform/config.js';
import { StripeAdapter } from './stripe.adapter.js';

interface Vector {
  secret: string;
  body: string;
  cases: { name: string; nowUnix: number; header: string; accept: boolean }[];
}
const file = new URL('../../../../../tests/reference/data/money/stripe-signature-vector.json', import.meta.url);
const vector = JSON.parse(readFileSync(file, 'utf8')) as Vector;

const adapter = new StripeAdapter({
  paymentsUrl: 'http://127.0.0.1:9',
  stripeSecretKey: 'sk_test_unused',
  stripeWebhookSecret: vector.secret,
} as Config);

const verdict = (body: string, header: string, nowMs: number): string => {
  try {
    return adapter.verifyEvent(Buffer.from(body), header, nowMs).id;
  } catch (error) {
    return (error as { code?: string }).code ?? 'another error';
  }
};

/** The body of the vector has no data, so what is accepted must not be of a type that we read. */
const eventOf = (change: object) =>
  JSON.stringify({ id: 'evt_1', object: 'event', type: 'customer.created', ...change });

describe('the signature of an event', () => {
  // Scheme as published: reference/published-values.md, section j, from stripe-node Webhooks.ts; invented secret and body.
  it.each(vector.cases)('is judged as the published scheme says: $name', ({ nowUnix, header, accept }) => {
    const result = verdict(vector.body, header, nowUnix * 1000);
    if (accept) expect(result).not.toBe('bad-signature');
    else expect(result).toBe('bad-signature');
  });

  it('is refused from the future, which the library lets pass', async () => {
    const { default: Stripe } = await import('stripe');
    const signed = (timestamp: number) =>
      Stripe.webhooks.generateTestHeaderString({ payload: eventOf({}), secret: vector.secret, timestamp });
    const nowS = 1_767_225_600;
    expect(verdict(eventOf({}), signed(nowS + 30), nowS * 1000)).toBe('evt_1');
    expect(verdict(eventOf({}), signed(nowS + 120), nowS * 1000)).toBe('bad-signature');
    expect(verdict(eventOf({ id: 'evt_2' }), signed(nowS), nowS * 1000)).toBe('bad-signature');
    expect(verdict(eventOf({}), '', nowS * 1000)).toBe('bad-signature');
  });
});
