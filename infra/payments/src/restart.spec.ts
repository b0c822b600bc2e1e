import { mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { describe, expect, it, onTestFinished } from 'vitest';
import { start } from './index.js';
import { bench, pay, receiver, sdk } from './testing.js';

describe('a restart', () => {
  it('loses neither money, nor time, nor answers, nor deliveries, and no card number was written down', async () => {
    const dataDir = mkdtempSync(join(tmpdir(), 'skyberth-payments-'));
    onTestFinished(() => rmSync(dataDir, { recursive: true, force: true }));
    const target = await receiver();
    target.answers = [500];
    const webhook = { url: target.url, secret: 'whsec_harbour_test' };
    const first = await start({ dataDir, webhook, retryDelaysMs: [3_600_000] });
    await fetch(`${first.url}/_test/clock`, {
      method: 'POST',
      headers: { 'content-type': 'application/json' },
      body: '{"advanceMs":86400000}',
    });
    const before = sdk(first.url);
    const customer = await before.customers.create({ name: 'Fjordsat' }, { idempotencyKey: 'once' });
    await first.deliveriesSettled();
    const method = await before.paymentMethods.create({
      type: 'card',
      card: { number: '5555555555554444', exp_month: 1, exp_year: 2040 },
    });
    const held = await pay(before, { amount: 900, capture_method: 'manual', payment_method: method.id });
    await first.close();

    const { stripe, hook } = await bench({ dataDir, webhook });
    expect((await stripe.paymentIntents.capture(held.id)).status).toBe('succeeded');
    expect((await stripe.customers.create({ name: 'Fjordsat' }, { idempotencyKey: 'once' })).id).toBe(customer.id);
    expect((await stripe.webhookEndpoints.list()).data).toHaveLength(2);
    const created = (await stripe.events.list({ type: 'payment_intent.succeeded' })).data[0]?.created ?? 0;
    expect(created - customer.created).toBeLessThan(3600);
    await hook('clock', { advanceMs: 3_700_000 });
    const delivered = target.received.filter(
      ({ body }) => (JSON.parse(body) as { type: string }).type === 'customer.created',
    );
    expect(delivered).toHaveLength(2);
    for (const name of ['payments.sqlite', 'payments.sqlite-wal']) {
      expect(readFileSync(join(dataDir, name)).includes('5555555555554444')).toBe(false);
    }
  });
});
